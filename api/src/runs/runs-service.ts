import type * as z from 'zod';
import {
  runStates,
  type Proposal,
  type Run,
  type runListQuery,
  type runNew,
  type RunPreview,
  type RunState,
} from '@shared/contract';
import { badInput, notFound } from '@shared/errors';
import type { Deps } from '../deps';
import type { Actor } from '../http/actor';
import { changeRun, type Patch } from './change-run';
import { createRun } from './create-run';
import { note, shown } from './move-run';
import { proposeRuns } from './propose-runs';
import { callOffRun, confirmRun, departRun, handOverRun } from './run-life';
import { mustSee, readRuns, seenBy } from './run-view';
import { findRunParcels, takeOffRun } from './runs-queries';
import { judged, workOut } from './work-out';

export interface RunsService {
  /** Throws 404. */
  get(id: number): Promise<Run>;
  /** The run a parcel is on, or null. */
  ofParcel(parcelId: number): Promise<Run | null>;
  /**
   * Takes a parcel out of its run, if it is on one: the run is sequenced and its cost shared anew, an emptied run is called
   * off, and (for a confirmed run) its people are told. The parcel's own state is left alone.
   */
  takeOut(parcelId: number, why: string, who: Actor | null): Promise<void>;
  /** Works the proposed run of a parcel out again, after something about the parcel changed; nothing without one. */
  lookAgain(parcelId: number): Promise<void>;
  /** Proposed and confirmed runs from a counter in a window of days, with the room left: the notches of the strip. */
  notches(
    counterId: number,
    from: string,
    to: string,
  ): Promise<{ id: number; date: string; state: string; roomL: number }[]>;

  /** What the actor may see, in a window and in states (comma list). */
  list(actor: Actor, query: z.output<typeof runListQuery>): Promise<Run[]>;
  /** Throws 404 for what the actor may not see. */
  forActor(actor: Actor, id: number): Promise<Run>;
  propose(actor: Actor, span: { from?: string | undefined; to?: string | undefined }): Promise<Proposal>;
  /** The last proposal as it was answered. Throws 404 without one. */
  latestProposal(): Promise<Proposal>;
  create(actor: Actor, body: z.output<typeof runNew>): Promise<Run>;
  change(actor: Actor, id: number, patch: Patch, ifMatch: number | null): Promise<Run>;
  /** The same change, worked out and taken back: what it would cost and break. */
  preview(actor: Actor, id: number, patch: Patch): Promise<RunPreview>;
  confirm(actor: Actor, id: number, ifMatch: number | null): Promise<Run>;
  depart(
    actor: Actor,
    id: number,
    ifMatch: number | null,
    aboardIds: readonly number[] | undefined,
  ): Promise<Run>;
  handOver(
    actor: Actor,
    id: number,
    ifMatch: number | null,
    tracking: readonly { parcelId: number; number: string }[],
  ): Promise<Run>;
  callOff(actor: Actor, id: number, ifMatch: number | null, reason: string): Promise<Run>;
}

/** Carries a preview's answer out of the transaction that it takes back. */
class TakenBack extends Error {
  constructor(readonly run: Run) {
    super('preview');
  }
}

