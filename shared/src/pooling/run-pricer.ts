import { legCents } from './cost';
import { mostStops, type Point, type PoolStop, type PoolProblem, type Slot } from './problem';
import {
  bestPath,
  sequenceTable,
  type Path,
  type SequenceLeg,
  type SequenceProblem,
  type SequenceTable,
} from './sequence';
import { estimateLeg } from './travel';

/** The cheapest way to drive a set of stops. */
export interface PricedRun {
  /** Breeders in driving order. */
  readonly order: readonly number[];
  readonly departMinute: number;
  /** Driving in whole cents, without the fixed part. */
  readonly drivingCents: number;
}

/** Prices runs exactly; the answers are kept, for the same stops come up again and again. */
export interface RunPricer {
  /** Null when no order keeps windows, cut-off and the longest run, or there are more stops than a run may have. */
  price(slot: Slot, stopIds: readonly number[]): PricedRun | null;
  /** The same with windows, cut-off and length left aside: for a run that is to be shown with what is wrong. */
  relaxed(slot: Slot, stopIds: readonly number[]): PricedRun;
}

const never = 1e7;
/** A run to a counter that is shut that day is shown as if it had to be there by 17:00. */
const shutCounterMinute = 17 * 60;

/** `stopIds` of the pricer's world is every breeder of the problem; unknown ids throw. */
export function createRunPricer(problem: PoolProblem): RunPricer {
  const breeders = new Map(problem.stops.map((breeder) => [breeder.id, breeder]));
  const byCounter = new Map(problem.counters.map((counter) => [counter.id, stopsOf(problem, counter.id)]));
  const tables = new Map<string, SequenceTable>();
  const memo = new Map<string, PricedRun | null>();
  const named = (ids: readonly number[]) => ids.map((id) => need(breeders.get(id), `breeder ${id}`));

  const solve = (slot: Slot, ids: readonly number[], key: string): PricedRun | null => {
    const everyone = byCounter.get(slot.counterId) ?? [];
    const inTable = everyone.length <= mostStops && ids.every((id) => everyone.includes(id));
    if (!inTable) return priced(bestPath(sequenceOf(problem, slot, named(ids))), ids);
    let table = tables.get(key);
    if (!table) tables.set(key, (table = sequenceTable(sequenceOf(problem, slot, named(everyone)))));
    return priced(table.path(ids.reduce((mask, id) => mask | (1 << everyone.indexOf(id)), 0)), everyone);
  };

  return {
    price(slot, stopIds) {
      if (stopIds.length === 0 || stopIds.length > mostStops) return null;
      const frame = frameKey(problem, slot);
      if (frame === null) return null;
      const ids = stopIds.toSorted((a, b) => a - b);
      const key = `${frame}:${ids.join(',')}`;
      let answer = memo.get(key);
      if (answer === undefined) memo.set(key, (answer = solve(slot, ids, frame)));
      return answer;
    },
    relaxed(slot, stopIds) {
      const exact = sequenceOf(problem, slot, named(stopIds.toSorted((a, b) => a - b)));
      const loose = {
        ...exact,
        stops: exact.stops.map((stop) => ({ ...stop, openMinute: -never, closeMinute: never })),
        earliestDepartMinute: -never,
        latestArriveMinute: exact.latestArriveMinute < 0 ? shutCounterMinute : exact.latestArriveMinute,
        longestMinutes: never,
      };
      const answer = priced(
        bestPath(loose),
        stopIds.toSorted((a, b) => a - b),
      );
      return {
        ...need(answer, 'a path without limits'),
        departMinute: Math.max(answer?.departMinute ?? 0, exact.earliestDepartMinute),
      };
    },
  };
}

/** Minutes and cents of the stops of a run, as the sequence takes them. */
export function sequenceOf(problem: PoolProblem, slot: Slot, stops: readonly PoolStop[]): SequenceProblem {
  const { costs } = problem;
  const coordinator = need(
    problem.coordinators.find(({ id }) => id === slot.coordinatorId),
    `coordinator ${slot.coordinatorId}`,
  );
  const counter = need(
    problem.counters.find(({ id }) => id === slot.counterId),
    `counter ${slot.counterId}`,
  );
  const leg = (a: Point, b: Point): SequenceLeg => {
    const road = estimateLeg(a, b, costs.circuity);
    return {
      minutes: road.minutes,
      cents: legCents(road, coordinator.centsPerMile, costs.driverMinuteCents),
    };
  };
  return {
    stops: stops.map((stop) => ({
      openMinute: stop.windowOpenMinute,
      closeMinute: stop.windowCloseMinute,
      serviceMinutes: stop.serviceMinutes,
      fromStart: leg(coordinator, stop),
      toEnd: leg(stop, counter),
    })),
    between: stops.map((a) => stops.map((b) => leg(a, b))),
    earliestDepartMinute: problem.earliestMinutes[slot.date] ?? 0,
    latestArriveMinute: (counter.cutOffMinutes[slot.date] ?? -never) - costs.cutOffSlackMinutes,
    longestMinutes: coordinator.longestRunMinutes,
  };
}

/** Days with the same cut-off and the same earliest minute have the same runs. */
function frameKey(problem: PoolProblem, slot: Slot): string | null {
  const cutOff = problem.counters.find(({ id }) => id === slot.counterId)?.cutOffMinutes[slot.date];
  if (cutOff === undefined) return null;
  return `${slot.coordinatorId}|${slot.counterId}|${cutOff}|${problem.earliestMinutes[slot.date] ?? 0}`;
}

function stopsOf(problem: PoolProblem, counterId: number): number[] {
  const ids = new Set(
    problem.parcels.filter((parcel) => parcel.counterId === counterId).map(({ stopId }) => stopId),
  );
  for (const run of problem.fixedRuns)
    if (run.counterId === counterId) for (const id of run.stopIds) ids.add(id);
  const known = new Set(problem.stops.map(({ id }) => id));
  return [...ids].filter((id) => known.has(id)).sort((a, b) => a - b);
}

function priced(path: Path | null, ids: readonly number[]): PricedRun | null {
  if (!path) return null;
  return {
    order: path.order.map((index) => ids[index] as number),
    departMinute: path.departMinute,
    drivingCents: Math.round(path.cents),
  };
}

function need<T>(value: T | null | undefined, what: string): T {
  if (value == null) throw new RangeError(`The problem has no ${what}.`);
  return value;
}
