import zoneAt from '@photostructure/tz-lookup';
import { climateAt, milesBetween } from './climate';
import { climateNormals } from './climate-normals';

/** The invented grid: cells of 0.025 degrees, about the real service's 2.5 km, numbered over the whole country. */
const cellDegrees = 0.025;
/** How far the rows are renumbered when the script says that the grid has moved. */
const moveRows = 10_000;

export interface GridCell {
  readonly office: string;
  readonly x: number;
  readonly y: number;
}
export interface Position {
  readonly lat: number;
  readonly lon: number;
}

const usZone = new RegExp(
  '^(America/(New_York|Chicago|Denver|Los_Angeles|Phoenix|Anchorage|Juneau|Sitka|Nome|Yakutat|Metlakatla|Adak|Boise|' +
    'Detroit|Menominee|Puerto_Rico|St_Thomas|Indiana/.+|Kentucky/.+|North_Dakota/.+)|Pacific/(Honolulu|Guam|Saipan))$',
);

/** The IANA zone of a position in the US; null abroad and at sea. A city just over a border counts with the near side. */
export function usZoneAt({ lat, lon }: Position): string | null {
  const zone = zoneAt(lat, lon);
  if (usZone.test(zone)) return zone;
  const near = climateNormals.find((normal) => milesBetween(normal, { lat, lon }) < 40);
  return near ? zoneAt(near.lat, near.lon) : null;
}

/** The cell a position lies in; `moves` is how often the grid has been renumbered. */
export function cellAt({ lat, lon }: Position, moves: number): GridCell {
  const x = Math.floor((lon + 180) / cellDegrees);
  const y = Math.floor(lat / cellDegrees) + moves * moveRows;
  return { office: officeOf(centre(x, y, moves)), x, y };
}

/** The middle of a cell, to which its weather belongs; null when there is no such cell, or not any more. */
export function positionOf(cell: GridCell, moves: number): Position | null {
  const position = centre(cell.x, cell.y, moves);
  const inRange = position.lat > -15 && position.lat < 72 && position.lon >= -180 && position.lon < 180;
  return inRange && officeOf(position) === cell.office ? position : null;
}

const officeOf = ({ lat, lon }: Position) => climateAt(lat, lon).nearest.code;
const centre = (x: number, y: number, moves: number): Position => ({
  lat: round4((y - moves * moveRows + 0.5) * cellDegrees),
  lon: round4((x + 0.5) * cellDegrees - 180),
});
const round4 = (value: number) => Math.round(value * 1e4) / 1e4;
