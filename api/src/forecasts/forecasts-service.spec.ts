import { placeKey } from '@shared/forecast/outdoor-forecast';
import { createTestSite, type TestSite } from '../../../test/support/test-site';
import { createDeps } from '../deps';
import { createForecastFake, type ForecastFake } from '../fakes/forecast/forecast-fake';

const start = '2026-12-01T12:34:00.000Z';
const phoenix = { lat: 33.43, lon: -112.01, zone: 'America/Phoenix' };
const denver = { lat: 39.85, lon: -104.67, zone: 'America/Denver' };
const key = placeKey(phoenix);

let fake: ForecastFake;
let baseUrl: string;
let site: TestSite;
let now = start;

/** Moves both clocks, the site's and the service's. */
function setNow(iso: string): void {
  now = iso;
  site.setNow(iso);
}
const minutesLater = (minutes: number) => new Date(Date.parse(start) + minutes * 60_000).toISOString();
const forecasts = () => site.deps.services.forecasts;
const phoenixNow = async (options?: { maxAgeMinutes?: number; waitMs?: number }) =>
  (await forecasts().forPlaces([phoenix], options)).get(key);

beforeAll(async () => {
  fake = createForecastFake({ seed: 7, now: () => Date.parse(now) });
  baseUrl = `http://127.0.0.1:${await fake.listen(0)}`;
});
beforeEach(async () => {
  now = start;
  fake.script({ reset: true });
  fake.script({ steady: { lowF: 45, highF: 70 } });
  site = await createTestSite({ now: start, env: { FORECAST_URL: baseUrl } });
});
afterEach(() => site.close());
afterAll(() => fake.close());

describe('forecasts of places', () => {
  it('are fetched the first time and then read from the cache', async () => {
    const first = await phoenixNow();
    expect(first).toMatchObject({
      zone: 'America/Phoenix',
      issuedAt: '2026-12-01T12:00:00.000Z',
      fetchedAt: start,
      alerts: [],
    });
    expect(Math.min(...(first?.tempsF ?? []).filter((tempF) => tempF !== null))).toBe(45);
    const requests = fake.log.length;
    setNow(minutesLater(59));
    expect(await phoenixNow()).toEqual(first);
    expect(fake.log).toHaveLength(requests);
  });

  it('are fetched again after an hour, and an unchanged one only becomes fresher', async () => {
    await phoenixNow();
    site.setNow(minutesLater(60));
    const again = await phoenixNow();
    expect(again).toMatchObject({ issuedAt: '2026-12-01T12:00:00.000Z', fetchedAt: minutesLater(60) });
    expect(fake.log.some((request) => request.status === 304)).toBe(true);
    setNow(minutesLater(120));
    expect(await phoenixNow()).toMatchObject({
      issuedAt: '2026-12-01T14:00:00.000Z',
      fetchedAt: minutesLater(120),
    });
  });

  it('are fetched as often as the caller asks', async () => {
    await phoenixNow();
    fake.script({ steady: { lowF: 30, highF: 50 } });
    const again = await phoenixNow({ maxAgeMinutes: 0 });
    expect(Math.min(...(again?.tempsF ?? []).filter((tempF) => tempF !== null))).toBe(30);
  });

  it('are fetched once for many who ask at the same time', async () => {
    fake.script({ delayMs: 30 });
    const all = await Promise.all(Array.from({ length: 8 }, () => phoenixNow()));
    expect(new Set(all.map((forecast) => JSON.stringify(forecast))).size).toBe(1);
    expect(fake.log.filter((request) => request.path.startsWith('/points'))).toHaveLength(1);
  });

  it('are fetched at most four requests at a time', async () => {
    fake.script({ delayMs: 20 });
    const places = Array.from({ length: 10 }, (_, index) => ({ ...denver, lat: 35 + index / 2 }));
    expect((await forecasts().forPlaces(places)).size).toBe(10);
    expect(fake.mostAtOnce()).toBe(4);
  });

  it('survive a restart, for they stand in the database', async () => {
    const first = await phoenixNow();
    fake.script({ outage: 'refuse' });
    const { config, clock, log } = site.deps;
    const restarted = createDeps({ config: { ...config }, db: site.db, clock, log });
    const requests = fake.log.length;
    expect((await restarted.services.forecasts.forPlaces([phoenix])).get(key)).toEqual(first);
    expect(fake.log).toHaveLength(requests);
  });

  it('inside a transaction are read from the cache only', async () => {
    await phoenixNow();
    setNow(minutesLater(600));
    const requests = fake.log.length;
    const inside = await site.deps.transaction((tx) => tx.services.forecasts.forPlaces([phoenix, denver]));
    expect([...inside.keys()]).toEqual([key]);
    expect(inside.get(key)?.fetchedAt).toBe(start);
    expect(fake.log).toHaveLength(requests);
  });

  it('of no places are none', async () => {
    expect((await forecasts().forPlaces([])).size).toBe(0);
  });
});

