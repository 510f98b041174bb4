import { mkdirSync } from 'node:fs';
import { dirname } from 'node:path';
import { migrate, openDatabase } from '../api/src/database/connection';

/** `npm run migrate`: brings DATABASE_FILE to the newest schema and says what it did. */
async function main(): Promise<void> {
  const file = process.env['DATABASE_FILE'] ?? 'data/dayberth.sqlite';
  mkdirSync(dirname(file), { recursive: true });
  const db = openDatabase(file);
  const names = await migrate(db);
  process.stdout.write(names.length ? `${names.join('\n')}\n` : 'Nothing to do.\n');
  await db.destroy();
}

void main();
