/** A weather alert in force for a place, reduced to what a verdict needs. Instants are UTC ISO text. */
export interface WeatherAlert {
  readonly id: string;
  readonly event: string;
  readonly severity: string;
  readonly headline: string;
  readonly from: string;
  readonly to: string;
}

/**
 * What is known of the weather at one place. `tempsF[i]` is the air temperature of the hour that starts at
 * `startMs + i * 3 600 000` (UTC epoch ms, on the hour); null where the service gave none.
 */
export interface OutdoorForecast {
  readonly zone: string;
  readonly startMs: number;
  readonly tempsF: readonly (number | null)[];
  /** When the service issued it (its updateTime), UTC ISO. A verdict's age counts from here. */
  readonly issuedAt: string;
  /** When we last heard from the service about it (200 or 304), UTC ISO. */
  readonly fetchedAt: string;
  /** Null when the alerts could not be fetched: then nobody may say there is none. */
  readonly alerts: readonly WeatherAlert[] | null;
}

/** A position whose weather is asked for, with the zone its local days are counted in. */
export interface ForecastPlace {
  readonly lat: number;
  readonly lon: number;
  readonly zone: string;
}

/** One key per grid cell's worth of position (2 decimals, about 1 km): the cache's and the maps' key. */
export const placeKey = (place: { readonly lat: number; readonly lon: number }): string =>
  `${place.lat.toFixed(2)},${place.lon.toFixed(2)}`;
