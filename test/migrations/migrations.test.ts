import { readdirSync } from 'node:fs';
import type { Knex } from 'knex';
import { migrate, openDatabase } from '@api/database/connection';
import { migrationNames } from '@api/database/migration-source';
import { seedSmallCircle } from '../support/small-circle';

const tablesOf = async (db: Knex) =>
  (
    await db.raw<{ name: string }[]>(
      "select name from sqlite_master where type = 'table' and name not like 'sqlite_%' and name not like 'knex_%'",
    )
  )
    .map((row) => row.name)
    .sort();

describe('The migrations', () => {
  let db: Knex;
  beforeEach(() => {
    db = openDatabase(':memory:');
  });
  afterEach(() => db.destroy());

  it('are all in the registry, in the order of their names', () => {
    const files = readdirSync('migrations')
      .filter((name) => name.endsWith('.ts'))
      .map((name) => name.replace(/\.ts$/, ''))
      .sort();
    expect(migrationNames).toEqual(files);
  });

  it('bring an empty file up, and nothing more the second time', async () => {
    expect(await migrate(db)).toHaveLength(migrationNames.length);
    expect(await migrate(db)).toEqual([]);
  });

  it('go down to nothing and up again to the same tables', async () => {
    await migrate(db);
    const tables = await tablesOf(db);
    await db.migrate.rollback(undefined, true);
    expect(await tablesOf(db)).toEqual([]);
    await migrate(db);
    expect(await tablesOf(db)).toEqual(tables);
  });

  it('step down and up over a seeded circle with every reference intact', async () => {
    await migrate(db);
    await seedSmallCircle(db);
    await db.migrate.down();
    await db.migrate.up();
    expect(await db.raw('pragma foreign_key_check')).toEqual([]);
    expect(await db.raw('pragma integrity_check')).toEqual([{ integrity_check: 'ok' }]);
    expect(await db('people')).toHaveLength(6);
  });
});
