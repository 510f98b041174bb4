import { mkdirSync } from 'node:fs';
import type { Server } from 'node:http';
import type { AddressInfo } from 'node:net';
import { dirname, resolve } from 'node:path';
import { pino } from 'pino';
import { createApp } from './app';
import { createClock } from './clock';
import type { Config } from './config';
import { migrate, openDatabase } from './database/connection';
import { createDeps, type Deps } from './deps';
import { startJobs } from './jobs/start-jobs';
import { closeLive } from './live/live-hub';

export interface RunningSite {
  readonly port: number;
  readonly deps: Deps;
  stop(): Promise<void>;
}

/** Opens and migrates the database, starts the jobs and listens; `port` 0 in the configuration takes a free one. */
export async function startSite(config: Config, webRoot?: string): Promise<RunningSite> {
  if (config.DATABASE_FILE !== ':memory:')
    mkdirSync(dirname(resolve(config.DATABASE_FILE)), { recursive: true });
  const db = openDatabase(config.DATABASE_FILE);
  await migrate(db);
  const log = pino({ level: config.LOG_LEVEL });
  const deps = createDeps({ config, db, clock: createClock(config.DAYBERTH_NOW), log });
  const app = createApp(deps, webRoot === undefined ? {} : { webRoot });
  const server = await listen(app, config.PORT);
  const stopJobs = startJobs(deps);
  return {
    port: (server.address() as AddressInfo).port,
    deps,
    stop: async () => {
      await stopJobs();
      closeLive(config);
      await close(server);
      await db.destroy();
    },
  };
}

function listen(app: ReturnType<typeof createApp>, port: number): Promise<Server> {
  return new Promise((done, fail) => {
    const server = app.listen(port, '0.0.0.0', (error?: Error) => (error ? fail(error) : done(server)));
  });
}

function close(server: Server): Promise<void> {
  return new Promise((done) => {
    server.close(() => done());
    server.closeIdleConnections();
    setTimeout(() => server.closeAllConnections(), 2000).unref();
  });
}
