import type { Knex } from 'knex';
import { placeKey } from '@shared/forecast/outdoor-forecast';

/** Parcels in these states still need a forecast of their route. */
const needForecast = ['seeking', 'booked', 'packed'];

interface Position {
  readonly lat: number | null;
  readonly lon: number | null;
}

export interface PlaceInUse {
  readonly key: string;
  readonly name: string;
}

/** The places whose weather decides about a parcel at present: drop-off, sort hub and destination, each once. */
export async function placesInUse(db: Knex): Promise<PlaceInUse[]> {
  const parcels = () => db('parcels as p').whereIn('p.state', needForecast);
  const ends = (column: string) =>
    parcels()
      .join('counters as c', 'c.id', column)
      .distinct('c.lat', 'c.lon', 'c.city', 'c.state') as Promise<Named[]>;
  const hubs = parcels()
    .join('counters as c', 'c.id', 'p.drop_off_counter_id')
    .join('carriers', 'carriers.id', 'c.carrier_id')
    .join('hubs', 'hubs.id', 'carriers.hub_id')
    .distinct('hubs.lat', 'hubs.lon', 'hubs.city', 'hubs.state') as Promise<Named[]>;
  const doors = parcels().where('p.service', 'door').distinct({
    lat: 'p.door_lat',
    lon: 'p.door_lon',
    city: 'p.door_city',
    state: 'p.door_state',
  }) as Promise<Named[]>;
  const rows = [
    ...(await ends('p.drop_off_counter_id')),
    ...(await hubs),
    ...(await ends('p.hold_counter_id')),
    ...(await doors),
  ];
  const places = new Map<string, PlaceInUse>();
  for (const { lat, lon, city, state } of rows) {
    if (lat === null || lon === null) continue;
    const key = placeKey({ lat, lon });
    if (!places.has(key)) places.set(key, { key, name: `${city}, ${state}` });
  }
  return [...places.values()].sort((a, b) => a.name.localeCompare(b.name, 'en'));
}

interface Named extends Position {
  readonly city: string;
  readonly state: string;
}

export interface DeskCounts {
  readonly people: number;
  readonly parcels: number;
  readonly runs: number;
}

/** Active people, parcels under way in the circle, and runs from `today` on that are not called off. */
export async function deskCounts(db: Knex, today: string): Promise<DeskCounts> {
  const count = async (query: Knex.QueryBuilder): Promise<number> => {
    const row = (await query.count({ n: '*' }).first()) as { n: number };
    return Number(row.n);
  };
  return {
    people: await count(db('people').where({ active: true })),
    parcels: await count(db('parcels').whereNotIn('state', ['arrived', 'closed', 'cancelled'])),
    runs: await count(db('runs').where('date', '>=', today).whereNot('state', 'called-off')),
  };
}

/** Whether the database answers at all. */
export async function databaseAnswers(db: Knex): Promise<boolean> {
  try {
    await db.raw('select 1');
    return true;
  } catch {
    return false;
  }
}
