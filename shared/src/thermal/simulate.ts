import type { Pack } from '../contract/days';
import type { Policy } from '../policy/policy';
import type { BoxModel } from './box-model';
import type { Leg, PlaceRole } from './journey';
import { outdoorAtC, type OutdoorHours } from './outdoor-hours';
import { ThermalError } from './thermal-error';
import { toC, toF } from './units';

const hourMs = 3_600_000;

export interface Packs {
  readonly heat: Policy['heatPack'];
  readonly cold: Policy['coldPack'];
}

export interface BoxQuestion {
  readonly model: BoxModel;
  readonly legs: readonly Leg[];
  readonly outdoor: Readonly<Record<PlaceRole, OutdoorHours>>;
  readonly pack: Pack;
  readonly packs: Packs;
  readonly startF: number;
}

/** The air in the box along a journey. `response` is how far it moves for one degree more in every outdoor value. */
export interface BoxRun {
  /** UTC epoch ms: the start, every full hour, every leg's end. */
  readonly atMs: Float64Array;
  readonly tempF: Float64Array;
  readonly response: Float64Array;
  /** The leg that ends at, or holds, each point. */
  readonly legs: readonly Leg[];
}

/** What is round the box, in steps between which the outdoor air is straight; shared by all packs of a journey. */
export interface JourneySteps {
  readonly atMs: Float64Array;
  /** Round the box at the beginning and at the end of each step, °C; one less than points. */
  readonly fromC: Float64Array;
  readonly toC: Float64Array;
  readonly exposure: Float64Array;
  readonly legOf: readonly Leg[];
}

/**
 * Cuts a journey into steps at full hours and leg ends. Throws ThermalError `bad-leg` for a leg that ends before it starts and
 * `no-forecast` where the outdoor air of a leg that feels it is not known.
 */
export function journeySteps(legs: readonly Leg[], outdoor: BoxQuestion['outdoor']): JourneySteps {
  const at: number[] = [];
  const fromC: number[] = [];
  const toCs: number[] = [];
  const exposure: number[] = [];
  const legOf: Leg[] = [];
  for (const leg of legs) {
    if (!(leg.endMs >= leg.startMs))
      throw new ThermalError('bad-leg', `The leg “${leg.kind}” ends before it starts.`);
    if (at.length === 0) at.push(leg.startMs);
    let fromMs = leg.startMs;
    while (fromMs < leg.endMs) {
      const untilMs = Math.min(leg.endMs, (Math.floor(fromMs / hourMs) + 1) * hourMs);
      const hours = outdoor[leg.role];
      fromC.push(roundBoxC(leg, outdoorAtC(hours, fromMs)));
      toCs.push(roundBoxC(leg, beforeC(hours, untilMs)));
      exposure.push(leg.exposure);
      legOf.push(leg);
      at.push(untilMs);
      fromMs = untilMs;
    }
  }
  return {
    atMs: Float64Array.from(at),
    fromC: Float64Array.from(fromC),
    toC: Float64Array.from(toCs),
    exposure: Float64Array.from(exposure),
    legOf,
  };
}

/** At the end of what is forecast the last hour's value stands in for the next. */
function beforeC(hours: OutdoorHours, atMs: number): number {
  const there = outdoorAtC(hours, atMs);
  return Number.isNaN(there) ? outdoorAtC(hours, atMs - hourMs) : there;
}

function roundBoxC(leg: Leg, outdoorC: number): number {
  const indoorC = toC(leg.indoorF);
  if (leg.exposure === 0) return indoorC;
  if (Number.isNaN(outdoorC))
    throw new ThermalError('no-forecast', 'The forecast does not cover the journey.');
  const warmC = leg.cabinF !== 0 && toF(outdoorC) > leg.cabinAboveF ? leg.cabinF / 1.8 : 0;
  return leg.exposure * (outdoorC + warmC) + (1 - leg.exposure) * indoorC;
}

/**
 * Steps C dT/dt = UA (Ta − T) + P − Q through a journey with the exact solution for straight Ta and P (design 5.3). A heat pack
 * is woken at the start; its bends fall into steps of their own. A cold pack takes Q = k · T(°C) until its ice is melted.
 */
export function simulate({ model, legs, outdoor, pack, packs, startF }: BoxQuestion): BoxRun {
  const steps = journeySteps(legs, outdoor);
  const decays = decaysOf(model, steps);
  return {
    atMs: steps.atMs,
    tempF: boxTemps(model, steps, decays, pack, packs, startF),
    response: responseOf(steps, decays),
    legs: steps.legOf,
  };
}

/** Gives room for so many numbers, all 0. */
export type Room = (length: number) => Float64Array;
const ownRoom: Room = (length) => new Float64Array(length);

/**
 * Room for many short rows in one piece of memory; a row that no longer fits gets its own. An array of its own costs more than
 * stepping a box through it.
 */
export function sharedRoom(total: number): Room {
  const buffer = new ArrayBuffer(total * Float64Array.BYTES_PER_ELEMENT);
  let used = 0;
  return (length) => {
    if (used + length > total) return ownRoom(length);
    const row = new Float64Array(buffer, used * Float64Array.BYTES_PER_ELEMENT, length);
    used += length;
    return row;
  };
}

/** What is left of a difference to the air after each step: exp(−Δt / τ). All packs of a box and its response share them. */
export function decaysOf(
  { uaWPerK, heatJPerK }: BoxModel,
  { atMs }: JourneySteps,
  room = ownRoom,
): Float64Array {
  const tau = heatJPerK / uaWPerK;
  const decays = room(Math.max(0, atMs.length - 1));
  for (let step = 0; step < decays.length; step += 1)
    decays[step] = Math.exp(((atMs[step] ?? 0) - (atMs[step + 1] ?? 0)) / 1000 / tau);
  return decays;
}

