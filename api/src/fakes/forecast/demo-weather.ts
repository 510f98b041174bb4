import { weatherAt } from './weather';

const hourMs = 3_600_000;
const dayMs = 24 * hourMs;
/** Days of the year (0 = January 1) in which Texas is too hot to ship from most afternoons: 20 April to 15 October. */
const hotFrom = 109;
const hotTo = 288;
/** 5 November, when most of the country can be reached. */
const played = 308;
const origin = { lat: 29.5337, lon: -98.4698 };
const hub = { lat: 39.7173, lon: -86.2944 };

export interface DemoWeather {
  readonly seed: number;
  readonly seasonShiftDays: number;
}

/**
 * The weather a demo circle in Texas begins with, so that there is something to ship on any date of the year: in the hot months
 * that of early November, and the first seed that leaves three of the next four Mondays to Thursdays mild enough at the drop-off
 * and the sort hub. What happens at the destinations is left to the weather. A pure function of the instant's day.
 */
export function demoWeather(nowMs: number): DemoWeather {
  const dayStartMs = Math.floor(nowMs / dayMs) * dayMs;
  const dayOfYear = (dayStartMs - Date.UTC(new Date(dayStartMs).getUTCFullYear(), 0, 1)) / dayMs;
  const seasonShiftDays = dayOfYear >= hotFrom && dayOfYear < hotTo ? played - dayOfYear : 0;
  let best = { seed: 1, kind: -1 };
  for (let seed = 1; seed <= 1500 && best.kind < 3; seed += 1) {
    const kind = kindDays(seed, seasonShiftDays * dayMs, dayStartMs);
    if (kind > best.kind) best = { seed, kind };
  }
  return { seed: best.seed, seasonShiftDays };
}

/** How many of the next four Mondays to Thursdays have a mild day and morning after, with a margin for the forecast's blur. */
function kindDays(seed: number, shiftMs: number, dayStartMs: number): number {
  const here = weatherAt(seed, origin.lat, origin.lon, shiftMs);
  const there = weatherAt(seed, hub.lat, hub.lon, shiftMs);
  let kind = 0;
  for (let ahead = 1; ahead <= 7; ahead += 1) {
    const startMs = dayStartMs + ahead * dayMs + 6 * hourMs;
    if (![1, 2, 3, 4].includes(new Date(startMs).getUTCDay())) continue;
    const hours = Array.from({ length: 48 }, (_, hour) => startMs + hour * hourMs);
    const mild = hours.every(
      (atMs) => here.trueF(atMs) > 42 && here.trueF(atMs) < 80 && there.trueF(atMs) > 33,
    );
    if (mild) kind += 1;
  }
  return kind;
}
