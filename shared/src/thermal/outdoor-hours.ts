import type { OutdoorForecast } from '../forecast/outdoor-forecast';
import { ThermalError } from './thermal-error';

const hourMs = 3_600_000;
/** A gap of up to 3 h is bridged in a straight line; a longer one may hide what matters. */
export const bridgedHours = 3;

/** The outdoor air of a place by the hour, °C; NaN where nobody knows. `startMs` is a full hour. */
export interface OutdoorHours {
  readonly startMs: number;
  readonly tempsC: Float64Array;
}

// A forecast is never changed, so its hours stay true; fourteen days and many parcels share them.
const made = new WeakMap<OutdoorForecast, OutdoorHours>();

/** The hours of a forecast with short gaps bridged. Throws ThermalError `bad-forecast` for a value that is no temperature. */
export function outdoorHours(forecast: OutdoorForecast): OutdoorHours {
  const known = made.get(forecast);
  if (known) return known;
  const tempsC = Float64Array.from(forecast.tempsF, (tempF) => (tempF === null ? NaN : (tempF - 32) / 1.8));
  const isBroken = forecast.tempsF.some((tempF) => tempF !== null && !Number.isFinite(tempF));
  if (isBroken || !Number.isFinite(forecast.startMs) || forecast.startMs % hourMs !== 0)
    throw new ThermalError('bad-forecast', 'The forecast holds a value that is no temperature.');
  bridge(tempsC);
  const hours = { startMs: forecast.startMs, tempsC };
  made.set(forecast, hours);
  return hours;
}

function bridge(tempsC: Float64Array): void {
  let last = -1;
  for (let hour = 0; hour < tempsC.length; hour += 1) {
    if (Number.isNaN(tempsC[hour])) continue;
    const missing = hour - last - 1;
    if (last >= 0 && missing > 0 && missing <= bridgedHours) {
      const from = tempsC[last] ?? NaN;
      const to = tempsC[hour] ?? NaN;
      for (let gap = 1; gap <= missing; gap += 1)
        tempsC[last + gap] = from + ((to - from) * gap) / (missing + 1);
    }
    last = hour;
  }
}

/** The outdoor air at an instant, °C, straight between full hours; NaN where it is not known. */
export function outdoorAtC({ startMs, tempsC }: OutdoorHours, atMs: number): number {
  const hours = (atMs - startMs) / hourMs;
  const before = Math.floor(hours);
  const from = tempsC[before] ?? NaN;
  const part = hours - before;
  if (part === 0) return from;
  // The last hour that is forecast holds to its end.
  const to = tempsC[before + 1] ?? from;
  return from + ((Number.isNaN(to) ? from : to) - from) * part;
}
