import type { Desk } from '@shared/contract';
import { addParcel } from '../support/run-rows';
import { createTestSite, type TestSite } from '../support/test-site';

/** Tuesday 1 December 2026 in Texas; the small circle's counters work Monday to Friday. */
const today = '2026-12-01';

describe("The admin's desk", () => {
  let site: TestSite;
  beforeEach(async () => {
    site = await createTestSite();
  });
  afterEach(() => site.close());

  const desk = async (): Promise<Desk> =>
    (await (await site.as('admin@example.org')).get('/api/desk').expect(200)).body as Desk;

  async function parcel(columns: Record<string, unknown>): Promise<number> {
    const { breeder, buyer, dropOffCounter, phoenixCounter, smallBox } = site.ids;
    const [id] = await site.db('parcels').insert({
      code: `TD-${Math.floor(performance.now() * 1000)}`,
      breeder_id: breeder,
      buyer_id: buyer,
      buyer_name: 'Bo Buyer',
      drop_off_counter_id: dropOffCounter,
      service: 'hold',
      hold_counter_id: phoenixCounter,
      box_id: smallBox,
      ready_from: today,
      latest_date: '2026-12-31',
      arrival_token: `token-${performance.now()}-long-enough`,
      created_at: site.deps.clock.nowIso(),
      updated_at: site.deps.clock.nowIso(),
      ...columns,
    });
    return id as number;
  }

  const run = async (columns: Record<string, unknown>): Promise<number> => {
    const [id] = await site.db('runs').insert({
      state: 'proposed',
      date: '2026-12-03',
      coordinator_id: site.ids.coordinator,
      counter_id: site.ids.dropOffCounter,
      depart_at: '2026-12-03T15:00:00.000Z',
      arrive_at: '2026-12-03T20:00:00.000Z',
      cut_off_at: '2026-12-03T23:00:00.000Z',
      drive_minutes: 60,
      miles: 40,
      last_leg_minutes: 20,
      fixed_cents: 1200,
      driving_cents: 3000,
      alone_cents: 9000,
      created_at: site.deps.clock.nowIso(),
      updated_at: site.deps.clock.nowIso(),
      ...columns,
    });
    return id as number;
  };

  it('is quiet where nothing is wrong', async () => {
    await parcel({ state: 'draft' });
    await parcel({ state: 'closed' });
    await run({});
    expect(await desk()).toEqual({
      forecasts: [],
      failedMail: [],
      mailWaiting: 0,
      runs: [],
      parcels: [],
      counts: { people: 6, parcels: 1, runs: 1 },
    });
  });

  it.each([
    ['on hold', { state: 'on-hold', hold_reason: 'Snow at the hub.' }, 'On hold: Snow at the hub.'],
    [
      'left behind by its day',
      { state: 'booked', ship_date: '2026-11-30' },
      'is over and it was never noted',
    ],
    [
      'booked for tomorrow without a run',
      { state: 'packed', ship_date: '2026-12-02' },
      'on no confirmed run',
    ],
    [
      'handed over and not reported',
      { state: 'handed-over', ship_date: '2026-11-29' },
      'has not reported it',
    ],
    ['open for days that are over', { state: 'seeking', latest_date: '2026-11-30' }, 'could ship is over'],
  ])('names a parcel that is %s', async (_, columns, text) => {
    const id = await parcel(columns);
    const { parcels } = await desk();
    expect(parcels).toEqual([{ id, code: expect.any(String), text: expect.stringContaining(text) }]);
  });

  it.each([
    ['booked for later', { state: 'booked', ship_date: '2026-12-10' }],
    ['due today at the counter', { state: 'handed-over', ship_date: '2026-11-30' }],
    ['arrived', { state: 'arrived', ship_date: '2026-11-20' }],
  ])('leaves alone a parcel that is %s', async (_, columns) => {
    await parcel(columns);
    expect((await desk()).parcels).toEqual([]);
  });

  it.each([
    ['cannot be driven', { problems: '["Cora does not drive that day."]' }, 'Cora does not drive that day.'],
    ['waits for tomorrow unconfirmed', { date: '2026-12-02' }, 'Not confirmed yet'],
    ['was never driven', { state: 'confirmed', date: '2026-11-30' }, 'never noted as driven'],
    ['never came to the counter', { state: 'underway', date: '2026-11-30' }, 'never noted as handed over'],
  ])('names a run that %s', async (_, columns, text) => {
    const id = await run(columns);
    expect((await desk()).runs).toEqual([
      { id, date: expect.any(String), text: expect.stringContaining(text) },
    ]);
  });

  it('leaves a called-off run and yesterday’s proposal alone', async () => {
    await run({ state: 'called-off', problems: '["Nobody drives."]' });
    await run({ date: '2026-11-30' });
    expect((await desk()).runs).toEqual([]);
  });

  it('names the places of a parcel on its way to a day that have no forecast, and no others', async () => {
    await parcel({ state: 'booked', ship_date: '2026-12-10' });
    expect((await desk()).forecasts.map(({ place }) => place)).toEqual([
      'Indianapolis, IN',
      'Phoenix, AZ',
      'San Antonio, TX',
    ]);
  });

  it.each([
    ['fresh', 11, null, []],
    ['older than the twelve hours of the policy', 13, null, ['Issued 13 h ago']],
    [
      'kept while the service fails',
      1,
      'The forecast service answers 503.',
      ['The forecast service answers 503.'],
    ],
  ])('with a forecast that is %s', async (_, hours, problem, said) => {
    await parcel({ state: 'booked', ship_date: '2026-12-10' });
    const at = new Date(site.deps.clock.nowMs() - hours * 3_600_000).toISOString();
    const cached = { zone: 'UTC', issued_at: at, fetched_at: at, series: '{"startMs":0,"tempsF":[50]}' };
    for (const [key, lat, lon] of [
      ['33.43,-112.01', 33.43, -112.01],
      ['29.53,-98.47', 29.53, -98.47],
      ['39.72,-86.29', 39.72, -86.29],
    ] as const)
      await site.db('forecasts').insert({
        place_key: key,
        lat,
        lon,
        ...cached,
        problem: key.startsWith('33.43') ? problem : null,
      });
    const { forecasts } = await desk();
    const texts = forecasts.filter(({ place }) => place === 'Phoenix, AZ').map((one) => one.problem);
    expect(texts).toEqual(said.map((text) => expect.stringContaining(text)));
  });

  it('shows a mail that could not be sent, and puts it back at a word', async () => {
    const [id] = await site.db('outbox').insert({
      idempotency_key: 'k',
      to_email: 'bo@example.org',
      to_name: 'Bo',
      subject: 'Planned arrival',
      text: 't',
      html: 'h',
      state: 'failed',
      attempts: 10,
      next_attempt_at: '2026-12-01T10:00:00.000Z',
      last_error: '550 No such mailbox',
      message_id: '<m@example.org>',
      created_at: '2026-12-01T10:00:00.000Z',
    });
    const admin = await site.as('admin@example.org');
    expect((await desk()).failedMail).toEqual([
      {
        id,
        to: 'bo@example.org',
        subject: 'Planned arrival',
        error: '550 No such mailbox',
        at: '2026-12-01T10:00:00.000Z',
      },
    ]);
    await admin.post(`/api/desk/mail/${id}/resend`).expect(204);
    expect(await desk()).toMatchObject({ failedMail: [], mailWaiting: 1 });
    await admin.post(`/api/desk/mail/${id}/resend`).expect(404);
  });
});

