import type { Config } from '../config';
import { atMost } from './at-most';
import { createForecastClient, type ForecastClient } from './forecast-client';
import type { CachedForecast } from './forecast-queries';
import { createJsonFetcher } from './json-fetcher';

/** What one running site keeps in memory about forecasts. */
export interface ForecastCache {
  readonly client: ForecastClient;
  /** Refreshes under way by place. */
  readonly running: Map<string, Promise<void>>;
  /** Parsed payloads by place, each with the edition of the row it was parsed from. */
  readonly parsed: Map<string, { edition: string; payload: CachedForecast | null }>;
}

const mostAtOnce = 4;
/** A raw grid has about 200 kB; alerts for a point rarely more. */
const maxBytes = 4_000_000;

const caches = new WeakMap<Config, ForecastCache>();

/** One cache a site: services are built anew for each transaction, and all of them must share it. */
export function forecastCache(config: Config): ForecastCache {
  const existing = caches.get(config);
  if (existing) return existing;
  const isTest = config.NODE_ENV === 'test';
  const fetcher = createJsonFetcher({
    baseUrl: config.FORECAST_URL,
    userAgent: config.FORECAST_USER_AGENT,
    limiter: atMost(mostAtOnce),
    timeoutMs: isTest ? 1000 : 10_000,
    backOffMs: isTest ? 5 : 500,
    attempts: 4,
    maxBytes,
  });
  const cache: ForecastCache = {
    client: createForecastClient(fetcher),
    running: new Map(),
    parsed: new Map(),
  };
  caches.set(config, cache);
  return cache;
}
