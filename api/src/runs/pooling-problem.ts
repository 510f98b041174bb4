import type { DayVerdict, Parcel } from '@shared/contract';
import { daysBetween } from '@shared/calendar/days-between';
import type { FixedRun, Pin, PoolParcel, PoolProblem } from '@shared/pooling/problem';
import type { Deps } from '../deps';
import { poolStop, poolCoordinator, poolCounter, circleMinute, type RunWorld } from './run-world';
import { findRunParcels, findRuns, findStops, type RunRow } from './runs-queries';

export const standing = ['confirmed', 'underway', 'handed-over'] as const;

/** What the pooling decides from, out of the database. `dates` ascending, without holes. */
export async function poolingProblem(
  deps: Deps,
  world: RunWorld,
  dates: readonly string[],
  parcels: readonly Parcel[],
  verdicts: ReadonlyMap<number, readonly DayVerdict[]>,
): Promise<PoolProblem> {
  const { services, clock } = deps;
  const breeders = await Promise.all(
    [...world.breeders.values()].map(async (person) => {
      const { daysAway } = await services.people.availability(person.id);
      return poolStop(
        person,
        dates.filter((date) => daysAway.some((span) => span.from <= date && date <= span.to)),
      );
    }),
  );
  const coordinators = await Promise.all(
    [...world.coordinators.values()].map(async (person) => {
      const availability = await services.people.availability(person.id);
      return poolCoordinator(
        person,
        dates.filter((date) => services.people.canDrive(person, availability, date)),
      );
    }),
  );
  const today = clock.today(world.zone);
  const known = breeders.flatMap((breeder) => breeder ?? []);
  return {
    parcels: parcels.map((parcel) => poolParcelOf(world, parcel, verdicts.get(parcel.id) ?? [])),
    stops: known,
    coordinators: coordinators.flatMap((coordinator) => coordinator ?? []),
    counters: [...world.counters.values()]
      .filter((counter) => counter.canDropOff && counter.active)
      .map((counter) => poolCounter(counter, dates, world.zone)),
    fixedRuns: await fixedRuns(deps, dates, new Set(known.map(({ id }) => id))),
    pins: await pins(deps, new Set(parcels.map(({ id }) => id))),
    costs: world.costs,
    earliestMinutes: { [today]: circleMinute(clock.nowMs(), today, world.zone) },
  };
}

/** A confirmed run stands as it is, with its stops and its load: only a person adds to it. */
async function fixedRuns(
  { db, services }: Deps,
  dates: readonly string[],
  known: ReadonlySet<number>,
): Promise<FixedRun[]> {
  const rows = await findRuns(db, { from: dates[0] ?? '', states: standing });
  const ids = rows.map(({ id }) => id);
  const stops = await findStops(db, ids);
  const links = await findRunParcels(db, { runIds: ids });
  const parcels = new Map(
    (await services.parcels.byIds(links.map((link) => link.parcel_id))).map((one) => [one.id, one]),
  );
  const volumeL = (row: RunRow) =>
    links
      .filter((link) => link.run_id === row.id)
      .reduce((sum, link) => sum + (parcels.get(link.parcel_id)?.box.volumeL ?? 0), 0);
  return rows.map((row) => ({
    takes: row.state === 'confirmed' ? 'by-hand' : 'nothing',
    runId: row.id,
    coordinatorId: row.coordinator_id,
    date: row.date,
    counterId: row.counter_id,
    stopIds: stops.flatMap((stop) =>
      stop.run_id === row.id && known.has(stop.breeder_id) ? [stop.breeder_id] : [],
    ),
    volumeL: volumeL(row),
  }));
}

async function pins({ db }: Deps, parcelIds: ReadonlySet<number>): Promise<Pin[]> {
  const proposed = new Map((await findRuns(db, { states: ['proposed'] })).map((row) => [row.id, row]));
  const links = await findRunParcels(db, { runIds: [...proposed.keys()] });
  return links.flatMap((link) => {
    const run = proposed.get(link.run_id);
    if (!run || !link.pinned || !parcelIds.has(link.parcel_id)) return [];
    return [
      {
        parcelId: link.parcel_id,
        coordinatorId: run.coordinator_id,
        date: run.date,
        counterId: run.counter_id,
      },
    ];
  });
}

function poolParcelOf(world: RunWorld, parcel: Parcel, verdicts: readonly DayVerdict[]): PoolParcel {
  const { dayLaterCents, tightCents } = world.policy.pooling;
  const asked = (date: string) =>
    parcel.shipDate !== null
      ? date === parcel.shipDate
      : parcel.flexible !== null && parcel.flexible.from <= date && date <= parcel.flexible.to;
  // A tight day is the breeder's to accept in words; a run that counted on it could not be confirmed.
  const needsWords = (day: DayVerdict) => day.verdict === 'tight' && parcel.acceptedTight === null;
  const safe = verdicts.filter(
    (day) => day.verdict === 'open' || (day.verdict === 'tight' && !needsWords(day)),
  );
  const first = safe.find((day) => asked(day.date))?.date;
  return {
    id: parcel.id,
    label: parcel.code,
    stopId: parcel.breeder.id,
    breederId: parcel.breeder.id,
    counterId: parcel.dropOff.counterId,
    volumeL: parcel.box.volumeL,
    days: safe
      .filter((day) => asked(day.date))
      .map((day) => ({
        date: day.date,
        penaltyCents:
          (first ? daysBetween(first, day.date) : 0) * dayLaterCents +
          (day.verdict === 'tight' ? tightCents : 0),
      })),
    elsewhere: safe.filter((day) => !asked(day.date)).map((day) => day.date),
    unknownDates: verdicts.filter((day) => day.verdict === 'far' && asked(day.date)).map((day) => day.date),
    tightDates: verdicts.filter((day) => needsWords(day) && asked(day.date)).map((day) => day.date),
    dayFixed: parcel.shipDate !== null,
  };
}
