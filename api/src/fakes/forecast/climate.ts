import { climateNormals, type ClimateNormal } from './climate-normals';

/** A position's climate: monthly normals, and how strongly the weather swings about them (one standard deviation). */
export interface Climate {
  readonly nearest: ClimateNormal;
  readonly highsF: readonly number[];
  readonly lowsF: readonly number[];
  readonly winterSwingF: number;
  readonly summerSwingF: number;
}

const earthRadiusMiles = 3958.8;
const radians = (degrees: number) => (degrees * Math.PI) / 180;

/** Great-circle distance by the haversine formula on a sphere. */
export function milesBetween(a: { lat: number; lon: number }, b: { lat: number; lon: number }): number {
  const dLat = radians(b.lat - a.lat);
  const dLon = radians(b.lon - a.lon);
  const h =
    Math.sin(dLat / 2) ** 2 + Math.cos(radians(a.lat)) * Math.cos(radians(b.lat)) * Math.sin(dLon / 2) ** 2;
  return 2 * earthRadiusMiles * Math.asin(Math.min(1, Math.sqrt(h)));
}

/** How much colder a degree of latitude further north is, °F, by month: much in winter, little in summer. */
const northwardF = [1.5, 1.4, 1.2, 0.9, 0.7, 0.5, 0.4, 0.5, 0.7, 0.9, 1.2, 1.4];

/**
 * The climate at a position: normals of the cities round it by inverse distance (third power, so that the nearest
 * decides), each corrected for latitude. The swing follows the yearly range: about 3 °F in Honolulu, 13 in the north.
 */
export function climateAt(lat: number, lon: number): Climate {
  const near = climateNormals
    .map((normal) => ({ normal, miles: milesBetween(normal, { lat, lon }) }))
    .sort((a, b) => a.miles - b.miles)
    .slice(0, 5);
  const weights = near.map(({ miles }) => 1 / (miles + 5) ** 3);
  const total = weights.reduce((sum, weight) => sum + weight, 0);
  const blend = (of: (normal: ClimateNormal) => readonly number[]) =>
    northwardF.map((perDegree, month) => {
      const sum = near.reduce((acc, { normal }, index) => {
        const north = Math.max(-4, Math.min(4, lat - normal.lat));
        return acc + (weights[index] ?? 0) * ((of(normal)[month] ?? 0) - north * perDegree);
      }, 0);
      return sum / total;
    });
  const highsF = blend((normal) => normal.highsF);
  const lowsF = blend((normal) => normal.lowsF);
  const mean = (month: number) => ((highsF[month] ?? 0) + (lowsF[month] ?? 0)) / 2;
  const winterSwingF = Math.min(14, 1.2 + 0.19 * Math.abs(mean(6) - mean(0))) * shelter(lat, lon);
  const nearest = near[0]?.normal as ClimateNormal;
  return { nearest, highsF, lowsF, winterSwingF, summerSwingF: 0.5 + 0.45 * winterSwingF };
}

/** Cold air from the north seldom gets over the Rockies: west of them the swing is about two thirds. */
function shelter(lat: number, lon: number): number {
  if (lat > 52) return 1;
  return Math.max(0.65, Math.min(1, 1 - ((-104 - lon) / 8) * 0.35));
}

/** A monthly table at an instant, going smoothly from the middle of one month to the next. */
export function monthly(table: readonly number[], atMs: number): number {
  const date = new Date(atMs);
  const startOfYear = Date.UTC(date.getUTCFullYear(), 0, 1);
  const months = ((atMs - startOfYear) / 86_400_000 / 365.25) * 12 - 0.5;
  const before = Math.floor(months);
  const part = (1 - Math.cos(Math.PI * (months - before))) / 2;
  const value = (month: number) => table[((month % 12) + 12) % 12] ?? 0;
  return value(before) * (1 - part) + value(before + 1) * part;
}

/** 1 in the middle of winter, 0 in the middle of summer. */
export function winterness(atMs: number): number {
  const day = (atMs - Date.UTC(new Date(atMs).getUTCFullYear(), 0, 1)) / 86_400_000;
  return (1 + Math.cos((2 * Math.PI * (day - 20)) / 365.25)) / 2;
}
