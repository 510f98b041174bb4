import type { Knex } from 'knex';
import type { ForecastPlace, WeatherAlert } from '@shared/forecast/outdoor-forecast';

/** How a place's cached forecast stands, without the forecast itself: enough to see whether it is fresh. */
export interface CacheState {
  readonly placeKey: string;
  readonly gridPath: string | null;
  readonly lastModified: string | null;
  readonly issuedAt: string | null;
  readonly fetchedAt: string | null;
  readonly alertsFetchedAt: string | null;
  readonly problem: string | null;
  readonly triedAt: string | null;
}

export interface CachedSeries {
  readonly startMs: number;
  readonly tempsF: readonly (number | null)[];
}

/** The payload of one place. `alerts` is null before the first answer. */
export interface CachedForecast {
  readonly placeKey: string;
  readonly series: CachedSeries;
  readonly alerts: readonly WeatherAlert[] | null;
}

/** What a refresh learned; members left out stay as they are. */
export interface CacheChange {
  readonly gridPath?: string | null;
  readonly lastModified?: string | null;
  readonly series?: CachedSeries;
  readonly issuedAt?: string;
  readonly fetchedAt?: string;
  readonly alerts?: readonly WeatherAlert[];
  readonly alertsFetchedAt?: string;
  readonly problem: string | null;
  readonly triedAt: string;
}

interface Row {
  place_key: string;
  lat: number;
  lon: number;
  zone: string;
  grid_path: string | null;
  last_modified: string | null;
  series: string | null;
  issued_at: string | null;
  fetched_at: string | null;
  alerts: string | null;
  alerts_fetched_at: string | null;
  problem: string | null;
  tried_at: string | null;
}

const stateColumns = [
  'place_key', 'grid_path', 'last_modified', 'issued_at', 'fetched_at', 'alerts_fetched_at', 'problem', 'tried_at',
] as const; // prettier-ignore

const toState = (row: Pick<Row, (typeof stateColumns)[number]>): CacheState => ({
  placeKey: row.place_key,
  gridPath: row.grid_path,
  lastModified: row.last_modified,
  issuedAt: row.issued_at,
  fetchedAt: row.fetched_at,
  alertsFetchedAt: row.alerts_fetched_at,
  problem: row.problem,
  triedAt: row.tried_at,
});

export async function listStates(db: Knex, placeKeys?: readonly string[]): Promise<CacheState[]> {
  const query = db<Row>('forecasts').select(...stateColumns);
  if (placeKeys) query.whereIn('place_key', placeKeys);
  return (await query.orderBy('place_key')).map(toState);
}

/** The payloads of those places that ever had an answer. */
export async function readForecasts(db: Knex, placeKeys: readonly string[]): Promise<CachedForecast[]> {
  const rows = await db<Row>('forecasts')
    .select('place_key', 'series', 'alerts')
    .whereIn('place_key', placeKeys);
  return rows.flatMap(({ place_key, series, alerts }) =>
    series === null
      ? []
      : [
          {
            placeKey: place_key,
            series: JSON.parse(series) as CachedSeries,
            alerts: alerts === null ? null : (JSON.parse(alerts) as WeatherAlert[]),
          },
        ],
  );
}

export async function writeForecast(
  db: Knex,
  placeKey: string,
  place: ForecastPlace,
  change: CacheChange,
): Promise<void> {
  const columns = {
    lat: place.lat,
    lon: place.lon,
    zone: place.zone,
    grid_path: change.gridPath,
    last_modified: change.lastModified,
    series: change.series && JSON.stringify(change.series),
    issued_at: change.issuedAt,
    fetched_at: change.fetchedAt,
    alerts: change.alerts && JSON.stringify(change.alerts),
    alerts_fetched_at: change.alertsFetchedAt,
    problem: change.problem,
    tried_at: change.triedAt,
  };
  const known = Object.fromEntries(Object.entries(columns).filter(([, value]) => value !== undefined));
  await db('forecasts')
    .insert({ place_key: placeKey, ...known })
    .onConflict('place_key')
    .merge(Object.keys(known));
}