/** The air in the box at each point, °F. */
export function boxTemps(
  model: BoxModel,
  steps: JourneySteps,
  decays: Float64Array,
  pack: Pack,
  packs: Packs,
  startF: number,
  room = ownRoom,
): Float64Array {
  const { atMs, fromC, toC: untilC } = steps;
  const tempF = room(atMs.length);
  let tempC = toC(startF);
  tempF[0] = startF;
  const power = heatPower(pack, packs.heat);
  const ice = {
    leftJ: pack === 'cold' ? packs.cold.massKg * packs.cold.latentKJPerKg * 1000 : 0,
    wPerK: packs.cold.wPerK,
  };
  const originMs = atMs[0] ?? 0;
  for (let step = 0; step + 1 < atMs.length; step += 1) {
    const start = ((atMs[step] ?? 0) - originMs) / 1000;
    const seconds = ((atMs[step + 1] ?? 0) - originMs) / 1000 - start;
    const a = fromC[step] ?? 0;
    const slope = ((untilC[step] ?? 0) - a) / seconds;
    const decay = decays[step] ?? 0;
    tempC =
      power !== null
        ? heated(model, tempC, a, slope, start, seconds, decay, power)
        : ice.leftJ > 0
          ? cooled(model, tempC, a, slope, seconds, ice)
          : relax(model.uaWPerK, model.heatJPerK, tempC, a, slope, 0, 0, seconds, decay);
    tempF[step + 1] = toF(tempC);
  }
  return tempF;
}

/** Exact solution over `seconds`, of which `decay` is exp(−seconds / τ), for air a + slope·s and power p + rise·s. */
function relax(
  ua: number,
  heat: number,
  from: number,
  a: number,
  slope: number,
  p: number,
  rise: number,
  seconds: number,
  decay = Math.exp((-seconds * ua) / heat),
): number {
  const tau = heat / ua;
  const alpha = a + p / ua;
  const beta = slope + rise / ua;
  return alpha + beta * (seconds - tau) + (from - alpha + beta * tau) * decay;
}

/** Bends of the power, in seconds from waking, and the power at each, W; null for no heat pack. */
function heatPower(
  pack: Pack,
  heat: Policy['heatPack'],
): { at: readonly number[]; watts: readonly number[] } | null {
  if (pack !== 'heat-40' && pack !== 'heat-72') return null;
  const rated = (pack === 'heat-72' ? 72 : 40) * 3600;
  return {
    at: [0, heat.riseHours * 3600, rated, rated * (1 + heat.tailShare)],
    watts: [0, heat.powerW, heat.powerW, 0],
  };
}

function heated(
  { uaWPerK, heatJPerK }: BoxModel,
  from: number,
  a: number,
  slope: number,
  start: number,
  seconds: number,
  decay: number,
  power: { at: readonly number[]; watts: readonly number[] },
): number {
  let tempC = from;
  let now = start;
  const end = start + seconds;
  while (now < end) {
    const next = power.at.findIndex((bend) => bend > now);
    const until = next < 0 ? end : Math.min(end, power.at[next] ?? end);
    const before = power.at[next - 1] ?? 0;
    const span = (power.at[next] ?? 0) - before;
    const rise =
      next < 0 || span === 0 ? 0 : ((power.watts[next] ?? 0) - (power.watts[next - 1] ?? 0)) / span;
    const watts = next < 0 ? 0 : (power.watts[next - 1] ?? 0) + rise * (now - before);
    const airC = a + slope * (now - start);
    const whole = now === start && until === end ? decay : undefined;
    tempC = relax(uaWPerK, heatJPerK, tempC, airC, slope, watts, rise, until - now, whole);
    now = until;
  }
  return tempC;
}

/** With ice at 0 °C: Q = k T while T is over 0, which is one more path to air of 0 °C. The melt is taken from the step's mean. */
function cooled(
  { uaWPerK, heatJPerK }: BoxModel,
  from: number,
  a: number,
  slope: number,
  seconds: number,
  ice: { leftJ: number; wPerK: number },
): number {
  let tempC = from;
  // Short parts keep the melted heat exact to well under a percent; the one in which the ice ends is cut there.
  const longest = seconds / Math.max(1, Math.round(seconds / 300));
  let now = 0;
  while (now < seconds - 1e-6) {
    let part = Math.min(longest, seconds - now);
    const airC = a + slope * now;
    const k = ice.leftJ > 0 && tempC > 0 ? ice.wPerK : 0;
    const ua = uaWPerK + k;
    const after = (length: number) =>
      relax(ua, heatJPerK, tempC, (uaWPerK * airC) / ua, (uaWPerK * slope) / ua, 0, 0, length);
    let next = after(part);
    const meltedJ = k * Math.max(0, (tempC + next) / 2) * part;
    if (meltedJ > ice.leftJ) {
      part *= ice.leftJ / meltedJ;
      next = after(part);
    }
    ice.leftJ = Math.max(0, ice.leftJ - meltedJ);
    tempC = next;
    now += part;
  }
  return tempC;
}

/** How far the box's air has moved at each point for one degree more in every outdoor value: the same model without power. */
export function responseOf(
  { atMs, exposure }: JourneySteps,
  decays: Float64Array,
  room = ownRoom,
): Float64Array {
  const response = room(atMs.length);
  let moved = 0;
  for (let step = 0; step < decays.length; step += 1) {
    const air = exposure[step] ?? 0;
    moved = air + (moved - air) * (decays[step] ?? 0);
    response[step + 1] = moved;
  }
  return response;
}
