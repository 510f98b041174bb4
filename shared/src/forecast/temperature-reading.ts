import { unreadable } from './forecast-shape';

/** Air has been measured from −129 °F (Vostok) to 134 °F (Death Valley); what lies beyond is a fill value such as −9999. */
const coldestAirF = -130;
const hottestAirF = 140;

/**
 * A temperature in °F from a value in `unit`: `wmoUnit:degC`, older `unit:degC`, `degF`, or the letters C and F (the
 * suffix decides). Rounded to 0.01 °F, which undoes the service's °C made from whole °F. Null stays null, and a fill
 * value becomes null. Throws `forecast-unavailable` for a unit that is neither.
 */
export function temperatureReading(
  value: number | null,
  unit: string | undefined,
  what: string,
): number | null {
  if (value === null) return null;
  const tempF = Math.round(inF(value, unit, what) * 100) / 100;
  return tempF >= coldestAirF && tempF <= hottestAirF ? tempF : null;
}

function inF(value: number, unit: string | undefined, what: string): number {
  if (/(?:^|:|deg)C$/.test(unit ?? '')) return (value * 9) / 5 + 32;
  if (/(?:^|:|deg)F$/.test(unit ?? '')) return value;
  throw unreadable(what, `the unit ${unit ? `“${unit}”` : 'is missing and so'} is neither °C nor °F.`);
}
