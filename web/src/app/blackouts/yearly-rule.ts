/** The yearly days that can be built from plain choices. Weekdays are ISO: 1 Monday to 7 Sunday. */
export type YearlyChoice =
  | { readonly kind: 'fixed'; readonly month: number; readonly day: number }
  | { readonly kind: 'nth'; readonly month: number; readonly weekday: number; readonly nth: Nth };
/** 1 to 4, or -1 for the last of the month. */
export type Nth = 1 | 2 | 3 | 4 | -1;

export const monthNames: readonly string[] = [
  'January',
  'February',
  'March',
  'April',
  'May',
  'June',
  'July',
  'August',
  'September',
  'October',
  'November',
  'December',
];
export const weekdayNames: readonly string[] = [
  'Monday',
  'Tuesday',
  'Wednesday',
  'Thursday',
  'Friday',
  'Saturday',
  'Sunday',
];
export const nthNames: ReadonlyMap<Nth, string> = new Map([
  [1, '1st'],
  [2, '2nd'],
  [3, '3rd'],
  [4, '4th'],
  [-1, 'last'],
]);
/** RFC 5545, 3.3.10. */
const weekdayCodes = ['MO', 'TU', 'WE', 'TH', 'FR', 'SA', 'SU'] as const;
const longest = [31, 29, 31, 30, 31, 30, 31, 31, 30, 31, 30, 31];

/** The RFC 5545 rule of a choice, e.g. `FREQ=YEARLY;BYMONTH=11;BYDAY=4TH` for the 4th Thursday of November. */
export function yearlyRule(choice: YearlyChoice): string {
  const month = `FREQ=YEARLY;BYMONTH=${choice.month}`;
  if (choice.kind === 'fixed') return `${month};BYMONTHDAY=${choice.day}`;
  return `${month};BYDAY=${choice.nth}${weekdayCodes[choice.weekday - 1] ?? 'MO'}`;
}

/** Whether the month ever has that day; 29 February counts, it comes in leap years. */
export function dayExists(month: number, day: number): boolean {
  return day >= 1 && day <= (longest[month - 1] ?? 0);
}

/** The choice behind a rule; null for several lines or parts that the plain choices do not know. */
export function readYearlyRule(rules: string): YearlyChoice | null {
  const lines = ruleLines(rules);
  const only = lines[0];
  if (lines.length !== 1 || only === undefined) return null;
  const parts = new Map(only.split(';').map((part) => part.split('=', 2) as [string, string]));
  const month = Number(parts.get('BYMONTH'));
  if (parts.get('FREQ') !== 'YEARLY' || parts.size !== 3 || !Number.isInteger(month)) return null;
  const day = Number(parts.get('BYMONTHDAY'));
  if (parts.has('BYMONTHDAY')) return dayExists(month, day) ? { kind: 'fixed', month, day } : null;
  return readNth(month, parts.get('BYDAY') ?? '');
}

function readNth(month: number, text: string): YearlyChoice | null {
  const match = /^\+?(-?\d)([A-Z]{2})$/.exec(text);
  if (!match) return null;
  const nth = Number(match[1]) as Nth;
  const weekday = weekdayCodes.indexOf(match[2] as (typeof weekdayCodes)[number]) + 1;
  return nthNames.has(nth) && weekday > 0 && month >= 1 && month <= 12
    ? { kind: 'nth', month, weekday, nth }
    : null;
}

const ruleLines = (rules: string): string[] =>
  rules
    .split('\n')
    .map((line) => line.trim().replace(/^RRULE:/, ''))
    .filter(Boolean);

/** A choice in words: "Every July 4", "4th Thursday of November". */
export function yearlyText(choice: YearlyChoice): string {
  const month = monthNames[choice.month - 1] ?? '';
  if (choice.kind === 'fixed') return `Every ${month} ${choice.day}`;
  const weekday = weekdayNames[choice.weekday - 1] ?? '';
  const nth = nthNames.get(choice.nth) ?? '';
  return `${nth[0]?.toUpperCase() ?? ''}${nth.slice(1)} ${weekday} of ${month}`;
}

/**
 * A blackout's rules in words. Several lines that share one month are a holiday with its observed days (5 U.S.C. 6103):
 * the first is told, the others are summed up.
 */
export function rulesText(rules: string): string {
  const lines = ruleLines(rules);
  const first = readYearlyRule(lines[0] ?? '');
  if (!first) return 'By a written yearly rule';
  const text = yearlyText(first);
  return lines.length > 1 ? `${text}, and the weekday it is observed on` : text;
}
