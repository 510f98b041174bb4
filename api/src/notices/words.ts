import { DateTime } from 'luxon';

const locale = { locale: 'en-US' };

/** `2026-12-09` → "Wednesday, December 9". */
export const longDate = (date: string): string =>
  DateTime.fromISO(date, { zone: 'utc' }).toFormat('cccc, LLLL d', locale);

/** `2026-12-09` → ["Wednesday", "December 9"], for large type. */
export function dateLines(date: string): readonly [string, string] {
  const day = DateTime.fromISO(date, { zone: 'utc' });
  return [day.toFormat('cccc', locale), day.toFormat('LLLL d', locale)];
}

/** An instant as the clock of `zone` shows it, e.g. "9:00 AM". */
export const clockTime = (instant: string, zone: string): string =>
  DateTime.fromISO(instant, { zone }).toFormat('h:mm a', locale);

/** The plain date of an instant on the clock of `zone`. */
export const localDate = (instant: string, zone: string): string =>
  DateTime.fromISO(instant, { zone }).toISODate() ?? '';

/** "between 9:00 AM and 11:00 AM, Phoenix time". */
export const clockSpan = (from: string, to: string, zone: string, place: string): string =>
  `between ${clockTime(from, zone)} and ${clockTime(to, zone)}, ${place} time`;

/** An instant moved by whole minutes, as UTC ISO text. */
export const minutesLater = (instant: string, minutes: number): string =>
  DateTime.fromISO(instant, { zone: 'utc' }).plus({ minutes }).toISO() ?? instant;

/** The plain date after `date`. */
export const dayAfter = (date: string): string =>
  DateTime.fromISO(date, { zone: 'utc' }).plus({ days: 1 }).toISODate() ?? date;

/** `minute` after midnight of `date` on the clock of `zone`, as UTC ISO text; a skipped hour moves on with the clock. */
export function instantAt(date: string, minute: number, zone: string): string {
  const midnight = DateTime.fromISO(date, { zone });
  return (
    midnight
      .set({ hour: Math.floor(minute / 60), minute: minute % 60 })
      .toUTC()
      .toISO() ?? ''
  );
}

/** "1 corn snake" → "corn snake"; what is more than one animal stays as it is. */
export const withoutOne = (contents: string): string => contents.replace(/^1 ([^,]+)$/, '$1');

/** One line without control characters (line breaks forge mail headers), runs of space joined. */
export const oneLine = (text: string): string =>
  text
    // eslint-disable-next-line no-control-regex -- control characters are exactly what is taken out
    .replace(/[\u0000-\u001f\u007f-\u009f\u2028\u2029]+/g, ' ')
    .replace(/ {2,}/g, ' ')
    .trim();

/** "1 parcel", "3 parcels". */
export const count = (n: number, one: string): string => `${n} ${one}${n === 1 ? '' : 's'}`;
