import type { Blackout, BlackoutScope } from '@shared/contract';
import { blackoutDates, type BlackoutSpan } from '@shared/calendar/blackout-dates';
import { dayLabel } from '../core/dates';
import { addDays } from '../ui/plain-dates';
import { stateName } from '../ui/us-states';
import type { ScopeNames } from './blackouts-api';
import { readYearlyRules } from './observed-rule';
import { rulesText, yearlyText } from './yearly-rule';

/** The glyph of each scope; its word always stands beside it. */
export const scopeIcons: Readonly<Record<BlackoutScope, string>> = {
  everywhere: 'globe',
  carrier: 'van',
  state: 'map',
  counter: 'counter',
};

type Scoped = Pick<Blackout, 'scope' | 'carrierId' | 'state' | 'counterId'>;

/** For whom a blackout closes: `everywhere`, a carrier's name, a state, a counter. */
export function scopeText(blackout: Scoped, names: ScopeNames): string {
  if (blackout.scope === 'carrier')
    return names.carriers.find(({ id }) => id === blackout.carrierId)?.name ?? 'one carrier';
  if (blackout.scope === 'state') return stateName(blackout.state ?? '');
  if (blackout.scope === 'counter')
    return names.counters.find(({ id }) => id === blackout.counterId)?.name ?? 'one counter';
  return 'everywhere';
}

/** When it holds: `Thu, Dec 24 – Sun, Dec 27`, `Every July 4, and the weekday it is observed on`. */
export function whenText(blackout: Pick<Blackout, 'kind' | 'startDate' | 'endDate' | 'rules'>): string {
  if (blackout.kind === 'date') return dayLabel(blackout.startDate ?? '', 'medium');
  if (blackout.kind === 'range')
    return `${dayLabel(blackout.startDate ?? '', 'medium')} – ${dayLabel(blackout.endDate ?? '', 'medium')}`;
  const rules = blackout.rules ?? '';
  const answer = readYearlyRules(rules);
  return answer && !answer.isObserved ? yearlyText(answer.choice) : rulesText(rules);
}

/** Longest stretch that is looked through for the next days, in days. */
const lookAhead = 3660;

/** The next days it covers from a date on, lifted ones among them; empty while the rule is not understood. */
export function nextDays(span: BlackoutSpan, from: string, count: number): string[] {
  try {
    const years = span.kind === 'yearly' ? Math.min(lookAhead, 366 * (count + 1)) : lookAhead;
    return blackoutDates({ ...span, liftedDates: [] }, from, addDays(from, years)).slice(0, count);
  } catch (error) {
    if (error instanceof RangeError) return [];
    throw error;
  }
}

/** Whether nothing of it lies ahead. */
export const isOver = (blackout: Blackout, today: string): boolean => {
  const last = blackout.kind === 'date' ? blackout.startDate : blackout.endDate;
  return last !== null && last < today;
};

/** The rules in three groups, each by its next day: what was entered for certain days, what comes every year, what is over. */
export function ruleGroups(blackouts: readonly Blackout[], today: string): RuleGroup[] {
  const rows = blackouts
    .map((blackout) => ({ blackout, next: nextClosed(blackout, today) }))
    .toSorted(
      (a, b) =>
        (a.next ?? '9999').localeCompare(b.next ?? '9999') ||
        a.blackout.title.localeCompare(b.blackout.title),
    );
  const current = rows.filter(({ blackout }) => !isOver(blackout, today));
  const groups: RuleGroup[] = [
    { title: 'Certain days', rows: current.filter(({ blackout }) => blackout.kind !== 'yearly') },
    { title: 'Every year', rows: current.filter(({ blackout }) => blackout.kind === 'yearly') },
    { title: 'Over', rows: rows.filter(({ blackout }) => isOver(blackout, today)).toReversed() },
  ];
  return groups.filter((group) => group.rows.length > 0);
}

export interface RuleGroup {
  readonly title: string;
  readonly rows: readonly { readonly blackout: Blackout; readonly next: string | null }[];
}

const nextClosed = (blackout: Blackout, today: string): string | null =>
  nextDays(blackout, today, 8).find((date) => !blackout.liftedDates.includes(date)) ?? null;
