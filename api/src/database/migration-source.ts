import type { Knex } from 'knex';
import * as createPeople from '../../../migrations/20261201090000_create_people';
import * as createSignIn from '../../../migrations/20261201090100_create_sign_in';
import * as createPlaces from '../../../migrations/20261201090200_create_places';
import * as createCalendar from '../../../migrations/20261201090300_create_calendar';
import * as createForecasts from '../../../migrations/20261201090400_create_forecasts';
import * as createParcels from '../../../migrations/20261201090500_create_parcels';
import * as createRuns from '../../../migrations/20261201090600_create_runs';
import * as createNotices from '../../../migrations/20261201090700_create_notices';
import * as guardHistory from '../../../migrations/20261201090800_guard_history';

interface Migration {
  readonly name: string;
  readonly up: (knex: Knex) => Promise<void>;
  readonly down: (knex: Knex) => Promise<void>;
}

/** Every migration in order. A test holds that each file of migrations/ stands here. */
const registry: readonly Migration[] = [
  { name: '20261201090000_create_people', ...createPeople },
  { name: '20261201090100_create_sign_in', ...createSignIn },
  { name: '20261201090200_create_places', ...createPlaces },
  { name: '20261201090300_create_calendar', ...createCalendar },
  { name: '20261201090400_create_forecasts', ...createForecasts },
  { name: '20261201090500_create_parcels', ...createParcels },
  { name: '20261201090600_create_runs', ...createRuns },
  { name: '20261201090700_create_notices', ...createNotices },
  { name: '20261201090800_guard_history', ...guardHistory },
];

/**
 * Knex migration source over imported modules: the same names whether run by tsx, from the bundle or in Jest (Knex
 * refuses a database whose migrations were recorded under other file names).
 */
export const migrationSource: Knex.MigrationSource<Migration> = {
  getMigrations: () => Promise.resolve([...registry]),
  getMigrationName: (migration) => migration.name,
  getMigration: (migration) => Promise.resolve(migration),
};

export const migrationNames: readonly string[] = registry.map((migration) => migration.name);
