import type { Counter, Parcel, Person } from '@shared/contract';
import { localInstant } from '@shared/calendar/local-instant';
import { cutOffInstant } from '@shared/calendar/cut-off-instant';
import { splitCost } from '@shared/money/split-cost';
import { aloneTrip } from '@shared/pooling/cost';
import { createRunPricer, type PricedRun, type RunPricer } from '@shared/pooling/run-pricer';
import { timeline, type Timeline } from '@shared/pooling/timeline';
import type { PoolProblem, Slot } from '@shared/pooling/problem';
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
  readonly stops: readonly { breederId: number; arriveAt: string; leaveAt: string; waitMinutes: number; driveMinutes: number; miles: number }[];
  readonly shares: ReadonlyMap<number, number>;
}

export interface RunFrame {
  readonly coordinator: Person;
  readonly counter: Counter;
  readonly date: string;
}

/** Works a run out: best order, clock, cost, shares, and in plain sentences what is wrong with it. */
export function runSheet(world: RunWorld, frame: RunFrame, parcels: readonly Parcel[]): RunSheet {
  const { coordinator, counter, date } = frame;
  const problem = oneRunProblem(world, coordinator, counter, date, parcels);
  const slot: Slot = { coordinatorId: coordinator.id, date, counterId: counter.id };
  const ids = problem.breeders.map(({ id }) => id).sort((a, b) => a - b);
  const pricer = createRunPricer(problem);
  const exact = ids.length > 0 && problem.coordinators.length > 0 ? pricer.price(slot, ids) : null;
  const priced = exact ?? relaxed(pricer, slot, ids, problem);
  const clock = priced ? drive(problem, priced) : null;
  const at = (minute: number) => new Date(localInstant(date, 0, world.zone) + minute * 60_000).toISOString();
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
    problems: problemsOf(problem, frame, parcels, exact !== null),
    stops: (clock?.stops ?? []).map((stop) => ({
      breederId: stop.breederId,
      arriveAt: at(stop.arriveMinute),
      leaveAt: at(stop.leaveMinute),
      waitMinutes: stop.waitMinutes,
      driveMinutes: stop.driveMinutes,
      miles: stop.miles,
    })),
    shares: shares(pricer, slot, problem, ids, fixedCents, drivingCents),
  };
}

function relaxed(pricer: RunPricer, slot: Slot, ids: readonly number[], problem: PoolProblem): PricedRun | null {
  return ids.length > 0 && problem.coordinators.length > 0 && ids.length <= 12 ? pricer.relaxed(slot, ids) : null;
}

function drive(problem: PoolProblem, priced: PricedRun): Timeline | null {
  const [driver] = problem.coordinators;
  const [counter] = problem.counters;
  if (!driver || !counter) return null;
  const stops = priced.order.flatMap((id) => problem.breeders.find((breeder) => breeder.id === id) ?? []);
  return timeline(driver, stops, counter, priced.departMinute, problem.costs.circuity);
}

function aloneCents(world: RunWorld, problem: PoolProblem): number {
  const [counter] = problem.counters;
  if (!counter) return 0;
  const perMile = world.policy.pooling.aloneCentsPerMile;
  return problem.breeders.reduce((sum, breeder) => sum + aloneTrip(breeder, counter, problem.costs, perMile).cents, 0);
}

/** A set of breeders alone is priced without the windows when it cannot be driven with them: shares need every subset. */
function shares(pricer: RunPricer, slot: Slot, problem: PoolProblem, ids: readonly number[], fixedCents: number, drivingCents: number): ReadonlyMap<number, number> {
  if (ids.length === 0 || ids.length > 12 || problem.coordinators.length === 0) return new Map();
  const sharers = problem.parcels.map((parcel) => ({ parcelId: parcel.id, breederId: parcel.breederId }));
  const all = (1 << ids.length) - 1;
  return splitCost(sharers, { fixedCents, drivingCents }, (mask) => {
    if (mask === all) return drivingCents;
    const some = ids.filter((_, index) => mask & (1 << index));
    return (pricer.price(slot, some) ?? pricer.relaxed(slot, some)).drivingCents;
  });
}

function problemsOf(problem: PoolProblem, frame: RunFrame, parcels: readonly Parcel[], canBeDriven: boolean): string[] {
  const { coordinator, counter } = frame;
  if (parcels.length === 0) return ['No parcel is on this run yet.'];
  const found: string[] = [];
  const loadL = parcels.reduce((sum, parcel) => sum + parcel.box.volumeL, 0);
  const capacityL = coordinator.coordinator?.capacityL ?? 0;
  if (loadL > capacityL + 1e-6) found.push(`The boxes take ${loadL.toFixed(1)} L, the vehicle has ${capacityL} L.`);
  if (cutOffInstant(counter, frame.date) === null) found.push(`The ${counter.name} takes no drop-off that day.`);
  else if (!canBeDriven) found.push('No order of the stops keeps the collection windows, the cut-off and the longest run.');
  const placed = new Set(problem.breeders.map(({ id }) => id));
  for (const parcel of parcels) {
    if (parcel.dropOff.counterId !== counter.id) found.push(`${parcel.code} is checked for the ${parcel.dropOff.name}, not this counter.`);
    if (!placed.has(parcel.breeder.id)) found.push(`${parcel.code}: where ${parcel.breeder.name} lives is not known.`);
    if (parcel.shipDate !== null && parcel.shipDate !== frame.date) found.push(`${parcel.code} is booked on ${parcel.shipDate}.`);
    if (parcel.flexible && (frame.date < parcel.flexible.from || frame.date > parcel.flexible.to)) found.push(`${parcel.code} was not left open for this day.`);
  }
  return found;
}