describe('GET /api/health', () => {
  let site: TestSite;
  beforeEach(async () => {
    site = await createTestSite();
  });
  afterEach(() => site.close());

  const health = async () => (await (await site.as(null)).get('/api/health').expect(200)).body as unknown;

  it('is open to anybody and names neither people nor places', async () => {
    expect(await health()).toEqual({
      status: 'ok',
      database: 'ok',
      mailQueue: { waiting: 0, failed: 0 },
      forecasts: { places: 0, oldestMinutes: null, newestMinutes: null },
      version: expect.stringMatching(/^\d+\.\d+\.\d+$/),
    });
  });

  /** A booked parcel from San Antonio over Indianapolis to Phoenix: three places whose weather decides about it. */
  const book = () =>
    addParcel(site, {
      code: 'TD-1',
      breederId: site.ids.breeder,
      buyerId: site.ids.buyer,
      holdCounterId: site.ids.phoenixCounter,
      shipDate: '2026-12-08',
    });
  const fetched = (key: string, minutesAgo: number) => {
    const at = new Date(site.deps.clock.nowMs() - minutesAgo * 60_000).toISOString();
    return site.db('forecasts').insert({ place_key: key, lat: 1, lon: 1, zone: 'UTC', fetched_at: at });
  };
  const [sanAntonio, phoenix, denver] = ['29.53,-98.47', '33.43,-112.01', '39.85,-104.67'] as const;

  it('tells the age of the oldest and the newest forecast that a parcel waits on, and of no others', async () => {
    await book();
    await fetched(sanAntonio, 5);
    await fetched(phoenix, 95);
    await fetched(denver, 9000);
    expect(await health()).toMatchObject({
      status: 'ok',
      forecasts: { places: 3, oldestMinutes: 95, newestMinutes: 5 },
    });
  });

  it.each([
    ['has been silent for longer than a forecast may be old', 13 * 60],
    ['has never answered', null],
  ])('is degraded when the service %s', async (_, minutesAgo) => {
    await book();
    if (minutesAgo !== null) await fetched(phoenix, minutesAgo);
    expect(await health()).toMatchObject({ status: 'degraded' });
  });

  it('is degraded while a mail has failed', async () => {
    await site.db('outbox').insert({
      idempotency_key: 'k',
      to_email: 'bo@example.org',
      to_name: 'Bo',
      subject: 's',
      text: 't',
      html: 'h',
      state: 'failed',
      next_attempt_at: '2026-12-01T10:00:00.000Z',
      message_id: '<m@example.org>',
      created_at: '2026-12-01T10:00:00.000Z',
    });
    expect(await health()).toMatchObject({ status: 'degraded', mailQueue: { waiting: 0, failed: 1 } });
  });

  it('is degraded when the database does not answer', async () => {
    const caller = await site.as(null);
    await site.db.destroy();
    expect((await caller.get('/api/health').expect(200)).body).toMatchObject({
      status: 'degraded',
      database: 'failing',
    });
    site.db.initialize();
  });
});
