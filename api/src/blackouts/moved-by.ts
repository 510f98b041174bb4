import type { Blackout, BlackoutPreview, Counter, Parcel } from '@shared/contract';
import { addDays } from '@shared/calendar/add-days';
import { blackoutCalendar, type BlackoutRule } from '@shared/calendar/blackout-calendar';
import { dayOff, type WorkPlace } from '@shared/calendar/is-working-day';
import { counterPlace, doorPlace } from '@shared/calendar/work-place';
import { contentsText } from '@shared/parcels/contents-text';
import { longDate } from '@shared/parcels/long-date';
import type { Deps } from '../deps';

/** A parcel that would lose its day, and why in a sentence. */
export interface Moved {
  readonly parcel: Parcel;
  readonly text: string;
}

/** Parcels whose day a new calendar can still take away; what is aboard goes with its run. */
const movable = ['booked', 'packed'] as const;

/**
 * The booked and packed parcels that lose their ship day or their arrival day when the blackouts `now` become `then`. A day
 * that was off before loses nothing by staying off.
 */
export async function movedBy(
  { services, clock }: Deps,
  now: readonly Blackout[],
  then: readonly BlackoutRule[],
): Promise<Moved[]> {
  const { policy } = await services.policy.current();
  const today = clock.today(policy.circleZone);
  const parcels = (await services.parcels.inStates(movable)).filter(
    ({ shipDate }) => shipDate !== null && shipDate >= addDays(today, -1),
  );
  const dates = parcels.map(({ shipDate }) => shipDate ?? today).sort();
  const [first, last] = [dates[0], dates.at(-1)];
  if (first === undefined || last === undefined) return [];
  const calendars = {
    now: blackoutCalendar(now, first, addDays(last, 1)),
    then: blackoutCalendar(then, first, addDays(last, 1)),
  };
  const counters = new Map((await services.places.counters()).map((counter) => [counter.id, counter]));
  return parcels.flatMap((parcel) => {
    const text = loss(parcel, counters, calendars);
    return text === null ? [] : [{ parcel, text }];
  });
}

type Calendar = Parameters<typeof dayOff>[2];

function loss(
  parcel: Parcel,
  counters: ReadonlyMap<number, Counter>,
  calendars: { readonly now: Calendar; readonly then: Calendar },
): string | null {
  const { shipDate, dropOff, destination } = parcel;
  const origin = counters.get(dropOff.counterId);
  if (shipDate === null || !origin) return null;
  const arrivalDate = addDays(shipDate, 1);
  const off = (place: WorkPlace, date: string): string | null => {
    if (dayOff(place, date, calendars.now)) return null;
    const why = dayOff(place, date, calendars.then);
    return why?.why === 'blackout' ? why.title : null;
  };
  const atOrigin = off(counterPlace(origin), shipDate);
  if (atOrigin !== null) return `${longDate(shipDate)} is closed for shipping: ${atOrigin}.`;
  const hold = destination.counterId === null ? undefined : counters.get(destination.counterId);
  const atEnd = off(hold ? counterPlace(hold) : doorPlace(origin.carrierId, destination.state), arrivalDate);
  return atEnd === null
    ? null
    : `${longDate(arrivalDate)}, its arrival, is closed at ${destination.name}: ${atEnd}.`;
}

/** What the page shows before saving: the days concerned, the parcels, the runs they leave, the people who would be told. */
export async function previewOf(
  deps: Deps,
  moved: readonly Moved[],
  days: readonly string[],
): Promise<BlackoutPreview> {
  const runIds = [...new Set(moved.flatMap(({ parcel }) => (parcel.run ? [parcel.run.id] : [])))];
  const runs = await Promise.all(runIds.map((id) => deps.services.runs.get(id)));
  const people = new Map<string, { name: string; role: string }>();
  for (const { parcel } of moved) {
    people.set(`breeder ${parcel.breeder.id}`, { name: parcel.breeder.name, role: 'breeder' });
    people.set(`buyer ${parcel.buyer.id}`, { name: parcel.buyer.name, role: 'buyer' });
  }
  for (const { coordinator, state } of runs)
    if (state === 'confirmed')
      people.set(`coordinator ${coordinator.id}`, { name: coordinator.name, role: 'coordinator' });
  return {
    days: [...days],
    parcels: moved.map(({ parcel, text }) => ({
      id: parcel.id,
      code: parcel.code,
      what: contentsText(parcel.contents),
      breederName: parcel.breeder.name,
      buyerName: parcel.buyer.name,
      shipDate: parcel.shipDate ?? '',
      text,
    })),
    runs: runs.map(({ id, date, coordinator, parcels }) => ({
      id,
      date,
      coordinatorName: coordinator.name,
      parcels: parcels.length,
    })),
    people: [...people.values()],
  };
}
