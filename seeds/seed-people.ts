import type { Knex } from 'knex';
import { buyers, people, type PersonSeed } from './circle-people';
import { counters } from './circle-places';
import type { SeededPlaces } from './seed-places';

/** Minutes a driver needs at a breeder's door. */
const serviceMinutes = 10;
/** IRS business mileage rate of 2026, 72.5 cents, rounded up. */
const centsPerMile = 73;

/** Everybody of the demo circle; ids by e-mail. Those who work with it and the first buyer can sign in. */
export async function seedPeople(
  db: Knex,
  places: SeededPlaces,
  passwordHash: string,
  now: string,
): Promise<ReadonlyMap<string, number>> {
  const ids = new Map<string, number>();
  for (const person of people)
    ids.set(person.email, await insertPerson(db, places, person, passwordHash, now));
  for (const [index, [name, email, city]] of buyers.entries()) {
    const counter = counters.find((one) => one.city === city);
    if (!counter) throw new Error(`No counter in ${city} for ${name}.`);
    const row = {
      name,
      email,
      phone: `555-01${String(index + 20).padStart(2, '0')}`,
      city,
      state: counter.state,
      postal_code: counter.postalCode,
      lat: counter.lat,
      lon: counter.lon,
      zone: counter.zone,
      password_hash: index === 0 ? passwordHash : null,
    };
    ids.set(email, await insertRow(db, row, ['buyer'], now));
  }
  return ids;
}

async function insertPerson(
  db: Knex,
  places: SeededPlaces,
  person: PersonSeed,
  passwordHash: string,
  now: string,
): Promise<number> {
  const { breeder, coordinator } = person;
  const row = {
    name: person.name,
    email: person.email,
    phone: person.phone,
    business_name: person.businessName ?? null,
    street: person.street,
    city: person.city,
    state: person.state,
    postal_code: person.postalCode,
    lat: person.lat,
    lon: person.lon,
    zone: 'America/Chicago',
    password_hash: passwordHash,
  };
  const id = await insertRow(db, row, person.roles, now);
  if (breeder)
    await db('breeder_profiles').insert({
      person_id: id,
      window_open_minute: breeder.open,
      window_close_minute: breeder.close,
      service_minutes: serviceMinutes,
      drop_off_counter_id: places.counters.get(breeder.counterCity),
    });
  if (coordinator)
    await db('coordinator_profiles').insert({
      person_id: id,
      capacity_l: coordinator.capacityL,
      longest_run_minutes: coordinator.longestRunMinutes,
      cents_per_mile: centsPerMile,
      free_weekdays: JSON.stringify(coordinator.freeWeekdays),
    });
  return id;
}

async function insertRow(
  db: Knex,
  row: Record<string, unknown>,
  roles: readonly string[],
  now: string,
): Promise<number> {
  const [id] = await db('people').insert({ ...row, created_at: now, updated_at: now });
  if (id === undefined) throw new Error('people took no row.');
  for (const role of roles) await db('person_roles').insert({ person_id: id, role });
  return id;
}
