import { DateTime } from 'luxon';

/** The only source of "now" in the API. */
export interface Clock {
  nowMs(): number;
  /** UTC ISO text with milliseconds, as stored. */
  nowIso(): string;
  /** Today's plain date on the clock of `zone`. */
  today(zone: string): string;
}

/** The running clock, or one frozen at `frozenAt` (ISO instant). */
export function createClock(frozenAt?: string): Clock {
  const frozenMs = frozenAt === undefined ? null : Date.parse(frozenAt);
  const nowMs = () => frozenMs ?? Date.now();
  return {
    nowMs,
    nowIso: () => new Date(nowMs()).toISOString(),
    today: (zone) => DateTime.fromMillis(nowMs(), { zone }).toISODate() ?? '',
  };
}
