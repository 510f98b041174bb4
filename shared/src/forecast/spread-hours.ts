import { unreadable } from './forecast-shape';
import { hourMs } from './hours-between';
import type { OutdoorForecast } from './outdoor-forecast';
import type { TimeSpan } from './parse-valid-time';

/** A temperature that holds over a span; null where the service gave none. */
export interface SpanTemperature extends TimeSpan {
  readonly tempF: number | null;
}

/** Hours, temperatures and issue time: what the parsers read of a forecast, before zone and alerts are put to it. */
export type HourlySeries = Pick<OutdoorForecast, 'startMs' | 'tempsF' | 'issuedAt'>;

/** The service covers about eight days; a series much longer than that is not one. */
const longestHours = 24 * 30;

/**
 * Spreads merged spans over single hours: every hour that a span touches gets its value, a later span winning. Hours
 * between spans that none covers stay null. The first hour is the start of the earliest span. Throws
 * `forecast-unavailable` for no spans at all, or for more than 30 days.
 */
export function spreadHours(spans: readonly SpanTemperature[]): Pick<HourlySeries, 'startMs' | 'tempsF'> {
  if (spans.length === 0) throw unreadable('forecast', 'it holds no temperatures.');
  const startMs = floorHour(spans.reduce((least, span) => Math.min(least, span.startMs), Infinity));
  const endMs = spans.reduce((most, span) => Math.max(most, span.endMs), -Infinity);
  const count = Math.ceil((endMs - startMs) / hourMs);
  if (count > longestHours) throw unreadable('forecast', `it covers ${Math.round(count / 24)} days.`);
  const tempsF = new Array<number | null>(count).fill(null);
  for (const span of spans) {
    const from = (floorHour(span.startMs) - startMs) / hourMs;
    tempsF.fill(span.tempF, from, Math.ceil((span.endMs - startMs) / hourMs));
  }
  return { startMs, tempsF };
}

const floorHour = (ms: number): number => Math.floor(ms / hourMs) * hourMs;
