import type { Knex } from 'knex';
import type {
  Availability,
  BreederProfile,
  CoordinatorProfile,
  Person,
  Role,
  TemperatureUnit,
} from '@shared/contract';

interface PersonRow {
  id: number;
  email: string;
  name: string;
  business_name: string | null;
  phone: string | null;
  street: string | null;
  city: string | null;
  state: string | null;
  postal_code: string | null;
  lat: number | null;
  lon: number | null;
  zone: string;
  temperature_unit: TemperatureUnit;
  password_hash: string | null;
  active: number;
  version: number;
}

interface BreederRow {
  person_id: number;
  window_open_minute: number;
  window_close_minute: number;
  service_minutes: number;
  drop_off_counter_id: number;
}

interface CoordinatorRow {
  person_id: number;
  capacity_l: number;
  longest_run_minutes: number;
  cents_per_mile: number;
  free_weekdays: string;
}

/** The columns of a person that are edited as they are. */
export type PersonFields = Pick<
  Person,
  | 'email'
  | 'name'
  | 'businessName'
  | 'phone'
  | 'street'
  | 'city'
  | 'state'
  | 'postalCode'
  | 'lat'
  | 'lon'
  | 'zone'
  | 'temperatureUnit'
  | 'active'
>;

const toRow = (person: PersonFields): Record<string, unknown> => ({
  email: person.email,
  name: person.name,
  business_name: person.businessName,
  phone: person.phone,
  street: person.street,
  city: person.city,
  state: person.state,
  postal_code: person.postalCode,
  lat: person.lat,
  lon: person.lon,
  zone: person.zone,
  temperature_unit: person.temperatureUnit,
  active: person.active,
});

/** People with roles and profiles, by name; all of them, or those with the ids. */
export async function findPeople(db: Knex, ids?: readonly number[]): Promise<Person[]> {
  const only = (table: string, column: string): Knex.QueryBuilder =>
    ids ? db(table).whereIn(column, [...ids]) : db(table);
  const rows = (await only('people', 'id').orderBy(['name', 'id'])) as PersonRow[];
  const roles = (await only('person_roles', 'person_id').orderBy('role')) as {
    person_id: number;
    role: Role;
  }[];
  const breeders = (await only('breeder_profiles', 'person_id')) as BreederRow[];
  const coordinators = (await only('coordinator_profiles', 'person_id')) as CoordinatorRow[];
  const rolesOf = new Map<number, Role[]>();
  for (const row of roles as { person_id: number; role: Role }[])
    rolesOf.set(row.person_id, [...(rolesOf.get(row.person_id) ?? []), row.role]);
  const breederOf = new Map(breeders.map((row) => [row.person_id, toBreeder(row)]));
  const coordinatorOf = new Map(coordinators.map((row) => [row.person_id, toCoordinator(row)]));
  return rows.map((row) => ({
    id: row.id,
    email: row.email,
    roles: rolesOf.get(row.id) ?? [],
    name: row.name,
    businessName: row.business_name,
    phone: row.phone,
    street: row.street,
    city: row.city,
    state: row.state,
    postalCode: row.postal_code,
    lat: row.lat,
    lon: row.lon,
    zone: row.zone,
    temperatureUnit: row.temperature_unit,
    active: Boolean(row.active),
    hasPassword: row.password_hash !== null,
    breeder: breederOf.get(row.id) ?? null,
    coordinator: coordinatorOf.get(row.id) ?? null,
    version: row.version,
  }));
}

const toBreeder = (row: BreederRow): BreederProfile => ({
  windowOpenMinute: row.window_open_minute,
  windowCloseMinute: row.window_close_minute,
  serviceMinutes: row.service_minutes,
  dropOffCounterId: row.drop_off_counter_id,
});

const toCoordinator = (row: CoordinatorRow): CoordinatorProfile => ({
  capacityL: row.capacity_l,
  longestRunMinutes: row.longest_run_minutes,
  centsPerMile: row.cents_per_mile,
  freeWeekdays: JSON.parse(row.free_weekdays) as number[],
});

export async function findIdByEmail(db: Knex, email: string): Promise<number | null> {
  const row = await db<PersonRow>('people').where({ email: email.toLowerCase() }).first('id');
  return row?.id ?? null;
}

export async function insertPerson(db: Knex, person: PersonFields, at: string): Promise<number> {
  const [id] = await db('people').insert({ ...toRow(person), created_at: at, updated_at: at });
  return id ?? 0;
}

/** Writes the fields and the next version; `endSessions` signs the person out everywhere. */
export async function updatePerson(
  db: Knex,
  id: number,
  person: PersonFields,
  set: { version: number; at: string; endSessions: boolean },
): Promise<void> {
  await db('people')
    .where({ id })
    .update({ ...toRow(person), version: set.version, updated_at: set.at });
  if (set.endSessions) await db('people').where({ id }).increment('session_epoch', 1);
}

export async function replaceRoles(db: Knex, personId: number, roles: readonly Role[]): Promise<void> {
  await db('person_roles').where({ person_id: personId }).delete();
  await db('person_roles').insert([...new Set(roles)].map((role) => ({ person_id: personId, role })));
}

export const addRole = (db: Knex, personId: number, role: Role): Promise<unknown> =>
  db('person_roles').insert({ person_id: personId, role }).onConflict(['person_id', 'role']).ignore();

export async function saveBreeder(db: Knex, personId: number, profile: BreederProfile): Promise<void> {
  const row = {
    person_id: personId,
    window_open_minute: profile.windowOpenMinute,
    window_close_minute: profile.windowCloseMinute,
    service_minutes: profile.serviceMinutes,
    drop_off_counter_id: profile.dropOffCounterId,
  };
  await db('breeder_profiles').insert(row).onConflict('person_id').merge();
}

export async function saveCoordinator(
  db: Knex,
  personId: number,
  profile: CoordinatorProfile,
): Promise<void> {
  const row = {
    person_id: personId,
    capacity_l: profile.capacityL,
    longest_run_minutes: profile.longestRunMinutes,
    cents_per_mile: profile.centsPerMile,
    free_weekdays: JSON.stringify([...new Set(profile.freeWeekdays)].sort()),
  };
  await db('coordinator_profiles').insert(row).onConflict('person_id').merge();
}

interface AwayRow {
  person_id: number;
  from_date: string;
  to_date: string;
  note: string;
}

interface DrivingRow {
  person_id: number;
  date: string;
  free: number;
}

export async function findAvailability(db: Knex, personId: number): Promise<Availability> {
  const away = await db<AwayRow>('days_away')
    .where({ person_id: personId })
    .orderBy(['from_date', 'to_date']);
  const driving = await db<DrivingRow>('driving_days').where({ person_id: personId }).orderBy('date');
  return {
    daysAway: away.map((row) => ({ from: row.from_date, to: row.to_date, note: row.note })),
    drivingDays: driving.map((row) => ({ date: row.date, free: Boolean(row.free) })),
  };
}

export async function replaceAvailability(
  db: Knex,
  personId: number,
  availability: Availability,
): Promise<void> {
  await db('days_away').where({ person_id: personId }).delete();
  await db('driving_days').where({ person_id: personId }).delete();
  for (const span of availability.daysAway)
    await db('days_away').insert({
      person_id: personId,
      from_date: span.from,
      to_date: span.to,
      note: span.note,
    });
  for (const day of availability.drivingDays)
    await db('driving_days').insert({ person_id: personId, date: day.date, free: day.free });
}
