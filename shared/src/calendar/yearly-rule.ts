import { rrulestr } from 'rrule';
import { addDays } from './add-days';
import { dayNumber } from './day-number';

const weekday = '(MO|TU|WE|TH|FR|SA|SU)';
const month = '(0?[1-9]|1[0-2])';
const dayOfMonth = '(0?[1-9]|[12]\\d|3[01])';
const weekOfYear = '(0?[1-9]|[1-4]\\d|5[0-3])';
const dayOfYear = '(0{0,2}[1-9]|0?[1-9]\\d|[12]\\d\\d|3[0-5]\\d|36[0-6])';
/** One to `most` values, joined by commas. */
const list = (value: string, most: number) => new RegExp(`^${value}(,${value}){0,${most - 1}}$`);

/** What each part may hold: the ranges of RFC 5545 section 3.3.10, so that the library never meets a value it cannot take. */
const parts: Readonly<Record<string, RegExp>> = {
  FREQ: /^YEARLY$/,
  BYMONTH: list(month, 12),
  BYMONTHDAY: list(`[+-]?${dayOfMonth}`, 62),
  BYYEARDAY: list(`[+-]?${dayOfYear}`, 100),
  BYWEEKNO: list(`[+-]?${weekOfYear}`, 53),
  BYDAY: list(`([+-]?${weekOfYear})?${weekday}`, 14),
  BYSETPOS: list(`[+-]?${dayOfYear}`, 21),
  INTERVAL: /^[1-9]\d?$/,
  COUNT: /^[1-9]\d{0,3}$/,
  UNTIL: /^(19|20|21)\d\d(0[1-9]|1[0-2])(0[1-9]|[12]\d|3[01])(T\d{6}Z)?$/,
  WKST: new RegExp(`^${weekday}$`),
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

// Every look at a day expands the same few rules over the same few weeks, and parsing a rule costs more than judging the day.
// The dates follow from the key alone, so remembering them changes nothing but the time it takes; the size is bounded.
const remembered = new Map<string, readonly string[]>();
const most = 2000;

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
): readonly string[] {
  const key = `${rule} ${from} ${to} ${startDate ?? ''}`;
  const known = remembered.get(key);
  if (known) return known;
  const problem = yearlyRuleProblem(rule, startDate);
  if (problem) throw new RangeError(problem);
  const text = rule.trim().replace(/^RRULE:/, '');
  // Only a rule that counts has to be followed from its beginning; any other may begin with the year asked for.
  const counts = /(COUNT|INTERVAL)=/.test(text);
  const start = startDate ?? (counts ? '2000-01-01' : `${from.slice(0, 4)}-01-01`);
  const parsed = rrulestr(`RRULE:${text}`, { dtstart: utc(start) });
  // RFC 5545 lets DTSTART be the first instance; rrule only lists what the rule itself yields, which is what we want. It says a
  // day twice that two positions name.
  const found = parsed.between(utc(from), utc(to), true).map((date) => date.toISOString().slice(0, 10));
  const dates = Object.freeze([...new Set(found)]);
  if (remembered.size >= most) remembered.clear();
  remembered.set(key, dates);
  return dates;
}

/**
 * A day of the year meets each weekday again within 28 years (40 where a century's missing leap year lies between, as around
 * 2100), so a rule that stays away longer is a mistake.
 */
const lookAheadDays = 40 * 366;

/**
 * Whether a rule yields any date in the forty years after `from`; one that never does is a mistake (February 30). It must not be
 * stored: the library would look for its next date up to the year 9999 whenever a calendar is read.
 */
export function yearlyRuleEverFalls(rule: string, from: string, startDate: string | null = null): boolean {
  const first = startDate !== null && startDate > from ? startDate : from;
  return yearlyRuleDates(rule, first, addDays(first, lookAheadDays), startDate).length > 0;
}

const utc = (date: string) => new Date(dayNumber(date) * 86_400_000);
