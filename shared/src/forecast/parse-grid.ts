import * as z from 'zod';
import { readInstant, readShape, unreadable } from './forecast-shape';
import { parseValidTime } from './parse-valid-time';
import { spreadHours, type HourlySeries } from './spread-hours';
import { temperatureReading } from './temperature-reading';

const layer = z.object({
  /** Missing on an empty layer. */
  uom: z.string().optional(),
  values: z.array(z.object({ validTime: z.string(), value: z.number().nullable() })),
});
/** Grid coordinates come as numbers or as text, depending on the server that answers. */
const gridCoordinate = z.union([z.number().int(), z.string().regex(/^\d+$/)]);
const grid = z.object({
  properties: z.object({
    updateTime: z.string(),
    gridX: gridCoordinate.optional(),
    gridY: gridCoordinate.optional(),
    temperature: layer,
  }),
});

/**
 * Reads the raw grid (`/gridpoints/{office}/{x},{y}`): its hourly `temperature` layer in °F, merged hours spread,
 * nulls and holes kept as null. `issuedAt` is its updateTime. Throws `forecast-unavailable` for a wrong shape, an
 * unknown unit, or a layer without a single value.
 */
export function parseGrid(json: unknown): HourlySeries {
  const { updateTime, temperature } = readShape(grid, json, 'forecast grid').properties;
  const { uom, values } = temperature;
  const spans = values.map(({ validTime, value }) => ({
    ...parseValidTime(validTime),
    tempF: temperatureReading(value, uom, 'forecast grid'),
  }));
  if (!spans.some((span) => span.tempF !== null))
    throw unreadable('forecast grid', 'it holds no temperatures.');
  return {
    ...spreadHours(spans),
    issuedAt: new Date(readInstant(updateTime, 'forecast grid')).toISOString(),
  };
}
