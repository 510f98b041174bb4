import type { Knex } from 'knex';
import { pino } from 'pino';
import { createClock } from '@api/clock';
import { readConfig } from '@api/config';
import { migrate, openDatabase } from '@api/database/connection';
import { createDeps, type Deps } from '@api/deps';
import { createForecastFake, type ForecastFake } from '@api/fakes/forecast/forecast-fake';
import { demoWeather } from '@api/fakes/forecast/demo-weather';
import { parcelStates } from '@shared/contract';
import { addDays } from '@shared/calendar/add-days';
import { seedDemo } from '../../seeds/seed-demo';

/** Days that are awkward: weekends, holidays and the days round them, clock changes, the hottest and the coldest weeks. */
const awkwardDays = [
  ['a Tuesday in December', '2026-12-01T12:00:00.000Z'],
  ['Christmas Eve', '2026-12-24T15:00:00.000Z'],
  ['Saturday after a Friday New Year', '2027-01-02T18:00:00.000Z'],
  ['the Sunday the clocks go forward', '2027-03-14T17:00:00.000Z'],
  ['Independence Day, a Sunday', '2027-07-04T16:00:00.000Z'],
  ['a hot Thursday in August', '2027-08-12T20:00:00.000Z'],
  ['the day before Thanksgiving', '2027-11-24T14:00:00.000Z'],
  ['leap day', '2028-02-29T15:00:00.000Z'],
] as const;

describe.each(awkwardDays)('the demo circle on %s (%s)', (_name, now) => {
  let fake: ForecastFake;
  let db: Knex;
  let deps: Deps;

  beforeAll(async () => {
    const nowMs = Date.parse(now);
    fake = createForecastFake({ ...demoWeather(nowMs), now: () => nowMs });
    const port = await fake.listen(0);
    const config = readConfig({
      NODE_ENV: 'test',
      DEMO: '1',
      SESSION_SECRET: 'a secret for tests only, forty characters',
      SMTP_URL: 'smtp://127.0.0.1:9',
      MAIL_FROM: 'Dayberth <circle@example.org>',
      FORECAST_URL: `http://127.0.0.1:${port}`,
      FORECAST_USER_AGENT: '(dayberth tests, admin@example.org)',
      LOG_LEVEL: 'silent',
    });
    db = openDatabase(':memory:');
    await migrate(db);
    deps = createDeps({ config, db, clock: createClock(now), log: pino({ level: 'silent' }) });
    await seedDemo(deps);
  }, 60_000);

  afterAll(async () => {
    await db.destroy();
    await fake.close();
  });

  it('has its people: six breeders, two coordinators, buyers in twelve states and four zones at least', async () => {
    const people = await deps.services.people.list();
    expect(people.filter(({ roles }) => roles.includes('breeder'))).toHaveLength(6);
    expect(people.filter(({ roles }) => roles.includes('coordinator'))).toHaveLength(2);
    const parcels = await deps.services.parcels.inStates(parcelStates);
    expect(new Set(parcels.map(({ destination }) => destination.state)).size).toBeGreaterThanOrEqual(12);
    expect(new Set(parcels.map(({ destination }) => destination.zone)).size).toBeGreaterThanOrEqual(4);
  });

  it('has twenty-five parcels, some in every state, within three weeks of today', async () => {
    const parcels = await deps.services.parcels.inStates(parcelStates);
    expect(parcels).toHaveLength(25);
    expect(new Set(parcels.map(({ state }) => state))).toEqual(new Set(parcelStates));
    const today = now.slice(0, 10);
    for (const { shipDate } of parcels.filter((parcel) => parcel.shipDate !== null)) {
      expect(shipDate! >= addDays(today, -21)).toBe(true);
      expect(shipDate! <= addDays(today, 21)).toBe(true);
    }
  });

  it('has two confirmed runs ahead that can be driven, on working days, with parcels on board', async () => {
    const runs = await db<{ id: number; date: string; state: string }>('runs').where({ state: 'confirmed' });
    expect(runs).toHaveLength(2);
    for (const { id, date } of runs) {
      const run = await deps.services.runs.get(id);
      expect(run.problems).toEqual([]);
      expect(run.parcels.length).toBeGreaterThanOrEqual(2);
      expect(date > now.slice(0, 10)).toBe(true);
      expect([1, 2, 3, 4]).toContain(new Date(`${date}T12:00:00Z`).getUTCDay());
      expect(run.parcels.reduce((sum, parcel) => sum + parcel.shareCents, 0)).toBe(run.costCents);
    }
  });

  it('keeps mails for what lies ahead and none for what was before', async () => {
    const mails = await db('outbox').select('id');
    expect(mails.length).toBeGreaterThan(20);
    expect((await db('invitations').select('id')).length).toBeGreaterThan(8);
  });

  it('leaves a sound database', async () => {
    expect(await db.raw('PRAGMA foreign_key_check')).toEqual([]);
  });
});
