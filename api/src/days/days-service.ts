import type * as z from 'zod';
import type { DaysAnswer, DayVerdict, Parcel, routeCheck } from '@shared/contract';
import { addDays } from '@shared/calendar/add-days';
import { AppError, badInput } from '@shared/errors';
import { ThermalError, type ThermalErrorCode } from '@shared/thermal/thermal-error';
import { contentsLimits } from '@shared/verdict/contents-limits';
import { dayVerdict, stripDays } from '@shared/verdict/day-verdict';
import type { RouteQuestion } from '@shared/verdict/day-question';
import type { Deps } from '../deps';
import type { Actor } from '../http/actor';
import { readDayWorld, routePlaces, routeQuestion, type DayWorld, type RouteDraft } from './route-question';

type RouteCheckBody = z.output<typeof routeCheck>;

export interface DaysService {
  /** Fourteen days from `from` (default: today at the drop-off counter) for a stored parcel. */
  forParcel(
    parcelId: number,
    options?: { from?: string; days?: number; trace?: boolean },
  ): Promise<DaysAnswer>;
  /** The verdicts of many parcels at once, forecasts fetched once: for pooling, blackouts and rechecks. */
  forParcels(
    parcelIds: readonly number[],
    options: { from: string; days: number },
  ): Promise<ReadonlyMap<number, DayVerdict[]>>;
  /** One day, as it stands now. `as`: the stored parcel with changes that are not saved yet. */
  forDate(parcelId: number, date: string, as?: Parcel): Promise<DayVerdict>;
  /** A question without a parcel; nothing is saved. Throws 400 field by field. */
  routeCheck(actor: Actor, body: RouteCheckBody): Promise<DaysAnswer>;
}

/** Reads what a day rests on and lets shared/verdict judge it. */
export function createDaysService(deps: Deps): DaysService {
  const { services, clock } = deps;

  const ask = async (world: DayWorld, drafts: readonly RouteDraft[]): Promise<RouteQuestion[]> => {
    const places = drafts.flatMap((draft) => Object.values(routePlaces(world, draft)));
    const weather = await services.forecasts.forPlaces(places);
    return drafts.map((draft) => routeQuestion(world, draft, weather));
  };

  const answer = async (
    world: DayWorld,
    draft: RouteDraft,
    { from, days, trace }: { from: string; days: number; trace: boolean },
  ): Promise<DaysAnswer> => {
    const [question] = await ask(world, [draft]);
    if (!question) throw new Error('One question, one answer.');
    const notches = await services.runs.notches(draft.dropOffCounterId, from, addDays(from, days - 1));
    const strip = judged(() => stripDays(question, from, days, { trace })).map((day) => {
      const run = notches.find((one) => one.date === day.date);
      return run ? { ...day, run: { id: run.id, state: run.state, roomL: run.roomL } } : day;
    });
    return { days: strip, ...about(question, strip, clock.nowMs()) };
  };

  const forParcels: DaysService['forParcels'] = async (parcelIds, { from, days }) => {
    const world = await readDayWorld(deps, from, days);
    const parcels = await services.parcels.byIds(parcelIds);
    const drafts = await Promise.all(parcels.map((parcel) => draftOf(deps, parcel)));
    const questions = await ask(world, drafts);
    return new Map(
      parcels.map((parcel, index) => [
        parcel.id,
        judged(() => stripDays(questions[index] as RouteQuestion, from, days)),
      ]),
    );
  };

  return {
    async forParcel(parcelId, options = {}) {
      const parcel = await services.parcels.get(parcelId);
      const from = options.from ?? clock.today(parcel.dropOff.zone);
      const days = options.days ?? 14;
      const world = await readDayWorld(deps, from, days);
      return answer(world, await draftOf(deps, parcel), { from, days, trace: options.trace ?? false });
    },
    forParcels,
    async forDate(parcelId, date, as) {
      const parcel = as ?? (await services.parcels.get(parcelId));
      const [question] = await ask(await readDayWorld(deps, date, 1), [await draftOf(deps, parcel)]);
      if (!question) throw new Error('One question, one answer.');
      return judged(() => dayVerdict({ ...question, shipDate: date }));
    },
    async routeCheck(actor, body) {
      const origin = await originOf(deps, actor, body);
      const from = body.from ?? clock.today(origin.zone);
      const draft = await checkDraft(deps, body, origin.id);
      const { days, trace } = body;
      return answer(await readDayWorld(deps, from, days), draft, { from, days, trace });
    },
  };
}

const fieldOf: Readonly<Partial<Record<ThermalErrorCode, string>>> = {
  'empty-band': 'contents',
  'bad-mass': 'contents',
  'bad-box': 'boxId',
};

/** Judges; what the box model cannot work with becomes a problem: 400 at its field, or 409 where no field is to blame. */
function judged<T>(judge: () => T): T {
  try {
    return judge();
  } catch (error) {
    if (!(error instanceof ThermalError)) throw error;
    const path = fieldOf[error.code];
    if (path) throw badInput([{ path, message: error.message }]);
    throw new AppError('conflict', `The days cannot be worked out: ${error.message}`);
  }
}

