import * as z from 'zod';
import { readInstant, readShape } from './forecast-shape';
import type { WeatherAlert } from './outdoor-forecast';

const text = z.string().nullish();
const collection = z.object({
  features: z.array(
    z.object({
      /** Null for alerts that name forecast zones instead of drawing an outline; we asked by point, so it does not matter. */
      geometry: z.unknown(),
      properties: z.object({
        id: z.string(),
        event: z.string(),
        severity: z.string().nullish(),
        headline: text,
        status: text,
        messageType: text,
        effective: text,
        onset: text,
        expires: z.string(),
        ends: text,
      }),
    }),
  ),
});
type Properties = z.output<typeof collection>['features'][number]['properties'];

const what = 'list of weather alerts';
/** How long an event is taken to last that has begun to be announced without an end. No source: a cautious assumption. */
const unknownEndMs = 24 * 3_600_000;

/**
 * Reads `/alerts/active?point=…`: the alerts that are meant (no tests, exercises or withdrawals), with the window in
 * which the event is expected, `onset ?? effective` to `ends ?? expires`. `expires` is when the message goes out of
 * date, which may be before the event begins: then the event is taken to last 24 h. Throws `forecast-unavailable`
 * for a wrong shape: one alert that cannot be read makes the whole list unknown.
 */
export function parseAlerts(json: unknown): WeatherAlert[] {
  return readShape(collection, json, what)
    .features.map((feature) => feature.properties)
    .filter(isMeant)
    .map(toAlert);
}

const isMeant = ({ status, messageType }: Properties): boolean =>
  (status ?? 'Actual') === 'Actual' && messageType !== 'Cancel';

function toAlert(alert: Properties): WeatherAlert {
  const fromMs = readInstant(alert.onset ?? alert.effective ?? '', what);
  const endMs = readInstant(alert.ends ?? alert.expires, what);
  const toMs = endMs > fromMs ? endMs : fromMs + unknownEndMs;
  return {
    id: alert.id,
    event: alert.event,
    severity: alert.severity ?? 'Unknown',
    headline: alert.headline ?? alert.event,
    from: new Date(fromMs).toISOString(),
    to: new Date(toMs).toISOString(),
  };
}
