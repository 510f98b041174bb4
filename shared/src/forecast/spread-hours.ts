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
 * Spreads merged spans over single hours: an hour takes the value of the span that holds its middle, of two that do the
 * later one. So spans whose ends miss the full hour by some seconds lie where they belong. Hours between spans stay
 * null. The first hour is the start of the earliest span. Throws `forecast-unavailable` for no spans at all, or for
 * more than 30 days.
 */
export function spreadHours(spans: readonly SpanTemperature[]): Pick<HourlySeries, 'startMs' | 'tempsF'> {
  if (spans.length === 0) throw unreadable('forecast', 'it holds no temperatures.');
  const startMs = nearestHour(spans.reduce((least, span) => Math.min(least, span.startMs), Infinity));
  const endMs = nearestHour(spans.reduce((most, span) => Math.max(most, span.endMs), -Infinity));
  const count = (endMs - startMs) / hourMs;
  if (count > longestHours) throw unreadable('forecast', `it covers ${Math.round(count / 24)} days.`);
  const tempsF = new Array<number | null>(count).fill(null);
  for (const span of spans) {
    const [from, to] = [span.startMs, span.endMs].map((ms) => (nearestHour(ms) - startMs) / hourMs);
    tempsF.fill(span.tempF, from, to);
  }
  return { startMs, tempsF };
}

const nearestHour = (ms: number): number => Math.round(ms / hourMs) * hourMs;
