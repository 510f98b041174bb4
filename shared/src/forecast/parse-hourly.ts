import * as z from 'zod';
import { readInstant, readShape, unreadable } from './forecast-shape';
import { spreadHours, type HourlySeries } from './spread-hours';
import { temperatureReading } from './temperature-reading';

const quantity = z.object({ unitCode: z.string().optional(), value: z.number().nullable() });
const hourly = z.object({
  properties: z.object({
    updateTime: z.string(),
    periods: z.array(
      z.object({
        startTime: z.string(),
        endTime: z.string(),
        /** A number with `temperatureUnit` beside it, or a QuantitativeValue under the service's feature flag. */
        temperature: z.union([z.number(), quantity]).nullable(),
        temperatureUnit: z.string().nullish(),
      }),
    ),
  }),
});

/**
 * Reads the hourly forecast (`/gridpoints/{office}/{x},{y}/forecast/hourly`), which stands in when the raw grid cannot
 * be read. Temperatures in °F. Throws `forecast-unavailable` for a wrong shape or when it holds no temperature.
 */
export function parseHourly(json: unknown): HourlySeries {
  const what = 'hourly forecast';
  const { updateTime, periods } = readShape(hourly, json, what).properties;
  const spans = periods.map(({ startTime, endTime, temperature, temperatureUnit }) => {
    const span = { startMs: readInstant(startTime, what), endMs: readInstant(endTime, what) };
    if (span.endMs <= span.startMs)
      throw unreadable(what, `the period from ${startTime} ends before it starts.`);
    const plain = typeof temperature === 'number' || temperature === null;
    const value = plain ? temperature : temperature.value;
    const unit = plain ? temperatureUnit : (temperature.unitCode ?? temperatureUnit);
    return { ...span, tempF: temperatureReading(value, unit ?? undefined, what) };
  });
  if (!spans.some((span) => span.tempF !== null)) throw unreadable(what, 'it holds no temperatures.');
  return { ...spreadHours(spans), issuedAt: new Date(readInstant(updateTime, what)).toISOString() };
}
