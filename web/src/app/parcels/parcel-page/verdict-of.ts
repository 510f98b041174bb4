import { verdicts, type DayVerdict, type Problem } from '@shared/contract';

/** The present verdict that a refused booking carries along (409); null when the problem has none. */
export function verdictOf(problem: Problem): DayVerdict | null {
  const { current } = problem;
  return isDayVerdict(current) ? current : null;
}

/** The days with one of them as it stands now; its run stays, which a single verdict does not tell. */
export function withVerdict(days: readonly DayVerdict[], current: DayVerdict | null): DayVerdict[] {
  return days.map((day) => (day.date === current?.date ? { ...current, run: current.run ?? day.run } : day));
}

function isDayVerdict(value: unknown): value is DayVerdict {
  if (typeof value !== 'object' || value === null) return false;
  const { date, verdict, reasons } = value as Partial<Record<keyof DayVerdict, unknown>>;
  return typeof date === 'string' && verdicts.some((one) => one === verdict) && Array.isArray(reasons);
}
