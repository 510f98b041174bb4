import type { DaysAnswer, Parcel } from '@shared/contract';
import type { Caller } from '../support/test-site';
import { createWeatherSite, parcelBody, type WeatherSite } from '../support/weather-site';

let site: WeatherSite;
let breeder: Caller;

beforeEach(async () => {
  site = await createWeatherSite();
  breeder = await site.as('breeder@example.org');
});
afterEach(() => site.close());

const question = (changes: object = {}) => ({
  destination: { counterId: site.ids.phoenixCounter },
  service: 'hold',
  contents: [{ speciesId: site.ids.cornSnake, quantity: 1, massG: 160 }],
  boxId: site.ids.smallBox,
  ...changes,
});
const check = async (changes: object = {}): Promise<DaysAnswer> =>
  (await breeder.post('/api/route-checks').send(question(changes)).expect(200)).body as DaysAnswer;
const verdicts = ({ days }: DaysAnswer) =>
  Object.fromEntries(days.map(({ date, verdict }) => [date, verdict]));

describe('a route check', () => {
  it('answers fourteen days from today with verdict, reasons in numbers, arrival, pack and slack, and saves nothing', async () => {
    const answer = await check();
    expect(answer.days.map(({ date }) => date)).toEqual(
      Array.from({ length: 14 }, (_, index) => `2026-12-${String(index + 1).padStart(2, '0')}`),
    );
    // Mild everywhere; Thursdays have no slack, Fridays to Sundays rest over the weekend, and the forecast ends after a week.
    expect(verdicts(answer)).toMatchObject({
      '2026-12-01': 'open',
      '2026-12-02': 'open',
      '2026-12-03': 'tight',
      '2026-12-04': 'shut',
      '2026-12-05': 'shut',
      '2026-12-06': 'shut',
      // The forecast ends before a late parcel of Monday's would arrive.
      '2026-12-07': 'tight',
      '2026-12-09': 'far',
      '2026-12-11': 'shut',
    });
    expect(answer).toMatchObject({
      band: { lowF: 60, highF: 86 },
      route: {
        origin: 'San Antonio airport counter',
        hub: 'Larkspur sort hub',
        destination: 'Phoenix counter',
      },
      forecastAgeMinutes: 0,
    });
    expect(answer.days[1]).toMatchObject({
      outdoor: { lowF: 47, highF: 60 },
      slackDays: 1,
      arrival: { place: 'Phoenix counter' },
    });
    expect(await site.db('parcels').select('id')).toEqual([]);
  });

  it('takes a ZIP code for the nearest counter that holds parcels, or for the door', async () => {
    const byZip = await check({ destination: { postalCode: '80202' } });
    expect(byZip.route.destination).toBe('Denver counter');
    const door = await check({ destination: { postalCode: '80202' }, service: 'door' });
    expect(door.route).toMatchObject({
      destination: 'the door in Denver',
      destinationZone: 'America/Denver',
    });
    // A hardy animal, so that only the guard rails speak.
    const hardy = { band_low_f: 0, band_high_f: 130, endurance_low_f: -20, endurance_high_f: 139 };
    await site.db('species').where({ id: site.ids.cornSnake }).update(hardy);
    // Guard rail for a door 85 °F, for a counter 90 °F: an afternoon of 88 °F in Denver shuts only the door.
    site.weather.script({
      coldSnap: {
        lat: 39.85,
        lon: -104.8,
        radiusMiles: 60,
        fromIso: '2026-12-01T00:00:00Z',
        toIso: '2026-12-09T00:00:00Z',
        deltaF: 27,
      },
    });
    site.setNow('2026-12-01T14:00:00.000Z');
    const of = async (service: string) =>
      verdicts(await check({ destination: { postalCode: '80202' }, service }))['2026-12-02'];
    expect([await of('hold'), await of('door')]).toEqual(['tight', 'shut']);
  });

  it('shuts exactly the days that a scripted cold snap touches: two ship days for one cold day', async () => {
    site.weather.script({
      // The whole of Monday, December 7 in Phoenix (UTC−7).
      coldSnap: {
        lat: 33.43,
        lon: -112.01,
        radiusMiles: 40,
        fromIso: '2026-12-07T07:00:00Z',
        toIso: '2026-12-08T07:00:00Z',
        deltaF: -22,
      },
    });
    const after = await check();
    // Shipped on Monday or arriving on Monday: both days count at either end. Sunday was shut before.
    expect(verdicts(after)).toMatchObject({
      '2026-12-02': 'open',
      '2026-12-07': 'shut',
      '2026-12-06': 'shut',
    });
    // 47 °F less 22 is 25 °F at 6 in the morning.
    expect(after.days.find(({ date }) => date === '2026-12-07')?.reasons[0]?.text).toBe(
      'Phoenix falls to 25 °F at 6 am Monday, 13 °F under the limit of 38 °F.',
    );
  });

  it('tells the air in the box hour by hour when it is asked for, and else not', async () => {
    const traced = await check({ from: '2026-12-02', days: 1, trace: true });
    const [day] = traced.days;
    expect(day?.chance).toBeGreaterThan(0.95);
    expect(day?.inBox?.lowF).toBeGreaterThan(60);
    expect(day?.trace?.[0]).toMatchObject({
      tempF: 75,
      leg: 'packed',
      place: 'San Antonio',
      zone: 'America/Chicago',
    });
    // The planned way ends with the pickup at 11:00 in Phoenix, the late one a day after.
    expect(day?.trace?.findLast(({ tempF }) => tempF !== null)?.at).toBe('2026-12-03T18:00:00.000Z');
    expect(day?.trace?.at(-1)?.at).toBe('2026-12-04T18:00:00.000Z');
    expect((await check({ days: 1 })).days[0]?.trace).toBeUndefined();
  });

  it('is shut by a warning in force on the route, and only while it is', async () => {
    site.weather.script({
      alert: {
        lat: 39.72,
        lon: -86.29,
        fromIso: '2026-12-02T18:00:00Z',
        toIso: '2026-12-03T06:00:00Z',
        event: 'Winter Storm Warning',
      },
    });
    const { days } = await check();
    const day = days.find(({ date }) => date === '2026-12-02');
    expect(day?.verdict).toBe('shut');
    expect(day?.reasons[0]?.text).toMatch(/^Winter Storm Warning for Indianapolis until/);
    expect(days.find(({ date }) => date === '2026-12-01')?.verdict).toBe('open');
  });

  it('refuses two species that no temperature suits, and names them', async () => {
    await site.db('species').where({ id: site.ids.crestedGecko }).update({ band_low_f: 40, band_high_f: 58 });
    const contents = [site.ids.cornSnake, site.ids.crestedGecko].map((speciesId) => ({
      speciesId,
      quantity: 1,
      massG: 100,
    }));
    const { body } = await breeder.post('/api/route-checks').send(question({ contents })).expect(400);
    expect((body as { errors: unknown }).errors).toEqual([
      {
        path: 'contents',
        message: 'Corn snake and crested gecko do not go into one box: no temperature suits both.',
      },
    ]);
  });

  it('judges a counter with a late cut-off as any other', async () => {
    const late = Object.fromEntries([1, 2, 3, 4, 5].map((weekday) => [String(weekday), 21 * 60]));
    await site
      .db('counters')
      .where({ id: site.ids.dropOffCounter })
      .update({ cut_off_minutes: JSON.stringify(late) });
    expect(verdicts(await check())['2026-12-02']).toBe('open');
  });

  it.each([
    ['a ZIP that does not exist', { destination: { postalCode: '00000' } }, 'destination.postalCode'],
    ['a counter that does not exist', { destination: { counterId: 999 } }, 'destination.counterId'],
    ['door service to a counter', { service: 'door' }, 'destination'],
    [
      'a species that does not exist',
      { contents: [{ speciesId: 999, quantity: 1, massG: 100 }] },
      'contents.0.speciesId',
    ],
    ['a negative mass', { contents: [{ speciesId: 1, quantity: 1, massG: -1 }] }, 'contents.0.massG'],
    ['an empty box', { contents: [] }, 'contents'],
    ['a box that does not exist', { boxId: 999 }, 'boxId'],
    ['a drop-off at a counter that takes none', { dropOffCounterId: 2 }, 'dropOffCounterId'],
    ['a hundred days', { days: 100 }, 'days'],
    ['a day at the end of all calendars', { from: '9999-12-31' }, 'from'],
    ['a day before all clocks', { from: '0001-01-01' }, 'from'],
    [
      'nothing at all',
      { destination: undefined, service: undefined, contents: undefined, boxId: undefined },
      'destination',
    ],
  ])('refuses %s at its field', async (_what, changes, path) => {
    const { body } = await breeder.post('/api/route-checks').send(question(changes)).expect(400);
    expect((body as { errors: { path: string }[] }).errors.map((error) => error.path)).toContain(path);
  });

  it('refuses a venomous animal for a door', async () => {
    await site.db('species').where({ id: site.ids.cornSnake }).update({ venomous: true });
    const { body } = await breeder
      .post('/api/route-checks')
      .send(question({ service: 'door', destination: { postalCode: '80202' } }))
      .expect(400);
    expect((body as { errors: { path: string }[] }).errors).toEqual([
      expect.objectContaining({ path: 'service' }),
    ]);
  });

  it.each([
    ['buyer@example.org', 403],
    ['breeder@example.org', 200],
    ['coordinator@example.org', 200],
    ['admin@example.org', 200],
    [null, 401],
  ])('is for those who ship: %s gets %d', async (who, status) => {
    await (await site.as(who)).post('/api/route-checks').send(question()).expect(status);
  });
});

