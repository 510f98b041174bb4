import { pathToFileURL } from 'node:url';
import { mkdirSync, renameSync, rmSync } from 'node:fs';
import { dirname } from 'node:path';
import { pino } from 'pino';
import { createClock } from '../api/src/clock';
import { readConfig } from '../api/src/config';
import { migrate, openDatabase } from '../api/src/database/connection';
import { createDeps, type Deps } from '../api/src/deps';
import { seedDemo } from '../seeds/seed-demo';
import { seedFirstAdmin } from '../seeds/seed-first-admin';
import { demoEnvironment, isDemo, readEnvironment, type Environment } from './environment';
import { startFakes } from './fakes';
import { buildServer } from './build';

/**
 * Seeds the demo circle into a database without people; answers whether it did. The forecast service must be up. The circle
 * is made in a file of its own and put in place whole: a seed that was interrupted leaves nothing half-done.
 */
export async function seed(env: Environment): Promise<boolean> {
  const file = readConfig(env).DATABASE_FILE;
  if (await withSite(env, async ({ db }) => (await db('people').first('id')) !== undefined)) return false;
  const unfinished = `${file}.unfinished`;
  removeDatabase(unfinished);
  await withSite({ ...env, DATABASE_FILE: unfinished }, seedDemo);
  removeDatabase(file);
  renameSync(unfinished, file);
  return true;
}

function removeDatabase(file: string): void {
  for (const suffix of ['', '-wal', '-shm']) rmSync(`${file}${suffix}`, { force: true });
}

async function withSite<T>(env: Environment, work: (deps: Deps) => Promise<T>): Promise<T> {
  const config = readConfig(env);
  mkdirSync(dirname(config.DATABASE_FILE), { recursive: true });
  const db = openDatabase(config.DATABASE_FILE);
  try {
    await migrate(db);
    return await work(
      createDeps({
        config,
        db,
        clock: createClock(config.DAYBERTH_NOW),
        log: pino({ level: 'warn' }, pino.destination(2)),
      }),
    );
  } finally {
    await db.destroy();
  }
}

/** `npm run seed` (demo) or `npm run seed -- --admin you@example.org "Your Name" [--carrier "Name" ZIP-of-its-sort-hub]`. */
async function main(): Promise<void> {
  const args = process.argv.slice(2);
  const value = (flag: string, offset: number) =>
    args.includes(flag) ? args[args.indexOf(flag) + offset] : undefined;
  const env = readEnvironment();
  const [email, name] = [value('--admin', 1), value('--admin', 2)];
  if (email !== undefined) {
    if (!name) throw new Error('Say the name too: npm run seed -- --admin you@example.org "Your Name"');
    const [carrierName, hubZip] = [value('--carrier', 1), value('--carrier', 2)];
    const carrier = carrierName && hubZip ? { name: carrierName, hubZip } : null;
    const url = await withSite(env, (deps) => seedFirstAdmin(deps, { email, name }, carrier));
    say(`Open this link within seven days to set the password:\n${url}`);
    return;
  }
  if (!isDemo(env))
    throw new Error(
      'This is a real circle. Its first admin: npm run seed -- --admin you@example.org "Your Name"',
    );
  await buildServer();
  const demo = demoEnvironment(env);
  const fakes = await startFakes(demo, 0);
  try {
    const done = await seed({ ...demo, FORECAST_URL: fakes.forecastUrl, SMTP_URL: fakes.smtpUrl });
    say(
      done
        ? 'The demo circle has been seeded.'
        : 'There are people in the database already: nothing was changed.',
    );
  } finally {
    fakes.stop();
  }
}

const say = (text: string): boolean => process.stdout.write(`${text}\n`);

if (process.argv[1] && import.meta.url === pathToFileURL(process.argv[1]).href)
  main().catch((error: unknown) => {
    process.stderr.write(`${error instanceof Error ? error.message : String(error)}\n`);
    process.exit(1);
  });
