/** A day of the week: ISO number (1 Monday to 7 Sunday) and names. */
export interface Weekday {
  readonly iso: number;
  readonly short: string;
  readonly long: string;
}

export const weekdays: readonly Weekday[] = [
  { iso: 1, short: 'Mon', long: 'Monday' },
  { iso: 2, short: 'Tue', long: 'Tuesday' },
  { iso: 3, short: 'Wed', long: 'Wednesday' },
  { iso: 4, short: 'Thu', long: 'Thursday' },
  { iso: 5, short: 'Fri', long: 'Friday' },
  { iso: 6, short: 'Sat', long: 'Saturday' },
  { iso: 7, short: 'Sun', long: 'Sunday' },
];

/**
 * Weekdays in words, neighbors drawn together: `Mon–Fri, Sun`; `every day` for all seven, `no day` for none.
 */
export function weekdaysText(days: readonly number[]): string {
  if (days.length === 0) return 'no day';
  if (new Set(days).size === 7) return 'every day';
  return runsOf([...new Set(days)].toSorted((a, b) => a - b))
    .map(spanText)
    .join(', ');
}

/**
 * What each weekday has (a text), neighbors with the same text drawn together: `Mon–Fri 4:30 PM, Sat 12:00 PM`.
 * Weekdays without a text are left out.
 */
export function weekText(textOf: (iso: number) => string | null): string {
  const groups: { days: number[]; text: string }[] = [];
  for (const { iso } of weekdays) {
    const text = textOf(iso);
    if (text === null) continue;
    const last = groups.at(-1);
    if (last?.text === text && last.days.at(-1) === iso - 1) last.days.push(iso);
    else groups.push({ days: [iso], text });
  }
  return groups.map(({ days, text }) => `${spanText(days)} ${text}`).join(', ');
}

function runsOf(days: readonly number[]): number[][] {
  const runs: number[][] = [];
  for (const day of days) {
    const last = runs.at(-1);
    if (last && last.at(-1) === day - 1) last.push(day);
    else runs.push([day]);
  }
  return runs;
}

function spanText(days: readonly number[]): string {
  const name = (iso: number | undefined): string => weekdays.find((day) => day.iso === iso)?.short ?? '';
  const first = name(days[0]);
  if (days.length === 1) return first;
  return days.length === 2 ? `${first}, ${name(days[1])}` : `${first}–${name(days.at(-1))}`;
}
