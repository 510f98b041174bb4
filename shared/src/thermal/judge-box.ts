import type { Pack, RangeF } from '../contract/days';
import type { OutdoorForecast } from '../forecast/outdoor-forecast';
import type { ContentsLimits } from '../verdict/contents-limits';
import type { DayQuestion } from '../verdict/day-question';
import { boxModel } from './box-model';
import { chanceOfFit, fitBand, type BandFit } from './chance';
import { journeyLegs, lateLegs, type Leg, type PlaceRole } from './journey';
import { outdoorHours, type OutdoorHours } from './outdoor-hours';
import {
  boxTemps,
  decaysOf,
  journeySteps,
  responseOf,
  sharedRoom,
  type BoxRun,
  type JourneySteps,
} from './simulate';
import { ThermalError } from './thermal-error';

/** The air in the box for a ship day, with the pack that suits best, and how sure that is. */
export interface BoxJudgement {
  readonly pack: Pack;
  readonly chance: number;
  readonly fit: BandFit;
  readonly inBox: RangeF;
  readonly nominal: BoxRun;
  /** Null where the forecast does not reach a day further. */
  readonly late: {
    readonly chance: number;
    readonly fit: BandFit;
    readonly run: BoxRun;
    readonly where: 'hub' | 'destination';
  } | null;
}

export interface BoxAsk {
  readonly question: DayQuestion;
  readonly limits: ContentsLimits;
  /** Packs that come into question, the least first. */
  readonly packs: readonly Pack[];
  readonly sigmaF: number;
}

/** Chances closer than this are a tie, and the lesser pack is taken. */
const tie = 1e-6;

/**
 * Runs the box through its journey with every pack that comes into question and takes the best: the best chance at the planned
 * arrival, then a day late, then the lesser pack (design 5.5). Throws ThermalError where something cannot be worked with.
 */
export function judgeBox({ question, limits, packs, sigmaF }: BoxAsk): BoxJudgement {
  const { policy, contents, box } = question;
  const massG = contents.reduce((sum, line) => sum + line.quantity * line.massG, 0);
  const model = boxModel(box, massG, policy.boxModel);
  const way = wayOf(question);
  const consts = { heat: policy.heatPack, cold: policy.coldPack };
  const points = [way, ...way.late].reduce((sum, { steps }) => sum + steps.atMs.length, 0);
  // Decays, responses and one run for each pack.
  const room = sharedRoom(points * (2 + packs.length));
  const feel = (steps: JourneySteps): FeltWay => {
    const decays = decaysOf(model, steps, room);
    return { steps, decays, response: responseOf(steps, decays, room) };
  };
  const run = ({ steps, decays, response }: FeltWay, pack: Pack): BoxRun => ({
    atMs: steps.atMs,
    tempF: boxTemps(model, steps, decays, pack, consts, policy.boxModel.startF, room),
    response,
    legs: steps.legOf,
  });
  const planned = feel(way.steps);
  const band = { lowF: limits.bandLowF, highF: limits.bandHighF };
  const endurance = { lowF: limits.enduranceLowF, highF: limits.enduranceHighF };
  const lateWays = way.late.map(({ where, steps }) => ({ where, felt: feel(steps) }));
  let best: BoxJudgement | null = null;
  for (const pack of packs) {
    const nominal = run(planned, pack);
    const fit = fitBand(nominal, band);
    const chance = chanceOfFit(fit, sigmaF);
    let late: BoxJudgement['late'] = null;
    for (const one of lateWays) {
      const lateRun = run(one.felt, pack);
      const lateFit = fitBand(lateRun, endurance);
      const lateChance = chanceOfFit(lateFit, sigmaF);
      if (late === null || lateChance < late.chance)
        late = { chance: lateChance, fit: lateFit, run: lateRun, where: one.where };
    }
    const found: BoxJudgement = { pack, chance, fit, inBox: rangeOf(nominal.tempF), nominal, late };
    if (best === null || isBetter(found, best)) best = found;
  }
  if (!best) throw new RangeError('No pack was asked about.');
  return best;
}

function isBetter(one: BoxJudgement, than: BoxJudgement): boolean {
  if (Math.abs(one.chance - than.chance) > tie) return one.chance > than.chance;
  return (one.late?.chance ?? 0) > (than.late?.chance ?? 0) + tie;
}

/** A journey as one box feels it. */
interface FeltWay {
  readonly steps: JourneySteps;
  readonly decays: Float64Array;
  readonly response: Float64Array;
}

interface Way {
  readonly steps: JourneySteps;
  readonly late: readonly { readonly where: 'hub' | 'destination'; readonly steps: JourneySteps }[];
}

// Parcels on one route and day have the same air round them, whatever is in the box. The key and `of` hold all that it rests on.
// Kept by destination: a circle sends from few counters to very many, and one map for all of them would overflow at each look.
const ways = new WeakMap<
  OutdoorForecast,
  Map<string, { readonly of: readonly unknown[]; readonly way: Way }>
>();
const most = 400;

function wayOf(question: DayQuestion): Way {
  const { weather, origin, hub, destination, policy, shipDate } = question;
  if (!weather.origin || !weather.hub || !weather.destination)
    throw new ThermalError('no-forecast', 'A place of the route has no forecast.');
  const end = destination.kind === 'hold' ? destination.counter : destination.door;
  const of = [
    weather.origin,
    weather.hub,
    origin,
    hub,
    end,
    policy.journey,
    policy.packedBeforeCutOffMinutes,
  ];
  const known = ways.get(weather.destination) ?? new Map<string, { of: readonly unknown[]; way: Way }>();
  ways.set(weather.destination, known);
  const key = `${shipDate} ${origin.id} ${hub.id} ${destination.kind} ${end.name} ${end.city}`;
  const there = known.get(key);
  if (there?.of.every((one, index) => one === of[index])) return there.way;
  const way = makeWay(question, {
    origin: outdoorHours(weather.origin),
    hub: outdoorHours(weather.hub),
    destination: outdoorHours(weather.destination),
  });
  if (known.size >= most) known.clear();
  known.set(key, { of, way });
  return way;
}

function makeWay(question: DayQuestion, outdoor: Readonly<Record<PlaceRole, OutdoorHours>>): Way {
  const legs = journeyLegs(question);
  const steps = journeySteps(legs, outdoor);
  const late = (['hub', 'destination'] as const).flatMap((where) => {
    const longer = stepsIfKnown(lateLegs(legs, where, question.policy.journey.late), outdoor);
    return longer ? [{ where, steps: longer }] : [];
  });
  // Only one of the two being known would hide the worse one.
  return { steps, late: late.length === 2 ? late : [] };
}

function stepsIfKnown(
  legs: readonly Leg[],
  outdoor: Readonly<Record<PlaceRole, OutdoorHours>>,
): JourneySteps | null {
  try {
    return journeySteps(legs, outdoor);
  } catch (error) {
    if (error instanceof ThermalError && error.code === 'no-forecast') return null;
    throw error;
  }
}

function rangeOf(tempF: Float64Array): RangeF {
  let lowF = Infinity;
  let highF = -Infinity;
  for (const value of tempF) {
    if (value < lowF) lowF = value;
    if (value > highF) highF = value;
  }
  return { lowF, highF };
}
