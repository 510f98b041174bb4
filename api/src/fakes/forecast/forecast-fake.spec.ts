import { spawn } from 'node:child_process';
import { once } from 'node:events';
import { join } from 'node:path';
import { createInterface } from 'node:readline';
import { parseAlerts } from '@shared/forecast/parse-alerts';
import { parseGrid } from '@shared/forecast/parse-grid';
import { parseHourly } from '@shared/forecast/parse-hourly';
import { parsePoints } from '@shared/forecast/parse-points';
import { parseValidTime } from '@shared/forecast/parse-valid-time';
import { climateNormals } from './climate-normals';
import { createForecastFake, type ForecastFake } from './forecast-fake';

const hourMs = 3_600_000;
const start = Date.parse('2026-12-01T12:34:00Z');
const headers = { 'User-Agent': 'test' };
interface Layer {
  uom?: string;
  values: { validTime: string; value: number | null }[];
}

let fake: ForecastFake;
let base: string;
let nowMs = start;

const get = (path: string, extra: Record<string, string> = {}) =>
  fetch(base + path, { headers: { ...headers, ...extra }, redirect: 'manual' });
const json = async (path: string): Promise<unknown> => (await get(path)).json();
const gridUrlOf = async (lat: number, lon: number) =>
  parsePoints(await json(`/points/${lat},${lon}`)).gridUrl.slice(base.length);
const layersOf = async (path: string) =>
  ((await json(path)) as { properties: Record<string, Layer> }).properties;
const script = (change: object) =>
  fetch(`${base}/__script`, { method: 'POST', body: JSON.stringify(change) });

beforeAll(async () => {
  fake = createForecastFake({ seed: 5, now: () => nowMs });
  base = `http://127.0.0.1:${await fake.listen(0)}`;
});
beforeEach(() => {
  nowMs = start;
  fake.script({ reset: true });
});
afterAll(() => fake.close());

describe('the protocol', () => {
  it('refuses who does not say who asks', async () => {
    expect((await get('/points/29.53,-98.47', { 'User-Agent': '' })).status).toBe(403);
  });

  it.each(['/points/29.53,-98.47?units=us', '/alerts/active?point=29.53,-98.47&colour=blue'])(
    'refuses unknown parameters: %s',
    async (path) => {
      const answer = await get(path);
      expect(answer.status).toBe(400);
      expect(answer.headers.get('content-type')).toContain('problem+json');
    },
  );

  it.each([
    ['/points/29.531234,-98.47', '/points/29.5312,-98.47'],
    ['/points/29.50,-98.4700', '/points/29.5,-98.47'],
    ['/alerts/active?point=29.531234,-98.47', '/alerts/active?point=29.5312,-98.47'],
  ])('sends %s to a relative address with a problem document', async (path, location) => {
    const answer = await get(path);
    expect([answer.status, answer.headers.get('location')]).toEqual([301, location]);
    expect(await answer.json()).toMatchObject({ status: 301 });
  });

  it.each([
    '/points/51.5,-0.12',
    '/points/35,-50',
    '/gridpoints/SAT/1,1',
    '/gridpoints/XXX/3261,1181',
    '/zones',
    '/',
  ])('does not know %s', async (path) => {
    const answer = await get(path);
    expect(answer.status).toBe(404);
    expect(await answer.json()).toMatchObject({ status: 404 });
  });

  it('answers 304 until there is a new issue, and at once after the script changed the weather', async () => {
    const path = await gridUrlOf(29.53, -98.47);
    const modified = (await get(path)).headers.get('last-modified') ?? '';
    expect((await get(path, { 'If-Modified-Since': modified })).status).toBe(304);
    fake.script({ steady: { lowF: 1, highF: 2 } });
    expect((await get(path, { 'If-Modified-Since': modified })).status).toBe(200);
    nowMs += hourMs;
    expect((await get(path, { 'If-Modified-Since': modified })).status).toBe(200);
  });
});

