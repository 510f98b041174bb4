import type { DayVerdict, Verdict } from '@shared/contract';

const order: readonly Verdict[] = ['open', 'tight', 'far', 'shut'];

/** The day to show first: the first open one, else the first tight, else the first far one, else the first. */
export function bestDay(days: readonly Pick<DayVerdict, 'date' | 'verdict'>[]): string | null {
  return order.flatMap((verdict) => days.filter((day) => day.verdict === verdict))[0]?.date ?? null;
}
