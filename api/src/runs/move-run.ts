import type { Run, RunState } from '@shared/contract';
import { AppError, notFound } from '@shared/errors';
import { canMoveRun } from '@shared/states/run-moves';
import type { Deps } from '../deps';
import type { Actor } from '../http/actor';
import { checkVersion } from '../http/router';
import { readRuns } from './run-view';
import { setRun } from './runs-queries';

/** Writes a line of a run's history; without an actor it was the program itself. */
export const note = (tx: Deps, actor: Actor | null, runId: number, action: string, text: string) =>
  tx.services.history.add({
    actorId: actor?.id ?? null,
    actorName: actor?.name ?? 'Dayberth',
    subjectKind: 'run',
    subjectId: runId,
    action,
    text,
  });

/** The run as it is, checked against the version the caller saw and the states in which it may be touched. */
export async function readForChange(
  tx: Deps,
  id: number,
  ifMatch: number | null,
  states: readonly RunState[],
): Promise<Run> {
  const [run] = await readRuns(tx, { ids: [id] });
  if (!run) throw notFound('That run');
  checkVersion(ifMatch, run.version, run);
  if (!states.includes(run.state))
    throw new AppError('move-not-allowed', `The run is ${run.state}, so that is not possible any more.`);
  return run;
}

/** A run as it is now, whoever asks. Throws 404. */
export async function shown(deps: Deps, id: number): Promise<Run> {
  const [run] = await readRuns(deps, { ids: [id] });
  if (!run) throw notFound('That run');
  return run;
}

/** Moves a run along its state table. */
export async function moveRun(
  tx: Deps,
  run: Run,
  to: RunState,
  actor: Actor | null,
  text: string,
  columns: Record<string, unknown> = {},
): Promise<void> {
  if (!canMoveRun(run.state, to))
    throw new AppError('move-not-allowed', `A run that is ${run.state} cannot become ${to}.`);
  await setRun(tx.db, run.id, { state: to, ...columns }, tx.clock.nowIso());
  await note(tx, actor, run.id, to, text);
}
