import { DateTime } from 'luxon';

// The zone's rules never change within a run, so remembering answers changes nothing but the time it takes: a strip asks
// for the same few days over and over, and luxon has to format a date for each. The size is bounded.
const remembered = new Map<string, number>();
const most = 20_000;

/** The instant (UTC epoch ms) at which a plain date begins in an IANA zone. Throws RangeError for an unknown zone. */
export function startOfLocalDay(date: string, zone: string): number {
  const key = `${zone} ${date}`;
  const known = remembered.get(key);
  if (known !== undefined) return known;
  const start = DateTime.fromISO(date, { zone }).startOf('day').toMillis();
  if (Number.isNaN(start)) throw new RangeError(`No day ${date} in zone ${zone}.`);
  if (remembered.size >= most) remembered.clear();
  remembered.set(key, start);
  return start;
}
