import type { Run } from '@shared/contract';
import { AppError, badInput } from '@shared/errors';
import { longDate } from '@shared/parcels/long-date';
import type { Deps } from '../deps';
import type { Actor } from '../http/actor';
import { moveRun, readForChange, shown } from './move-run';
import { takeOffRun } from './runs-queries';
import { judged, workOut } from './work-out';

/**
 * Confirms a proposed run: every parcel gets its day, everybody an invitation. The run is worked out once more under
 * the present settings and refused (409) while anything is wrong with it.
 */
export async function confirmRun(deps: Deps, actor: Actor, id: number, ifMatch: number | null): Promise<Run> {
  const seen = await readForChange(deps, id, ifMatch, ['proposed']);
  // The forecast may have to be fetched, so it is asked before the transaction; the version says that it is the same run.
  await judged(deps, seen.parcels, seen.date);
  return deps.transaction(async (tx) => {
    await readForChange(tx, id, seen.version, ['proposed']);
    await workOut(tx, id);
    const run = await shown(tx, id);
    if (run.problems.length > 0)
      throw new AppError(
        'conflict',
        run.problems.join(' '),
        run.problems.map((message) => ({ path: '', message })),
        { run },
      );
    await moveRun(tx, run, 'confirmed', actor, `Confirmed with ${inNumber(run)}.`, {
      confirmed_at: tx.clock.nowIso(),
    });
    await bookParcels(tx, actor, run);
    await tx.services.notices.tell({ kind: 'run-confirmed', runId: id });
    return shown(tx, id);
  });
}

const inNumber = ({ parcels }: Run) => (parcels.length === 1 ? '1 parcel' : `${parcels.length} parcels`);

async function bookParcels(tx: Deps, actor: Actor, run: Run): Promise<void> {
  const days = await judged(tx, run.parcels, run.date);
  for (const parcel of run.parcels) {
    const verdict = days.get(parcel.id);
    if (parcel.state === 'seeking')
      await tx.services.parcels.move(
        parcel.id,
        'booked',
        actor,
        `Booked for ${longDate(run.date)}, with the run.`,
        { shipDate: run.date, flexible: null, ...(verdict ? { verdict } : {}) },
      );
    await tx.services.parcels.setShare(parcel.id, parcel.shareCents);
  }
}

/** The driver leaves: what is aboard goes on its way, what was left behind goes on hold and the cost is shared anew. */
export async function departRun(
  tx: Deps,
  actor: Actor,
  id: number,
  ifMatch: number | null,
  aboardIds: readonly number[] | undefined,
): Promise<Run> {
  const run = await readForChange(tx, id, ifMatch, ['confirmed']);
  if (run.date > tx.clock.today(run.zone))
    throw new AppError('conflict', `It goes on ${longDate(run.date)}, not before.`);
  const aboard = new Set(aboardIds ?? run.parcels.map((parcel) => parcel.id));
  const left = run.parcels.filter((parcel) => !aboard.has(parcel.id)).map((parcel) => parcel.id);
  const unknown = notOn(run, aboardIds ?? [], (index) => `aboardParcelIds.${index}`);
  if (unknown.length > 0) throw badInput(unknown);
  if (run.parcels.length === left.length)
    throw badInput([{ path: 'aboardParcelIds', message: 'At least one parcel must be aboard.' }]);
  await moveRun(tx, run, 'underway', actor, 'Underway.', { departed_at: tx.clock.nowIso() });
  for (const parcel of run.parcels)
    if (aboard.has(parcel.id))
      await tx.services.parcels.move(
        parcel.id,
        'aboard',
        actor,
        `Aboard the run of ${run.coordinator.name}.`,
      );
  if (left.length > 0) {
    await takeOffRun(tx.db, left);
    for (const parcelId of left)
      await tx.services.parcels.putOnHold(parcelId, 'It was not aboard when the run left.', actor);
    await workOut(tx, id);
  }
  return shown(tx, id);
}

/** A complaint for each id that is not on the run, or is named twice. */
function notOn(run: Run, ids: readonly number[], pathOf: (index: number) => string) {
  return ids.flatMap((id, index) => {
    if (!run.parcels.some((parcel) => parcel.id === id))
      return [{ path: pathOf(index), message: 'That parcel is not on this run.' }];
    return ids.indexOf(id) < index ? [{ path: pathOf(index), message: 'That parcel is named twice.' }] : [];
  });
}

/** Handed over at the counter; tracking numbers go to the buyers. */
export async function handOverRun(
  tx: Deps,
  actor: Actor,
  id: number,
  ifMatch: number | null,
  tracking: readonly { parcelId: number; number: string }[],
): Promise<Run> {
  const run = await readForChange(tx, id, ifMatch, ['underway']);
  const unknown = notOn(
    run,
    tracking.map(({ parcelId }) => parcelId),
    (index) => `tracking.${index}.parcelId`,
  );
  if (unknown.length > 0) throw badInput(unknown);
  const late = tx.clock.nowIso() > run.cutOffAt;
  await moveRun(
    tx,
    run,
    'handed-over',
    actor,
    late ? 'Handed over after the cut-off.' : 'Handed over before the cut-off.',
    { handed_over_at: tx.clock.nowIso() },
  );
  for (const parcel of run.parcels) {
    const number = tracking.find((entry) => entry.parcelId === parcel.id)?.number ?? null;
    await tx.services.parcels.move(
      parcel.id,
      'handed-over',
      actor,
      `Handed over at the ${run.counter.name}.`,
      number === null ? {} : { trackingNumber: number },
    );
  }
  await tx.services.notices.tell({ kind: 'run-handed-over', runId: id });
  return shown(tx, id);
}

/** The run does not go: its parcels keep their day and wait for another run; the people of a confirmed one are told. */
export async function callOffRun(
  tx: Deps,
  actor: Actor | null,
  id: number,
  ifMatch: number | null,
  reason: string,
): Promise<Run> {
  const run = await readForChange(tx, id, ifMatch, ['proposed', 'confirmed', 'underway']);
  const parcelIds = run.parcels.map((parcel) => parcel.id);
  await moveRun(tx, run, 'called-off', actor, `Called off: ${reason}`, { call_off_reason: reason });
  for (const parcel of run.parcels) {
    if (parcel.state === 'aboard')
      await tx.services.parcels.move(parcel.id, 'booked', actor, `The run was called off: ${reason}`);
    await tx.services.parcels.setShare(parcel.id, null);
  }
  await takeOffRun(tx.db, parcelIds);
  if (run.state !== 'proposed')
    await tx.services.notices.tell({ kind: 'run-called-off', runId: id, parcelIds, reason });
  return shown(tx, id);
}
