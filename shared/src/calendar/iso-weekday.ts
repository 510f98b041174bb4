import { dayNumber } from './day-number';

/** ISO weekday of a plain date, 1 = Monday to 7 = Sunday. Day 0 (1970-01-01) was a Thursday. */
export const isoWeekday = (date: string): number => ((((dayNumber(date) + 3) % 7) + 7) % 7) + 1;
