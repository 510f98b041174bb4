import { AppError } from '@shared/errors';
import type { ForecastPlace, WeatherAlert } from '@shared/forecast/outdoor-forecast';
import { parseAlerts } from '@shared/forecast/parse-alerts';
import { parseGrid } from '@shared/forecast/parse-grid';
import { parseHourly } from '@shared/forecast/parse-hourly';
import { parsePoints } from '@shared/forecast/parse-points';
import type { HourlySeries } from '@shared/forecast/spread-hours';
import { upstreamStatus, type JsonFetcher } from './json-fetcher';

/** What we hold of a place's forecast: where its grid is and how new our copy is. Null: not known (any more). */
export interface Held {
  readonly gridPath: string | null;
  readonly lastModified: string | null;
}

/** A fetched forecast; `series` is null when ours is still the newest. */
export interface GridAnswer {
  readonly gridPath: string;
  readonly lastModified: string | null;
  readonly series: HourlySeries | null;
}

export interface ForecastClient {
  /** The newest forecast of a place. Throws `forecast-unavailable`. */
  forecast(place: ForecastPlace, held: Held): Promise<GridAnswer>;
  /** The alerts in force for a place. Throws `forecast-unavailable`. */
  alerts(place: ForecastPlace): Promise<WeatherAlert[]>;
}

/** Speaks the protocol of the public weather service (NWS API): points, raw grid, hourly forecast, active alerts. */
export function createForecastClient(get: JsonFetcher): ForecastClient {
  return {
    async forecast(place, held) {
      if (held.gridPath === null) return gridOf(await resolve(place), null);
      try {
        return await gridOf(held.gridPath, held.lastModified);
      } catch (error) {
        if (upstreamStatus(error) !== 404) throw error;
        // Grids are renumbered now and then: ask once where ours has gone.
        return gridOf(await resolve(place), null);
      }
    },
    async alerts(place) {
      const answer = await get(`/alerts/active?point=${point(place)}`);
      return parseAlerts(jsonOf(answer));
    },
  };

  async function resolve(place: ForecastPlace): Promise<string> {
    return gridPath(parsePoints(jsonOf(await get(`/points/${point(place)}`))).gridUrl);
  }

  async function gridOf(path: string, lastModified: string | null): Promise<GridAnswer> {
    try {
      const answer = await get(path, { ifModifiedSince: lastModified });
      if (answer.kind === 'unchanged') return { gridPath: path, lastModified, series: null };
      return { gridPath: path, lastModified: answer.lastModified, series: parseGrid(answer.json) };
    } catch (error) {
      if (!mayHourlyHelp(error)) throw error;
      return hourlyOf(path).catch(() => {
        throw error;
      });
    }
  }

  /** The hourly forecast reaches a day less far, so the next refresh asks for the grid again, unconditionally. */
  async function hourlyOf(path: string): Promise<GridAnswer> {
    const answer = await get(`${path}/forecast/hourly`, { attempts: 1 });
    return { gridPath: path, lastModified: null, series: parseHourly(jsonOf(answer)) };
  }
}

/** When the grid came in a shape we cannot read, or its server alone is ill; not when nobody answers at all. */
function mayHourlyHelp(error: unknown): boolean {
  const status = upstreamStatus(error);
  return status === null ? error instanceof AppError && error.cause === undefined : status >= 500;
}

const jsonOf = (answer: Awaited<ReturnType<JsonFetcher>>): unknown =>
  answer.kind === 'new' ? answer.json : null;

/** At most four decimals, and no zeros that say nothing: anything else is redirected. */
const point = ({ lat, lon }: ForecastPlace): string =>
  [lat, lon].map((value) => String(Number(value.toFixed(4)))).join(',');

/** The grid's path under our base. Only the path is taken over, so an answer cannot send us to another host. */
function gridPath(gridUrl: string): string {
  const path = /\/gridpoints\/[A-Z]{3}\/\d+,\d+$/.exec(gridUrl)?.[0];
  if (!path)
    throw new AppError('forecast-unavailable', 'The grid address from the forecast service cannot be read.');
  return path;
}
