import * as z from 'zod';
import { readShape } from './forecast-shape';

const point = z.object({
  properties: z.object({
    forecastGridData: z.string().min(1),
    forecastHourly: z.string().min(1).nullish(),
    timeZone: z.string().nullish(),
  }),
});

/** Where a position's forecasts are to be found; addresses as the service gave them, the zone null when it gave none. */
export interface GridAddress {
  readonly gridUrl: string;
  readonly hourlyUrl: string | null;
  readonly zone: string | null;
}

/** Reads `/points/{lat},{lon}`. Throws `forecast-unavailable` for a wrong shape, e.g. a point without a grid at sea. */
export function parsePoints(json: unknown): GridAddress {
  const { forecastGridData, forecastHourly, timeZone } = readShape(point, json, 'grid address').properties;
  return { gridUrl: forecastGridData, hourlyUrl: forecastHourly ?? null, zone: timeZone ?? null };
}