describe('a grid', () => {
  it.each(climateNormals.map(({ city, lat, lon }) => [city, lat, lon] as const))(
    'of %s is whole and readable',
    async (_city, lat, lon) => {
      const path = await gridUrlOf(lat, lon);
      const { startMs, tempsF, issuedAt } = parseGrid(await json(path));
      expect(issuedAt).toBe('2026-12-01T12:00:00.000Z');
      expect(startMs).toBeLessThanOrEqual(start);
      const aheadDays = (startMs + tempsF.length * hourMs - start) / (24 * hourMs);
      expect(aheadDays).toBeGreaterThanOrEqual(7.5);
      expect(aheadDays).toBeLessThanOrEqual(8);
      for (const tempF of tempsF) expect(tempF).toEqual(Math.round(tempF ?? Number.NaN));
      const hourly = parseHourly(await json(`${path}/forecast/hourly`));
      const skip = (hourly.startMs - startMs) / hourMs;
      expect(hourly.tempsF).toEqual(tempsF.slice(skip, skip + 156));
    },
  );

  it('merges equal hours and leaves empty layers without a unit', async () => {
    const { temperature, snowLevel, windChill } = await layersOf(await gridUrlOf(29.53, -98.47));
    const values = temperature?.values ?? [];
    expect(values.some(({ validTime }) => /\/PT[2-9]H$/.test(validTime))).toBe(true);
    for (const [index, { value }] of values.slice(1).entries()) expect(value).not.toBe(values[index]?.value);
    expect(snowLevel).toEqual({ values: [] });
    expect(windChill?.values[0]?.value).toBeNull();
  });

  it('has highs of 13 and lows of 14 hours that overlap, the first and last cut where the grid ends', async () => {
    const { maxTemperature, minTemperature } = await layersOf(await gridUrlOf(29.53, -98.47));
    const hours = (layer?: Layer) =>
      (layer?.values ?? [])
        .map(({ validTime }) => parseValidTime(validTime))
        .map((span) => (span.endMs - span.startMs) / hourMs);
    expect(new Set(hours(maxTemperature).slice(1, -1))).toEqual(new Set([13]));
    expect(new Set(hours(minTemperature).slice(1, -1))).toEqual(new Set([14]));
    expect(hours(minTemperature).some((length) => length < 14)).toBe(true);
  });

  it('has its coordinates now as text and now as a number', async () => {
    const kinds = new Set<string>();
    for (const lon of [-98.47, -98.445, -98.42])
      kinds.add(typeof (await layersOf(await gridUrlOf(29.53, lon)))['gridX']);
    expect(kinds).toEqual(new Set(['string', 'number']));
  });

  it('is the same for the same seed and hour, from any fake, whatever was asked before', async () => {
    const places = [[29.53, -98.47], [44.88, -93.23], [21.32, -157.93]] as const; // prettier-ignore
    const other = createForecastFake({ seed: 5, now: () => nowMs + 20 * 60_000 });
    const port = await other.listen(0);
    const read = async (root: string, order: readonly (readonly [number, number])[]) => {
      const grids = new Map<number, unknown>();
      for (const [lat, lon] of order) {
        const path = await gridUrlOf(lat, lon);
        grids.set(lat, parseGrid(await (await fetch(root + path, { headers })).json()));
      }
      return grids;
    };
    const [one, two] = [
      await read(base, places),
      await read(`http://127.0.0.1:${port}`, places.toReversed()),
    ];
    await other.close();
    for (const [lat] of places) expect(one.get(lat)).toEqual(two.get(lat));
  });
});

describe('alerts', () => {
  it('follow a cold snap that the script brings', async () => {
    fake.script({
      coldSnap: {
        lat: 44.88,
        lon: -93.23,
        fromIso: '2026-12-02T00:00:00Z',
        toIso: '2026-12-03T00:00:00Z',
        deltaF: -60,
      },
    });
    const alerts = parseAlerts(await json('/alerts/active?point=44.88,-93.23'));
    expect(alerts.map((alert) => alert.event)).toContain('Extreme Cold Warning');
  });

  it('that are scripted are in force where and when they were asked for', async () => {
    const span = { fromIso: '2026-12-02T06:00:00Z', toIso: '2026-12-02T18:00:00Z' };
    await script({
      steady: { lowF: 50, highF: 60 },
      alert: { lat: 29.53, lon: -98.47, radiusMiles: 20, event: 'Tornado Watch', ...span },
    });
    const at = async (point: string) => parseAlerts(await json(`/alerts/active?point=${point}`));
    expect(await at('29.53,-98.47')).toMatchObject([
      { event: 'Tornado Watch', from: '2026-12-02T06:00:00.000Z', to: '2026-12-02T18:00:00.000Z' },
    ]);
    expect(await at('32.9,-97.04')).toEqual([]);
    nowMs = Date.parse('2026-12-02T18:00:00Z');
    expect(await at('29.53,-98.47')).toEqual([]);
  });
});

