import type { Box, Counter, Hub, RouteCheck, Species } from '@shared/contract';
import { addDays } from '@shared/calendar/add-days';
import { blackoutCalendar } from '@shared/calendar/blackout-calendar';
import { placeKey, type ForecastPlace } from '@shared/forecast/outdoor-forecast';
import type { Policy } from '@shared/policy/policy';
import { doorRefusal } from '@shared/parcels/door-refusal';
import { assertCommonBand } from '@shared/verdict/contents-limits';
import { calendarReachDays, type Destination, type RouteQuestion } from '@shared/verdict/day-question';
import { badInput, type FieldProblem } from '@shared/errors';
import type { Deps } from '../deps';

/** A route before its weather is known. */
export interface RouteDraft {
  readonly service: 'hold' | 'door';
  readonly contents: RouteCheck['contents'];
  readonly boxId: number;
  readonly dropOffCounterId: number;
  readonly destination:
    | { readonly counterId: number }
    | { readonly door: ForecastPlace & { name: string; city: string; state: string } };
  readonly readyFrom: string | null;
  readonly latestDate: string | null;
  readonly lastMealDate: string | null;
  readonly mornings: readonly { date: string; suits: boolean }[];
  readonly breederDaysAway: readonly { from: string; to: string }[];
}

/** What every route is judged with, read once for many routes. */
export interface DayWorld {
  readonly policy: Policy;
  readonly policyId: number | null;
  readonly counters: ReadonlyMap<number, Counter>;
  readonly species: ReadonlyMap<number, Species>;
  readonly boxes: ReadonlyMap<number, Box>;
  readonly hubByCarrier: ReadonlyMap<number, Hub>;
  readonly calendar: RouteQuestion['calendar'];
  readonly now: string;
}

/** Reads what the days from `from` on rest on, but for the weather. */
export async function readDayWorld(deps: Deps, from: string, days: number): Promise<DayWorld> {
  const { services, clock } = deps;
  const { id, policy } = await services.policy.current();
  const [counters, species, boxes, carriers, hubs, blackouts] = [
    await services.places.counters(),
    await services.places.species(),
    await services.places.boxes(),
    await services.places.carriers(),
    await services.places.hubs(),
    await services.blackouts.all(),
  ];
  const byId = <T extends { id: number }>(list: readonly T[]) => new Map(list.map((one) => [one.id, one]));
  const hubById = byId(hubs);
  return {
    policy,
    policyId: id,
    counters: byId(counters),
    species: byId(species),
    boxes: byId(boxes),
    hubByCarrier: new Map(
      carriers.flatMap((carrier) => {
        const hub = hubById.get(carrier.hubId);
        return hub ? [[carrier.id, hub] as const] : [];
      }),
    ),
    calendar: blackoutCalendar(blackouts, addDays(from, -1), addDays(from, days + calendarReachDays)),
    now: clock.nowIso(),
  };
}

/** The places whose weather a route needs. */
export function routePlaces(
  world: DayWorld,
  draft: RouteDraft,
): { origin: ForecastPlace; hub: ForecastPlace; destination: ForecastPlace } {
  const { origin, hub, destination } = parts(world, draft);
  const place = ({ lat, lon, zone }: ForecastPlace): ForecastPlace => ({ lat, lon, zone });
  const end =
    'door' in draft.destination
      ? draft.destination.door
      : destination.kind === 'hold'
        ? destination.counter
        : origin;
  return { origin: place(origin), hub: place(hub), destination: place(end) };
}

/** The whole question of a route. Throws 400 where something does not exist or does not go together. */
export function routeQuestion(
  world: DayWorld,
  draft: RouteDraft,
  weather: Awaited<ReturnType<Deps['services']['forecasts']['forPlaces']>>,
): RouteQuestion {
  const { origin, hub, destination, box, contents } = parts(world, draft);
  const places = routePlaces(world, draft);
  const of = (place: ForecastPlace) => weather.get(placeKey(place)) ?? null;
  return {
    now: world.now,
    service: draft.service,
    contents,
    box,
    origin,
    hub,
    destination,
    readyFrom: draft.readyFrom,
    latestDate: draft.latestDate,
    lastMealDate: draft.lastMealDate,
    mornings: draft.mornings,
    breederDaysAway: draft.breederDaysAway,
    calendar: world.calendar,
    policy: world.policy,
    weather: { origin: of(places.origin), hub: of(places.hub), destination: of(places.destination) },
  };
}

function parts(world: DayWorld, draft: RouteDraft) {
  const errors: FieldProblem[] = [];
  const need = <T>(value: T | undefined, path: string, message: string): T | undefined => {
    if (value === undefined) errors.push({ path, message });
    return value;
  };
  const origin = need(
    world.counters.get(draft.dropOffCounterId),
    'dropOffCounterId',
    'That counter was not found.',
  );
  const box = need(world.boxes.get(draft.boxId), 'boxId', 'That box was not found.');
  const contents = draft.contents.flatMap((line, index) => {
    const species = need(
      world.species.get(line.speciesId),
      `contents.${index}.speciesId`,
      'That species was not found.',
    );
    return species ? [{ species, quantity: line.quantity, massG: line.massG }] : [];
  });
  const destination = destinationOf(world, draft);
  if (!destination) errors.push({ path: 'destination.counterId', message: 'That counter holds no parcels.' });
  const atDoor = doorRefusal(
    draft.service,
    contents.flatMap(({ species }) => world.species.get(species.id) ?? []),
  );
  if (atDoor) errors.push({ path: 'service', message: atDoor });
  const hub = origin ? world.hubByCarrier.get(origin.carrierId) : undefined;
  if (errors.length > 0 || !origin || !box || !destination || !hub) throw badInput(errors);
  assertCommonBand(contents);
  return { origin, box, contents, destination, hub };
}

function destinationOf(world: DayWorld, draft: RouteDraft): Destination | null {
  if ('door' in draft.destination) return { kind: 'door', door: draft.destination.door };
  const counter = world.counters.get(draft.destination.counterId);
  return counter?.canHold ? { kind: 'hold', counter } : null;
}
