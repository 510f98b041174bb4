import { DateTime } from 'luxon';
import { hourMs } from './hours-between';
import type { OutdoorForecast } from './outdoor-forecast';

/** Lowest and highest outdoor temperature of one local day, with what is missing. Hours are named by their start. */
export interface LocalDayRange {
  readonly lowF: number;
  /** Start of the first hour with the low, UTC epoch ms. */
  readonly lowAtMs: number;
  readonly highF: number;
  readonly highAtMs: number;
  /** Hours the local day has: 24, or 23 and 25 on the days the clocks change. */
  readonly hours: number;
  /** How many of them have no value: null in the answer, or outside of what it covers. */
  readonly missingHours: number;
  /** The longest run of hours without a value. A short one hides little, a long one may hide the low. */
  readonly longestGapHours: number;
}

/**
 * The range of plain date `date` (`YYYY-MM-DD`) on the clock of the forecast's own zone: every hour that starts at or
 * after local midnight and before the next one. Null when not one hour of the day has a value.
 *
 * Example: 2026-03-08 in America/Chicago has 23 hours, from 06:00Z to 05:00Z the next day.
 */
export function localDayRange(forecast: OutdoorForecast, date: string): LocalDayRange | null {
  const day = DateTime.fromISO(date, { zone: forecast.zone }).startOf('day');
  const fromMs = day.toMillis();
  const toMs = day.plus({ days: 1 }).startOf('day').toMillis();
  const firstMs = firstHourAtOrAfter(forecast.startMs, fromMs);
  let low: { f: number; atMs: number } | null = null;
  let high: { f: number; atMs: number } | null = null;
  let hours = 0;
  let missingHours = 0;
  let gap = 0;
  let longestGapHours = 0;
  for (let atMs = firstMs; atMs < toMs; atMs += hourMs) {
    const tempF = forecast.tempsF[(atMs - forecast.startMs) / hourMs] ?? null;
    hours += 1;
    gap = tempF === null ? gap + 1 : 0;
    longestGapHours = Math.max(longestGapHours, gap);
    if (tempF === null) missingHours += 1;
    else {
      if (low === null || tempF < low.f) low = { f: tempF, atMs };
      if (high === null || tempF > high.f) high = { f: tempF, atMs };
    }
  }
  if (low === null || high === null) return null;
  return {
    lowF: low.f,
    lowAtMs: low.atMs,
    highF: high.f,
    highAtMs: high.atMs,
    hours,
    missingHours,
    longestGapHours,
  };
}

/** The forecast's hours run on a grid from `startMs`; the first of them that starts in the day. */
const firstHourAtOrAfter = (startMs: number, fromMs: number): number =>
  startMs + Math.ceil((fromMs - startMs) / hourMs) * hourMs;
