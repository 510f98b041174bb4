import type { Counter, Parcel, Person, Run } from '@shared/contract';
import { notFound } from '@shared/errors';
import type { Policy } from '@shared/policy/policy';
import { aloneTrip } from '@shared/pooling/cost';
import type { Deps } from '../deps';
import { has, type Actor } from '../http/actor';
import {
  findRunParcels,
  findRuns,
  findStops,
  type RunFilter,
  type RunParcelRow,
  type RunRow,
  type StopRow,
} from './runs-queries';

/** Runs in the form of the contract, with the few reads that a list takes too. */
export async function readRuns(deps: Deps, filter: RunFilter): Promise<Run[]> {
  const { db, services } = deps;
  const rows = await findRuns(db, filter);
  if (rows.length === 0) return [];
  const ids = rows.map(({ id }) => id);
  const stops = await findStops(db, ids);
  const links = await findRunParcels(db, { runIds: ids });
  const parcels = new Map(
    (await services.parcels.byIds(links.map((link) => link.parcel_id))).map((parcel) => [parcel.id, parcel]),
  );
  const people = new Map((await services.people.list()).map((person) => [person.id, person]));
  const counters = new Map((await services.places.counters()).map((counter) => [counter.id, counter]));
  const { policy } = await services.policy.current();
  return rows.map((row): Run => {
    const coordinator = need(people.get(row.coordinator_id));
    const counter = need(counters.get(row.counter_id));
    const own = links.filter((link) => link.run_id === row.id).flatMap((link) => withParcel(link, parcels));
    return {
      ...figures(row),
      zone: policy.circleZone,
      coordinator: {
        id: coordinator.id,
        name: coordinator.name,
        capacityL: coordinator.coordinator?.capacityL ?? 0,
        lat: coordinator.lat ?? 0,
        lon: coordinator.lon ?? 0,
      },
      counter: {
        id: counter.id,
        name: counter.name,
        city: counter.city,
        state: counter.state,
        lat: counter.lat,
        lon: counter.lon,
      },
      loadL: Math.round(own.reduce((sum, { parcel }) => sum + parcel.box.volumeL, 0) * 10) / 10,
      stops: stops
        .filter((stop) => stop.run_id === row.id)
        .map((stop) => {
          const breeder = need(people.get(stop.breeder_id));
          return { ...stopView(stop, breeder, own), aloneCents: aloneCents(breeder, counter, policy) };
        }),
      parcels: own.map(({ link, parcel }) => ({
        id: parcel.id,
        code: parcel.code,
        state: parcel.state,
        breederId: parcel.breeder.id,
        breederName: parcel.breeder.name,
        what: whatOf(parcel),
        destination: `${parcel.destination.city}, ${parcel.destination.state}`,
        volumeL: parcel.box.volumeL,
        verdict: parcel.bookedVerdict?.verdict ?? null,
        pinned: Boolean(link.pinned),
        shareCents: link.share_cents,
      })),
    };
  });
}

interface Linked {
  readonly link: RunParcelRow;
  readonly parcel: Parcel;
}
const withParcel = (link: RunParcelRow, parcels: ReadonlyMap<number, Parcel>): Linked[] => {
  const parcel = parcels.get(link.parcel_id);
  return parcel ? [{ link, parcel }] : [];
};

/** "corn snake, 2 × crested gecko". */
export const whatOf = (parcel: Parcel): string =>
  parcel.contents
    .map((line) => (line.quantity === 1 ? line.commonName : `${line.quantity} × ${line.commonName}`))
    .join(', ');

const figures = (row: RunRow) => ({
  id: row.id,
  state: row.state,
  date: row.date,
  departAt: row.depart_at,
  arriveAt: row.arrive_at,
  cutOffAt: row.cut_off_at,
  slackMinutes: Math.round((Date.parse(row.cut_off_at) - Date.parse(row.arrive_at)) / 60_000),
  driveMinutes: row.drive_minutes,
  miles: row.miles,
  lastLegMinutes: row.last_leg_minutes,
  fixedCents: row.fixed_cents,
  drivingCents: row.driving_cents,
  costCents: row.fixed_cents + row.driving_cents,
  aloneCents: row.alone_cents,
  // What has left or is over has nothing to put right any more.
  problems: ['proposed', 'confirmed'].includes(row.state) ? (JSON.parse(row.problems) as string[]) : [],
  note: row.note,
  version: row.version,
});

function aloneCents(breeder: Person, counter: Counter, { pooling }: Policy): number {
  if (breeder.lat === null || breeder.lon === null) return 0;
  return aloneTrip({ lat: breeder.lat, lon: breeder.lon }, counter, pooling, pooling.aloneCentsPerMile).cents;
}

const stopView = (
  stop: StopRow,
  breeder: Person,
  own: readonly Linked[],
): Omit<Run['stops'][number], 'aloneCents'> => ({
  seq: stop.seq,
  breederId: breeder.id,
  breederName: breeder.name,
  businessName: breeder.businessName,
  street: breeder.street,
  city: breeder.city,
  phone: breeder.phone,
  lat: breeder.lat ?? 0,
  lon: breeder.lon ?? 0,
  arriveAt: stop.arrive_at,
  leaveAt: stop.leave_at,
  waitMinutes: stop.wait_minutes,
  driveMinutes: stop.drive_minutes,
  miles: stop.miles,
  parcelIds: own.filter(({ parcel }) => parcel.breeder.id === breeder.id).map(({ parcel }) => parcel.id),
});

function need<T>(value: T | undefined): T {
  if (value === undefined) throw new Error('A run points at somebody who is not there.');
  return value;
}

/**
 * What an actor may see of a run: coordinators and admins all of it, a breeder their own parcels, stop and shares on it;
 * null when it is none of their business. A proposal is the coordinators' own affair until it is confirmed.
 */
export function seenBy(actor: Actor, run: Run): Run | null {
  if (has(actor, 'coordinator', 'admin')) return run;
  const parcels = run.parcels.filter((parcel) => parcel.breederId === actor.id);
  if (parcels.length === 0 || run.state === 'proposed') return null;
  return {
    ...run,
    parcels,
    stops: run.stops.filter((stop) => stop.breederId === actor.id),
    note: '',
    // They may name other people's parcels.
    problems: [],
    coordinator: { ...run.coordinator, lat: 0, lon: 0 },
  };
}

/** Throws 404 for what the actor may not see, as for what is not there. */
export function mustSee(actor: Actor, run: Run): Run {
  const seen = seenBy(actor, run);
  if (!seen) throw notFound('That run');
  return seen;
}
