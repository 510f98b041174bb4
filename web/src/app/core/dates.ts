import { DateTime } from 'luxon';

export type DayStyle = 'long' | 'medium' | 'short' | 'weekday' | 'numeric';

const styles: Readonly<Record<DayStyle, Intl.DateTimeFormatOptions>> = {
  long: { weekday: 'long', month: 'long', day: 'numeric' },
  medium: { weekday: 'short', month: 'short', day: 'numeric' },
  short: { month: 'short', day: 'numeric' },
  weekday: { weekday: 'long' },
  numeric: { month: 'numeric', day: 'numeric', year: 'numeric' },
};

/** A plain date (`YYYY-MM-DD`) in words of the person's locale, e.g. `Tuesday, December 8`; the year when it is not `nowYear`. */
export function dayLabel(date: string, style: DayStyle = 'long', nowYear = DateTime.now().year): string {
  const day = DateTime.fromISO(date, { zone: 'utc' });
  if (!day.isValid) return date;
  const options =
    style !== 'weekday' && day.year !== nowYear
      ? { ...styles[style], year: 'numeric' as const }
      : styles[style];
  return day.toLocaleString(options);
}

/**
 * An instant as a clock time of a place, e.g. `9:00 AM MST`. The zone is named when the viewer's own clock shows
 * another time at that instant (or always, or never, by `zoneName`).
 */
export function clock(
  instant: string,
  zone: string,
  zoneName: 'auto' | 'always' | 'never' = 'auto',
  viewerZone = DateTime.local().zoneName,
): string {
  const there = DateTime.fromISO(instant, { zone });
  if (!there.isValid) return '';
  const differs = there.offset !== there.setZone(viewerZone).offset;
  const named = zoneName === 'always' || (zoneName === 'auto' && differs);
  return there.toLocaleString({
    hour: 'numeric',
    minute: '2-digit',
    ...(named ? { timeZoneName: 'short' } : {}),
  });
}

/** The date an instant falls on at a place, as `YYYY-MM-DD`. */
export const dateAt = (instant: string, zone: string): string =>
  DateTime.fromISO(instant, { zone }).toISODate() ?? '';

/** `Tue, Dec 8, 9:00 AM MST`. */
export const dayAndClock = (instant: string, zone: string): string =>
  `${dayLabel(dateAt(instant, zone), 'medium')}, ${clock(instant, zone)}`;

/** An age in words: `just now`, `40 min`, `5 h`, `3 days`. */
export function ageText(minutes: number): string {
  if (minutes < 2) return 'just now';
  if (minutes < 90) return `${Math.round(minutes)} min`;
  if (minutes < 48 * 60) return `${Math.round(minutes / 60)} h`;
  return `${Math.round(minutes / 1440)} days`;
}

/** Minutes after local midnight as a clock time, e.g. 990 → `4:30 PM`. */
export const minuteText = (minute: number): string =>
  DateTime.utc(2026, 1, 1).plus({ minutes: minute }).toLocaleString(DateTime.TIME_SIMPLE);
