import type { Blackout } from '../contract/blackouts';
import { blackoutDates, type BlackoutSpan } from './blackout-dates';

/** What a blackout has to tell for a day's verdict; a stored one, or one that is only being considered. */
export type BlackoutRule = BlackoutSpan &
  Pick<Blackout, 'title' | 'scope' | 'carrierId' | 'state' | 'counterId'>;

/** The blackouts by date over a window (both ends count). */
export interface BlackoutCalendar<B extends BlackoutRule = BlackoutRule> {
  readonly from: string;
  readonly to: string;
  readonly byDate: ReadonlyMap<string, readonly B[]>;
}

/** Expands blackouts once over a window, for many look-ups. */
export function blackoutCalendar<B extends BlackoutRule>(
  blackouts: readonly B[],
  from: string,
  to: string,
): BlackoutCalendar<B> {
  const byDate = new Map<string, B[]>();
  for (const blackout of blackouts)
    for (const date of blackoutDates(blackout, from, to)) {
      const there = byDate.get(date);
      if (there) there.push(blackout);
      else byDate.set(date, [blackout]);
    }
  return { from, to, byDate };
}

/**
 * The blackouts on a date. Throws RangeError outside the calendar's window: a date nobody has expanded must not pass for free.
 */
export function blackoutsOn<B extends BlackoutRule>(
  calendar: BlackoutCalendar<B>,
  date: string,
): readonly B[] {
  if (date < calendar.from || date > calendar.to)
    throw new RangeError(`${date} is outside the blackout calendar ${calendar.from} to ${calendar.to}.`);
  return calendar.byDate.get(date) ?? [];
}
