import type { ForecastScript } from './forecast-script';
import type { Position } from './us-grid';
import { weatherAt } from './weather';

const hourMs = 3_600_000;

/** One issue of the forecast for a cell: whole °F by the hour, null where the script has a gap. */
export interface Issue {
  readonly issuedMs: number;
  readonly startMs: number;
  readonly tempsF: readonly (number | null)[];
}

/** A new forecast is issued every full hour; it starts some hours back and reaches 7.5 to 8 days ahead. */
export function issueTime(nowMs: number): { issuedMs: number; startMs: number; endMs: number } {
  const issuedMs = Math.floor(nowMs / hourMs) * hourMs;
  const block = Math.floor(issuedMs / (6 * hourMs)) * 6 * hourMs;
  return { issuedMs, startMs: block - 6 * hourMs, endMs: block + 188 * hourMs };
}

/** The temperature that the issue of `issuedMs` gives for an hour, before rounding. */
export function issuedF(
  script: ForecastScript,
  seed: number,
  place: Position,
): (atMs: number, issuedMs: number) => number {
  const weather = weatherAt(seed, place.lat, place.lon, script.seasonShiftMs);
  return (atMs, issuedMs) => {
    const tempF = script.steady ? steadyF(script.steady, place.lon, atMs) : weather.forecastF(atMs, issuedMs);
    return tempF + script.deltaF(place, atMs);
  };
}

export function issueFor(script: ForecastScript, seed: number, place: Position, nowMs: number): Issue {
  const { issuedMs, startMs, endMs } = issueTime(nowMs);
  const tempF = issuedF(script, seed, place);
  const tempsF = Array.from({ length: (endMs - startMs) / hourMs + script.furtherHours }, (_, index) => {
    const atMs = startMs + index * hourMs;
    return script.isGap(place, atMs) ? null : Math.round(tempF(atMs, issuedMs));
  });
  return { issuedMs, startMs, tempsF };
}

/** Reaches both ends on the hour: solar time is taken in whole hours. */
function steadyF({ lowF, highF }: { lowF: number; highF: number }, lon: number, atMs: number): number {
  const solarHour = Math.floor(atMs / hourMs) + Math.round(lon / 15);
  const sinceLow = (((solarHour - 6) % 24) + 24) % 24;
  const part = sinceLow <= 9 ? sinceLow / 9 : (24 - sinceLow) / 15;
  return lowF + (highF - lowF) * part;
}
