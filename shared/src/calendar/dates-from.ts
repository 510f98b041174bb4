import { dayNumber, fromDayNumber } from './day-number';

/** `count` plain dates beginning with `from`. */
export function datesFrom(from: string, count: number): string[] {
  const first = dayNumber(from);
  return Array.from({ length: Math.max(0, count) }, (_, index) => fromDayNumber(first + index));
}
