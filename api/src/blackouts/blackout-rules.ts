import { blackoutNew } from '@shared/contract';
import { ruleLines } from '@shared/calendar/blackout-dates';
import { yearlyRuleEverFalls, yearlyRuleProblem } from '@shared/calendar/yearly-rule';
import { badInput, type FieldProblem } from '@shared/errors';
import type { Deps } from '../deps';
import { inputError } from '../http/problem';
import type { BlackoutFields } from './blackouts-queries';

/**
 * A blackout as it may be stored: consistent as a whole, its rules understood, what it names existing, and only its own
 * scope's member set. Lines of `stored` rules are not asked again whether they ever fall: one that has run out stays as it is.
 * Throws 400 field by field.
 */
export async function checkedBlackout(
  { services }: Deps,
  fields: BlackoutFields,
  today: string,
  stored: string | null = null,
): Promise<BlackoutFields> {
  const parsed = blackoutNew.safeParse(fields);
  if (!parsed.success) throw inputError(parsed.error);
  const errors: FieldProblem[] = [];
  const { scope, kind, rules, startDate } = parsed.data;
  if (kind === 'yearly') {
    const kept = new Set(ruleLines(stored));
    // Stops at the first bad line: to find out that a day never comes takes a good part of a second.
    for (const rule of ruleLines(rules)) {
      const problem =
        yearlyRuleProblem(rule, startDate) ?? (kept.has(rule) ? null : neverFalls(rule, today, startDate));
      if (problem === null) continue;
      errors.push({ path: 'rules', message: problem });
      break;
    }
  }
  const missing = (list: readonly { id: number }[], id: number | null) => !list.some((one) => one.id === id);
  if (scope === 'carrier' && missing(await services.places.carriers(), parsed.data.carrierId))
    errors.push({ path: 'carrierId', message: 'That carrier was not found.' });
  if (scope === 'counter' && missing(await services.places.counters(), parsed.data.counterId))
    errors.push({ path: 'counterId', message: 'That counter was not found.' });
  if (errors.length > 0) throw badInput(errors);
  const { data } = parsed;
  return {
    ...data,
    endDate: kind === 'date' ? null : data.endDate,
    rules: kind === 'yearly' ? rules : null,
    liftedDates: [...new Set(data.liftedDates)].sort(),
    carrierId: scope === 'carrier' ? data.carrierId : null,
    state: scope === 'state' ? data.state : null,
    counterId: scope === 'counter' ? data.counterId : null,
  };
}

const neverFalls = (rule: string, today: string, startDate: string | null): string | null =>
  yearlyRuleEverFalls(rule, today, startDate) ? null : `“${rule}” never comes in the next forty years.`;
