import type { Point } from './problem';

/** Mean Earth radius of IUGG (R1 = 6371.0088 km, Moritz 2000). */
const earthRadiusKm = 6371.0088;
/** The international mile, exact. */
export const kmPerMile = 1.609344;

/**
 * Speeds by how far into a leg one is, in miles an hour: streets first, then county roads, then highways. Assumptions
 * without source. Longer legs are never faster in total, and the minutes keep the triangle inequality.
 */
const speedClasses = [
  { upToMiles: 5, mph: 25 },
  { upToMiles: 20, mph: 42 },
  { upToMiles: Infinity, mph: 60 },
] as const;

/** One leg on the road: whole minutes, rounded up, so that a plan never counts on a part of a minute. */
export interface Leg {
  readonly minutes: number;
  readonly miles: number;
}

/** Great-circle distance in km by the haversine formula. */
export function haversineKm(a: Point, b: Point): number {
  const rad = Math.PI / 180;
  const h =
    Math.sin(((b.lat - a.lat) * rad) / 2) ** 2 +
    Math.cos(a.lat * rad) * Math.cos(b.lat * rad) * Math.sin(((b.lon - a.lon) * rad) / 2) ** 2;
  return 2 * earthRadiusKm * Math.asin(Math.min(1, Math.sqrt(h)));
}

/** Minutes for a leg of so many road miles, rounded up. */
export function drivingMinutes(miles: number): number {
  let minutes = 0;
  let from = 0;
  for (const { upToMiles, mph } of speedClasses) {
    if (miles <= from) break;
    minutes += ((Math.min(miles, upToMiles) - from) / mph) * 60;
    from = upToMiles;
  }
  return Math.max(0, Math.ceil(minutes - 1e-9));
}

/** The default estimate of a leg: straight line times `circuity`, speed by distance. */
export function estimateLeg(a: Point, b: Point, circuity: number): Leg {
  const miles = (haversineKm(a, b) * circuity) / kmPerMile;
  return { miles, minutes: drivingMinutes(miles) };
}
