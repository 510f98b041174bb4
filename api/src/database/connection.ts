import knex, { type Knex } from 'knex';
import { migrationSource } from './migration-source';

interface RawSqlite {
  pragma(text: string): unknown;
}

/**
 * Opens the SQLite file (`:memory:` for tests that need no second connection). Write-ahead log, foreign keys on, and
 * a busy time-out so that the recheck script and the server may write side by side.
 */
export function openDatabase(file: string): Knex {
  return knex({
    client: 'better-sqlite3',
    connection: { filename: file },
    useNullAsDefault: true,
    pool: {
      min: 1,
      max: 1,
      afterCreate: (raw: RawSqlite, done: (error: Error | null, connection: unknown) => void) => {
        raw.pragma('journal_mode = WAL');
        raw.pragma('synchronous = NORMAL');
        raw.pragma('foreign_keys = ON');
        raw.pragma('busy_timeout = 5000');
        done(null, raw);
      },
    },
    migrations: { migrationSource },
  });
}

/** Brings the schema to the newest version; answers the names of the migrations it ran. */
export async function migrate(db: Knex): Promise<string[]> {
  const [, names] = (await db.migrate.latest()) as [number, string[]];
  return names;
}
