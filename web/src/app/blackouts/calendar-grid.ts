import type { Blackout, BlackoutList } from '@shared/contract';
import { addDays, addMonths, datesBetween, endOfMonth, startOfWeek } from '../ui/plain-dates';

/** One blackout on one day of a week; it is drawn as a bar that goes on in the neighboring cells. */
export interface CalendarBar {
  readonly blackout: Blackout;
  /** Row of the bar inside its week, 0 on top; the same in all cells of the week. */
  readonly lane: number;
  readonly starts: boolean;
  readonly ends: boolean;
  /** Whether the title is written in this cell: the first of the blackout in this week of this month. */
  readonly isNamed: boolean;
  /** From this cell on, how many cells of this week the bar still takes: room for its title. */
  readonly span: number;
}

export interface CalendarDay {
  readonly date: string;
  readonly day: number;
  readonly isInMonth: boolean;
  readonly isToday: boolean;
  readonly bars: readonly CalendarBar[];
}

export interface CalendarMonth {
  readonly month: string;
  /** Full weeks, Sunday first. Days of the neighboring months carry no bars. */
  readonly weeks: readonly (readonly CalendarDay[])[];
}

/** Builds a month's weeks with the blackouts of each day as bars in lanes. */
export function calendarMonth(month: string, list: BlackoutList, today: string): CalendarMonth {
  const first = startOfWeek(`${month}-01`);
  const last = addDays(startOfWeek(endOfMonth(month)), 6);
  const covered = coveredDays(list);
  const weeks: CalendarDay[][] = [];
  for (let sunday = first; sunday <= last; sunday = addDays(sunday, 7)) {
    const dates = datesBetween(sunday, addDays(sunday, 6));
    const lanes = weekLanes(
      dates.filter((date) => date.startsWith(month)),
      covered,
    );
    weeks.push(
      dates.map((date) => ({
        date,
        day: Number(date.slice(8)),
        isInMonth: date.startsWith(month),
        isToday: date === today,
        bars: date.startsWith(month) ? barsOf(date, month, covered, lanes) : [],
      })),
    );
  }
  return { month, weeks };
}

type Covered = ReadonlyMap<string, readonly Blackout[]>;

function coveredDays(list: BlackoutList): Covered {
  const byId = new Map(list.blackouts.map((blackout) => [blackout.id, blackout]));
  const covered = new Map<string, Blackout[]>();
  for (const { date, blackoutId } of list.days) {
    const blackout = byId.get(blackoutId);
    if (blackout) covered.set(date, [...(covered.get(date) ?? []), blackout]);
  }
  return covered;
}

/** A lane for each blackout of a week, so that its bar stays on one height. Longer ones lie on top. */
function weekLanes(dates: readonly string[], covered: Covered): ReadonlyMap<number, number> {
  const lengths = new Map<number, number>();
  for (const date of dates)
    for (const { id } of covered.get(date) ?? []) lengths.set(id, (lengths.get(id) ?? 0) + 1);
  const ids = [...lengths.keys()].sort((a, b) => (lengths.get(b) ?? 0) - (lengths.get(a) ?? 0) || a - b);
  return new Map(ids.map((id, lane) => [id, lane]));
}

function barsOf(
  date: string,
  month: string,
  covered: Covered,
  lanes: ReadonlyMap<number, number>,
): CalendarBar[] {
  const isOn = (day: string, id: number): boolean =>
    (covered.get(day) ?? []).some((blackout) => blackout.id === id);
  const isSunday = startOfWeek(date) === date;
  const weekEnd = [addDays(startOfWeek(date), 6), endOfMonth(month)].sort()[0] ?? date;
  return (covered.get(date) ?? [])
    .map((blackout) => {
      const starts = !isOn(addDays(date, -1), blackout.id);
      return {
        blackout,
        lane: lanes.get(blackout.id) ?? 0,
        starts,
        ends: !isOn(addDays(date, 1), blackout.id),
        isNamed: starts || isSunday || date === `${month}-01`,
        span: datesBetween(date, weekEnd).filter((day) => isOn(day, blackout.id)).length,
      };
    })
    .sort((a, b) => a.lane - b.lane);
}

const keySteps: Readonly<Record<string, number>> = {
  ArrowLeft: -1,
  ArrowRight: 1,
  ArrowUp: -7,
  ArrowDown: 7,
};

/** The date that a key moves to from another; null for keys that mean nothing here (WAI-ARIA grid of dates). */
export function dateForKey(date: string, key: string): string | null {
  const step = keySteps[key];
  if (step !== undefined) return addDays(date, step);
  if (key === 'Home') return startOfWeek(date);
  if (key === 'End') return addDays(startOfWeek(date), 6);
  if (key === 'PageUp' || key === 'PageDown') return sameDay(date, key === 'PageUp' ? -1 : 1);
  return null;
}

/** The same day of a neighboring month, or its last day when it is shorter. */
function sameDay(date: string, months: number): string {
  const month = addMonths(date.slice(0, 7), months);
  const wanted = `${month}-${date.slice(8)}`;
  const last = endOfMonth(month);
  return wanted > last ? last : wanted;
}
