import type { Counter, Parcel, Person } from '@shared/contract';
import { addDays } from '@shared/calendar/add-days';
import { localInstant } from '@shared/calendar/local-instant';
import { cutOffInstant } from '@shared/calendar/cut-off-instant';
import { splitCost } from '@shared/money/split-cost';
import { aloneTrip } from '@shared/pooling/cost';
import { createRunPricer, type PricedRun, type RunPricer } from '@shared/pooling/run-pricer';
import { timeline, type Timeline } from '@shared/pooling/timeline';
import { mostStops, type PoolProblem, type Slot } from '@shared/pooling/problem';
import { runProblems, type RunFacts } from './run-problems';
import { oneRunProblem, type RunWorld } from './run-world';

/** Everything about a run that follows from its day, driver, counter and parcels. */
export interface RunSheet {
  readonly departAt: string;
  readonly arriveAt: string;
  readonly cutOffAt: string;
  readonly driveMinutes: number;
  readonly miles: number;
  readonly lastLegMinutes: number;
  readonly fixedCents: number;
  readonly drivingCents: number;
  readonly aloneCents: number;
  readonly problems: readonly string[];
  readonly stops: readonly {
    breederId: number;
    arriveAt: string;
    leaveAt: string;
    waitMinutes: number;
    driveMinutes: number;
    miles: number;
  }[];
  readonly shares: ReadonlyMap<number, number>;
}

export interface RunFrame {
  readonly coordinator: Person;
  readonly counter: Counter;
  readonly date: string;
}

/** Works a run out: best order, clock, cost, shares, and in plain sentences what is wrong with it. */
export function runSheet(
  world: RunWorld,
  frame: RunFrame,
  parcels: readonly Parcel[],
  facts: RunFacts,
): RunSheet {
  const { coordinator, counter, date } = frame;
  const inTime = oneRunProblem(world, coordinator, counter, date, parcels, facts.earliestMinute);
  const isTooLate = facts.earliestMinute !== null && !canBeDriven(inTime, frame);
  // Too late for today: shown as it would have gone, with the problem beside it.
  const problem = isTooLate ? { ...inTime, earliestMinutes: {} } : inTime;
  const slot: Slot = { coordinatorId: coordinator.id, date, counterId: counter.id };
  const ids = problem.stops.map(({ id }) => id).sort((a, b) => a - b);
  const pricer = createRunPricer(problem);
  const exact = ids.length > 0 && problem.coordinators.length > 0 ? pricer.price(slot, ids) : null;
  const priced = exact ?? relaxed(pricer, slot, ids, problem);
  const clock = priced ? drive(problem, priced) : null;
  const at = (minute: number) => new Date(instantOf(date, minute, world.zone)).toISOString();
  const cutOffMs = cutOffInstant(counter, date) ?? localInstant(date, 0, world.zone);
  const fixedCents = ids.length > 0 ? world.costs.runFixedCents : 0;
  const drivingCents = priced?.drivingCents ?? 0;
  return {
    departAt: clock ? at(clock.departMinute) : new Date(cutOffMs).toISOString(),
    arriveAt: clock ? at(clock.arriveMinute) : new Date(cutOffMs).toISOString(),
    cutOffAt: new Date(cutOffMs).toISOString(),
    driveMinutes: clock?.driveMinutes ?? 0,
    miles: clock?.miles ?? 0,
    lastLegMinutes: clock?.lastLegMinutes ?? 0,
    fixedCents,
    drivingCents,
    aloneCents: aloneCents(world, problem),
    problems: runProblems(
      { ...facts, isDriven: exact !== null, isTooLate: isTooLate && exact !== null },
      problem,
      frame,
      parcels,
    ),
    stops: (clock?.stops ?? []).map((stop) => ({
      breederId: stop.stopId,
      arriveAt: at(stop.arriveMinute),
      leaveAt: at(stop.leaveMinute),
      waitMinutes: stop.waitMinutes,
      driveMinutes: stop.driveMinutes,
      miles: stop.miles,
    })),
    shares: shares(pricer, slot, problem, ids, fixedCents, drivingCents),
  };
}

/** Minutes on the clock's face; a long drive may begin the evening before. */
function instantOf(date: string, minute: number, zone: string): number {
  const days = Math.floor(minute / 1440);
  return localInstant(addDays(date, days), minute - days * 1440, zone);
}

function canBeDriven(problem: PoolProblem, { coordinator, counter, date }: RunFrame): boolean {
  const ids = problem.stops.map(({ id }) => id);
  if (ids.length === 0 || problem.coordinators.length === 0) return false;
  const slot: Slot = { coordinatorId: coordinator.id, date, counterId: counter.id };
  return createRunPricer(problem).price(slot, ids) !== null;
}

function relaxed(
  pricer: RunPricer,
  slot: Slot,
  ids: readonly number[],
  problem: PoolProblem,
): PricedRun | null {
  return ids.length > 0 && problem.coordinators.length > 0 && ids.length <= mostStops
    ? pricer.relaxed(slot, ids)
    : null;
}

function drive(problem: PoolProblem, priced: PricedRun): Timeline | null {
  const [driver] = problem.coordinators;
  const [counter] = problem.counters;
  if (!driver || !counter) return null;
  const stops = priced.order.flatMap((id) => problem.stops.find((breeder) => breeder.id === id) ?? []);
  return timeline(driver, stops, counter, priced.departMinute, problem.costs.circuity);
}

function aloneCents(world: RunWorld, problem: PoolProblem): number {
  const [counter] = problem.counters;
  if (!counter) return 0;
  const perMile = world.policy.pooling.aloneCentsPerMile;
  return problem.stops.reduce(
    (sum, breeder) => sum + aloneTrip(breeder, counter, problem.costs, perMile).cents,
    0,
  );
}

/** A set of breeders alone is priced without the windows when it cannot be driven with them: shares need every subset. */
function shares(
  pricer: RunPricer,
  slot: Slot,
  problem: PoolProblem,
  ids: readonly number[],
  fixedCents: number,
  drivingCents: number,
): ReadonlyMap<number, number> {
  if (ids.length === 0 || ids.length > mostStops || problem.coordinators.length === 0) return new Map();
  const sharers = problem.parcels.map((parcel) => ({ parcelId: parcel.id, breederId: parcel.breederId }));
  const all = (1 << ids.length) - 1;
  return splitCost(sharers, { fixedCents, drivingCents }, (mask) => {
    if (mask === all) return drivingCents;
    const some = ids.filter((_, index) => mask & (1 << index));
    return (pricer.price(slot, some) ?? pricer.relaxed(slot, some)).drivingCents;
  });
}
