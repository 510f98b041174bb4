import type { Knex } from 'knex';
import { migrationSource } from './api/src/database/migration-source';

/** For the Knex command line; the server opens its own connection in api/src/database. */
const config: Knex.Config = {
  client: 'better-sqlite3',
  connection: { filename: process.env['DATABASE_FILE'] ?? 'data/dayberth.sqlite' },
  useNullAsDefault: true,
  migrations: { migrationSource },
};
export default config;
