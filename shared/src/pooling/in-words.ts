/** `2026-12-08` → `Tue, Dec 8`. */
export function dayName(date: string): string {
  return new Intl.DateTimeFormat('en-US', {
    weekday: 'short',
    month: 'short',
    day: 'numeric',
    timeZone: 'UTC',
  }).format(Date.parse(`${date}T00:00:00Z`));
}

/** Up to three days by name; more are hinted at. */
export const dayNames = (dates: readonly string[]): string =>
  dates.length > 3 ? `${dates.slice(0, 3).map(dayName).join('; ')} …` : dates.map(dayName).join('; ');

/** 1250 → `$12.50`. */
export const money = (cents: number): string => `$${(cents / 100).toFixed(2)}`;

/** Rounded up to a tenth, so that what is said to be lacking is enough. */
export const litres = (volume: number): string => `${Math.ceil(volume * 10 - 1e-6) / 10} L`;
