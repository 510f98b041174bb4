import { rrulestr } from 'rrule';
import { addDays } from './add-days';
import { dayNumber } from './day-number';

const parts: Readonly<Record<string, RegExp>> = {
  FREQ: /^YEARLY$/,
  BYMONTH: /^\d{1,2}(,\d{1,2}){0,11}$/,
  BYMONTHDAY: /^[+-]?\d{1,2}(,[+-]?\d{1,2}){0,61}$/,
  BYYEARDAY: /^[+-]?\d{1,3}(,[+-]?\d{1,3}){0,99}$/,
  BYWEEKNO: /^[+-]?\d{1,2}(,[+-]?\d{1,2}){0,52}$/,
  BYDAY: /^([+-]?\d{1,2})?(MO|TU|WE|TH|FR|SA|SU)(,([+-]?\d{1,2})?(MO|TU|WE|TH|FR|SA|SU)){0,13}$/,
  BYSETPOS: /^[+-]?\d{1,3}(,[+-]?\d{1,3}){0,20}$/,
  INTERVAL: /^[1-9]\d?$/,
  COUNT: /^[1-9]\d{0,3}$/,
  UNTIL: /^\d{8}(T\d{6}Z)?$/,
  WKST: /^(MO|TU|WE|TH|FR|SA|SU)$/,
};

/**
 * What is wrong with one RRULE value as a yearly day off, in a sentence; null when nothing is. A rule that names no day takes
 * it from `startDate`, so it needs one. Times of day (BYHOUR and the
 * like) are refused: a blackout is about days, and they would make one rule yield thousands of instants a day.
 */
export function yearlyRuleProblem(rule: string, startDate: string | null = null): string | null {
  const pairs = rule
    .trim()
    .replace(/^RRULE:/, '')
    .split(';')
    .map((text) => text.split('='));
  const names = pairs.map(([name]) => name ?? '');
  if (names[0] !== 'FREQ') return 'A rule begins with FREQ=YEARLY.';
  const twice = names.find((name, index) => names.indexOf(name) !== index);
  if (twice) return `${twice} stands twice in “${rule.trim()}”.`;
  for (const [name = '', value = ''] of pairs) {
    const allowed = parts[name];
    if (!allowed) return `${name} cannot be used in a yearly day off.`;
    if (!allowed.test(value)) return `${name}=${value} is not understood.`;
  }
  if (names.includes('COUNT') && names.includes('UNTIL')) return 'COUNT and UNTIL cannot be used together.';
  if (startDate === null && !names.some((name) => /^BY(MONTHDAY|DAY|YEARDAY|WEEKNO)$/.test(name)))
    return 'Say which day of the year it is, like BYMONTH=7;BYMONTHDAY=4.';
  return null;
}

/**
 * The dates of one RRULE value from `from` to `to` (both ends count), evaluated in UTC so that no zone can shift a date.
 * `startDate` is its DTSTART: nothing lies before it, and INTERVAL and COUNT count from it; without one they count from 2000.
 * Throws RangeError when `yearlyRuleProblem` has something to say.
 */
export function yearlyRuleDates(
  rule: string,
  from: string,
  to: string,
  startDate: string | null = null,
): string[] {
  const problem = yearlyRuleProblem(rule, startDate);
  if (problem) throw new RangeError(problem);
  const text = rule.trim().replace(/^RRULE:/, '');
  // Only a rule that counts has to be followed from its beginning; any other may begin with the year asked for.
  const counts = /(COUNT|INTERVAL)=/.test(text);
  const start = startDate ?? (counts ? '2000-01-01' : `${from.slice(0, 4)}-01-01`);
  const parsed = rrulestr(`RRULE:${text}`, { dtstart: utc(start) });
  const found: string[] = [];
  // RFC 5545 lets DTSTART be the first instance; rrule only lists what the rule itself yields, which is what we want.
  for (const date of parsed.between(utc(from), utc(to), true)) found.push(date.toISOString().slice(0, 10));
  return found;
}

/** Whether a rule yields any date in the ten years after `from`; one that never does is a mistake (February 30). */
export function yearlyRuleEverFalls(rule: string, from: string, startDate: string | null = null): boolean {
  const first = startDate !== null && startDate > from ? startDate : from;
  return yearlyRuleDates(rule, first, addDays(first, 3653), startDate).length > 0;
}

const utc = (date: string) => new Date(dayNumber(date) * 86_400_000);
