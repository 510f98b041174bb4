import type { PoolStop, PoolProblem, Slot } from './problem';
import { estimateLeg } from './travel';

/** A run as it would be driven and loaded. */
export interface PlannedRun extends Slot {
  /** The confirmed run that takes more parcels, or null for a new one. */
  readonly runId: number | null;
  /** Breeders in driving order, those of a confirmed run among them. */
  readonly order: readonly number[];
  readonly departMinute: number;
  /** The parcels put in (a confirmed run's own are not listed). */
  readonly parcelIds: readonly number[];
  /** What the plan pays for it in whole cents: a confirmed run's own cost is not counted again. */
  readonly fixedCents: number;
  readonly drivingCents: number;
}

export interface Plan {
  readonly runs: readonly PlannedRun[];
  readonly unplacedIds: readonly number[];
}

export interface Violation {
  readonly code:
    | 'parcel-twice'
    | 'parcel-lost'
    | 'parcel-unknown'
    | 'day-not-safe'
    | 'wrong-counter'
    | 'breeder-away'
    | 'pin-broken'
    | 'no-stop'
    | 'idle-stop'
    | 'stop-twice'
    | 'confirmed-stop-lost'
    | 'capacity'
    | 'window'
    | 'cut-off'
    | 'too-long'
    | 'too-early'
    | 'driver-not-free'
    | 'driver-twice'
    | 'run-closed'
    | 'counter-closed'
    | 'unknown';
  readonly text: string;
}

/**
 * Looks at a finished plan with fresh eyes: drives every run minute by minute and counts every parcel. Shares nothing with
 * the search but the estimate of a leg. An empty answer means the plan can be carried out.
 */
export function checkPlan(problem: PoolProblem, plan: Plan): Violation[] {
  return [
    ...checkParcels(problem, plan),
    ...checkDrivers(problem, plan),
    ...plan.runs.flatMap((run) => checkRun(problem, run)),
  ];
}

function checkParcels(problem: PoolProblem, plan: Plan): Violation[] {
  const found: Violation[] = [];
  const times = new Map<number, number>();
  for (const id of [...plan.runs.flatMap(({ parcelIds }) => parcelIds), ...plan.unplacedIds])
    times.set(id, (times.get(id) ?? 0) + 1);
  for (const { id } of problem.parcels) {
    const count = times.get(id) ?? 0;
    if (count === 0)
      found.push({ code: 'parcel-lost', text: `Parcel ${id} is neither on a run nor unplaced.` });
    if (count > 1) found.push({ code: 'parcel-twice', text: `Parcel ${id} is named ${count} times.` });
    times.delete(id);
  }
  for (const id of times.keys())
    found.push({ code: 'parcel-unknown', text: `Parcel ${id} is not part of the problem.` });
  for (const pin of problem.pins) {
    const run = plan.runs.find(({ parcelIds }) => parcelIds.includes(pin.parcelId));
    if (
      run &&
      (run.coordinatorId !== pin.coordinatorId || run.date !== pin.date || run.counterId !== pin.counterId)
    )
      found.push({ code: 'pin-broken', text: `Parcel ${pin.parcelId} is pinned to another run.` });
  }
  return found;
}

function checkDrivers(problem: PoolProblem, plan: Plan): Violation[] {
  const found: Violation[] = [];
  const seen = new Set<string>();
  for (const run of plan.runs) {
    const key = `${run.coordinatorId} on ${run.date}`;
    if (seen.has(key)) found.push({ code: 'driver-twice', text: `Coordinator ${key} drives twice.` });
    seen.add(key);
    const fixed = problem.fixedRuns.find(
      (other) => other.coordinatorId === run.coordinatorId && other.date === run.date,
    );
    if ((fixed?.runId ?? null) !== run.runId || (fixed && fixed.counterId !== run.counterId))
      found.push({ code: 'driver-twice', text: `Coordinator ${key} has a confirmed run already.` });
    if (fixed && fixed.takes !== 'more')
      found.push({ code: 'run-closed', text: `The run of coordinator ${key} takes nothing from a plan.` });
    const coordinator = problem.coordinators.find(({ id }) => id === run.coordinatorId);
    if (!fixed && !coordinator?.freeDates.includes(run.date))
      found.push({ code: 'driver-not-free', text: `Coordinator ${key} is not free.` });
  }
  return found;
}

