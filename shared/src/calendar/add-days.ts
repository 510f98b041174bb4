import { dayNumber, fromDayNumber } from './day-number';

/** The plain date `days` calendar days after `date` (before it when negative): `addDays('2026-02-28', 1)` is `2026-03-01`. */
export const addDays = (date: string, days: number): string => fromDayNumber(dayNumber(date) + days);
