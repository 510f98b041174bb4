import { defaultPolicy } from '@shared/policy/policy';
import type { BoxModel } from '@shared/thermal/box-model';
import type { Leg } from '@shared/thermal/journey';
import { outdoorHours } from '@shared/thermal/outdoor-hours';
import { simulate, type BoxRun } from '@shared/thermal/simulate';
import { sampleForecast } from '@shared/verdict/question-samples';

const { heatPack: heat, coldPack: cold } = defaultPolicy;
export const constants = defaultPolicy.boxModel;
const packs = { heat, cold };
export const hourMs = 3_600_000;
export const startMs = Date.parse('2026-12-02T12:00:00Z');
export const small = { lengthIn: 12, widthIn: 9, heightIn: 6, foamIn: 0.75 };

/** One leg that feels nothing but the outdoor air, and outdoor air by the hour in °F. */
export const leg = (hours: number, changes: Partial<Leg> = {}): Leg => ({
  kind: 'hub',
  role: 'hub',
  startMs,
  endMs: startMs + hours * hourMs,
  exposure: 1,
  indoorF: 70,
  cabinF: 0,
  cabinAboveF: 0,
  ...changes,
});
export const air = (tempF: (hour: number) => number, hours = 400) =>
  outdoorHours({
    ...sampleForecast('UTC', '2026-12-02T12:00:00Z', 70),
    startMs,
    tempsF: Array.from({ length: hours }, (_, hour) => tempF(hour)),
  });
export const run = (
  model: BoxModel,
  legs: readonly Leg[],
  outdoor: ReturnType<typeof air>,
  startF: number,
  pack: 'none' | 'heat-40' | 'heat-72' | 'cold' = 'none',
): BoxRun =>
  simulate({
    model,
    legs,
    outdoor: { origin: outdoor, hub: outdoor, destination: outdoor },
    pack,
    packs,
    startF,
  });
export const toC = (tempF: number) => (tempF - 32) / 1.8;
export const last = (values: Float64Array) => values.at(-1) ?? NaN;
