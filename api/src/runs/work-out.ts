import type { DayVerdict, Parcel, Person } from '@shared/contract';
import { notFound } from '@shared/errors';
import type { Deps } from '../deps';
import type { RunFacts } from './run-problems';
import { runSheet } from './run-sheet';
import { circleMinute, readRunWorld, type RunWorld } from './run-world';
import { findRunParcels, findRuns, writeSheet, type RunRow } from './runs-queries';

/** Sequences, prices and shares a run anew from the parcels that are on it now. */
export async function workOut(tx: Deps, runId: number): Promise<void> {
  const [row] = await findRuns(tx.db, { ids: [runId] });
  if (!row) throw notFound('That run');
  const world = await readRunWorld(tx);
  const coordinator =
    world.coordinators.get(row.coordinator_id) ?? (await tx.services.people.get(row.coordinator_id));
  const counter = world.counters.get(row.counter_id) ?? (await tx.services.places.counter(row.counter_id));
  const links = await findRunParcels(tx.db, { runIds: [runId] });
  const parcels = await tx.services.parcels.byIds(links.map((link) => link.parcel_id));
  const frame = { coordinator, counter, date: row.date };
  const sheet = runSheet(world, frame, parcels, await readFacts(tx, world, row, coordinator, parcels));
  await writeSheet(tx.db, runId, sheet, tx.clock.nowIso());
  if (row.state !== 'proposed')
    for (const [parcelId, shareCents] of sheet.shares)
      await tx.services.parcels.setShare(parcelId, shareCents);
}

/** A confirmed run's days are the recheck's business, and its driver may be on the way: only a proposal is asked for them. */
async function readFacts(
  tx: Deps,
  world: RunWorld,
  { id, date, state }: RunRow,
  coordinator: Person,
  parcels: readonly Parcel[],
): Promise<RunFacts> {
  const { services } = tx;
  const today = tx.clock.today(world.zone);
  const isProposed = state === 'proposed';
  const availability = await services.people.availability(coordinator.id);
  const sameDay = await findRuns(tx.db, { from: date, to: date, states: ['confirmed', 'underway'] });
  return {
    days: isProposed ? await judged(tx, parcels, date) : null,
    isDriverFree: services.people.canDrive(coordinator, availability, date),
    isDriverTaken: sameDay.some((other) => other.id !== id && other.coordinator_id === coordinator.id),
    isDayOver: isProposed && date < today,
    earliestMinute: isProposed && date === today ? circleMinute(tx.clock.nowMs(), today, world.zone) : null,
  };
}

/** How a day is judged for parcels; inside a transaction with the weather that is known already. */
export async function judged(
  deps: Deps,
  parcels: readonly { id: number }[],
  date: string,
): Promise<ReadonlyMap<number, DayVerdict>> {
  if (parcels.length === 0) return new Map();
  const days = await deps.services.days.forParcels(
    parcels.map(({ id }) => id),
    { from: date, days: 1 },
  );
  return new Map([...days].flatMap(([id, [day]]) => (day ? [[id, day] as const] : [])));
}
