import { readYearlyRule, yearlyRule, type YearlyChoice } from './yearly-rule';

/** A yearly day as the editor knows it: a plain choice, and whether its observed weekday counts too. */
export interface YearlyAnswer {
  readonly choice: YearlyChoice;
  /** A day that falls on a weekend is also kept on the Friday before (Saturday) or the Monday after (Sunday). */
  readonly isObserved: boolean;
}

type Fixed = Extract<YearlyChoice, { kind: 'fixed' }>;

/** Days whose neighbor depends on a leap year; no rule of one line can say their observed weekday. */
const leapNeighbors = ['2-28', '2-29', '3-1'];
/** No leap day among them: those are left out above. */
const monthLengths = [31, 28, 31, 30, 31, 30, 31, 31, 30, 31, 30, 31];

/** Whether the observed weekday of a day can be written as rules. */
export const canBeObserved = (choice: YearlyChoice): boolean =>
  choice.kind === 'fixed' && !leapNeighbors.includes(`${choice.month}-${choice.day}`);

/**
 * The rule lines of an answer. Observed days follow 5 U.S.C. 6103(b) (Saturday: the Friday before) and Executive Order
 * 11582 (Sunday: the Monday after).
 */
export function yearlyRules({ choice, isObserved }: YearlyAnswer): string {
  const rule = yearlyRule(choice);
  if (!isObserved || choice.kind !== 'fixed' || !canBeObserved(choice)) return rule;
  const friday = `${yearlyRule(dayBefore(choice))};BYDAY=FR`;
  const monday = `${yearlyRule(dayAfter(choice))};BYDAY=MO`;
  return [rule, friday, monday].join('\n');
}

/** The answer behind rules; null when they say something that only the written form can say. */
export function readYearlyRules(rules: string): YearlyAnswer | null {
  const lines = rules
    .split('\n')
    .map((line) => line.trim().replace(/^RRULE:/, ''))
    .filter(Boolean);
  const choice = readYearlyRule(lines[0] ?? '');
  if (!choice) return null;
  if (lines.length === 1) return { choice, isObserved: false };
  const observed = yearlyRules({ choice, isObserved: true }).split('\n');
  const isSame = observed.length === lines.length && observed.every((line) => lines.includes(line));
  return isSame ? { choice, isObserved: true } : null;
}

function dayBefore({ month, day }: Fixed): Fixed {
  if (day > 1) return { kind: 'fixed', month, day: day - 1 };
  const before = month === 1 ? 12 : month - 1;
  return { kind: 'fixed', month: before, day: monthLengths[before - 1] ?? 31 };
}

function dayAfter({ month, day }: Fixed): Fixed {
  if (day < (monthLengths[month - 1] ?? 31)) return { kind: 'fixed', month, day: day + 1 };
  return { kind: 'fixed', month: month === 12 ? 1 : month + 1, day: 1 };
}
