import { DateTime } from 'luxon';

/** A plain date for sentences: `longDate('2026-12-08')` is "Tuesday, December 8". */
export const longDate = (date: string): string =>
  DateTime.fromISO(date, { zone: 'utc' }).setLocale('en-US').toFormat('cccc, LLLL d');
