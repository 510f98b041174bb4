import type { Knex } from 'knex';
import argon2 from 'argon2';
import { hashOptions } from '@api/session/session-service';

export const password = 'a quiet morning';

/** Ids of the small invented circle that API tests start from. */
export interface SmallCircle {
  readonly admin: number;
  readonly breeder: number;
  readonly otherBreeder: number;
  readonly coordinator: number;
  readonly buyer: number;
  readonly otherBuyer: number;
  readonly dropOffCounter: number;
  readonly phoenixCounter: number;
  readonly denverCounter: number;
  readonly cornSnake: number;
  readonly crestedGecko: number;
  readonly smallBox: number;
  readonly largeBox: number;
}

let hash: Promise<string> | null = null;
const everyday = (value: unknown) =>
  JSON.stringify(Object.fromEntries([1, 2, 3, 4, 5].map((day) => [day, value])));

/** Writes the small circle into a freshly migrated database: two breeders, one coordinator, two buyers, one admin. */
export async function seedSmallCircle(db: Knex, at = '2026-12-01T12:00:00.000Z'): Promise<SmallCircle> {
  hash ??= argon2.hash(password, hashOptions);
  const passwordHash = await hash;
  const insert = async (table: string, row: Record<string, unknown>): Promise<number> => {
    const [id] = await db(table).insert(row);
    return id as number;
  };
  const person = async (name: string, email: string, role: string, extra: Record<string, unknown> = {}) => {
    const id = await insert('people', {
      name,
      email,
      password_hash: passwordHash,
      zone: 'America/Chicago',
      created_at: at,
      updated_at: at,
      city: 'San Antonio',
      state: 'TX',
      street: '1 Test Lane',
      postal_code: '78205',
      lat: 29.42,
      lon: -98.49,
      ...extra,
    });
    await insert('person_roles', { person_id: id, role });
    return id;
  };
  const hub = await insert('hubs', {
    name: 'Larkspur sort hub',
    city: 'Indianapolis',
    state: 'IN',
    lat: 39.72,
    lon: -86.29,
    zone: 'America/Indiana/Indianapolis',
  });
  const carrier = await insert('carriers', { name: 'Larkspur Overnight', hub_id: hub });
  const counter = (
    name: string,
    city: string,
    state: string,
    lat: number,
    lon: number,
    zone: string,
    dropOff: boolean,
  ) =>
    insert('counters', {
      carrier_id: carrier,
      name,
      street: '100 Ramp Road',
      city,
      state,
      postal_code: '00000',
      lat,
      lon,
      zone,
      can_drop_off: dropOff,
      can_hold: true,
      working_days: '[1,2,3,4,5]',
      cut_off_minutes: dropOff ? everyday(17 * 60) : '{}',
      opening_hours: everyday({ openMinute: 480, closeMinute: 1080 }),
      commit_minute: 540,
    });
  const dropOffCounter = await counter(
    'San Antonio airport counter',
    'San Antonio',
    'TX',
    29.53,
    -98.47,
    'America/Chicago',
    true,
  );
  const phoenixCounter = await counter(
    'Phoenix counter',
    'Phoenix',
    'AZ',
    33.43,
    -112.01,
    'America/Phoenix',
    false,
  );
  const denverCounter = await counter(
    'Denver counter',
    'Denver',
    'CO',
    39.85,
    -104.67,
    'America/Denver',
    false,
  );
  const cornSnake = await insert('species', {
    common_name: 'corn snake',
    scientific_name: 'Pantherophis guttatus',
    band_low_f: 60,
    band_high_f: 86,
    endurance_low_f: 48,
    endurance_high_f: 92,
    typical_mass_g: 160,
  });
  const crestedGecko = await insert('species', {
    common_name: 'crested gecko',
    scientific_name: 'Correlophus ciliatus',
    band_low_f: 60,
    band_high_f: 80,
    endurance_low_f: 50,
    endurance_high_f: 84,
    outdoor_high_f: 84,
    typical_mass_g: 35,
  });
  const box = (name: string, l: number, w: number, h: number) =>
    insert('boxes', { name, length_in: l, width_in: w, height_in: h, foam_in: 0.75 });
  const smallBox = await box('Small', 12, 9, 6);
  const largeBox = await box('Large', 16, 12, 12);
  const admin = await person('Ada Admin', 'admin@example.org', 'admin');
  const breeder = await person('Bea Breeder', 'breeder@example.org', 'breeder', {
    business_name: 'Third Draw Serpents',
    city: 'Boerne',
    lat: 29.79,
    lon: -98.73,
  });
  const otherBreeder = await person('Otto Other', 'other@example.org', 'breeder', {
    business_name: 'Cypress Fork Geckos',
    city: 'Seguin',
    lat: 29.57,
    lon: -97.96,
  });
  const coordinator = await person('Cora Coordinator', 'coordinator@example.org', 'coordinator');
  const buyer = await person('Bo Buyer', 'buyer@example.org', 'buyer', {
    zone: 'America/Phoenix',
    city: 'Phoenix',
    state: 'AZ',
    lat: 33.45,
    lon: -112.07,
  });
  const otherBuyer = await person('Uma Unrelated', 'unrelated@example.org', 'buyer', {
    zone: 'America/Denver',
  });
  for (const id of [breeder, otherBreeder])
    await db('breeder_profiles').insert({
      person_id: id,
      window_open_minute: 540,
      window_close_minute: 960,
      service_minutes: 10,
      drop_off_counter_id: dropOffCounter,
    });
  await db('coordinator_profiles').insert({
    person_id: coordinator,
    capacity_l: 300,
    longest_run_minutes: 360,
    cents_per_mile: 73,
    free_weekdays: '[1,2,3,4,5]',
  });
  return {
    admin,
    breeder,
    otherBreeder,
    coordinator,
    buyer,
    otherBuyer,
    dropOffCounter,
    phoenixCounter,
    denverCounter,
    cornSnake,
    crestedGecko,
    smallBox,
    largeBox,
  };
}
