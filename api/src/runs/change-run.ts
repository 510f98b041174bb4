import type { Parcel, Run, RunState } from '@shared/contract';
import { AppError, badInput, notFound } from '@shared/errors';
import { canMoveRun } from '@shared/states/run-moves';
import type { Deps } from '../deps';
import type { Actor } from '../http/actor';
import { checkVersion } from '../http/router';
import { runSheet } from './run-sheet';
import { readRuns } from './run-view';
import { readRunWorld } from './run-world';
import { findRunParcels, findRuns, insertRun, putOnRun, setRun, takeOffRun, writeSheet } from './runs-queries';

export interface Patch {
  readonly addParcelIds?: readonly number[] | undefined;
  readonly removeParcelIds?: readonly number[] | undefined;
  readonly pin?: readonly { parcelId: number; pinned: boolean }[] | undefined;
  readonly note?: string | undefined;
}

const mayJoin: readonly string[] = ['seeking', 'booked', 'packed'];

/** Sequences, prices and shares a run anew from the parcels that are on it now. */
export async function workOut(tx: Deps, runId: number): Promise<void> {
  const [row] = await findRuns(tx.db, { ids: [runId] });
  if (!row) throw notFound('That run');
  const world = await readRunWorld(tx);
  const coordinator = world.coordinators.get(row.coordinator_id) ?? (await tx.services.people.get(row.coordinator_id));
  const counter = world.counters.get(row.counter_id) ?? (await tx.services.places.counter(row.counter_id));
  const links = await findRunParcels(tx.db, { runIds: [runId] });
  const parcels = await tx.services.parcels.byIds(links.map((link) => link.parcel_id));
  const sheet = runSheet(world, { coordinator, counter, date: row.date }, parcels);
  await writeSheet(tx.db, runId, sheet, tx.clock.nowIso());
  if (row.state !== 'proposed') for (const [parcelId, shareCents] of sheet.shares) await tx.services.parcels.setShare(parcelId, shareCents);
}

export const note = (tx: Deps, actor: Actor | null, runId: number, action: string, text: string) =>
  tx.services.history.add({ actorId: actor?.id ?? null, actorName: actor?.name ?? 'Dayberth', subjectKind: 'run', subjectId: runId, action, text });

/** The run as it is, checked against the version the caller saw and the states in which it may be touched. */
export async function readForChange(tx: Deps, id: number, ifMatch: number | null, states: readonly RunState[]): Promise<Run> {
  const [run] = await readRuns(tx, { ids: [id] });
  if (!run) throw notFound('That run');
  checkVersion(ifMatch, run.version, run);
  if (!states.includes(run.state)) throw new AppError('move-not-allowed', `The run is ${run.state}, so that is not possible any more.`);
  return run;
}

/** Puts parcels in and out, pins and notes; a confirmed run's people are told. Nothing is sent by a preview. */
export async function changeRun(tx: Deps, actor: Actor, id: number, patch: Patch, ifMatch: number | null): Promise<Run> {
  const run = await readForChange(tx, id, ifMatch, ['proposed', 'confirmed']);
  const removed = (patch.removeParcelIds ?? []).filter((parcelId) => run.parcels.some((parcel) => parcel.id === parcelId));
  const added = (patch.addParcelIds ?? []).filter((parcelId) => !run.parcels.some((parcel) => parcel.id === parcelId));
  const joining = await joiningParcels(tx, run, added);
  if (removed.length > 0) await leave(tx, run, removed, actor);
  for (const parcel of joining) await join(tx, run, parcel, actor);
  for (const { parcelId, pinned } of patch.pin ?? []) await tx.db('run_parcels').where({ run_id: id, parcel_id: parcelId }).update({ pinned });
  if (patch.note !== undefined) await tx.db('runs').where({ id }).update({ note: patch.note });
  await workOut(tx, id);
  const [after] = await readRuns(tx, { ids: [id] });
  if (!after) throw notFound('That run');
  if (run.state === 'confirmed' && after.problems.length > 0)
    throw new AppError('conflict', `A confirmed run must stay one that can be driven. ${after.problems.join(' ')}`, [], { run: after });
  if (removed.length + joining.length > 0) {
    await note(tx, actor, id, 'changed', `${joining.length} parcels put on, ${removed.length} taken off.`);
    if (run.state === 'confirmed')
      await tx.services.notices.tell({ kind: 'run-changed', runId: id, removedParcelIds: removed, addedParcelIds: added, why: `${actor.name} changed the run.` });
  }
  return after;
}