describe('when the service is down', () => {
  it.each(['500', 'timeout', 'not-json', 'malformed', 'refuse'] as const)(
    'with %s the last known forecast stands, with its age',
    async (outage) => {
      const first = await phoenixNow();
      fake.script({ outage });
      setNow(minutesLater(180));
      const later = await phoenixNow();
      expect(later).toMatchObject({
        issuedAt: '2026-12-01T12:00:00.000Z',
        fetchedAt: start,
        tempsF: first?.tempsF,
      });
      expect((await forecasts().status())[0]?.problem).toMatch(/forecast service/);
    },
  );

  it('a place that never had an answer is missing', async () => {
    await phoenixNow();
    fake.script({ outage: '503' });
    const known = await forecasts().forPlaces([phoenix, denver]);
    expect([...known.keys()]).toEqual([key]);
  });

  it('it is left alone for two minutes after a failure', async () => {
    fake.script({ outage: '500' });
    await phoenixNow();
    const requests = fake.log.length;
    setNow(minutesLater(1));
    await phoenixNow();
    expect(fake.log).toHaveLength(requests);
    setNow(minutesLater(2));
    fake.script({ outage: 'none' });
    expect(await phoenixNow()).toMatchObject({ fetchedAt: minutesLater(2) });
    expect((await forecasts().status())[0]?.problem).toBeNull();
  });

  it('nobody waits longer than asked, and the late answer is kept', async () => {
    await phoenixNow();
    fake.script({ delayMs: 150 });
    setNow(minutesLater(90));
    const startedMs = performance.now();
    expect(await phoenixNow({ waitMs: 20 })).toMatchObject({ fetchedAt: start });
    expect(performance.now() - startedMs).toBeLessThan(140);
    expect(await phoenixNow()).toMatchObject({ fetchedAt: minutesLater(90) });
  });
});

describe('alerts of a place', () => {
  const warning = {
    lat: phoenix.lat, lon: phoenix.lon, event: 'Extreme Heat Warning',
    fromIso: '2026-12-02T17:00:00Z', toIso: '2026-12-03T03:00:00Z',
  }; // prettier-ignore

  it('come with its forecast', async () => {
    fake.script({ alert: warning });
    expect((await phoenixNow())?.alerts).toMatchObject([
      { event: 'Extreme Heat Warning', to: '2026-12-03T03:00:00.000Z' },
    ]);
  });

  it('are unknown when they could not be fetched, though the forecast could', async () => {
    fake.script({ outage: '500', only: 'alerts' });
    const forecast = await phoenixNow();
    expect(forecast?.alerts).toBeNull();
    expect(forecast?.tempsF.length).toBeGreaterThan(150);
    expect((await forecasts().status())[0]?.problem).toContain('500');
  });

  it('an empty list is believed for three hours', async () => {
    await phoenixNow();
    fake.script({ outage: '500', only: 'alerts' });
    setNow(minutesLater(179));
    expect((await phoenixNow())?.alerts).toEqual([]);
    setNow(minutesLater(182));
    expect((await phoenixNow())?.alerts).toBeNull();
  });

  it('a known one holds till its end, however old', async () => {
    fake.script({ alert: warning });
    await phoenixNow();
    fake.script({ outage: 'refuse' });
    setNow('2026-12-03T02:00:00.000Z');
    expect((await phoenixNow())?.alerts).toHaveLength(1);
    setNow('2026-12-03T04:00:00.000Z');
    expect((await phoenixNow())?.alerts).toBeNull();
  });
});

describe('the state of the cache', () => {
  it('names each place with issue time, fetch time and the last problem', async () => {
    await forecasts().forPlaces([denver]);
    const [status] = await forecasts().status();
    expect(status).toMatchObject({ issuedAt: '2026-12-01T12:00:00.000Z', fetchedAt: start, problem: null });
    expect(['Denver, CO', placeKey(denver)]).toContain(status?.place);
  });
});
