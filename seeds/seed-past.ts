import type { Parcel, Run } from '../shared/src/contract';
import type { Deps } from '../api/src/deps';
import type { Actor } from '../api/src/http/actor';
import { addDays } from '../shared/src/calendar/add-days';
import { localInstant } from '../shared/src/calendar/local-instant';
import { longDate } from '../shared/src/parcels/long-date';
import { aboardParcels, arrivedParcels, closedParcels, type ParcelSeed } from './circle-parcels';
import { actorOf, enterParcel, isShipDay, known, shipDaysBefore, type SeedWorld } from './seed-world';

const minuteMs = 60_000;
/** Who drove every run that lies behind. */
const driver = 'coordinator@example.org';

/**
 * What lies behind the circle: a run whose parcels are closed, one whose parcels arrived, and one underway. On a day
 * without drop-offs the run underway is that of the last ship day, whose hand-over nobody has recorded: a case for the desk.
 * No mail is kept of any of it, for none was sent.
 */
export async function seedPast(world: SeedWorld): Promise<void> {
  const { today } = world;
  const before = await shipDaysBefore(world, today, 7);
  const underwayDate = (await isShipDay(world, today)) ? today : before[0];
  const [arrivedDate, closedDate] = before
    .filter((date) => date !== underwayDate && addDays(date, 1) <= today)
    .filter((_, index) => index === 0 || index === 4);
  if (!underwayDate || !arrivedDate || !closedDate) throw new Error('No ship day in the last weeks.');
  await seedClosed(world, closedDate);
  await seedArrived(world, arrivedDate);
  await seedUnderway(world, underwayDate);
  await world.deps.db('outbox').del();
}

async function seedClosed(world: SeedWorld, date: string): Promise<void> {
  const run = await handedOverRun(world, date, closedParcels);
  for (const parcel of run.parcels) {
    await report(world, parcel, date, 'arrived-well', 'Active and drinking. Thank you!');
    const deps = world.at(localInstant(addDays(date, 3), 9 * 60, world.zone));
    await deps.services.parcels.move(parcel.id, 'closed', await actorOf(world, driver), 'Closed.');
  }
}

async function seedArrived(world: SeedWorld, date: string): Promise<void> {
  const run = await handedOverRun(world, date, arrivedParcels);
  const [well, weak] = run.parcels;
  if (well)
    await report(world, well, date, 'arrived-well', 'Picked up at ten, lively. The box was still warm.');
  if (weak) await report(world, weak, date, 'arrived-weak', 'A little slow at first, basking now.');
}

async function seedUnderway(world: SeedWorld, date: string): Promise<void> {
  const { deps: now } = world;
  const run = await confirmedRun(world, date, aboardParcels);
  const leftMs = Math.min(now.clock.nowMs(), Date.parse(run.departAt));
  const deps = world.at(leftMs);
  await deps.services.runs.depart(await actorOf(world, driver), run.id, null, undefined);
}

async function handedOverRun(world: SeedWorld, date: string, seeds: readonly ParcelSeed[]): Promise<Run> {
  const run = await confirmedRun(world, date, seeds);
  const actor = await actorOf(world, driver);
  await world.at(Date.parse(run.departAt)).services.runs.depart(actor, run.id, null, undefined);
  const tracking = run.parcels.map(({ id }) => ({
    parcelId: id,
    number: `LK${date.replaceAll('-', '')}${String(id).padStart(4, '0')}`,
  }));
  return world.at(Date.parse(run.arriveAt)).services.runs.handOver(actor, run.id, null, tracking);
}

/** A run of the past, confirmed the afternoon before. Its days cannot be judged any more, so no verdict is claimed. */
async function confirmedRun(world: SeedWorld, date: string, seeds: readonly ParcelSeed[]): Promise<Run> {
  const coordinator = await actorOf(world, driver);
  const entered = world.at(localInstant(addDays(date, -6), 19 * 60, world.zone));
  const span = { readyFrom: addDays(date, -3), latestDate: addDays(date, 9) };
  const parcels: Parcel[] = [];
  for (const seed of seeds) parcels.push(await enterParcel(world, entered, seed, span));
  const deps = world.at(localInstant(addDays(date, -1), 15 * 60, world.zone));
  for (const [index, parcel] of parcels.entries()) {
    const breeder = await actorOf(world, seeds[index]?.breeder ?? '');
    await deps.services.parcels.move(parcel.id, 'booked', breeder, `Booked for ${longDate(date)}.`, {
      shipDate: date,
    });
  }
  const run = await deps.services.runs.create(coordinator, {
    coordinatorId: coordinator.id,
    date,
    counterId: known(world.places.counters, 'San Antonio'),
    parcelIds: parcels.map(({ id }) => id),
  });
  await setConfirmed(deps, coordinator, run);
  return run;
}

async function setConfirmed(deps: Deps, coordinator: Actor, run: Run): Promise<void> {
  const at = deps.clock.nowIso();
  await deps
    .db('runs')
    .where({ id: run.id })
    .update({ state: 'confirmed', confirmed_at: at, updated_at: at });
  for (const parcel of run.parcels) await deps.services.parcels.setShare(parcel.id, parcel.shareCents);
  await deps.services.history.add({
    actorId: coordinator.id,
    actorName: coordinator.name,
    subjectKind: 'run',
    subjectId: run.id,
    action: 'confirmed',
    text: `Confirmed with ${run.parcels.length} parcels.`,
  });
}

async function report(
  world: SeedWorld,
  { id }: { readonly id: number },
  shipDate: string,
  outcome: 'arrived-well' | 'arrived-weak',
  text: string,
): Promise<void> {
  const parcel = await world.deps.services.parcels.get(id);
  const token = parcel.arrivalUrl.slice(parcel.arrivalUrl.lastIndexOf('/') + 1);
  const collectedMs = Math.min(
    world.deps.clock.nowMs(),
    localInstant(addDays(shipDate, 1), 10 * 60 + 12, parcel.destination.zone) + 8 * minuteMs,
  );
  await world.at(collectedMs).services.arrivals.report(token, { outcome, text });
}
