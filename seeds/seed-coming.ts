import type { DayVerdict, Parcel } from '../shared/src/contract';
import { addDays } from '../shared/src/calendar/add-days';
import { longDate } from '../shared/src/parcels/long-date';
import { cancelledParcel, comingParcels, draftParcels } from './circle-parcels';
import { actorOf, enterParcel, known, type SeedWorld } from './seed-world';

const hourMs = 3_600_000;
const runSize = 4;
const secondRunSize = 3;
const mostOfOneBreeder = 2;

/** A parcel that waits, with its days as they stand. */
interface Waiting {
  readonly parcel: Parcel;
  readonly breeder: string;
  readonly days: readonly DayVerdict[];
}

/** What lies ahead: two confirmed runs, a parcel booked alone, one put on hold by a blackout, five left open, drafts. */
export async function seedComing(world: SeedWorld): Promise<void> {
  let waiting = await enterWaiting(world);
  const taken = new Set<string>();
  for (const size of [runSize, secondRunSize]) {
    const plan = await bestRun(world, waiting, size, taken);
    if (!plan) continue;
    await confirmRun(world, plan, taken.size === 0);
    taken.add(plan.date);
    waiting = waiting.filter((one) => !plan.aboard.includes(one));
  }
  waiting = await putOneOnHold(world, waiting, taken);
  waiting = await bookOneAlone(world, waiting);
  for (const { parcel, breeder } of waiting)
    await world.deps.services.parcels.book(
      await actorOf(world, breeder),
      parcel.id,
      { flexible: { from: parcel.readyFrom, to: parcel.latestDate } },
      null,
    );
  await enterDrafts(world);
}

async function enterWaiting(world: SeedWorld): Promise<Waiting[]> {
  const { deps, today } = world;
  const parcels: { parcel: Parcel; breeder: string }[] = [];
  for (const [index, seed] of comingParcels.entries()) {
    const entered = world.at(deps.clock.nowMs() - (70 - 4 * index) * hourMs);
    const span = { readyFrom: addDays(today, index < 8 ? 0 : index % 3), latestDate: addDays(today, 12) };
    parcels.push({ parcel: await enterParcel(world, entered, seed, span), breeder: seed.breeder });
  }
  const days = await deps.services.days.forParcels(
    parcels.map(({ parcel }) => parcel.id),
    { from: today, days: 14 },
  );
  return parcels.map((one) => ({ ...one, days: days.get(one.parcel.id) ?? [] }));
}

interface RunPlan {
  readonly date: string;
  readonly coordinator: string;
  readonly aboard: readonly Waiting[];
}

/** The first day on which a driver is free and enough parcels are safe; else the day with the most. */
async function bestRun(
  world: SeedWorld,
  waiting: readonly Waiting[],
  size: number,
  taken: ReadonlySet<string>,
): Promise<RunPlan | null> {
  let best: RunPlan | null = null;
  for (let ahead = 1; ahead <= 8 && (best?.aboard.length ?? 0) < size; ahead += 1) {
    const date = addDays(world.today, ahead);
    const coordinator = taken.has(date) ? null : await driverOn(world, date, taken.size);
    if (!coordinator) continue;
    const aboard = safeOn(waiting, date, size);
    if (aboard.length > (best?.aboard.length ?? 0)) best = { date, coordinator, aboard };
  }
  return best;
}

/** Delia drives the first run, Marco the second, where they are free. */
async function driverOn({ deps, people }: SeedWorld, date: string, turn: number): Promise<string | null> {
  const drivers = ['coordinator@example.org', 'marco@example.org'];
  const order = turn === 0 ? drivers : drivers.toReversed();
  for (const email of order) {
    const person = await deps.services.people.get(people.get(email) ?? 0);
    if (deps.services.people.canDrive(person, await deps.services.people.availability(person.id), date))
      return email;
  }
  return null;
}

