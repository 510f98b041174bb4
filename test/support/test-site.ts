import type { Express } from 'express';
import type { Knex } from 'knex';
import { pino } from 'pino';
import request from 'supertest';
import { createApp } from '@api/app';
import { createClock, type Clock } from '@api/clock';
import { readConfig, type Config } from '@api/config';
import { migrate, openDatabase } from '@api/database/connection';
import { createDeps, type Deps } from '@api/deps';
import { password, seedSmallCircle, type SmallCircle } from './small-circle';

export interface TestSite {
  readonly app: Express;
  readonly deps: Deps;
  readonly db: Knex;
  readonly ids: SmallCircle;
  /** Moves the frozen clock. */
  setNow(iso: string): void;
  /** A supertest caller; `as('breeder@example.org')` signs in first. Sends the form token by itself. */
  as(email: string | null): Promise<Caller>;
  close(): Promise<void>;
}

type Verb = 'get' | 'post' | 'put' | 'patch' | 'delete';
export type Caller = Record<Verb, (path: string) => request.Test>;

export interface TestSiteOptions {
  readonly now?: string;
  readonly env?: Record<string, string>;
}

/** A whole site on a database in memory, with the clock frozen (Tuesday 1 December 2026, 06:00 in Texas by default). */
export async function createTestSite(options: TestSiteOptions = {}): Promise<TestSite> {
  let now = options.now ?? '2026-12-01T12:00:00.000Z';
  const config: Config = readConfig({
    NODE_ENV: 'test',
    SESSION_SECRET: 'a secret for tests only, forty characters',
    SMTP_URL: 'smtp://127.0.0.1:9',
    MAIL_FROM: 'Dayberth <circle@example.org>',
    FORECAST_URL: 'http://127.0.0.1:9',
    FORECAST_USER_AGENT: '(dayberth tests, admin@example.org)',
    LOG_LEVEL: 'silent',
    POOLING_WORKER_FILE: process.env.POOLING_WORKER_FILE,
    ...options.env,
  });
  const clock: Clock = {
    nowMs: () => Date.parse(now),
    nowIso: () => new Date(Date.parse(now)).toISOString(),
    today: (zone) => createClock(now).today(zone),
  };
  const db = openDatabase(':memory:');
  await migrate(db);
  const ids = await seedSmallCircle(db, now);
  const deps = createDeps({ config, db, clock, log: pino({ level: 'silent' }) });
  const app = createApp(deps);
  return {
    app,
    deps,
    db,
    ids,
    setNow: (iso) => {
      now = iso;
    },
    as: (email) => caller(app, email),
    close: () => db.destroy(),
  };
}

async function caller(app: Express, email: string | null): Promise<Caller> {
  const agent = request.agent(app);
  let token = tokenIn(await agent.get('/api/session'));
  if (email !== null) {
    const answer = await agent.post('/api/session').set('X-XSRF-TOKEN', token).send({ email, password });
    if (answer.status !== 200) throw new Error(`${email} could not sign in: ${answer.status} ${answer.text}`);
    token = tokenIn(answer);
  }
  const send = (verb: Verb) => (path: string) => agent[verb](path).set('X-XSRF-TOKEN', token);
  return {
    get: send('get'),
    post: send('post'),
    put: send('put'),
    patch: send('patch'),
    delete: send('delete'),
  };
}

function tokenIn(answer: request.Response): string {
  const cookies = (answer.headers['set-cookie'] ?? []) as unknown as string[];
  const cookie = cookies.find((text) => text.startsWith('XSRF-TOKEN='));
  if (!cookie) throw new Error('The answer sets no form token.');
  return decodeURIComponent(cookie.slice('XSRF-TOKEN='.length).split(';')[0] ?? '');
}
