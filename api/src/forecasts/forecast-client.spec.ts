import { createServer, type RequestListener, type Server } from 'node:http';
import type { AddressInfo } from 'node:net';
import { isAppError } from '@shared/errors';
import { createForecastFake, type ForecastFake } from '../fakes/forecast/forecast-fake';
import { atMost } from './at-most';
import { createForecastClient } from './forecast-client';
import { createJsonFetcher, upstreamStatus, type FetcherOptions } from './json-fetcher';

const nowMs = Date.parse('2026-12-01T12:34:00Z');
const sanAntonio = { lat: 29.53, lon: -98.47, zone: 'America/Chicago' };
const userAgent = '(circle.example.org, admin@example.org)';
const nothingHeld = { gridPath: null, lastModified: null };

let fake: ForecastFake;
let baseUrl: string;
let clock = nowMs;
const strangers: Server[] = [];

const fetcher = (extra: Partial<FetcherOptions> = {}) =>
  createJsonFetcher({
    baseUrl,
    userAgent,
    limiter: atMost(4),
    timeoutMs: 200,
    backOffMs: 2,
    attempts: 4,
    maxBytes: 1_000_000,
    ...extra,
  });
const client = (extra: Partial<FetcherOptions> = {}) => createForecastClient(fetcher(extra));
const asked = (start: string) => fake.log.filter((request) => request.path.startsWith(start));
const problemOf = async (promise: Promise<unknown>) => {
  const error = await promise.then(
    () => null,
    (reason: unknown) => reason,
  );
  if (!isAppError(error, 'forecast-unavailable')) throw new Error(`not a forecast problem: ${String(error)}`);
  return { message: error.message, status: upstreamStatus(error) };
};
/** A server of the test's own, for answers that the fake never gives. */
async function stranger(listener: RequestListener): Promise<string> {
  const server = createServer(listener);
  strangers.push(server);
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve));
  return `http://127.0.0.1:${(server.address() as AddressInfo).port}`;
}

beforeAll(async () => {
  fake = createForecastFake({ seed: 7, now: () => clock });
  baseUrl = `http://127.0.0.1:${await fake.listen(0)}`;
});
beforeEach(() => {
  clock = nowMs;
  fake.script({ reset: true });
});
afterEach(() => {
  for (const server of strangers.splice(0)) {
    server.closeAllConnections();
    server.close();
  }
});
afterAll(() => fake.close());

