import type { DayVerdict, Parcel, Proposal } from '@shared/contract';
import { addDays } from '@shared/calendar/add-days';
import { datesFrom } from '@shared/calendar/dates-from';
import { aloneTrip } from '@shared/pooling/cost';
import type { PlanResult } from '@shared/pooling/plan-runs';
import type { FixedRun, PoolParcel, PoolProblem } from '@shared/pooling/problem';
import type { Deps } from '../deps';
import type { Actor } from '../http/actor';
import { poolBreeder, poolCoordinator, poolCounter, circleMinute, readRunWorld, type RunWorld } from './run-world';
import { runSheet } from './run-sheet';
import { readRuns, whatOf } from './run-view';
import { deleteRuns, findRunParcels, findRuns, insertRun, putOnRun, writeSheet } from './runs-queries';
import { solveInWorker } from './pooling-solver';

const windowDays = 14;
const standing = ['confirmed', 'underway', 'handed-over'] as const;

/** Pools every parcel without a confirmed run; the proposed runs of before are replaced, the confirmed ones stand. */
export async function proposeRuns(deps: Deps, actor: Actor, span: { from?: string | undefined; to?: string | undefined }): Promise<Proposal> {
  const startedMs = performance.now();
  const world = await readRunWorld(deps);
  const today = deps.clock.today(world.zone);
  const from = span.from && span.from > today ? span.from : today;
  const to = span.to && span.to >= from ? span.to : addDays(from, windowDays - 1);
  const parcels = (await deps.services.parcels.inStates(['seeking', 'booked', 'packed'])).filter(
    (parcel) => parcel.run === null || parcel.run.state === 'proposed',
  );
  const days = datesFrom(from, Math.min(28, dayCount(from, to)));
  const verdicts = await deps.services.days.forParcels(parcels.map(({ id }) => id), { from, days: days.length });
  const problem = await buildProblem(deps, world, days, parcels, verdicts);
  const result = await solveInWorker(problem);
  const seconds = (performance.now() - startedMs) / 1000;
  return deps.transaction((tx) => store(tx, actor, world, problem, parcels, result, seconds));
}

const dayCount = (from: string, to: string): number => Math.round((Date.parse(to) - Date.parse(from)) / 86_400_000) + 1;

async function buildProblem(
  deps: Deps, world: RunWorld, dates: readonly string[], parcels: readonly Parcel[], verdicts: ReadonlyMap<number, DayVerdict[]>,
): Promise<PoolProblem> {
  const { services, clock } = deps;
  const breeders = await Promise.all(
    [...world.breeders.values()].map(async (person) => {
      const { daysAway } = await services.people.availability(person.id);
      return poolBreeder(person, dates.filter((date) => daysAway.some((span) => span.from <= date && date <= span.to)));
    }),
  );
  const coordinators = await Promise.all(
    [...world.coordinators.values()].map(async (person) => {
      const availability = await services.people.availability(person.id);
      return poolCoordinator(person, dates.filter((date) => services.people.canDrive(person, availability, date)));
    }),
  );
  const today = clock.today(world.zone);
  const proposed = await findRuns(deps.db, { states: ['proposed'] });
  const pinned = (await findRunParcels(deps.db, { runIds: proposed.map(({ id }) => id) })).filter((link) => link.pinned);
  return {
    parcels: parcels.map((parcel) => poolParcelOf(world, parcel, verdicts.get(parcel.id) ?? [])),
    breeders: breeders.flatMap((breeder) => breeder ?? []),
    coordinators: coordinators.flatMap((coordinator) => coordinator ?? []),
    counters: [...world.counters.values()].filter((counter) => counter.canDropOff && counter.active).map((counter) => poolCounter(counter, dates, world.zone)),
    fixedRuns: (await findRuns(deps.db, { from: dates[0] ?? today, states: standing })).map(
      // A confirmed run stands as it is: a coordinator adds to it by hand, so here it has no room.
      (run): FixedRun => ({ runId: run.id, coordinatorId: run.coordinator_id, date: run.date, counterId: run.counter_id, breederIds: [], volumeL: Number.MAX_SAFE_INTEGER }),
    ),
    pins: pinned.flatMap((link) => {
      const run = proposed.find(({ id }) => id === link.run_id);
      return run ? [{ parcelId: link.parcel_id, coordinatorId: run.coordinator_id, date: run.date, counterId: run.counter_id }] : [];
    }),
    costs: world.costs,
    earliestMinutes: { [today]: circleMinute(clock.nowMs(), today, world.zone) },
  };
}

