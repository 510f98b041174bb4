import { randomBytes } from 'node:crypto';
import { existsSync, mkdirSync, readFileSync, writeFileSync } from 'node:fs';
import { dirname, join } from 'node:path';
import { createClock } from '../api/src/clock';
import { demoWeather } from '../api/src/fakes/forecast/demo-weather';

export type Environment = Record<string, string>;

/** The process's environment with `.env` beneath it: what is set outside wins. */
export function readEnvironment(): Environment {
  if (existsSync('.env')) process.loadEnvFile('.env');
  return Object.fromEntries(
    Object.entries(process.env).filter((entry): entry is [string, string] => entry[1] !== undefined),
  );
}

/** The demo is what starts when nobody has configured a real circle. */
export function isDemo(env: Environment): boolean {
  return (
    env['DEMO'] === '1' ||
    (env['DEMO'] === undefined && env['SMTP_URL'] === undefined && env['FORECAST_URL'] === undefined)
  );
}

/** Fills in what the demo needs beside the addresses of its fakes; a secret is made once and kept beside the database. */
export function demoEnvironment(env: Environment): Environment {
  const databaseFile = env['DATABASE_FILE'] ?? 'data/dayberth.sqlite';
  const port = env['PORT'] ?? '4300';
  return {
    ...keptWeather(join(dirname(databaseFile), 'demo-weather.json'), env['DAYBERTH_NOW']),
    ...env,
    DEMO: '1',
    PORT: port,
    DATABASE_FILE: databaseFile,
    PUBLIC_URL: env['PUBLIC_URL'] ?? `http://127.0.0.1:${port}`,
    SESSION_SECRET: env['SESSION_SECRET'] ?? keptSecret(join(dirname(databaseFile), 'demo-secret')),
    MAIL_FROM: env['MAIL_FROM'] ?? 'Hill Country circle <circle@example.org>',
    FORECAST_USER_AGENT: env['FORECAST_USER_AGENT'] ?? '(dayberth demo, admin@example.org)',
    LOG_LEVEL: env['LOG_LEVEL'] ?? 'warn',
  };
}

function keptSecret(file: string): string {
  if (existsSync(file)) return readFileSync(file, 'utf8').trim();
  mkdirSync(dirname(file), { recursive: true });
  const secret = randomBytes(32).toString('base64url');
  writeFileSync(file, `${secret}\n`, { mode: 0o600 });
  return secret;
}

/** Chosen at the first start and kept beside the database: a later start must not turn the weather round. */
function keptWeather(file: string, frozenAt: string | undefined): Environment {
  if (!existsSync(file)) {
    const { seed, seasonShiftDays } = demoWeather(createClock(frozenAt).nowMs());
    const chosen = {
      FORECAST_FAKE_SEED: String(seed),
      FORECAST_FAKE_SEASON_SHIFT_DAYS: String(seasonShiftDays),
    };
    mkdirSync(dirname(file), { recursive: true });
    writeFileSync(file, `${JSON.stringify(chosen)}\n`);
  }
  return JSON.parse(readFileSync(file, 'utf8')) as Environment;
}
