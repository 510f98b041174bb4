import type { Counter, Run } from '@shared/contract';
import { badInput } from '@shared/errors';
import type { Deps } from '../deps';
import type { Actor } from '../http/actor';
import { changeRun } from './change-run';
import { note } from './move-run';
import { readRunWorld, type RunWorld } from './run-world';
import { findRuns, insertRun } from './runs-queries';

export interface NewRun {
  readonly coordinatorId: number;
  readonly date: string;
  readonly counterId?: number | undefined;
  readonly parcelIds: readonly number[];
}

/** A proposed run by hand, empty or with parcels; without a counter it goes where the first parcel is dropped off. */
export async function createRun(tx: Deps, actor: Actor, body: NewRun): Promise<Run> {
  const world = await readRunWorld(tx);
  const coordinator = world.coordinators.get(body.coordinatorId);
  if (!coordinator) throw badInput([{ path: 'coordinatorId', message: 'Choose a coordinator.' }]);
  const counter = await counterFor(tx, world, body);
  if (body.date < tx.clock.today(world.zone))
    throw badInput([{ path: 'date', message: 'That day is over.' }]);
  const same = await findRuns(tx.db, {
    from: body.date,
    to: body.date,
    states: ['proposed', 'confirmed', 'underway'],
  });
  if (same.some((run) => run.coordinator_id === coordinator.id))
    throw badInput([{ path: 'date', message: `${coordinator.name} has a run that day already.` }]);
  const frame = { coordinatorId: coordinator.id, counterId: counter.id, date: body.date };
  const id = await insertRun(tx.db, frame, tx.clock.nowIso());
  await note(tx, actor, id, 'created', 'Entered by hand.');
  return changeRun(tx, actor, id, { addParcelIds: body.parcelIds }, { ifMatch: null, addPath: 'parcelIds' });
}

async function counterFor(tx: Deps, world: RunWorld, body: NewRun): Promise<Counter> {
  const usable = [...world.counters.values()].filter((one) => one.canDropOff && one.active);
  const [first] = await tx.services.parcels.byIds(body.parcelIds.slice(0, 1));
  const wanted = body.counterId ?? first?.dropOff.counterId ?? usable[0]?.id;
  const counter = usable.find((one) => one.id === wanted);
  if (!counter) throw badInput([{ path: 'counterId', message: 'Choose a counter that takes drop-offs.' }]);
  return counter;
}