/** Open days first, then tight ones; few of one breeder, so that the run has stops. */
function safeOn(waiting: readonly Waiting[], date: string, size: number): Waiting[] {
  const verdictOf = (one: Waiting) => one.days.find((day) => day.date === date)?.verdict;
  const safe = [
    ...waiting.filter((one) => verdictOf(one) === 'open'),
    ...waiting.filter((one) => verdictOf(one) === 'tight'),
  ];
  const chosen: Waiting[] = [];
  for (const one of safe) {
    const own = chosen.filter((other) => other.breeder === one.breeder).length;
    if (chosen.length < size && own < mostOfOneBreeder) chosen.push(one);
  }
  return chosen;
}

async function bookDay(world: SeedWorld, { parcel, breeder, days }: Waiting, date: string): Promise<void> {
  const tight = days.find((day) => day.date === date)?.verdict !== 'open';
  const body = {
    date,
    ...(tight ? { acceptTight: 'Seen. The buyer collects at nine sharp and I watch the forecast.' } : {}),
  };
  await world.deps.services.parcels.book(await actorOf(world, breeder), parcel.id, body, null);
}

async function confirmRun(
  world: SeedWorld,
  { date, coordinator, aboard }: RunPlan,
  isFirst: boolean,
): Promise<void> {
  const { deps } = world;
  for (const one of aboard) await bookDay(world, one, date);
  const driver = await actorOf(world, coordinator);
  const run = await deps.services.runs.create(driver, {
    coordinatorId: driver.id,
    date,
    counterId: known(world.places.counters, 'San Antonio'),
    parcelIds: aboard.map(({ parcel }) => parcel.id),
  });
  await deps.services.runs.confirm(driver, run.id, run.version);
  const first = aboard[0];
  // The nearest run has one box made up already.
  if (first && isFirst) {
    const breeder = await actorOf(world, first.breeder);
    await deps.services.parcels.edit(breeder, first.parcel.id, { state: 'packed' }, null);
  }
}

/** A closing at a hold counter takes a booked parcel off its day, the way it happens to an admin. */
async function putOneOnHold(
  world: SeedWorld,
  waiting: Waiting[],
  taken: ReadonlySet<string>,
): Promise<Waiting[]> {
  const { deps } = world;
  for (const one of waiting.toReversed()) {
    const { counterId, city } = one.parcel.destination;
    const day =
      one.days.find(({ verdict, date }) => verdict === 'open' && !taken.has(date)) ??
      one.days.find(({ verdict }) => verdict !== 'shut');
    if (!day || counterId === null) continue;
    await bookDay(world, one, day.date);
    await deps.services.blackouts.create(await actorOf(world, 'admin@example.org'), {
      title: `${city} counter closed for building work`,
      kind: 'date',
      startDate: addDays(day.date, 1),
      endDate: null,
      rules: null,
      liftedDates: [],
      scope: 'counter',
      carrierId: null,
      state: null,
      counterId,
      note: `Told by the counter on ${longDate(world.today)}.`,
    });
    return waiting.filter((other) => other !== one);
  }
  return waiting;
}

async function bookOneAlone(world: SeedWorld, waiting: Waiting[]): Promise<Waiting[]> {
  for (const one of waiting) {
    const day = one.days.findLast(({ verdict }) => verdict === 'open' || verdict === 'tight');
    if (!day) continue;
    await bookDay(world, one, day.date);
    return waiting.filter((other) => other !== one);
  }
  return waiting;
}

async function enterDrafts(world: SeedWorld): Promise<void> {
  const { deps, today } = world;
  const span = { readyFrom: addDays(today, 1), latestDate: addDays(today, 18) };
  for (const [index, seed] of draftParcels.entries())
    await enterParcel(world, world.at(deps.clock.nowMs() - (index + 1) * hourMs), seed, span);
  const cancelled = await enterParcel(
    world,
    world.at(deps.clock.nowMs() - 40 * hourMs),
    cancelledParcel,
    span,
  );
  const breeder = await actorOf(world, cancelledParcel.breeder);
  await deps.services.parcels.edit(breeder, cancelled.id, { state: 'cancelled' }, null);
}
