import type { Arrival, Run, RunStop } from '@shared/contract';
import type { PlannedEvent } from './calendar-text';
import { clockTime, count, dayAfter, instantAt, minutesLater, withoutOne } from './words';

/** Boxes stand packed and sealed so many minutes before the driver comes. Assumption. */
export const packedBeforeMinutes = 15;

/** The whole run, for its coordinator; `phones` by breeder. */
export function runEvent(run: Run, phones: ReadonlyMap<number, string>, url: string): PlannedEvent {
  const stops = run.stops.map((stop) => stopLine(run, stop, phones.get(stop.breederId)));
  return {
    start: run.departAt,
    end: atLeastAMinute(run.departAt, run.arriveAt),
    zone: run.zone,
    summary: `Run to the ${run.counter.name}: ${count(run.stops.length, 'stop')}, ${count(run.parcels.length, 'parcel')}`,
    description: [
      `Leave at ${clockTime(run.departAt, run.zone)}.`,
      ...stops,
      `${clockTime(run.arriveAt, run.zone)} ${run.counter.name}: hand over before the cut-off at ${clockTime(run.cutOffAt, run.zone)}.`,
      `All times are ${run.counter.city} time.`,
    ].join('\n'),
    location: `${run.counter.name}, ${run.counter.city}, ${run.counter.state}`,
    url,
    alarmMinutes: 60,
  };
}

/** One stop in a line: time, whom, where, telephone and the parcels' codes. */
export function stopLine(run: Run, stop: RunStop, phone: string | undefined): string {
  const whom = stop.businessName ? `${stop.businessName} (${stop.breederName})` : stop.breederName;
  const where = [stop.street, stop.city].filter(Boolean).join(', ');
  const codes = run.parcels.filter((p) => stop.parcelIds.includes(p.id)).map((p) => p.code);
  return `${clockTime(stop.arriveAt, run.zone)} ${[whom, where, phone].filter(Boolean).join(', ')}: ${codes.join(', ')}`;
}

/** The collection at a breeder's own place: their parcels and their times, nobody else's. */
export function collectionEvent(run: Run, stop: RunStop, url: string): PlannedEvent {
  const own = run.parcels.filter((parcel) => parcel.breederId === stop.breederId);
  return {
    start: stop.arriveAt,
    end: atLeastAMinute(stop.arriveAt, stop.leaveAt),
    zone: run.zone,
    summary: `Collection of ${own.length === 1 ? 'your parcel' : `your ${own.length} parcels`}`,
    description: [
      `${run.coordinator.name} collects at ${clockTime(stop.arriveAt, run.zone)} (${run.counter.city} time).`,
      `Have the boxes packed and sealed ${packedBeforeMinutes} min before: ${packedBy(run, stop)}.`,
      ...own.map((parcel) => `${parcel.code}: ${parcel.what} to ${parcel.destination}`),
    ].join('\n'),
    location: [stop.street, stop.city].filter(Boolean).join(', '),
    url,
    alarmMinutes: 60,
  };
}

/** "by 9:25 AM": when the boxes of a stop should stand ready. */
export const packedBy = (run: Run, stop: RunStop): string =>
  `by ${clockTime(minutesLater(stop.arriveAt, -packedBeforeMinutes), run.zone)}`;

export interface CollectionWindow {
  readonly date: string;
  readonly from: string;
  readonly to: string;
}

/**
 * When the buyer can have the animal. Where the arrival names no minutes, the design's defaults stand (assumptions):
 * held from 09:00 for two hours, at the door from 06:30 to 12:00, on the clock of the place.
 */
export function collectionWindow(arrival: Arrival, shipDate: string | null): CollectionWindow | null {
  const date = arrival.arrivalDate ?? (shipDate === null ? null : dayAfter(shipDate));
  if (date === null) return null;
  const [first, last] = arrival.service === 'hold' ? [540, 660] : [390, 720];
  const from = arrival.collectFrom ?? instantAt(date, first, arrival.place.zone);
  return { date, from, to: arrival.collectBy ?? instantAt(date, last, arrival.place.zone) };
}

/** The arrival, for the buyer, on the clock of the counter (or door). */
export function arrivalEvent(arrival: Arrival, window: CollectionWindow, url: string): PlannedEvent {
  const { place } = arrival;
  const hold = arrival.service === 'hold';
  const first = hold
    ? `Collect it at the ${place.name} between ${clockTime(window.from, place.zone)} and ${clockTime(window.to, place.zone)} (${place.city} time).`
    : `It comes to your door before ${clockTime(window.to, place.zone)} (${place.city} time); please be there.`;
  return {
    start: window.from,
    end: atLeastAMinute(window.from, window.to),
    zone: place.zone,
    summary: hold
      ? `Collect your ${withoutOne(arrival.what)}`
      : `Be at your door: ${withoutOne(arrival.what)}`,
    description: [
      first,
      `Parcel ${arrival.code} from ${arrival.breederName}.`,
      ...(arrival.bring.length > 0
        ? [[hold ? 'Bring:' : 'Have ready:', ...arrival.bring.map((thing) => `- ${thing}`)].join('\n')]
        : []),
      `Your page: ${url}`,
    ].join('\n'),
    location: `${place.name}, ${place.street}, ${place.city}, ${place.state} ${place.postalCode}`,
    url,
    alarmMinutes: 60,
  };
}

/** DTEND must lie after DTSTART (RFC 5545 3.8.2.2). */
function atLeastAMinute(start: string, end: string): string {
  const earliest = minutesLater(start, 1);
  return Date.parse(end) >= Date.parse(earliest) ? end : earliest;
}
