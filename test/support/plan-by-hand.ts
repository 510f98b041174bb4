import type { PoolParcel, PoolProblem, Slot } from '@shared/pooling/problem';
import { cheapestByHand, found, isKept, legsOf } from './by-hand';

/** Where each parcel rides, null for nowhere. */
type Assignment = readonly (Slot | null)[];

/**
 * The cheapest plan by trying every assignment of parcels to coordinator, day and counter, each run at its cheapest by
 * trying every order at every minute. Answers the objective in cents. For a handful of parcels.
 */
export function cheapestPlanByHand(problem: PoolProblem): number {
  const prices = new Map<string, number>();
  const price = (slot: Slot, ids: readonly number[]): number => {
    const key = `${slot.coordinatorId} ${slot.date} ${slot.counterId} ${ids.join(',')}`;
    let cents = prices.get(key);
    if (cents === undefined)
      prices.set(key, (cents = Math.round(cheapestByHand(legsOf(problem, slot, ids)))));
    return cents;
  };
  const choices = problem.parcels.map((parcel) => [null, ...slotsFor(problem, parcel)]);
  let best = Infinity;
  for (const assignment of product(choices)) best = Math.min(best, objective(problem, assignment, price));
  return best;
}

function slotsFor(problem: PoolProblem, parcel: PoolParcel): Slot[] {
  const pin = problem.pins.find(({ parcelId }) => parcelId === parcel.id);
  const { daysAway } = found(problem.stops, parcel.stopId);
  const counter = found(problem.counters, parcel.counterId);
  return parcel.days.flatMap(({ date }) =>
    problem.coordinators.flatMap((driver): Slot[] => {
      if (daysAway.includes(date) || counter.cutOffMinutes[date] === undefined) return [];
      if (!driver.freeDates.includes(date)) return [];
      if (pin && (pin.date !== date || pin.coordinatorId !== driver.id || pin.counterId !== counter.id))
        return [];
      return [{ coordinatorId: driver.id, date, counterId: counter.id }];
    }),
  );
}

function objective(
  problem: PoolProblem,
  assignment: Assignment,
  price: (slot: Slot, ids: readonly number[]) => number,
): number {
  let cents = 0;
  const runs = new Map<string, { slot: Slot; parcels: PoolParcel[] }>();
  for (const [index, slot] of assignment.entries()) {
    const parcel = problem.parcels[index];
    if (!parcel) continue;
    if (!slot) {
      cents += problem.costs.unplacedCents;
      continue;
    }
    cents += parcel.days.find(({ date }) => date === slot.date)?.penaltyCents ?? NaN;
    const key = `${slot.coordinatorId} ${slot.date}`;
    const run = runs.get(key) ?? { slot, parcels: [] };
    // One run a coordinator and day, to one counter.
    if (run.slot.counterId !== slot.counterId) return Infinity;
    run.parcels.push(parcel);
    runs.set(key, run);
  }
  for (const { slot, parcels } of runs.values()) {
    const loadL = parcels.reduce((sum, { volumeL }) => sum + volumeL, 0);
    if (loadL > found(problem.coordinators, slot.coordinatorId).capacityL) return Infinity;
    const ids = [...new Set(parcels.map(({ stopId }) => stopId))].sort((a, b) => a - b);
    cents += problem.costs.runFixedCents + price(slot, ids);
  }
  return cents;
}

function* product<T>(choices: readonly (readonly T[])[]): Generator<T[]> {
  const [first, ...rest] = choices;
  if (!first) {
    yield [];
    return;
  }
  for (const tail of product(rest)) for (const head of first) yield [head, ...tail];
}

interface DrivenRun extends Slot {
  readonly order: readonly number[];
  readonly departMinute: number;
  readonly parcelIds: readonly number[];
}

/** What is wrong with a new run, looked at without the program's own checker: sentences, none when it is fine. */
export function faultsByHand(problem: PoolProblem, run: DrivenRun): string[] {
  const faults: string[] = [];
  const parcels = run.parcelIds.map((id) => found(problem.parcels, id));
  const driver = found(problem.coordinators, run.coordinatorId);
  const fixed = problem.fixedRuns.find(
    (one) => one.coordinatorId === run.coordinatorId && one.date === run.date,
  );
  const loadL = parcels.reduce((sum, { volumeL }) => sum + volumeL, fixed?.volumeL ?? 0);
  if (loadL > driver.capacityL + 1e-6) faults.push('over capacity');
  if (!fixed && !driver.freeDates.includes(run.date)) faults.push('the driver is not free');
  for (const parcel of parcels) {
    if (!parcel.days.some(({ date }) => date === run.date))
      faults.push(`parcel ${parcel.id}: not a safe day`);
    if (parcel.counterId !== run.counterId) faults.push(`parcel ${parcel.id}: wrong counter`);
    if (found(problem.stops, parcel.stopId).daysAway.includes(run.date))
      faults.push(`parcel ${parcel.id}: the breeder is away`);
    if (!run.order.includes(parcel.stopId)) faults.push(`parcel ${parcel.id}: not collected`);
    const pin = problem.pins.find(({ parcelId }) => parcelId === parcel.id);
    if (
      pin &&
      (pin.date !== run.date || pin.coordinatorId !== run.coordinatorId || pin.counterId !== run.counterId)
    )
      faults.push(`parcel ${parcel.id}: its pin was moved`);
  }
  const legs = legsOf(problem, run, run.order);
  if (
    !isKept(
      legs,
      run.order.map((_, index) => index),
      run.departMinute,
    )
  )
    faults.push('a window, the cut-off or the longest run is missed');
  return faults;
}
