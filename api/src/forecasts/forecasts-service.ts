import {
  placeKey,
  type ForecastPlace,
  type OutdoorForecast,
  type WeatherAlert,
} from '@shared/forecast/outdoor-forecast';
import type { Deps } from '../deps';
import { forecastCache, type ForecastCache } from './forecast-cache';
import { listStates, readForecasts, writeForecast, type CacheState } from './forecast-queries';
import { refreshPlace } from './refresh-place';

export interface ForecastStatus {
  readonly placeKey: string;
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
   * Inside a transaction only the cache is read.
   */
  forPlaces(
    places: readonly ForecastPlace[],
    options?: { maxAgeMinutes?: number; waitMs?: number },
  ): Promise<ReadonlyMap<string, OutdoorForecast>>;
  /** One line a cached place, for health and the admin's desk. */
  status(): Promise<ForecastStatus[]>;
}

const minuteMs = 60_000;
/** After a failure a place is left alone for this long. */
const restMs = 2 * minuteMs;
/** An empty list of alerts says so long that there are none; known alerts hold till their end. An assumption. */
const noAlertsMs = 3 * 60 * minuteMs;

/** Keeps forecasts and alerts in the database with their age, and fetches what has grown old. */
export function createForecastsService(deps: Deps): ForecastsService {
  const { db, clock, log } = deps;
  const cache = forecastCache(deps.config);
  return {
    async forPlaces(places, { maxAgeMinutes = 60, waitMs = 8000 } = {}) {
      const wanted = new Map(places.map((place) => [placeKey(place), place]));
      let states = await statesOf([...wanted.keys()]);
      // A transaction must not wait for the network, nor for a write on the one connection that it holds.
      if (!db.isTransaction) {
        const stale = [...wanted].filter(([key]) => isStale(states.get(key), maxAgeMinutes * minuteMs));
        if (stale.length > 0) {
          await settledWithin(
            waitMs,
            stale.map(([key, place]) => refresh(key, place, states.get(key))),
          );
          states = await statesOf([...wanted.keys()]);
        }
      }
      return assemble(wanted, states);
    },
    async status() {
      const [states, names] = await Promise.all([listStates(db), placeNames(deps)]);
      return states.map(({ placeKey: key, issuedAt, fetchedAt, problem }) => ({
        placeKey: key,
        place: names.get(key) ?? key,
        issuedAt,
        fetchedAt,
        problem,
      }));
    },
  };

  async function statesOf(keys: readonly string[]): Promise<Map<string, CacheState>> {
    if (keys.length === 0) return new Map();
    return new Map((await listStates(db, keys)).map((state) => [state.placeKey, state]));
  }

  function isStale(state: CacheState | undefined, maxAgeMs: number): boolean {
    if (!state) return true;
    if (state.problem !== null && state.triedAt !== null && !isOlder(state.triedAt, restMs)) return false;
    return [state.fetchedAt, state.alertsFetchedAt].some((at) => at === null || isOlder(at, maxAgeMs));
  }

  /** Also true for an instant well in the future, which a frozen clock may have left behind. */
  function isOlder(at: string, ageMs: number): boolean {
    const age = clock.nowMs() - Date.parse(at);
    return age >= ageMs || age < -5 * minuteMs;
  }

  /** One refresh a place at a time: whoever comes meanwhile waits for the same one. */
  function refresh(key: string, place: ForecastPlace, state: CacheState | undefined): Promise<void> {
    const running = cache.running.get(key);
    if (running) return running;
    const started = (async () => {
      try {
        const change = await refreshPlace(cache.client, clock, place, state);
        if (change.problem) log.warn({ place: key, problem: change.problem }, 'forecast not refreshed');
        await writeForecast(db, key, place, change);
        // A frozen clock gives two answers the same times.
        cache.parsed.delete(key);
      } catch (error) {
        log.error({ err: error, place: key }, 'forecast refresh failed');
      } finally {
        cache.running.delete(key);
      }
    })();
    cache.running.set(key, started);
    return started;
  }

  async function assemble(
    wanted: ReadonlyMap<string, ForecastPlace>,
    states: ReadonlyMap<string, CacheState>,
  ): Promise<Map<string, OutdoorForecast>> {
    await readInto(cache, [...states.values()]);
    const result = new Map<string, OutdoorForecast>();
    for (const [key, place] of wanted) {
      const state = states.get(key);
      const known = state && cache.parsed.get(key)?.payload;
      if (!known || state.fetchedAt === null || state.issuedAt === null) continue;
      result.set(key, {
        zone: place.zone,
        startMs: known.series.startMs,
        tempsF: known.series.tempsF,
        issuedAt: state.issuedAt,
        fetchedAt: state.fetchedAt,
        alerts: trusted(known.alerts, state.alertsFetchedAt),
      });
    }
    return result;
  }

  /** Parses again only what was written since it was parsed last. */
  async function readInto({ parsed }: ForecastCache, states: readonly CacheState[]): Promise<void> {
    const edition = (state: CacheState) => `${state.fetchedAt} ${state.alertsFetchedAt} ${state.issuedAt}`;
    const changed = states.filter((state) => parsed.get(state.placeKey)?.edition !== edition(state));
    if (changed.length === 0) return;
    const payloads = new Map(
      (
        await readForecasts(
          db,
          changed.map((state) => state.placeKey),
        )
      ).map((row) => [row.placeKey, row]),
    );
    for (const state of changed)
      parsed.set(state.placeKey, { edition: edition(state), payload: payloads.get(state.placeKey) ?? null });
  }

  function trusted(
    alerts: readonly WeatherAlert[] | null,
    fetchedAt: string | null,
  ): readonly WeatherAlert[] | null {
    if (alerts === null || fetchedAt === null) return null;
    if (!isOlder(fetchedAt, noAlertsMs)) return alerts;
    return alerts.some((alert) => Date.parse(alert.to) > clock.nowMs()) ? alerts : null;
  }
}

/** Waits for all of them, but not longer than `waitMs`; those that are late go on by themselves. */
async function settledWithin(waitMs: number, tasks: readonly Promise<void>[]): Promise<void> {
  let timer: NodeJS.Timeout | undefined;
  const late = new Promise<void>((resolve) => {
    timer = setTimeout(resolve, waitMs);
  });
  await Promise.race([Promise.allSettled(tasks), late]);
  clearTimeout(timer);
}

/** City names of counters and hubs by place; a position that is neither goes by its coordinates. */
async function placeNames({ services }: Deps): Promise<Map<string, string>> {
  const known = [...(await services.places.hubs()), ...(await services.places.counters())];
  return new Map(known.map((place) => [placeKey(place), `${place.city}, ${place.state}`]));
}
