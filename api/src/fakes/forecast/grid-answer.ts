import { DateTime } from 'luxon';
import type { Issue } from './issue';
import type { GridCell, Position } from './us-grid';

const hourMs = 3_600_000;
/** The service writes instants without milliseconds and with +00:00. */
export const stamp = (ms: number): string => new Date(ms).toISOString().replace('.000Z', '+00:00');
const toC = (tempF: number | null) => (tempF === null ? null : ((tempF - 32) * 5) / 9);

interface LayerValue {
  readonly validTime: string;
  readonly value: number | null;
}

/** Neighbouring hours with the same value as one span, as the service merges them. */
export function mergedLayer(startMs: number, tempsF: readonly (number | null)[]): LayerValue[] {
  const values: LayerValue[] = [];
  let from = 0;
  for (let hour = 1; hour <= tempsF.length; hour += 1) {
    if (hour < tempsF.length && tempsF[hour] === tempsF[from]) continue;
    values.push(span(startMs + from * hourMs, hour - from, tempsF[from] ?? null));
    from = hour;
  }
  return values;
}

const span = (fromMs: number, hours: number, tempF: number | null): LayerValue => ({
  validTime: `${stamp(fromMs)}/PT${hours}H`,
  value: toC(tempF),
});

/**
 * Daytime highs (07:00 for 13 h) or night lows (19:00 for 14 h) by local day. They overlap by an hour at each end, and
 * the first and last are cut where the grid begins and ends.
 */
function extremes(issue: Issue, zone: string, kind: 'max' | 'min'): LayerValue[] {
  const [fromHour, length] = kind === 'max' ? [7, 13] : [19, 14];
  const endMs = issue.startMs + issue.tempsF.length * hourMs;
  const first = DateTime.fromMillis(issue.startMs, { zone }).startOf('day').minus({ days: 1 });
  const values: LayerValue[] = [];
  for (let day = 0; day < 11; day += 1) {
    const dayFrom = first.plus({ days: day }).set({ hour: fromHour }).toMillis();
    const fromMs = Math.max(issue.startMs, dayFrom);
    const hours = (Math.min(endMs, dayFrom + length * hourMs) - fromMs) / hourMs;
    if (hours < 1) continue;
    const index = (fromMs - issue.startMs) / hourMs;
    const known = issue.tempsF.slice(index, index + hours).filter((tempF) => tempF !== null);
    values.push(
      span(
        fromMs,
        hours,
        known.length === 0 ? null : kind === 'max' ? Math.max(...known) : Math.min(...known),
      ),
    );
  }
  return values;
}

/** The raw grid in the documented shape: the layers we have weather for, the others empty and without a unit. */
export function gridAnswer(
  base: string,
  cell: GridCell,
  place: Position,
  zone: string,
  issue: Issue,
): object {
  const self = `${base}/gridpoints/${cell.office}/${cell.x},${cell.y}`;
  const hours = issue.tempsF.length;
  const uom = 'wmoUnit:degC';
  // Both kinds have been seen from the real service.
  const asText = (cell.x + cell.y) % 3 === 0;
  return {
    '@context': ['https://geojson.org/geojson-ld/geojson-context.jsonld', { '@version': '1.1' }],
    id: self,
    type: 'Feature',
    geometry: { type: 'Polygon', coordinates: [outline(place)] },
    properties: {
      '@id': self,
      '@type': 'wx:Gridpoint',
      updateTime: stamp(issue.issuedMs),
      validTimes: `${stamp(issue.startMs)}/P${Math.floor(hours / 24)}DT${hours % 24}H`,
      elevation: { unitCode: 'wmoUnit:m', value: 0 },
      forecastOffice: `${base}/offices/${cell.office}`,
      gridId: cell.office,
      gridX: asText ? String(cell.x) : cell.x,
      gridY: asText ? String(cell.y) : cell.y,
      temperature: { uom, values: mergedLayer(issue.startMs, issue.tempsF) },
      maxTemperature: { uom, values: extremes(issue, zone, 'max') },
      minTemperature: { uom, values: extremes(issue, zone, 'min') },
      windChill: { uom, values: [span(issue.startMs, hours, null)] },
      heatIndex: { values: [] },
      snowLevel: { values: [] },
      weather: { values: [] },
      hazards: { values: [] },
    },
  };
}

const outline = ({ lat, lon }: Position) =>
  [
    [-1, 1],
    [-1, -1],
    [1, -1],
    [1, 1],
    [-1, 1],
  ].map(([x = 0, y = 0]) => [lon + x * 0.0125, lat + y * 0.0125]);

/** The hourly forecast of the coming 156 hours; with `quantities` the temperature is an object, as under the flag. */
export function hourlyAnswer(issue: Issue, zone: string, quantities: boolean): object {
  const periods = issue.tempsF
    .map((tempF, index) => ({ tempF, atMs: issue.startMs + index * hourMs }))
    .filter(({ atMs }) => atMs >= issue.issuedMs)
    .slice(0, 156)
    .map(({ tempF, atMs }, index) => ({
      number: index + 1,
      name: '',
      startTime: localStamp(atMs, zone),
      endTime: localStamp(atMs + hourMs, zone),
      ...(quantities
        ? { temperature: { unitCode: 'wmoUnit:degC', value: toC(tempF) } }
        : { temperature: tempF, temperatureUnit: 'F' }),
    }));
  return {
    type: 'Feature',
    properties: {
      units: 'us',
      generatedAt: stamp(issue.issuedMs),
      updateTime: stamp(issue.issuedMs),
      periods,
    },
  };
}

const localStamp = (ms: number, zone: string) =>
  DateTime.fromMillis(ms, { zone }).toISO({ suppressMilliseconds: true }) ?? '';
