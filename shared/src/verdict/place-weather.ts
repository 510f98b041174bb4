import { hourMs, hoursBetween } from '../forecast/hours-between';
import { localDayRange, type LocalDayRange } from '../forecast/local-day-range';
import type { OutdoorForecast } from '../forecast/outdoor-forecast';

/** Lowest and highest value of a window, with the hours (UTC epoch ms) they stand at. */
export interface Extremes {
  readonly lowF: number;
  readonly lowAtMs: number;
  readonly highF: number;
  readonly highAtMs: number;
}

/** A forecast bucketed once: each local day and window is worked out at the first question and kept. */
export interface PlaceWeather {
  readonly forecast: OutdoorForecast;
  readonly issuedMs: number;
  /** The end of the last hour that has a value; -Infinity when none has. */
  readonly coverageEndMs: number;
  /** The range of a local day; null when no hour of it has a value. */
  day(date: string): LocalDayRange | null;
  /** The extremes of the hours from `fromMs` up to `toMs`; null when none has a value. */
  window(fromMs: number, toMs: number): Extremes | null;
  /** The longest run of hours without a value from `fromMs` up to `toMs`. */
  longestGapHours(fromMs: number, toMs: number): number;
}

// A forecast is never changed, so what was bucketed for it stays true; fourteen days and many parcels share it.
const bucketed = new WeakMap<OutdoorForecast, PlaceWeather>();

/** The buckets of a forecast; the same object again for the same forecast. */
export function placeWeather(forecast: OutdoorForecast): PlaceWeather {
  const known = bucketed.get(forecast);
  if (known) return known;
  const days = new Map<string, LocalDayRange | null>();
  const windows = new Map<string, Extremes | null>();
  const gaps = new Map<string, number>();
  const weather: PlaceWeather = {
    forecast,
    issuedMs: Date.parse(forecast.issuedAt),
    coverageEndMs: coverageEnd(forecast),
    day: (date) => remember(days, date, () => localDayRange(forecast, date)),
    window: (fromMs, toMs) => remember(windows, `${fromMs} ${toMs}`, () => extremes(forecast, fromMs, toMs)),
    longestGapHours: (fromMs, toMs) =>
      remember(gaps, `${fromMs} ${toMs}`, () => longestGap(forecast, fromMs, toMs)),
  };
  bucketed.set(forecast, weather);
  return weather;
}

function remember<V>(map: Map<string, V>, key: string, make: () => V): V {
  const known = map.get(key);
  if (known !== undefined) return known;
  const made = make();
  map.set(key, made);
  return made;
}

function coverageEnd(forecast: OutdoorForecast): number {
  const last = forecast.tempsF.findLastIndex((tempF) => tempF !== null);
  return last < 0 ? -Infinity : forecast.startMs + (last + 1) * hourMs;
}

function extremes(forecast: OutdoorForecast, fromMs: number, toMs: number): Extremes | null {
  let found: Extremes | null = null;
  for (const { atMs, tempF } of hoursBetween(forecast, fromMs, toMs)) {
    if (tempF === null) continue;
    found ??= { lowF: tempF, lowAtMs: atMs, highF: tempF, highAtMs: atMs };
    if (tempF < found.lowF) found = { ...found, lowF: tempF, lowAtMs: atMs };
    if (tempF > found.highF) found = { ...found, highF: tempF, highAtMs: atMs };
  }
  return found;
}

function longestGap(forecast: OutdoorForecast, fromMs: number, toMs: number): number {
  let gap = 0;
  let longest = 0;
  for (const { tempF } of hoursBetween(forecast, fromMs, toMs)) {
    gap = tempF === null ? gap + 1 : 0;
    longest = Math.max(longest, gap);
  }
  return longest;
}
