import type { Parcel, Run } from '@shared/contract';
import { addDays, datesBetween, dateText, isoWeekday, startOfWeek } from '../ui/plain-dates';

export interface BoardDay {
  readonly date: string;
  readonly isPast: boolean;
  readonly runs: readonly Run[];
  /** Parcels booked on this day that no run takes yet. */
  readonly booked: readonly Parcel[];
  /** For a day without runs: what that means, in words. */
  readonly emptyText: string;
}

export interface BoardWeek {
  /** Its Sunday. */
  readonly start: string;
  readonly title: string;
  readonly days: readonly BoardDay[];
}

/** Runs that are over are told on their own pages; the board shows the work. */
const offBoard = new Set(['called-off']);
/** Runs that are still to be driven: the figures and the summary are of these. */
const toCome = new Set(['proposed', 'confirmed', 'underway']);

/** Which weeks the board shows: from a Sunday on, so many. */
export interface BoardSpan {
  readonly start: string;
  readonly count: number;
}

/** The weeks of the board. Weekend days, and past ones, show only when a run goes then or parcels are booked. */
export function boardWeeks(
  runs: readonly Run[],
  waiting: readonly Parcel[],
  today: string,
  span: BoardSpan,
): BoardWeek[] {
  return Array.from({ length: span.count }, (_, index) => {
    const start = addDays(span.start, index * 7);
    const days = datesBetween(start, addDays(start, 6))
      .map((date) => boardDay(date, runs, waiting, today))
      .filter((day) => isShown(day));
    return { start, title: weekTitle(start, today), days };
  }).filter((week) => week.days.length > 0);
}

function weekTitle(start: string, today: string): string {
  const present = startOfWeek(today);
  if (start === present) return 'This week';
  if (start === addDays(present, 7)) return 'Next week';
  return `Week of ${dateText(addDays(start, 1), { month: 'long', day: 'numeric' })}`;
}

function boardDay(date: string, runs: readonly Run[], waiting: readonly Parcel[], today: string): BoardDay {
  const dayRuns = runs
    .filter((run) => run.date === date && !offBoard.has(run.state))
    .toSorted((a, b) => a.departAt.localeCompare(b.departAt) || a.id - b.id);
  const booked = waiting.filter(
    (parcel) => parcel.shipDate === date && parcel.run === null && parcel.state !== 'on-hold',
  );
  const couldGo = waiting.filter((parcel) => isOpenFor(parcel, date)).length;
  return { date, isPast: date < today, runs: dayRuns, booked, emptyText: emptyText(booked.length, couldGo) };
}

/** Whether a parcel without a day was left open for a span that holds this one. */
function isOpenFor(parcel: Parcel, date: string): boolean {
  return (
    parcel.state === 'seeking' &&
    parcel.run === null &&
    parcel.flexible !== null &&
    parcel.flexible.from <= date &&
    date <= parcel.flexible.to
  );
}

function emptyText(booked: number, couldGo: number): string {
  if (booked > 0) return `No run yet. ${parcels(booked)} ${booked === 1 ? 'is' : 'are'} booked for this day.`;
  if (couldGo > 0) return `No run. ${parcels(couldGo)} could go if the weather allows and someone drives.`;
  return 'No run needed.';
}

function isShown(day: BoardDay): boolean {
  if (day.runs.length > 0 || day.booked.length > 0) return true;
  return !day.isPast && isoWeekday(day.date) <= 5;
}

/** Days with runs get the room; an empty one is a narrow column. For `grid-template-columns`. */
export function boardColumns(week: BoardWeek): string {
  return week.days.map((day) => (day.runs.length > 0 ? 'minmax(164px, 2fr)' : 'minmax(96px, 1fr)')).join(' ');
}

/** `1 parcel`, `3 parcels`. */
export const parcels = (count: number): string => `${count} ${count === 1 ? 'parcel' : 'parcels'}`;

/** The line under the board's title: what is placed, and which run waits for the coordinator's word. */
export function boardSummary(weeks: readonly BoardWeek[], dayName: (date: string) => string): string {
  const runs = weeks
    .flatMap((week) => week.days.flatMap((day) => day.runs))
    .filter((run) => toCome.has(run.state));
  if (runs.length === 0) return 'No run is planned yet.';
  const placed = runs.reduce((sum, run) => sum + run.parcels.length, 0);
  const next = runs.find((run) => run.state === 'proposed');
  const text = `${parcels(placed)} ${placed === 1 ? 'is' : 'are'} placed on ${runs.length} ${runs.length === 1 ? 'run' : 'runs'}.`;
  return next ? `${text} The run on ${dayName(next.date)} waits for your word.` : text;
}