describe('a forecast', () => {
  it('is found by /points and read from the raw grid', async () => {
    fake.script({ steady: { lowF: 50, highF: 68 } });
    const answer = await client().forecast(sanAntonio, nothingHeld);
    expect(fake.log.map((request) => [request.path, request.status])).toEqual([
      ['/points/29.53,-98.47', 200],
      [answer.gridPath, 200],
    ]);
    expect(answer.gridPath).toMatch(/^\/gridpoints\/[A-Z]{3}\/\d+,\d+$/);
    const temps = answer.series?.tempsF.filter((tempF) => tempF !== null) ?? [];
    expect([Math.min(...temps), Math.max(...temps)]).toEqual([50, 68]);
    expect(answer.series?.issuedAt).toBe('2026-12-01T12:00:00.000Z');
  });

  it('says who is asking', async () => {
    await client().forecast(sanAntonio, nothingHeld);
    expect(new Set(fake.log.map((request) => request.userAgent))).toEqual(new Set([userAgent]));
  });

  it.each([
    [29.5312345, -98.47001, '/points/29.5312,-98.47'],
    [30, -97.5, '/points/30,-97.5'],
    [29.1, -98.1000000001, '/points/29.1,-98.1'],
  ])('at %d, %d is asked for with four decimals and no idle zeros', async (lat, lon, path) => {
    await client().forecast({ lat, lon, zone: 'America/Chicago' }, nothingHeld);
    expect(fake.log[0]).toMatchObject({ path, status: 200 });
  });

  it('whose grid is known is not looked up again', async () => {
    const { gridPath } = await client().forecast(sanAntonio, nothingHeld);
    fake.script({ reset: true });
    await client().forecast(sanAntonio, { gridPath, lastModified: null });
    expect(asked('/points')).toHaveLength(0);
  });

  it('that is still the newest is not sent again', async () => {
    const first = await client().forecast(sanAntonio, nothingHeld);
    const again = await client().forecast(sanAntonio, first);
    expect(again).toEqual({ gridPath: first.gridPath, lastModified: first.lastModified, series: null });
    expect(fake.log.at(-1)).toMatchObject({ status: 304, ifModifiedSince: first.lastModified });
    clock += 3_600_000;
    expect((await client().forecast(sanAntonio, first)).series?.issuedAt).toBe('2026-12-01T13:00:00.000Z');
  });

  it('whose grid has moved is looked up once more', async () => {
    const first = await client().forecast(sanAntonio, nothingHeld);
    fake.script({ gridMoved: true });
    const again = await client().forecast(sanAntonio, first);
    expect(again.gridPath).not.toBe(first.gridPath);
    expect(again.series?.tempsF).toEqual(first.series?.tempsF);
    expect(fake.log.slice(-3).map((request) => request.status)).toEqual([404, 200, 200]);
  });

  it('that is 404 after looking it up again fails, without a third try', async () => {
    const first = await client().forecast(sanAntonio, nothingHeld);
    fake.script({ outage: '404', only: 'grid' });
    expect(await problemOf(client().forecast(sanAntonio, first))).toMatchObject({ status: 404 });
    expect(asked('/gridpoints')).toHaveLength(3);
    expect(asked('/points')).toHaveLength(2);
  });

  it('outside of the country fails with the reason', async () => {
    const { message } = await problemOf(
      client().forecast({ lat: 51.5, lon: -0.12, zone: 'Europe/London' }, nothingHeld),
    );
    expect(message).toContain('404 InvalidPoint');
    expect(fake.log).toHaveLength(1);
  });

  it('comes from the hourly forecast when the grid cannot be read', async () => {
    fake.script({ steady: { lowF: 50, highF: 68 }, outage: 'malformed', only: 'grid' });
    const { series, lastModified } = await client().forecast(sanAntonio, nothingHeld);
    expect(series?.startMs).toBe(Date.parse('2026-12-01T12:00:00Z'));
    expect(series?.tempsF).toHaveLength(156);
    expect(Math.min(...(series?.tempsF ?? []).filter((tempF) => tempF !== null))).toBe(50);
    expect(lastModified).toBeNull();
  });

  it('in a shape nobody knows fails in words', async () => {
    fake.script({ outage: 'malformed' });
    expect((await problemOf(client().forecast(sanAntonio, nothingHeld))).message).toContain('cannot be read');
  });
});

describe('a service that stumbles', () => {
  it.each(['500', '503', '429', 'refuse', 'timeout', 'not-json'] as const)(
    'with %s is asked again',
    async (outage) => {
      fake.script({ outage, count: 2, only: 'points' });
      await client().forecast(sanAntonio, nothingHeld);
      expect(asked('/points')).toHaveLength(3);
    },
  );

  it.each([
    ['500', 500, /500 UnexpectedProblem/],
    ['503', 503, /503 ForecastGridExpired/],
    ['429', 429, /429/],
    ['refuse', null, /cannot be reached/],
    ['timeout', null, /did not answer within 0.2 s/],
    ['not-json', null, /not JSON/],
  ] as const)('with %s for good is given up after four tries', async (outage, status, message) => {
    fake.script({ outage });
    const problem = await problemOf(client().forecast(sanAntonio, nothingHeld));
    expect(problem.status).toBe(status);
    expect(problem.message).toMatch(message);
    expect(asked('/points')).toHaveLength(4);
  });

  it('is left longer and longer pauses', async () => {
    fake.script({ outage: '500' });
    const startedMs = performance.now();
    await problemOf(client({ backOffMs: 40 }).forecast(sanAntonio, nothingHeld));
    // Half of 40 + 80 + 160 ms at least, all of it at most; the upper bound leaves room for a busy machine.
    expect(performance.now() - startedMs).toBeGreaterThanOrEqual(140 - 5);
    expect(performance.now() - startedMs).toBeLessThan(2000);
  });

  it('that sends far more than a forecast is cut off, once', async () => {
    fake.script({ outage: 'huge' });
    expect((await problemOf(client().forecast(sanAntonio, nothingHeld))).message).toContain('far more');
    expect(fake.log).toHaveLength(1);
  });

  it('sees at most four requests at once', async () => {
    fake.script({ delayMs: 20 });
    const one = client();
    await Promise.all(
      Array.from({ length: 12 }, (_, index) =>
        one.forecast({ ...sanAntonio, lat: 29 + index / 10 }, nothingHeld),
      ),
    );
    expect(fake.mostAtOnce()).toBe(4);
  });

  it('that is told nobody’s name refuses, and is not asked again', async () => {
    // Node's fetch sends a name of its own unless it is given an empty one.
    const { status } = await problemOf(client({ userAgent: '' }).forecast(sanAntonio, nothingHeld));
    expect(status).toBe(403);
    expect(fake.log).toHaveLength(1);
  });
});

