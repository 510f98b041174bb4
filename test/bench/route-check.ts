import { mkdtempSync, rmSync } from 'node:fs';
import { Agent, createServer, request, type RequestListener, type Server } from 'node:http';
import type { AddressInfo } from 'node:net';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import express from 'express';
import knex from 'knex';
import { pino } from 'pino';
import { createApp } from '@api/app';
import { createClock } from '@api/clock';
import { readConfig } from '@api/config';
import { migrate, openDatabase } from '@api/database/connection';
import { createDeps } from '@api/deps';
import { createForecastFake } from '@api/fakes/forecast/forecast-fake';
import { seedHolidays } from '../../seeds/seed-places';
import { password, seedSmallCircle } from '../support/small-circle';
import type { BenchLine } from './bench-line';

const warmUps = 50;
const measured = 400;
const agent = new Agent({ keepAlive: true, maxSockets: 1 });

interface Call {
  readonly method: 'GET' | 'POST';
  readonly url: string;
  readonly headers?: Record<string, string>;
  readonly body?: unknown;
}
interface Reply {
  readonly status: number;
  readonly cookies: readonly string[];
  readonly text: string;
}

/**
 * `POST /api/route-checks` over HTTP from a warm cache, one after the other, beside a bare Express route that reads one
 * row of a SQLite file through Knex; the two take turns, so that both meet the same machine. Prints nothing.
 */
export async function routeCheck(): Promise<BenchLine[]> {
  const folder = mkdtempSync(join(tmpdir(), 'dayberth-bench-'));
  const ends: (() => unknown)[] = [() => rmSync(folder, { recursive: true })];
  try {
    const checking = await startSite(folder, ends);
    const reading = await startBare(folder, ends);
    const checks: number[] = [];
    const reads: number[] = [];
    for (let round = -warmUps; round < measured; round += 1) {
      const [check, read] = [await timed(checking), await timed(reading)];
      if (round < 0) continue;
      checks.push(check);
      reads.push(read);
    }
    const value = p95(checks);
    return [
      {
        bench: 'route-check',
        metric: 'p95Ms',
        value: round3(value),
        unit: 'ms',
        ratio: round3(value / p95(reads)),
        against: 'a bare Express route that reads one row',
      },
    ];
  } finally {
    agent.destroy();
    for (const end of ends.reverse()) await end();
  }
}

/** A site on a file of its own with its forecasts from the fake; answers the call to measure, made once already. */
async function startSite(folder: string, ends: (() => unknown)[]): Promise<Call> {
  const fake = createForecastFake({ seed: 1, now: Date.now });
  const forecastPort = await fake.listen(0);
  ends.push(() => fake.close());
  const db = openDatabase(join(folder, 'site.sqlite'));
  ends.push(() => db.destroy());
  await migrate(db);
  const ids = await seedSmallCircle(db);
  // Each of a real circle's yearly rules counts at every look.
  await seedHolidays(db, new Date().toISOString());
  const config = readConfig({
    SESSION_SECRET: 'a secret for the bench only, forty characters',
    SMTP_URL: 'smtp://127.0.0.1:9',
    MAIL_FROM: 'Dayberth <circle@example.org>',
    FORECAST_URL: `http://127.0.0.1:${forecastPort}`,
    FORECAST_USER_AGENT: '(dayberth bench, admin@example.org)',
    LOG_LEVEL: 'silent',
  });
  const deps = createDeps({ config, db, clock: createClock(), log: pino({ level: 'silent' }) });
  const base = await listen(createApp(deps), ends);
  const call: Call = {
    method: 'POST',
    url: `${base}/api/route-checks`,
    headers: await signIn(base),
    body: {
      destination: { counterId: ids.denverCounter },
      service: 'hold',
      contents: [{ speciesId: ids.cornSnake, quantity: 1, massG: 160 }],
      boxId: ids.smallBox,
    },
  };
  const { days } = JSON.parse((await send(call)).text) as { days: { forecastAt: string | null }[] };
  if (days.length !== 14 || days[1]?.forecastAt == null)
    throw new Error('The route check has no forecasts to work on.');
  return call;
}

/** Signs the breeder in; answers the headers that carry the session and the form token. */
async function signIn(base: string): Promise<Record<string, string>> {
  const url = `${base}/api/session`;
  const jar = new Map<string, string>();
  const keep = ({ cookies }: Reply) => {
    for (const cookie of cookies) {
      const [pair = ''] = cookie.split(';');
      jar.set(pair.slice(0, pair.indexOf('=')), pair.slice(pair.indexOf('=') + 1));
    }
    const all = [...jar].map(([name, value]) => `${name}=${value}`).join('; ');
    return { Cookie: all, 'X-XSRF-TOKEN': decodeURIComponent(jar.get('XSRF-TOKEN') ?? '') };
  };
  const headers = keep(await send({ method: 'GET', url }));
  return keep(await send({ method: 'POST', url, headers, body: { email: 'breeder@example.org', password } }));
}

async function startBare(folder: string, ends: (() => unknown)[]): Promise<Call> {
  const db = knex({
    client: 'better-sqlite3',
    connection: { filename: join(folder, 'bare.sqlite') },
    useNullAsDefault: true,
  });
  ends.push(() => db.destroy());
  await db.schema.createTable('rows', (t) => {
    t.increments('id');
    t.text('name').notNullable();
  });
  await db('rows').insert({ name: 'one row' });
  const app = express();
  app.get('/row', async (_req, res) => {
    res.json(await db('rows').where({ id: 1 }).first());
  });
  return { method: 'GET', url: `${await listen(app, ends)}/row` };
}

async function listen(app: RequestListener, ends: (() => unknown)[]): Promise<string> {
  const server: Server = createServer(app);
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve));
  ends.push(() => {
    server.closeAllConnections();
    server.close();
  });
  return `http://127.0.0.1:${(server.address() as AddressInfo).port}`;
}

async function timed(call: Call): Promise<number> {
  const startedMs = performance.now();
  await send(call);
  return performance.now() - startedMs;
}

/** One request on a kept connection; anything but 200 ends the bench. */
function send({ method, url, headers, body }: Call): Promise<Reply> {
  const payload = body === undefined ? null : JSON.stringify(body);
  const bodyHeaders =
    payload === null
      ? {}
      : { 'Content-Type': 'application/json', 'Content-Length': Buffer.byteLength(payload) };
  return new Promise((resolve, reject) => {
    const req = request(url, { method, agent, headers: { ...headers, ...bodyHeaders } }, (res) => {
      let text = '';
      res.setEncoding('utf8');
      res.on('data', (chunk: string) => (text += chunk));
      res.on('end', () => {
        const status = res.statusCode ?? 0;
        if (status === 200) resolve({ status, cookies: res.headers['set-cookie'] ?? [], text });
        else reject(new Error(`${method} ${url} answered ${status}: ${text.slice(0, 300)}`));
      });
    });
    req.on('error', reject);
    req.end(payload);
  });
}

/** The value that 95 of 100 stay at or under (nearest rank). */
function p95(values: readonly number[]): number {
  const sorted = values.toSorted((a, b) => a - b);
  return sorted[Math.ceil(0.95 * sorted.length) - 1] ?? Number.NaN;
}

const round3 = (value: number) => Math.round(value * 1000) / 1000;