function poolParcelOf(world: RunWorld, parcel: Parcel, verdicts: readonly DayVerdict[]): PoolParcel {
  const { dayLaterCents, tightCents } = world.policy.pooling;
  const asked = (date: string) =>
    parcel.shipDate !== null ? date === parcel.shipDate : parcel.flexible !== null && parcel.flexible.from <= date && date <= parcel.flexible.to;
  const safe = verdicts.filter((day) => day.verdict === 'open' || day.verdict === 'tight');
  const first = safe.find((day) => asked(day.date))?.date;
  return {
    id: parcel.id,
    label: parcel.code,
    breederId: parcel.breeder.id,
    counterId: parcel.dropOff.counterId,
    volumeL: parcel.box.volumeL,
    days: safe.filter((day) => asked(day.date)).map((day) => ({
      date: day.date,
      penaltyCents: (first ? dayCount(first, day.date) - 1 : 0) * dayLaterCents + (day.verdict === 'tight' ? tightCents : 0),
    })),
    elsewhere: safe.filter((day) => !asked(day.date)).map((day) => day.date),
    unknownDates: verdicts.filter((day) => day.verdict === 'far' && asked(day.date)).map((day) => day.date),
    dayFixed: parcel.shipDate !== null,
  };
}

async function store(
  tx: Deps, actor: Actor, world: RunWorld, problem: PoolProblem, parcels: readonly Parcel[], result: PlanResult, seconds: number,
): Promise<Proposal> {
  const now = tx.clock.nowIso();
  const old = await findRuns(tx.db, { states: ['proposed'] });
  await deleteRuns(tx.db, old.map(({ id }) => id));
  // Somebody may have moved a parcel while the plan was made: only those that still stand as they were are placed.
  const present = new Map((await tx.services.parcels.byIds(parcels.map(({ id }) => id))).map((parcel) => [parcel.id, parcel]));
  const same = new Map(parcels.flatMap((parcel) => (present.get(parcel.id)?.version === parcel.version ? [[parcel.id, parcel] as const] : [])));
  const pinnedIds = new Set(problem.pins.map((pin) => pin.parcelId));
  const ids: number[] = [];
  for (const planned of result.runs) {
    const own = planned.parcelIds.flatMap((id) => same.get(id) ?? []);
    const coordinator = world.coordinators.get(planned.coordinatorId);
    const counter = world.counters.get(planned.counterId);
    if (own.length === 0 || !coordinator || !counter) continue;
    const sheet = runSheet(world, { coordinator, counter, date: planned.date }, own);
    const id = await insertRun(tx.db, planned, sheet, now);
    for (const parcel of own) await putOnRun(tx.db, id, parcel.id, pinnedIds.has(parcel.id));
    await writeSheet(tx.db, id, sheet, now);
    ids.push(id);
  }
  const runs = ids.length > 0 ? await readRuns(tx, { ids }) : [];
  const driveMinutes = runs.reduce((sum, run) => sum + run.driveMinutes, 0);
  const proposal: Proposal = { at: now, runs, ...figures(world, problem, parcels, result), driveMinutes, seconds };
  await tx.db('proposals').insert({ created_at: now, created_by: actor.id, result: JSON.stringify(proposal) });
  return proposal;
}

function figures(world: RunWorld, problem: PoolProblem, parcels: readonly Parcel[], result: PlanResult) {
  const byId = new Map(parcels.map((parcel) => [parcel.id, parcel]));
  const trips = result.runs.flatMap((run) => {
    const counter = problem.counters.find(({ id }) => id === run.counterId);
    return run.order.flatMap((breederId) => {
      const breeder = problem.breeders.find(({ id }) => id === breederId);
      return breeder && counter ? [aloneTrip(breeder, counter, problem.costs, world.policy.pooling.aloneCentsPerMile)] : [];
    });
  });
  return {
    unplaced: result.unplaced.map((left) => {
      const parcel = byId.get(left.parcelId);
      return { ...left, code: parcel?.code ?? '', what: parcel ? whatOf(parcel) : '', destination: parcel ? `${parcel.destination.city}, ${parcel.destination.state}` : '' };
    }),
    costCents: Math.round(result.costCents),
    objectiveCents: result.objectiveCents,
    boundCents: result.boundCents,
    gap: result.objectiveCents > 0 ? Math.max(0, (result.objectiveCents - result.boundCents) / result.objectiveCents) : 0,
    boundKind: result.boundKind,
    aloneCents: trips.reduce((sum, trip) => sum + trip.cents, 0),
    aloneMinutes: trips.reduce((sum, trip) => sum + trip.minutes, 0),
  };
}
