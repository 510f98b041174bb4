import { dayNumber } from './day-number';

/** Calendar days from `from` to `to`, negative when `to` is earlier: `daysBetween('2026-12-01', '2026-12-04')` is 3. */
export const daysBetween = (from: string, to: string): number => dayNumber(to) - dayNumber(from);
