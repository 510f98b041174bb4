import type { Parcel, Run } from '@shared/contract';
import { AppError, badInput } from '@shared/errors';
import { longDate } from '@shared/parcels/long-date';
import type { Deps } from '../deps';
import type { Actor } from '../http/actor';
import { note, readForChange, shown } from './move-run';
import { dayProblems } from './run-problems';
import { findRunParcels, putOnRun, takeOffRun } from './runs-queries';
import { judged, workOut } from './work-out';

export interface Patch {
  readonly addParcelIds?: readonly number[] | undefined;
  readonly removeParcelIds?: readonly number[] | undefined;
  readonly pin?: readonly { parcelId: number; pinned: boolean }[] | undefined;
  readonly note?: string | undefined;
}

const mayJoin: readonly string[] = ['seeking', 'booked', 'packed'];

/** Who changes what: `isPreview` shows a confirmed run that would break instead of refusing it. */
export interface ChangeOptions {
  readonly ifMatch: number | null;
  readonly isPreview?: boolean;
  /** The member of the request that names the parcels to put on. */
  readonly addPath?: string;
}

/** Puts parcels in and out, pins and notes; a confirmed run's people are told. */
export async function changeRun(
  tx: Deps,
  actor: Actor,
  id: number,
  patch: Patch,
  { ifMatch, isPreview = false, addPath = 'addParcelIds' }: ChangeOptions,
): Promise<Run> {
  const run = await readForChange(tx, id, ifMatch, ['proposed', 'confirmed']);
  const isOn = (parcelId: number) => run.parcels.some((parcel) => parcel.id === parcelId);
  const removed = (patch.removeParcelIds ?? []).filter(isOn);
  const joining = await joiningParcels(tx, run, patch.addParcelIds ?? [], addPath);
  const complaint = await unfitFor(tx, run, joining);
  if (removed.length > 0) await leave(tx, run, removed, actor);
  for (const parcel of joining) await join(tx, run, parcel, actor);
  await pinParcels(tx, id, patch.pin ?? []);
  if (patch.note !== undefined) await tx.db('runs').where({ id }).update({ note: patch.note });
  await workOut(tx, id);
  const after = await shown(tx, id);
  const problems = [...complaint, ...after.problems];
  if (isPreview) return { ...after, problems };
  // Taking off never breaks a drive, so what is wrong besides must not stand in its way.
  const mayBreak = joining.length > 0 || after.parcels.length === 0;
  if (run.state === 'confirmed' && mayBreak && problems.length > 0)
    throw new AppError(
      'conflict',
      `A confirmed run must stay one that can be driven. ${problems.join(' ')}`,
      [],
      { run: { ...after, problems } },
    );
  await tellChange(tx, actor, run, removed, joining);
  return after;
}

async function tellChange(
  tx: Deps,
  actor: Actor,
  run: Run,
  removed: readonly number[],
  joining: readonly Parcel[],
): Promise<void> {
  if (removed.length + joining.length === 0) return;
  const moves = [
    ...(joining.length > 0 ? [`${joining.map(({ code }) => code).join(', ')} put on`] : []),
    ...(removed.length > 0
      ? [
          `${run.parcels.flatMap(({ id, code }) => (removed.includes(id) ? [code] : [])).join(', ')} taken off`,
        ]
      : []),
  ];
  await note(tx, actor, run.id, 'changed', `${moves.join('; ')}.`);
  if (run.state !== 'confirmed') return;
  await tx.services.notices.tell({
    kind: 'run-changed',
    runId: run.id,
    removedParcelIds: removed,
    addedParcelIds: joining.map(({ id }) => id),
    why: `${actor.name} changed the run.`,
  });
}

async function pinParcels(tx: Deps, runId: number, pins: NonNullable<Patch['pin']>): Promise<void> {
  const links = await findRunParcels(tx.db, { runIds: [runId] });
  const errors = pins.flatMap(({ parcelId }, index) =>
    links.some((link) => link.parcel_id === parcelId)
      ? []
      : [{ path: `pin.${index}.parcelId`, message: 'That parcel is not on this run.' }],
  );
  if (errors.length > 0) throw badInput(errors);
  for (const { parcelId, pinned } of pins)
    await tx.db('run_parcels').where({ run_id: runId, parcel_id: parcelId }).update({ pinned });
}

/** Parcels to put on that are not on the run yet. Throws 400 for those that cannot be. */
async function joiningParcels(tx: Deps, run: Run, given: readonly number[], path: string): Promise<Parcel[]> {
  const parcels = (await tx.services.parcels.byIds(given)).filter((parcel) => parcel.run?.id !== run.id);
  const errors = given.flatMap((id, index) => {
    const parcel = parcels.find((one) => one.id === id);
    const say = (message: string) => [{ path: `${path}.${index}`, message }];
    if (!parcel) return run.parcels.some((one) => one.id === id) ? [] : say('That parcel was not found.');
    if (!mayJoin.includes(parcel.state)) return say(`${parcel.code} is ${parcel.state.replace('-', ' ')}.`);
    if (parcel.run && parcel.run.state !== 'proposed')
      return say(`${parcel.code} is on a confirmed run; take it off there first.`);
    return [];
  });
  if (errors.length > 0) throw badInput(errors);
  return parcels;
}

/** A confirmed run asks nobody for days any more, so a parcel that joins is held against its day here. */
async function unfitFor(tx: Deps, run: Run, joining: readonly Parcel[]): Promise<string[]> {
  if (run.state !== 'confirmed') return [];
  const days = await judged(tx, joining, run.date);
  return joining.flatMap((parcel) => dayProblems(parcel, run.date, days.get(parcel.id)));
}

async function join(tx: Deps, run: Run, parcel: Parcel, actor: Actor): Promise<void> {
  if (parcel.run)
    await tx.services.runs.takeOut(
      parcel.id,
      `${parcel.code} went to the run on ${longDate(run.date)}.`,
      actor,
    );
  await putOnRun(tx.db, run.id, parcel.id);
  if (run.state !== 'confirmed' || parcel.state !== 'seeking') return;
  const verdict = (await judged(tx, [parcel], run.date)).get(parcel.id);
  await tx.services.parcels.move(
    parcel.id,
    'booked',
    actor,
    `Booked for ${longDate(run.date)}, with the run.`,
    { shipDate: run.date, flexible: null, ...(verdict ? { verdict } : {}) },
  );
}

async function leave(tx: Deps, run: Run, ids: readonly number[], actor: Actor): Promise<void> {
  await takeOffRun(tx.db, ids);
  for (const id of ids) {
    await tx.services.parcels.setShare(id, null);
    await tx.services.history.add({
      actorId: actor.id,
      actorName: actor.name,
      subjectKind: 'parcel',
      subjectId: id,
      action: 'left-run',
      text: `Taken off the run on ${longDate(run.date)}.`,
    });
  }
}
