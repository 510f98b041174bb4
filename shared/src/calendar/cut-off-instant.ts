import { isoWeekday } from './iso-weekday';
import { localInstant } from './local-instant';

interface CutOffs {
  readonly zone: string;
  readonly cutOffMinutes: Readonly<Partial<Record<string, number>>>;
}

/**
 * The latest hand-over at a counter on a plain date, as UTC epoch ms; null when that weekday has none.
 * Example: 17:00 (1020) in Phoenix on 2026-07-06 is 2026-07-07T00:00:00Z.
 */
export function cutOffInstant(counter: CutOffs, date: string): number | null {
  const minute = counter.cutOffMinutes[String(isoWeekday(date))];
  return minute === undefined ? null : localInstant(date, minute, counter.zone);
}