describe('the days of a parcel', () => {
  it('count its own dates, meals and mornings', async () => {
    const body = parcelBody(site, {
      readyFrom: '2026-12-02',
      lastMealDate: '2026-12-01',
      latestDate: '2026-12-08',
    });
    const parcel = (await breeder.post('/api/parcels').send(body).expect(201)).body as Parcel;
    const answer = (await breeder.get(`/api/parcels/${parcel.id}/days`).expect(200)).body as DaysAnswer;
    const first = Object.fromEntries(
      answer.days.map(({ date, reasons }) => [
        date,
        reasons.filter(({ verdict }) => verdict === 'shut').map(({ code }) => code),
      ]),
    );
    expect(first['2026-12-01']).toEqual(['not-ready', 'fed-lately']);
    expect(first['2026-12-02']).toEqual(['fed-lately']);
    expect(first['2026-12-07']).toEqual([]);
    expect(first['2026-12-09']).toEqual(['too-late']);
  });

  it('begin where they are asked to, up to four weeks', async () => {
    const parcel = (await breeder.post('/api/parcels').send(parcelBody(site)).expect(201)).body as Parcel;
    const { body } = await breeder.get(`/api/parcels/${parcel.id}/days?from=2026-12-05&days=3`).expect(200);
    expect((body as DaysAnswer).days.map(({ date }) => date)).toEqual([
      '2026-12-05',
      '2026-12-06',
      '2026-12-07',
    ]);
    await breeder.get(`/api/parcels/${parcel.id}/days?days=99`).expect(400);
    await breeder.get(`/api/parcels/${parcel.id}/days?from=9999-12-31`).expect(400);
    await breeder.get('/api/parcels/999999/days').expect(404);
  });
});
