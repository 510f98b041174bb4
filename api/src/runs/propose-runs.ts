import type { Parcel, Proposal } from '@shared/contract';
import { AppError } from '@shared/errors';
import { addDays } from '@shared/calendar/add-days';
import { datesFrom } from '@shared/calendar/dates-from';
import { daysBetween } from '@shared/calendar/days-between';
import { aloneTrip } from '@shared/pooling/cost';
import type { PlanResult } from '@shared/pooling/plan-runs';
import type { PoolProblem } from '@shared/pooling/problem';
import type { Deps } from '../deps';
import type { Actor } from '../http/actor';
import { poolingProblem, standing } from './pooling-problem';
import { solveInWorker } from './pooling-solver';
import { readRunWorld, type RunWorld } from './run-world';
import { readRuns, whatOf } from './run-view';
import { workOut } from './work-out';
import { deleteRuns, findRuns, insertRun, putOnRun } from './runs-queries';

const windowDays = 14;
const mostDays = 28;
/** How often a plan is made anew when parcels or runs changed while it was made. */
const tries = 3;

/**
 * Pools every parcel without a confirmed run; the proposed runs of before are replaced, the confirmed ones stand. What
 * changes meanwhile makes the plan begin again. Throws 409 when it never comes to rest, or when somebody is pooling.
 */
export async function proposeRuns(
  deps: Deps,
  actor: Actor,
  span: { from?: string | undefined; to?: string | undefined },
): Promise<Proposal> {
  const startedMs = performance.now();
  for (let attempt = 0; attempt < tries; attempt++) {
    const basis = await basisOf(deps);
    const world = await readRunWorld(deps);
    const dates = datesOf(deps, world, span);
    const parcels = await openParcels(deps);
    const verdicts = await deps.services.days.forParcels(
      parcels.map(({ id }) => id),
      { from: dates[0] ?? '', days: dates.length },
    );
    const problem = await poolingProblem(deps, world, dates, parcels, verdicts);
    const result = await solveInWorker(deps.config.POOLING_WORKER_FILE, problem);
    const proposal = await deps.transaction(async (tx) => {
      if ((await basisOf(tx)) !== basis) return null;
      const seconds = (performance.now() - startedMs) / 1000;
      return store(tx, actor, world, { problem, parcels, result, seconds });
    });
    if (proposal) return proposal;
  }
  throw new AppError('conflict', 'Parcels or runs changed while the plan was made. Ask for it again.');
}

function datesOf(
  { clock }: Deps,
  world: RunWorld,
  span: { from?: string | undefined; to?: string | undefined },
): string[] {
  const today = clock.today(world.zone);
  const from = span.from && span.from > today ? span.from : today;
  const to = span.to && span.to >= from ? span.to : addDays(from, windowDays - 1);
  return datesFrom(from, Math.min(mostDays, daysBetween(from, to) + 1));
}

/** Parcels that want a run: a proposed one may be taken from them again. */
async function openParcels({ services }: Deps): Promise<Parcel[]> {
  const parcels = await services.parcels.inStates(['seeking', 'booked', 'packed']);
  return parcels.filter((parcel) => parcel.run === null || parcel.run.state === 'proposed');
}

/** Everything whose change would make a plan wrong, to be compared: parcels, runs and people's days. */
async function basisOf(deps: Deps): Promise<string> {
  const parcels = await openParcels(deps);
  const runs = await findRuns(deps.db, { states: ['proposed', ...standing] });
  const people = await deps.services.people.list();
  const days = [];
  for (const person of people) days.push(await deps.services.people.availability(person.id));
  return JSON.stringify([
    parcels.map(({ id, version, run }) => [id, version, run?.id]),
    runs.map(({ id, version, state }) => [id, version, state]),
    people.map(({ id, version }) => [id, version]),
    days,
  ]);
}

interface Planned {
  readonly problem: PoolProblem;
  readonly parcels: readonly Parcel[];
  readonly result: PlanResult;
  readonly seconds: number;
}

async function store(tx: Deps, actor: Actor, world: RunWorld, planned: Planned): Promise<Proposal> {
  const { problem, result, seconds } = planned;
  const now = tx.clock.nowIso();
  const old = await findRuns(tx.db, { states: ['proposed'] });
  await deleteRuns(
    tx.db,
    old.map(({ id }) => id),
  );
  const pinned = new Set(problem.pins.map((pin) => pin.parcelId));
  const ids: number[] = [];
  for (const run of result.runs) {
    const id = await insertRun(tx.db, run, now);
    for (const parcelId of run.parcelIds) await putOnRun(tx.db, id, parcelId, pinned.has(parcelId));
    await workOut(tx, id);
    ids.push(id);
  }
  const runs = ids.length > 0 ? await readRuns(tx, { ids }) : [];
  const driveMinutes = runs.reduce((sum, run) => sum + run.driveMinutes, 0);
  const proposal: Proposal = { at: now, runs, ...figures(world, planned), driveMinutes, seconds };
  await tx
    .db('proposals')
    .insert({ created_at: now, created_by: actor.id, result: JSON.stringify(proposal) });
  return proposal;
}

function figures(world: RunWorld, { problem, parcels, result }: Planned) {
  const byId = new Map(parcels.map((parcel) => [parcel.id, parcel]));
  const trips = result.runs.flatMap((run) => {
    const counter = problem.counters.find(({ id }) => id === run.counterId);
    return run.order.flatMap((breederId) => {
      const breeder = problem.stops.find(({ id }) => id === breederId);
      if (!breeder || !counter) return [];
      return [aloneTrip(breeder, counter, problem.costs, world.policy.pooling.aloneCentsPerMile)];
    });
  });
  return {
    unplaced: result.unplaced.map((left) => {
      const parcel = byId.get(left.parcelId);
      return {
        ...left,
        code: parcel?.code ?? '',
        what: parcel ? whatOf(parcel) : '',
        destination: parcel ? `${parcel.destination.city}, ${parcel.destination.state}` : '',
      };
    }),
    costCents: Math.round(result.costCents),
    objectiveCents: result.objectiveCents,
    boundCents: result.boundCents,
    gap:
      result.objectiveCents > 0
        ? Math.max(0, (result.objectiveCents - result.boundCents) / result.objectiveCents)
        : 0,
    boundKind: result.boundKind,
    aloneCents: trips.reduce((sum, trip) => sum + trip.cents, 0),
    aloneMinutes: trips.reduce((sum, trip) => sum + trip.minutes, 0),
  };
}
