/**
 * Arithmetic on plain dates (`YYYY-MM-DD`), done at UTC noon so that no zone and no clock change can shift a day.
 */
const atNoon = (date: string): Date => new Date(`${date}T12:00:00Z`);
const asText = (instant: Date): string => instant.toISOString().slice(0, 10);

/** The date so many days later, or earlier when negative. */
export function addDays(date: string, days: number): string {
  const instant = atNoon(date);
  instant.setUTCDate(instant.getUTCDate() + days);
  return asText(instant);
}

/** The month (`YYYY-MM`) so many months later. */
export function addMonths(month: string, months: number): string {
  const instant = atNoon(`${month}-01`);
  instant.setUTCMonth(instant.getUTCMonth() + months);
  return asText(instant).slice(0, 7);
}

/** ISO weekday: 1 Monday to 7 Sunday. */
export function isoWeekday(date: string): number {
  return ((atNoon(date).getUTCDay() + 6) % 7) + 1;
}

/** The dates from one to another; both ends count. */
export function datesBetween(from: string, to: string): string[] {
  const dates: string[] = [];
  for (let date = from; date <= to; date = addDays(date, 1)) dates.push(date);
  return dates;
}

/** The Sunday on or before a date: an American week's first day. */
export function startOfWeek(date: string): string {
  return addDays(date, -(isoWeekday(date) % 7));
}

/** The last date of a month. */
export function endOfMonth(month: string): string {
  return addDays(`${addMonths(month, 1)}-01`, -1);
}

/** The plain date that an instant falls on in a zone. */
export function dateIn(zone: string, instant: Date): string {
  return new Intl.DateTimeFormat('en-CA', {
    timeZone: zone,
    year: 'numeric',
    month: '2-digit',
    day: '2-digit',
  }).format(instant);
}

/** A plain date in words by Intl options, in English as the pages are. */
export function dateText(date: string, options: Intl.DateTimeFormatOptions): string {
  return new Intl.DateTimeFormat('en-US', { ...options, timeZone: 'UTC' }).format(atNoon(date));
}

/** `Tuesday, December 8`. */
export const longDate = (date: string): string =>
  dateText(date, { weekday: 'long', month: 'long', day: 'numeric' });
/** `Tue, Dec 8`. */
export const shortDate = (date: string): string =>
  dateText(date, { weekday: 'short', month: 'short', day: 'numeric' });
/** `December 2026` of `2026-12`. */
export const monthText = (month: string): string =>
  dateText(`${month}-01`, { month: 'long', year: 'numeric' });