/** What the strip shows beside its days. */
function about(
  question: RouteQuestion,
  strip: readonly DayVerdict[],
  nowMs: number,
): Omit<DaysAnswer, 'days'> {
  const { bandLowF, bandHighF, enduranceLowF, enduranceHighF } = contentsLimits(question.contents);
  const { destination, origin, hub } = question;
  const end = destination.kind === 'hold' ? destination.counter : destination.door;
  const issued = strip.flatMap((day) => (day.forecastAt === null ? [] : [Date.parse(day.forecastAt)]));
  return {
    band: { lowF: bandLowF, highF: bandHighF },
    endurance: { lowF: enduranceLowF, highF: enduranceHighF },
    route: {
      origin: origin.name,
      hub: hub.name,
      destination: end.name,
      originZone: origin.zone,
      destinationZone: end.zone,
    },
    forecastAgeMinutes:
      issued.length > 0 ? Math.max(0, Math.round((nowMs - Math.min(...issued)) / 60_000)) : null,
  };
}

async function draftOf(deps: Deps, parcel: Parcel): Promise<RouteDraft> {
  const { services } = deps;
  const { daysAway } = await services.people.availability(parcel.breeder.id);
  const destination =
    parcel.service === 'hold' && parcel.destination.counterId !== null
      ? { counterId: parcel.destination.counterId }
      : { door: await doorOf(deps, parcel) };
  return {
    service: parcel.service,
    contents: parcel.contents,
    boxId: parcel.box.id,
    dropOffCounterId: parcel.dropOff.counterId,
    destination,
    readyFrom: parcel.readyFrom,
    latestDate: parcel.latestDate,
    lastMealDate: parcel.lastMealDate,
    mornings: parcel.mornings,
    breederDaysAway: daysAway,
  };
}

interface DoorRow {
  readonly id: number;
  readonly door_postal_code: string | null;
  readonly door_lat: number | null;
  readonly door_lon: number | null;
}

/** Where the door is: as stored, or by its ZIP when that is a change not saved yet. */
async function doorOf({ db, services }: Deps, parcel: Parcel) {
  const { name, city, state, postalCode, zone } = parcel.destination;
  const stored = await db<DoorRow>('parcels')
    .where({ id: parcel.id, door_postal_code: postalCode })
    .first('door_lat', 'door_lon');
  if (stored?.door_lat != null && stored.door_lon != null)
    return { name, city, state, zone, lat: stored.door_lat, lon: stored.door_lon };
  const zip = await services.places.postalCode(postalCode);
  if (!zip) throw badInput([{ path: 'door.postalCode', message: 'That ZIP code is not known.' }]);
  return { name, city, state, zone: zip.zone, lat: zip.lat, lon: zip.lon };
}

async function originOf(
  { services }: Deps,
  actor: Actor,
  body: RouteCheckBody,
): Promise<{ id: number; zone: string }> {
  if (body.dropOffCounterId !== undefined) {
    const counter = (await services.places.counters()).find((one) => one.id === body.dropOffCounterId);
    if (!counter?.canDropOff || !counter.active)
      throw badInput([{ path: 'dropOffCounterId', message: 'Choose a counter that takes drop-offs.' }]);
    return counter;
  }
  const { breeder } = await services.people.get(actor.id);
  const counters = await services.places.counters();
  const own =
    counters.find((one) => one.id === breeder?.dropOffCounterId) ??
    counters.find((one) => one.canDropOff && one.active);
  if (!own)
    throw badInput([{ path: 'dropOffCounterId', message: 'Choose the counter where it is dropped off.' }]);
  return own;
}

async function checkDraft(
  { services }: Deps,
  body: RouteCheckBody,
  dropOffCounterId: number,
): Promise<RouteDraft> {
  const rest = {
    service: body.service,
    contents: body.contents,
    boxId: body.boxId,
    dropOffCounterId,
    readyFrom: null,
    latestDate: null,
    lastMealDate: null,
    mornings: [],
    breederDaysAway: [],
  };
  if ('counterId' in body.destination) {
    if (body.service === 'door')
      throw badInput([{ path: 'destination', message: 'Door service needs a ZIP code.' }]);
    return { ...rest, destination: { counterId: body.destination.counterId } };
  }
  const zip = await services.places.postalCode(body.destination.postalCode);
  if (!zip) throw badInput([{ path: 'destination.postalCode', message: 'That ZIP code is not known.' }]);
  const [nearest] = zip.nearest;
  if (body.service === 'hold') {
    if (!nearest)
      throw badInput([{ path: 'destination.postalCode', message: 'No counter near there holds parcels.' }]);
    return { ...rest, destination: { counterId: nearest.counterId } };
  }
  return {
    ...rest,
    destination: {
      door: {
        name: `the door in ${zip.city}`,
        city: zip.city,
        state: zip.state,
        zone: zip.zone,
        lat: zip.lat,
        lon: zip.lon,
      },
    },
  };
}
