import { pino } from 'pino';
import { createClock } from '../api/src/clock';
import { readConfig } from '../api/src/config';
import { migrate, openDatabase } from '../api/src/database/connection';
import { createDeps } from '../api/src/deps';
import { demoEnvironment, isDemo, readEnvironment } from './environment';

/** `npm run recheck`: one recheck of every booked parcel; prints what it did as JSON. */
async function main(): Promise<void> {
  const env = readEnvironment();
  const config = readConfig(isDemo(env) ? withRunningFakes(demoEnvironment(env)) : env);
  const db = openDatabase(config.DATABASE_FILE);
  try {
    await migrate(db);
    const deps = createDeps({
      config,
      db,
      clock: createClock(config.DAYBERTH_NOW),
      log: pino({ level: 'warn' }, pino.destination(2)),
    });
    const report = await deps.services.rechecks.run();
    process.stdout.write(`${JSON.stringify(report, null, 2)}\n`);
  } finally {
    await db.destroy();
  }
}

/** In the demo the fakes listen on the ports after the site's (tools/start.ts). */
function withRunningFakes(env: Record<string, string>): Record<string, string> {
  const port = Number(env['PORT']);
  return {
    FORECAST_URL: `http://127.0.0.1:${port + 1}`,
    SMTP_URL: `smtp://127.0.0.1:${port + 2}`,
    ...env,
  };
}

main().catch((error: unknown) => {
  process.stderr.write(`${error instanceof Error ? error.message : String(error)}\n`);
  process.exit(1);
});
