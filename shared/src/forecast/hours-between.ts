import type { OutdoorForecast } from './outdoor-forecast';

export const hourMs = 3_600_000;

/** One hour of a forecast: its start (UTC epoch ms) and its temperature, null where none is known. */
export interface ForecastHour {
  readonly atMs: number;
  readonly tempF: number | null;
}

/**
 * The hours that touch the window from `fromMs` (counts) to `toMs` (does not), in order, each once. Hours outside of
 * what the forecast covers are there with null, so a caller sees every hour it asked about. An empty window has none.
 *
 * Example: 17:30 to 19:00 touches the hours that start at 17:00 and 18:00.
 */
export function hoursBetween(
  forecast: Pick<OutdoorForecast, 'startMs' | 'tempsF'>,
  fromMs: number,
  toMs: number,
): ForecastHour[] {
  const first = Math.floor((fromMs - forecast.startMs) / hourMs);
  const end = toMs > fromMs ? Math.ceil((toMs - forecast.startMs) / hourMs) : first;
  return Array.from({ length: end - first }, (_, index) => ({
    atMs: forecast.startMs + (first + index) * hourMs,
    tempF: forecast.tempsF[first + index] ?? null,
  }));
}