describe('a redirect', () => {
  it('to a relative address is followed', async () => {
    const answer = await fetcher()('/points/29.531234,-98.47');
    expect(fake.log.map((request) => request.status)).toEqual([301, 200]);
    expect(answer.kind).toBe('new');
  });

  it('to another host is not', async () => {
    const other = await stranger((_req, res) => res.end('{}'));
    const base = await stranger(
      (_req, res) => void res.writeHead(301, { Location: `${other}/points/1,1` }).end(),
    );
    const { message } = await problemOf(fetcher({ baseUrl: base })('/points/1,1'));
    expect(message).toContain('another address');
  });

  it('out of the base path is not', async () => {
    const base = await stranger((_req, res) => void res.writeHead(301, { Location: '/elsewhere' }).end());
    expect((await problemOf(fetcher({ baseUrl: `${base}/weather` })('/points/1,1'))).message).toContain(
      'another address',
    );
  });

  it('in circles ends', async () => {
    const base = await stranger((req, res) => void res.writeHead(301, { Location: req.url }).end());
    expect((await problemOf(fetcher({ baseUrl: base })('/points/1,1'))).message).toContain('circles');
  });

  it('to a grid on another host keeps to our base', async () => {
    const paths: string[] = [];
    const base = await stranger((req, res) => {
      paths.push(req.url ?? '');
      res.end(JSON.stringify({ properties: { forecastGridData: 'http://192.0.2.1/gridpoints/EWX/1,2' } }));
    });
    await problemOf(client({ baseUrl: base }).forecast(sanAntonio, nothingHeld));
    expect(paths).toEqual([
      '/points/29.53,-98.47',
      '/gridpoints/EWX/1,2',
      '/gridpoints/EWX/1,2/forecast/hourly',
    ]);
  });
});

describe('alerts', () => {
  it('are asked for by point', async () => {
    const span = { fromIso: '2026-12-02T06:00:00Z', toIso: '2026-12-02T18:00:00Z' };
    fake.script({
      steady: { lowF: 50, highF: 60 },
      alert: { ...sanAntonioOnly, ...span, event: 'Ice Storm Warning' },
    });
    expect(await client().alerts(sanAntonio)).toMatchObject([
      {
        event: 'Ice Storm Warning',
        severity: 'Severe',
        from: '2026-12-02T06:00:00.000Z',
        to: '2026-12-02T18:00:00.000Z',
      },
    ]);
    expect(fake.log.at(-1)?.path).toBe('/alerts/active?point=29.53,-98.47');
    expect(await client().alerts({ lat: 39.72, lon: -86.29, zone: 'America/Indiana/Indianapolis' })).toEqual(
      [],
    );
  });

  it('in a shape nobody knows are a problem, not an empty list', async () => {
    fake.script({ outage: 'malformed', only: 'alerts' });
    expect((await problemOf(client().alerts(sanAntonio))).message).toContain('alerts');
  });
});

const sanAntonioOnly = { lat: sanAntonio.lat, lon: sanAntonio.lon, radiusMiles: 30 };
