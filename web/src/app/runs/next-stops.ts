import type { Run } from '@shared/contract';
import { parcels } from './board-layout';
import { slackText } from './run-figures';

/** Where the driver goes next, with all that is needed there. */
export interface NextPlace {
  readonly title: string;
  /** Instant. */
  readonly at: string;
  readonly address: string;
  readonly geo: string;
  readonly phone: string | null;
  /** What happens there. */
  readonly text: string;
  readonly codes: readonly string[];
}

/**
 * The places of a drive in road order, the counter last. While the driver collects (a confirmed run) these are the
 * stops and the counter; once everything is aboard, the counter alone.
 */
export function nextPlaces(run: Run): NextPlace[] {
  const stops = run.state === 'confirmed' ? run.stops : [];
  const codes = (ids: readonly number[]) =>
    run.parcels.filter((parcel) => ids.includes(parcel.id)).map((parcel) => `${parcel.code} ${parcel.what}`);
  return [
    ...stops.map((stop) => ({
      title: stop.businessName ?? stop.breederName,
      at: stop.arriveAt,
      address: [stop.street, stop.city].filter(Boolean).join(', '),
      geo: geo(stop),
      phone: stop.phone,
      text: `Load ${parcels(stop.parcelIds.length)}`,
      codes: codes(stop.parcelIds),
    })),
    {
      title: run.counter.name,
      at: run.arriveAt,
      address: `${run.counter.city}, ${run.counter.state}`,
      geo: geo(run.counter),
      phone: null,
      text: `Hand over ${parcels(run.parcels.length)}, ${slackText(run.slackMinutes)}`,
      codes: [],
    },
  ];
}

/** Which place comes next by the clock: the first whose planned time has not passed yet, else the last. */
export function nextByClock(places: readonly NextPlace[], nowMs: number): number {
  const index = places.findIndex((place) => Date.parse(place.at) > nowMs);
  return index < 0 ? Math.max(0, places.length - 1) : index;
}

/** RFC 5870: whatever map the phone has opens it. */
export const geo = ({ lat, lon }: { readonly lat: number; readonly lon: number }): string =>
  `geo:${lat},${lon}`;
