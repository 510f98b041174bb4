import type { ForecastPlace, OutdoorForecast } from '@shared/forecast/outdoor-forecast';
import type { Deps } from '../deps';

export interface ForecastStatus {
  readonly place: string;
  readonly issuedAt: string | null;
  readonly fetchedAt: string | null;
  readonly problem: string | null;
}

export interface ForecastsService {
  /**
   * What is known of each place, keyed by `placeKey`. Answers from the cache; a place whose answer is older than
   * `maxAgeMinutes` (default 60) or missing is fetched first, for at most `waitMs` (default 8000), after which the last known
   * answer stands. A place that never had an answer is missing from the map. Never throws for the service's sake.
   */
  forPlaces(
    places: readonly ForecastPlace[],
    options?: { maxAgeMinutes?: number; waitMs?: number },
  ): Promise<ReadonlyMap<string, OutdoorForecast>>;
  /** One line a cached place, for health and the admin's desk. */
  status(): Promise<ForecastStatus[]>;
}

export function createForecastsService(deps: Deps): ForecastsService {
  throw new Error(`not built yet ${deps.config.PORT}`);
}
