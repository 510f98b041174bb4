import type { Blackout } from '../contract/blackouts';
import { datesFrom } from './dates-from';
import { daysBetween } from './days-between';
import { yearlyRuleDates } from './yearly-rule';

/** The part of a blackout that says when it holds. */
export type BlackoutSpan = Pick<Blackout, 'kind' | 'startDate' | 'endDate' | 'rules' | 'liftedDates'>;

/**
 * The dates from `from` to `to` (both ends count) that a blackout covers, in order and each once, without the lifted ones.
 * A yearly one is the union of its rules; its start and end dates, when given, bound it.
 * Example: a range Dec 24–26 with Dec 25 lifted covers Dec 24 and Dec 26. Throws RangeError for a rule that is not understood.
 */
export function blackoutDates(blackout: BlackoutSpan, from: string, to: string): string[] {
  const first = later(from, blackout.startDate);
  const end = blackout.kind === 'date' ? blackout.startDate : blackout.endDate;
  const last = end !== null && end < to ? end : to;
  if (first > last) return [];
  const lifted = new Set(blackout.liftedDates);
  return [...new Set(covered(blackout, first, last))].filter((date) => !lifted.has(date)).toSorted();
}

function covered(blackout: BlackoutSpan, first: string, last: string): string[] {
  if (blackout.kind !== 'yearly')
    return blackout.startDate === null ? [] : datesFrom(first, daysBetween(first, last) + 1);
  return ruleLines(blackout.rules).flatMap((rule) => yearlyRuleDates(rule, first, last, blackout.startDate));
}

/** The single RRULE values of a blackout's rules text. */
export const ruleLines = (rules: string | null): string[] =>
  (rules ?? '')
    .split('\n')
    .map((text) => text.trim())
    .filter((text) => text !== '');

const later = (a: string, b: string | null): string => (b !== null && b > a ? b : a);