async function joiningParcels(tx: Deps, run: Run, ids: readonly number[]): Promise<Parcel[]> {
  const parcels = await tx.services.parcels.byIds(ids);
  const complaint = ids.flatMap((id, index) => {
    const parcel = parcels.find((one) => one.id === id);
    const say = (message: string) => [{ path: `addParcelIds.${index}`, message }];
    if (!parcel) return say('That parcel was not found.');
    if (!mayJoin.includes(parcel.state)) return say(`${parcel.code} is ${parcel.state}.`);
    if (parcel.run && parcel.run.id !== run.id && parcel.run.state !== 'proposed') return say(`${parcel.code} is on a confirmed run; take it off there first.`);
    return [];
  });
  if (complaint.length > 0) throw badInput(complaint);
  return parcels;
}

async function join(tx: Deps, run: Run, parcel: Parcel, actor: Actor): Promise<void> {
  const from = parcel.run;
  await takeOffRun(tx.db, [parcel.id]);
  await putOnRun(tx.db, run.id, parcel.id);
  if (from && from.id !== run.id) await workOut(tx, from.id);
  if (run.state === 'confirmed' && parcel.state === 'seeking')
    await tx.services.parcels.move(parcel.id, 'booked', actor, `Booked on ${run.date}, with the run.`, { shipDate: run.date });
}

async function leave(tx: Deps, run: Run, ids: readonly number[], actor: Actor): Promise<void> {
  await takeOffRun(tx.db, ids);
  for (const id of ids) {
    await tx.services.parcels.setShare(id, null);
    await tx.services.history.add({ actorId: actor.id, actorName: actor.name, subjectKind: 'parcel', subjectId: id, action: 'left-run', text: `Taken off the run on ${run.date}.` });
  }
}

/** An empty proposed run by hand, or one with parcels. */
export async function createRun(tx: Deps, actor: Actor, body: { coordinatorId: number; date: string; counterId?: number | undefined; parcelIds: readonly number[] }): Promise<Run> {
  const world = await readRunWorld(tx);
  const coordinator = world.coordinators.get(body.coordinatorId);
  if (!coordinator) throw badInput([{ path: 'coordinatorId', message: 'Choose a coordinator.' }]);
  const counter = body.counterId === undefined ? [...world.counters.values()].find((one) => one.canDropOff && one.active) : world.counters.get(body.counterId);
  if (!counter?.canDropOff) throw badInput([{ path: 'counterId', message: 'Choose a counter that takes drop-offs.' }]);
  if (body.date < tx.clock.today(world.zone)) throw badInput([{ path: 'date', message: 'That day is over.' }]);
  const same = await findRuns(tx.db, { from: body.date, to: body.date, states: ['proposed', 'confirmed', 'underway'] });
  if (same.some((run) => run.coordinator_id === coordinator.id)) throw badInput([{ path: 'date', message: `${coordinator.name} has a run that day already.` }]);
  const sheet = runSheet(world, { coordinator, counter, date: body.date }, []);
  const id = await insertRun(tx.db, { coordinatorId: coordinator.id, counterId: counter.id, date: body.date }, sheet, tx.clock.nowIso());
  await note(tx, actor, id, 'created', 'Entered by hand.');
  return changeRun(tx, actor, id, { addParcelIds: body.parcelIds }, null);
}

/** Moves a run along its state table. */
export async function moveRun(tx: Deps, run: Run, to: RunState, actor: Actor | null, text: string, columns: Record<string, unknown> = {}): Promise<void> {
  if (!canMoveRun(run.state, to)) throw new AppError('move-not-allowed', `A run that is ${run.state} cannot become ${to}.`);
  await setRun(tx.db, run.id, { state: to, ...columns }, tx.clock.nowIso());
  await note(tx, actor, run.id, to, text);
}