function checkRun(problem: PoolProblem, run: PlannedRun): Violation[] {
  const fixed = run.runId === null ? undefined : problem.fixedRuns.find(({ runId }) => runId === run.runId);
  const coordinator = problem.coordinators.find(({ id }) => id === run.coordinatorId);
  const parcels = problem.parcels.filter(({ id }) => run.parcelIds.includes(id));
  const found: Violation[] = [];
  for (const parcel of parcels) {
    if (!parcel.days.some(({ date }) => date === run.date))
      found.push({ code: 'day-not-safe', text: `Parcel ${parcel.id} has no safe day on ${run.date}.` });
    if (parcel.counterId !== run.counterId)
      found.push({ code: 'wrong-counter', text: `Parcel ${parcel.id} is for another counter.` });
    if (!run.order.includes(parcel.stopId))
      found.push({ code: 'no-stop', text: `Nobody collects parcel ${parcel.id}.` });
    if (problem.stops.find(({ id }) => id === parcel.stopId)?.daysAway.includes(run.date))
      found.push({ code: 'breeder-away', text: `The breeder of parcel ${parcel.id} is away.` });
  }
  const needed = new Set([...(fixed?.stopIds ?? []), ...parcels.map(({ stopId }) => stopId)]);
  for (const id of run.order)
    if (!needed.has(id))
      found.push({ code: 'idle-stop', text: `There is nothing to collect at breeder ${id}.` });
  for (const id of fixed?.stopIds ?? [])
    if (!run.order.includes(id))
      found.push({ code: 'confirmed-stop-lost', text: `The confirmed stop at breeder ${id} is left out.` });
  if (new Set(run.order).size !== run.order.length)
    found.push({ code: 'stop-twice', text: 'A breeder is visited twice.' });
  const loadL = parcels.reduce((sum, { volumeL }) => sum + volumeL, fixed?.volumeL ?? 0);
  if (loadL > (coordinator?.capacityL ?? 0) + 1e-6)
    found.push({ code: 'capacity', text: `${loadL} L do not fit into ${coordinator?.capacityL ?? 0} L.` });
  return [...found, ...checkDrive(problem, run)];
}

function checkDrive(problem: PoolProblem, run: PlannedRun): Violation[] {
  const coordinator = problem.coordinators.find(({ id }) => id === run.coordinatorId);
  const counter = problem.counters.find(({ id }) => id === run.counterId);
  const stops = run.order.map((id) => problem.stops.find((breeder) => breeder.id === id));
  if (!coordinator || !counter || stops.some((stop) => !stop))
    return [{ code: 'unknown', text: 'Somebody on the run is not known.' }];
  const cutOffMinute = counter.cutOffMinutes[run.date];
  if (cutOffMinute === undefined)
    return [{ code: 'counter-closed', text: `The counter takes nothing on ${run.date}.` }];
  const found: Violation[] = [];
  if (run.departMinute < (problem.earliestMinutes[run.date] ?? 0))
    found.push({ code: 'too-early', text: 'It would have to leave before now.' });
  let minute = run.departMinute;
  let here: { lat: number; lon: number } = coordinator;
  for (const stop of stops as PoolStop[]) {
    minute += estimateLeg(here, stop, problem.costs.circuity).minutes;
    if (minute > stop.windowCloseMinute)
      found.push({
        code: 'window',
        text: `Breeder ${stop.id} is reached ${minute - stop.windowCloseMinute} min late.`,
      });
    minute = Math.max(minute, stop.windowOpenMinute) + stop.serviceMinutes;
    here = stop;
  }
  minute += estimateLeg(here, counter, problem.costs.circuity).minutes;
  const late = minute - (cutOffMinute - problem.costs.cutOffSlackMinutes);
  if (late > 0) found.push({ code: 'cut-off', text: `The counter is reached ${late} min too late.` });
  const length = minute - run.departMinute;
  if (length > coordinator.longestRunMinutes)
    found.push({ code: 'too-long', text: `The run takes ${length} min.` });
  return found;
}
