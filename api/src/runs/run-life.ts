import type { DayVerdict, Parcel, Run } from '@shared/contract';
import { AppError, badInput } from '@shared/errors';
import type { Deps } from '../deps';
import type { Actor } from '../http/actor';
import { moveRun, readForChange } from './change-run';
import { readRuns } from './run-view';
import { takeOffRun } from './runs-queries';

const shownAgain = async (tx: Deps, id: number): Promise<Run> => (await readRuns(tx, { ids: [id] }))[0] as Run;

/** Confirms a proposed run: every parcel gets its day, everybody an invitation. Refused while anything is wrong. */
export async function confirmRun(deps: Deps, actor: Actor, id: number, ifMatch: number | null): Promise<Run> {
  const seen = await readForChange(deps, id, ifMatch, ['proposed']);
  // The forecast may have to be fetched, so it is asked before the transaction; the version says that it is the same run.
  const verdicts = await deps.services.days.forParcels(seen.parcels.map((parcel) => parcel.id), { from: seen.date, days: 1 });
  return deps.transaction(async (tx) => {
    const run = await readForChange(tx, id, seen.version, ['proposed']);
    const parcels = await tx.services.parcels.byIds(run.parcels.map((parcel) => parcel.id));
    const wrong = [...run.problems, ...parcels.flatMap((parcel) => refusal(parcel, run, verdicts.get(parcel.id)?.[0]))];
    if (wrong.length > 0) throw new AppError('conflict', wrong.join(' '), wrong.map((message) => ({ path: '', message })), { run });
    await moveRun(tx, run, 'confirmed', actor, `Confirmed with ${parcels.length} parcels.`, { confirmed_at: tx.clock.nowIso() });
    for (const parcel of parcels) {
      const verdict = verdicts.get(parcel.id)?.[0];
      if (parcel.state === 'seeking')
        await tx.services.parcels.move(parcel.id, 'booked', actor, `Booked on ${run.date}, with the run.`, { shipDate: run.date, ...(verdict ? { verdict } : {}) });
      await tx.services.parcels.setShare(parcel.id, run.parcels.find((one) => one.id === parcel.id)?.shareCents ?? null);
    }
    await tx.services.notices.tell({ kind: 'run-confirmed', runId: id });
    return shownAgain(tx, id);
  });
}

function refusal(parcel: Parcel, run: Run, day: DayVerdict | undefined): string[] {
  if (!day) return [`${parcel.code}: the day cannot be judged.`];
  if (day.verdict === 'shut' || day.verdict === 'far')
    return [`${parcel.code} is ${day.verdict} on ${run.date}: ${day.reasons.find((reason) => reason.verdict === day.verdict)?.text ?? ''}`];
  if (day.verdict === 'tight' && parcel.acceptedTight === null)
    return [`${parcel.code} is tight on ${run.date} and ${parcel.breeder.name} has not accepted that yet.`];
  return [];
}

/** The driver leaves: what is aboard goes on its way, what was left behind goes off the run. */
export async function departRun(tx: Deps, actor: Actor, id: number, ifMatch: number | null, aboardIds: readonly number[] | undefined): Promise<Run> {
  const run = await readForChange(tx, id, ifMatch, ['confirmed']);
  const aboard = new Set(aboardIds ?? run.parcels.map((parcel) => parcel.id));
  const left = run.parcels.filter((parcel) => !aboard.has(parcel.id)).map((parcel) => parcel.id);
  if (run.parcels.length === left.length) throw badInput([{ path: 'aboardParcelIds', message: 'At least one parcel must be aboard.' }]);
  await moveRun(tx, run, 'underway', actor, 'Underway.', { departed_at: tx.clock.nowIso() });
  for (const parcel of run.parcels)
    if (aboard.has(parcel.id)) await tx.services.parcels.move(parcel.id, 'aboard', actor, `Aboard the run of ${run.coordinator.name}.`);
  await takeOffRun(tx.db, left);
  for (const parcelId of left) await tx.services.parcels.putOnHold(parcelId, 'It was not aboard when the run left.', actor);
  return shownAgain(tx, id);
}

/** Handed over at the counter; tracking numbers go to the buyers. */
export async function handOverRun(tx: Deps, actor: Actor, id: number, ifMatch: number | null, tracking: readonly { parcelId: number; number: string }[]): Promise<Run> {
  const run = await readForChange(tx, id, ifMatch, ['underway']);
  const unknown = tracking.flatMap((entry, index) =>
    run.parcels.some((parcel) => parcel.id === entry.parcelId) ? [] : [{ path: `tracking.${index}.parcelId`, message: 'That parcel is not on this run.' }],
  );
  if (unknown.length > 0) throw badInput(unknown);
  const late = tx.clock.nowIso() > run.cutOffAt;
  await moveRun(tx, run, 'handed-over', actor, late ? 'Handed over after the cut-off.' : 'Handed over before the cut-off.', { handed_over_at: tx.clock.nowIso() });
  for (const parcel of run.parcels) {
    const number = tracking.find((entry) => entry.parcelId === parcel.id)?.number ?? null;
    await tx.services.parcels.move(parcel.id, 'handed-over', actor, `Handed over at the ${run.counter.name}.`, number === null ? {} : { trackingNumber: number });
  }
  await tx.services.notices.tell({ kind: 'run-handed-over', runId: id });
  return shownAgain(tx, id);
}

/** The run does not go: its parcels keep their day and wait for another run; the people of a confirmed one are told. */
export async function callOffRun(tx: Deps, actor: Actor | null, id: number, ifMatch: number | null, reason: string): Promise<Run> {
  const run = await readForChange(tx, id, ifMatch, ['proposed', 'confirmed', 'underway']);
  const parcelIds = run.parcels.map((parcel) => parcel.id);
  await moveRun(tx, run, 'called-off', actor, `Called off: ${reason}`, { call_off_reason: reason });
  for (const parcel of run.parcels) {
    if (parcel.state === 'aboard') await tx.services.parcels.move(parcel.id, 'booked', actor, `The run was called off: ${reason}`);
    await tx.services.parcels.setShare(parcel.id, null);
  }
  await takeOffRun(tx.db, parcelIds);
  if (run.state !== 'proposed') await tx.services.notices.tell({ kind: 'run-called-off', runId: id, parcelIds, reason });
  return shownAgain(tx, id);
}
