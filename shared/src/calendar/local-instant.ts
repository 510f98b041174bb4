import { DateTime } from 'luxon';
import { addDays } from './add-days';
import { startOfLocalDay } from './start-of-local-day';

/**
 * The instant (UTC epoch ms) of a local clock time. `minute` counts on the clock's face from midnight (17:00 is 1020, also
 * on a day of 23 or 25 hours); 1440 is the next midnight. A time that the spring change skips becomes the one an hour later
 * on the clock; of a time that occurs twice in the fall the earlier is taken, so that a cut-off is never thought later than it is.
 */
export function localInstant(date: string, minute: number, zone: string): number {
  const start = startOfLocalDay(date, zone);
  const end = startOfLocalDay(addDays(date, 1), zone);
  if (minute >= 1440) return end;
  if (end - start === 86_400_000) return start + minute * 60_000;
  const [year, month, day] = date.split('-').map(Number);
  const at = DateTime.fromObject(
    { year, month, day, hour: Math.floor(minute / 60), minute: minute % 60 },
    { zone },
  );
  const earlier = at.minus({ hours: 1 });
  const twice = earlier.hour === at.hour && earlier.minute === at.minute && earlier.day === at.day;
  return (twice ? earlier : at).toMillis();
}