/** Runs from proposal to hand-over. */
export function createRunsService(deps: Deps): RunsService {
  const get = (id: number) => shown(deps, id);
  /** Fetches the weather that a change will be judged by; inside the transaction only what is known is read. */
  const lookAhead = async (id: number, patch: Patch): Promise<Run> => {
    const run = await get(id);
    const added = (patch.addParcelIds ?? []).map((parcelId) => ({ id: parcelId }));
    await judged(deps, [...run.parcels, ...added], run.date);
    return run;
  };
  return {
    get,
    async ofParcel(parcelId) {
      const [link] = await findRunParcels(deps.db, { parcelIds: [parcelId] });
      return link ? get(link.run_id) : null;
    },
    takeOut: (parcelId, why, who) => deps.transaction((tx) => takeOut(tx, parcelId, why, who)),
    lookAgain: (parcelId) =>
      deps.transaction(async (tx) => {
        const [link] = await findRunParcels(tx.db, { parcelIds: [parcelId] });
        const run = link && (await shown(tx, link.run_id));
        if (run?.state === 'proposed') await workOut(tx, run.id);
      }),
    async notches(counterId, from, to) {
      const runs = await readRuns(deps, { from, to, states: ['proposed', 'confirmed'] });
      return runs
        .filter((run) => run.counter.id === counterId)
        .map((run) => ({
          id: run.id,
          date: run.date,
          state: run.state,
          roomL: Math.max(0, Math.round((run.coordinator.capacityL - run.loadL) * 10) / 10),
        }));
    },
    async list(actor, query) {
      const states = statesOf(query.state);
      const runs = await readRuns(deps, {
        ...(query.from ? { from: query.from } : {}),
        ...(query.to ? { to: query.to } : {}),
        ...(states ? { states } : {}),
      });
      return runs.flatMap((run) => seenBy(actor, run) ?? []);
    },
    forActor: async (actor, id) => mustSee(actor, await get(id)),
    propose: (actor, span) => proposeRuns(deps, actor, span),
    async latestProposal() {
      const row = (await deps.db('proposals').orderBy('id', 'desc').first()) as
        { result: string } | undefined;
      if (!row) throw notFound('A proposal');
      const stored = JSON.parse(row.result) as Proposal;
      // The runs as they stand now: some may have been confirmed or changed since.
      return { ...stored, runs: await readRuns(deps, { ids: stored.runs.map((run) => run.id) }) };
    },
    async create(actor, body) {
      const asked = body.parcelIds.map((id) => ({ id }));
      await judged(deps, asked, body.date);
      return deps.transaction((tx) => createRun(tx, actor, body));
    },
    async change(actor, id, patch, ifMatch) {
      await lookAhead(id, patch);
      return deps.transaction((tx) => changeRun(tx, actor, id, patch, { ifMatch }));
    },
    async preview(actor, id, patch) {
      const before = await lookAhead(id, patch);
      try {
        await deps.transaction(async (tx) => {
          throw new TakenBack(await changeRun(tx, actor, id, patch, { ifMatch: null, isPreview: true }));
        });
      } catch (thrown) {
        if (!(thrown instanceof TakenBack)) throw thrown;
        const after = thrown.run;
        return {
          before,
          after,
          costChangeCents: after.costCents - before.costCents,
          problems: after.problems,
        };
      }
      throw new Error('A preview must be taken back.');
    },
    confirm: (actor, id, ifMatch) => confirmRun(deps, actor, id, ifMatch),
    depart: (actor, id, ifMatch, aboardIds) =>
      deps.transaction((tx) => departRun(tx, actor, id, ifMatch, aboardIds)),
    handOver: (actor, id, ifMatch, tracking) =>
      deps.transaction((tx) => handOverRun(tx, actor, id, ifMatch, tracking)),
    callOff: (actor, id, ifMatch, reason) =>
      deps.transaction((tx) => callOffRun(tx, actor, id, ifMatch, reason)),
  };
}

/** A comma list of states. Throws 400 for one that does not exist. */
function statesOf(list: string | undefined): RunState[] | undefined {
  if (list === undefined) return undefined;
  return list.split(',').map((name) => {
    const state = runStates.find((one) => one === name.trim());
    if (!state) throw badInput([{ path: 'state', message: `No run is ever "${name.trim()}".` }]);
    return state;
  });
}

async function takeOut(tx: Deps, parcelId: number, why: string, who: Actor | null): Promise<void> {
  const [link] = await findRunParcels(tx.db, { parcelIds: [parcelId] });
  if (!link) return;
  const [run] = await readRuns(tx, { ids: [link.run_id] });
  if (!run || !['proposed', 'confirmed', 'underway'].includes(run.state)) return;
  if (run.parcels.length === 1) {
    await callOffRun(tx, who, run.id, null, why);
    return;
  }
  await takeOffRun(tx.db, [parcelId]);
  await tx.services.parcels.setShare(parcelId, null);
  await workOut(tx, run.id);
  await note(tx, who, run.id, 'changed', why);
  if (run.state !== 'proposed')
    await tx.services.notices.tell({
      kind: 'run-changed',
      runId: run.id,
      removedParcelIds: [parcelId],
      addedParcelIds: [],
      why,
    });
}
