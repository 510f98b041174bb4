import { climateAt, monthly, winterness, type Climate } from './climate';
import { smoothNoise } from './smooth-noise';

const dayMs = 86_400_000;
/** Fronts cross about ten degrees of longitude a day from west to east, some 550 miles at 40° north. */
const eastwardDegreesPerDay = 10;
/** No place with people in the US lies outside of this in any ordinary year; the sums below are cut there. */
const coldestF = -44;
const hottestF = 124;

/** The invented weather of one position: everything else is derived from it. */
export interface PointWeather {
  readonly climate: Climate;
  /** What the air will really do, °F. */
  readonly trueF: (atMs: number) => number;
  /** What an issue says of it: the same, blurred more the further ahead. Past hours are as they were. */
  readonly forecastF: (atMs: number, issuedMs: number) => number;
  /** The front's state, about a standard normal number: −2 is a deep cold spell. */
  readonly frontAt: (atMs: number) => number;
  /** Wetness in −1..1; above about 0.6 it rains or snows much. */
  readonly wetnessAt: (atMs: number) => number;
}

/**
 * Weather for a seed and position. Normals of the place and season, a day's curve in local solar time, and fronts:
 * smooth seeded noise in space and time that travels east, three to seven days from cold to cold, strongest inland and
 * in winter. A pure function of seed, position and hour; `seasonShiftMs` takes the normals of another time of the year.
 */
export function weatherAt(seed: number, lat: number, lon: number, seasonShiftMs = 0): PointWeather {
  const climate = climateAt(lat, lon);
  const frontAt = (atMs: number) => front(seed, lat, lon, atMs);
  const wetnessAt = (atMs: number) => {
    const days = atMs / dayMs;
    return 1.5 * smoothNoise(seed + 77, (lon - eastwardDegreesPerDay * days) / 7, lat / 5, days / 2);
  };
  const trueF = (atMs: number) => {
    const winter = winterness(atMs + seasonShiftMs);
    const swing = winter * climate.winterSwingF + (1 - winter) * climate.summerSwingF;
    return clamp(
      seasonF(climate, lon, atMs, 1 - 0.25 * wetnessAt(atMs), seasonShiftMs) + swing * frontAt(atMs),
    );
  };
  const forecastF = (atMs: number, issuedMs: number) =>
    clamp(trueF(atMs) + leadErrorF(seed, lat, lon, atMs, issuedMs) * (climate.winterSwingF / 9));
  return { climate, trueF, forecastF, frontAt, wetnessAt };
}

const clamp = (tempF: number) => Math.max(coldestF, Math.min(hottestF, tempF));

/** The day's curve between the normal low (06:00) and high (15:00 solar time); clouds flatten it by `openness`. */
function seasonF(
  climate: Climate,
  lon: number,
  atMs: number,
  openness: number,
  seasonShiftMs: number,
): number {
  const high = monthly(climate.highsF, atMs + seasonShiftMs);
  const low = monthly(climate.lowsF, atMs + seasonShiftMs);
  const solarHour = (((atMs / 3_600_000 + lon / 15) % 24) + 24) % 24;
  const sinceLow = (solarHour - 6 + 24) % 24;
  const rising = sinceLow <= 9;
  const curve = rising
    ? (1 - Math.cos((Math.PI * sinceLow) / 9)) / 2
    : (1 + Math.cos((Math.PI * (sinceLow - 9)) / 15)) / 2;
  const range = (high - low) * Math.min(1.15, Math.max(0.65, openness));
  return (high + low) / 2 + range * (curve - 0.5);
}

function front(seed: number, lat: number, lon: number, atMs: number): number {
  const days = atMs / dayMs;
  // Fronts lean: further north they are further east.
  const along = lon - 0.4 * lat - eastwardDegreesPerDay * days;
  const broad = smoothNoise(seed + 11, along / 22, lat / 16, days / 5);
  const narrow = smoothNoise(seed + 23, along / 12, lat / 9, days / 3);
  // The sum has a standard deviation of about 0.3; the curve keeps it within ±2.6.
  return 2.6 * Math.tanh((3.5 * (0.75 * broad + 0.55 * narrow)) / 2.6);
}

/**
 * What an issue gets wrong, °F: nothing now, a standard deviation of about 2 a day ahead and 5 a week ahead. It changes
 * smoothly with the issue time, so that successive issues differ a little.
 */
function leadErrorF(seed: number, lat: number, lon: number, atMs: number, issuedMs: number): number {
  const leadDays = (atMs - issuedMs) / dayMs;
  if (leadDays <= 0) return 0;
  const size = 2 * Math.min(1, leadDays) + 0.5 * Math.max(0, leadDays - 1);
  return (
    size *
    2.5 *
    smoothNoise(
      seed + 41 + Math.round(lat / 4) * 7 + Math.round(lon / 6),
      atMs / dayMs,
      0.37,
      (issuedMs / dayMs) * 1.5,
    )
  );
}