describe('the script', () => {
  const temps = async (lat: number, lon: number) => parseGrid(await json(await gridUrlOf(lat, lon)));

  it('makes it colder by exactly so much, there and then', async () => {
    const before = await temps(33.43, -112.01);
    const snap = {
      lat: 33.43,
      lon: -112.01,
      radiusMiles: 60,
      fromIso: '2026-12-04T07:00:00Z',
      toIso: '2026-12-05T07:00:00Z',
      deltaF: -30,
    };
    expect((await script({ coldSnap: snap })).status).toBe(204);
    const after = await temps(33.43, -112.01);
    const changed = after.tempsF.map((tempF, hour) => (tempF ?? 0) - (before.tempsF[hour] ?? 0));
    const first = (Date.parse(snap.fromIso) - after.startMs) / hourMs;
    expect(changed.indexOf(-30)).toBe(first);
    expect(changed.slice(first, first + 24)).toEqual(new Array(24).fill(-30));
    expect(changed.filter((change) => change !== 0)).toHaveLength(24);
    fake.script({ reset: true });
    expect((await temps(33.43, -112.01)).tempsF).toEqual(before.tempsF);
  });

  it('keeps it steady everywhere', async () => {
    fake.script({ steady: { lowF: 45, highF: 70 } });
    for (const { lat, lon } of climateNormals.slice(0, 8)) {
      const { tempsF } = await temps(lat, lon);
      expect([Math.min(...tempsF.map(Number)), Math.max(...tempsF.map(Number))]).toEqual([45, 70]);
    }
  });

  it('leaves hours out', async () => {
    fake.script({
      gap: { lat: 33.43, lon: -112.01, fromIso: '2026-12-04T07:00:00Z', toIso: '2026-12-04T12:00:00Z' },
    });
    expect((await temps(33.43, -112.01)).tempsF.filter((tempF) => tempF === null)).toHaveLength(5);
  });

  it('breaks only as many requests, of the kind asked for', async () => {
    fake.script({ outage: '503', count: 2, only: 'points' });
    const statuses = [];
    for (const path of [
      '/alerts/active?point=29.53,-98.47',
      '/points/29.53,-98.47',
      '/points/29.53,-98.47',
      '/points/29.53,-98.47',
    ])
      statuses.push((await get(path)).status);
    expect(statuses).toEqual([200, 503, 503, 200]);
    expect(fake.log.map((request) => request.status)).toEqual(statuses);
  });

  it('moves the grid', async () => {
    const before = await gridUrlOf(29.53, -98.47);
    fake.script({ gridMoved: true });
    expect((await get(before)).status).toBe(404);
    expect((await get(await gridUrlOf(29.53, -98.47))).status).toBe(200);
  });

  it('refuses what it does not know', async () => {
    expect((await script({ outage: 'plague' })).status).toBe(400);
    expect((await script({ sunshine: true })).status).toBe(400);
    expect((await fetch(`${base}/__script`, { method: 'POST', body: '{' })).status).toBe(400);
  });
});

describe('as a process of its own', () => {
  const main = join(__dirname, 'main.ts');

  it.each(['SIGTERM', 'SIGINT'] as const)(
    'says where it listens, serves, and ends on %s',
    async (signal) => {
      const child = spawn(process.execPath, ['--import', 'tsx', main], {
        env: {
          ...process.env,
          FORECAST_FAKE_PORT: '0',
          FORECAST_FAKE_SEED: '5',
          DAYBERTH_NOW: '2026-12-01T12:34:00Z',
        },
        stdio: ['ignore', 'pipe', 'inherit'],
      });
      const ended = once(child, 'exit');
      const [line] = (await once(createInterface(child.stdout), 'line')) as [string];
      const root = /^forecast fake listening on (http:\/\/127\.0\.0\.1:\d+)$/.exec(line)?.[1] ?? '';
      const path = await gridUrlOf(29.53, -98.47);
      const theirs = parseGrid(await (await fetch(root + path, { headers })).json());
      child.kill(signal);
      expect(await ended).toEqual([0, null]);
      expect(theirs).toEqual(parseGrid(await json(path)));
    },
    20_000,
  );
});
