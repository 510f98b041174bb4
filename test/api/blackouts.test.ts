import type { Blackout, BlackoutList, BlackoutPreview, Parcel, Run } from '@shared/contract';
import type { Caller } from '../support/test-site';
import { createWeatherSite, parcelBody, type WeatherSite } from '../support/weather-site';

/** Wednesday morning in Texas: the forecast reaches past a late arrival of next Monday's parcels. */
let site: WeatherSite;
let admin: Caller;
let breeder: Caller;

beforeEach(async () => {
  site = await createWeatherSite('2026-12-02T12:00:00.000Z');
  admin = await site.as('admin@example.org');
  breeder = await site.as('breeder@example.org');
});
afterEach(() => site.close());

const oneDay = (startDate: string, changes: object = {}) => ({
  title: 'Inventory day',
  kind: 'date',
  startDate,
  scope: 'everywhere',
  ...changes,
});
const enter = async (body: object): Promise<Blackout> =>
  (await admin.post('/api/blackouts').send(body).expect(201)).body as Blackout;
const parcelOn = async (date: string, changes: Record<string, unknown> = {}): Promise<Parcel> => {
  const parcel = (await breeder.post('/api/parcels').send(parcelBody(site, changes)).expect(201))
    .body as Parcel;
  return (await breeder.put(`/api/parcels/${parcel.id}/booking`).send({ date }).expect(200)).body as Parcel;
};
const stateOf = async ({ id }: Parcel) => {
  const { state, holdReason, shipDate } = (await breeder.get(`/api/parcels/${id}`)).body as Parcel;
  return { state, holdReason, shipDate };
};
const paths = (body: unknown) => (body as { errors: { path: string }[] }).errors.map(({ path }) => path);
const mails = async (email: string, like: string) =>
  site.db('outbox').where({ to_email: email }).whereLike('text', like);

const neverDays = Array.from({ length: 20 }, () => 'BYMONTH=2;BYMONTHDAY=30');
const yearly = (parts: string) => `FREQ=YEARLY;${parts}`;

describe('a new blackout', () => {
  it('takes the parcels off its day, says why, and tells breeder and buyer', async () => {
    const parcel = await parcelOn('2026-12-07');
    const untouched = await parcelOn('2026-12-02');
    await enter(oneDay('2026-12-07'));
    expect(await stateOf(parcel)).toEqual({
      state: 'on-hold',
      shipDate: null,
      holdReason: 'Monday, December 7 is closed for shipping: Inventory day.',
    });
    expect((await stateOf(untouched)).state).toBe('booked');
    expect((await mails('breeder@example.org', `%${parcel.code}%`)).length).toBeGreaterThan(0);
    expect((await mails('buyer@example.org', `%${parcel.code}%`)).length).toBeGreaterThan(1);
    const { body } = await breeder.get(`/api/parcels/${parcel.id}/history`);
    expect((body as { who: string; action: string }[])[0]).toMatchObject({
      who: 'Ada Admin',
      action: 'on-hold',
    });
  });

  it('also takes those that would arrive on it, by the scope of the hold counter', async () => {
    const toPhoenix = await parcelOn('2026-12-07');
    const toDenver = await parcelOn('2026-12-07', { holdCounterId: site.ids.denverCounter });
    await enter(
      oneDay('2026-12-08', { scope: 'counter', counterId: site.ids.phoenixCounter, title: 'Building work' }),
    );
    expect(await stateOf(toPhoenix)).toMatchObject({
      state: 'on-hold',
      holdReason: expect.stringContaining('Building work'),
    });
    expect((await stateOf(toDenver)).state).toBe('booked');
  });

  it('takes a parcel out of its confirmed run, which is worked out anew, and tells the driver', async () => {
    const coordinator = await site.as('coordinator@example.org');
    const [one, two] = [
      await parcelOn('2026-12-07'),
      await parcelOn('2026-12-07', { holdCounterId: site.ids.denverCounter }),
    ];
    const body = {
      coordinatorId: site.ids.coordinator,
      date: '2026-12-07',
      counterId: site.ids.dropOffCounter,
      parcelIds: [one.id, two.id],
    };
    const run = (await coordinator.post('/api/runs').send(body).expect(201)).body as Run;
    await coordinator
      .post(`/api/runs/${run.id}/confirmation`)
      .set('If-Match', `"${run.version}"`)
      .expect(200);
    const before = (await mails('coordinator@example.org', '%')).length;
    await enter(oneDay('2026-12-08', { scope: 'state', state: 'AZ' }));
    expect((await stateOf(one)).state).toBe('on-hold');
    const after = (await coordinator.get(`/api/runs/${run.id}`).expect(200)).body as Run;
    expect(after.parcels.map(({ id }) => id)).toEqual([two.id]);
    expect(after.parcels[0]?.shareCents).toBe(after.costCents);
    expect((await mails('coordinator@example.org', '%')).length).toBe(before + 1);
  });

  it('shuts its day for every parcel that asks, and lifting it opens the day again', async () => {
    const verdictOf = async (id: number) =>
      (
        (await breeder.get(`/api/parcels/${id}/days?from=2026-12-07&days=1`)).body as {
          days: { verdict: string }[];
        }
      ).days[0]?.verdict;
    const parcel = (await breeder.post('/api/parcels').send(parcelBody(site)).expect(201)).body as Parcel;
    const blackout = await enter({ ...oneDay('2026-12-05'), kind: 'range', endDate: '2026-12-09' });
    expect(await verdictOf(parcel.id)).toBe('shut');
    const edit = (body: object, version: number) =>
      admin.patch(`/api/blackouts/${blackout.id}`).set('If-Match', `"${version}"`).send(body);
    const lifted = (await edit({ liftedDates: ['2026-12-07', '2026-12-08'] }, blackout.version).expect(200))
      .body as Blackout;
    // Open for the day itself, but Wednesday stays shut behind the arrival: no slack.
    expect(await verdictOf(parcel.id)).toBe('tight');
    await edit({ title: 'Late' }, blackout.version).expect(412);
    await admin.delete(`/api/blackouts/${blackout.id}`).set('If-Match', `"${blackout.version}"`).expect(412);
    await admin.delete(`/api/blackouts/${blackout.id}`).set('If-Match', `"${lifted.version}"`).expect(204);
    expect(await verdictOf(parcel.id)).toBe('open');
  });

  it.each([
    ['without a day', { startDate: null }, 'startDate'],
    ['on 31 February', { startDate: '2027-02-31' }, 'startDate'],
    ['without a title', { title: ' ' }, 'title'],
    ['a range without an end', { kind: 'range' }, 'endDate'],
    ['a range that ends first', { kind: 'range', endDate: '2026-12-01' }, 'endDate'],
    ['a yearly one without a rule', { kind: 'yearly', startDate: null }, 'rules'],
    ['a rule that is none', { kind: 'yearly', startDate: null, rules: 'every Tuesday' }, 'rules'],
    [
      'a rule for every second of the year',
      { kind: 'yearly', startDate: null, rules: 'FREQ=YEARLY;BYHOUR=1;BYMINUTE=2' },
      'rules',
    ],
    [
      'a day that never comes',
      { kind: 'yearly', startDate: null, rules: 'FREQ=YEARLY;BYMONTH=2;BYMONTHDAY=30' },
      'rules',
    ],
    [
      'a rule out of its range',
      { kind: 'yearly', startDate: null, rules: 'FREQ=YEARLY;BYMONTHDAY=31;BYSETPOS=-400' },
      'rules',
    ],
    [
      'a weekday that is counted from nought',
      { kind: 'yearly', startDate: null, rules: 'FREQ=YEARLY;BYDAY=0MO' },
      'rules',
    ],
    // One good line must not carry others that the calendar would search for up to the year 9999 at every look.
    [
      'a day that never comes behind one that does',
      { kind: 'yearly', startDate: null, rules: ['BYMONTHDAY=1', ...neverDays].map(yearly).join('\n') },
      'rules',
    ],
    ['a scope without its counter', { scope: 'counter' }, 'counterId'],
    ['a counter that does not exist', { scope: 'counter', counterId: 999 }, 'counterId'],
    ['a carrier that does not exist', { scope: 'carrier', carrierId: 999 }, 'carrierId'],
    ['a state that is none', { scope: 'state', state: 'Texas' }, 'state'],
  ])('is refused %s, at its field', async (_what, changes, path) => {
    const { body } = await admin.post('/api/blackouts').send(oneDay('2026-12-07', changes)).expect(400);
    expect(paths(body)).toContain(path);
    expect(await site.db('blackouts').select('id')).toEqual([]);
  });

  it('leaves parcels that still seek a day, those aboard, and those that never had one', async () => {
    const seeking = (await breeder.post('/api/parcels').send(parcelBody(site)).expect(201)).body as Parcel;
    const flexible = { from: '2026-12-07', to: '2026-12-09' };
    await breeder.put(`/api/parcels/${seeking.id}/booking`).send({ flexible }).expect(200);
    const draft = (await breeder.post('/api/parcels').send(parcelBody(site)).expect(201)).body as Parcel;
    const aboard = await parcelOn('2026-12-07');
    await site.db('parcels').where({ id: aboard.id }).update({ state: 'aboard' });
    const sent = (await site.db('outbox').select('id')).length;
    await enter(oneDay('2026-12-07'));
    expect(await site.db('outbox').select('id')).toHaveLength(sent);
    expect((await stateOf(seeking)).state).toBe('seeking');
    expect((await stateOf(draft)).state).toBe('draft');
    expect(await stateOf(aboard)).toMatchObject({ state: 'aboard', shipDate: '2026-12-07' });
  });

  it('also takes a parcel that is packed already', async () => {
    const packed = await parcelOn('2026-12-07');
    await site.db('parcels').where({ id: packed.id }).update({ state: 'packed' });
    await enter(oneDay('2026-12-07', { scope: 'carrier', carrierId: 1 }));
    expect((await stateOf(packed)).state).toBe('on-hold');
  });

  it('is remembered with who entered, changed and removed it', async () => {
    const blackout = await enter(oneDay('2026-12-16'));
    await admin.patch(`/api/blackouts/${blackout.id}`).send({ title: 'Stocktaking' }).expect(200);
    await admin.delete(`/api/blackouts/${blackout.id}`).expect(204);
    const history = await site.deps.services.history.of('blackout', blackout.id);
    expect(history.map(({ who, text }) => `${who}: ${text}`)).toEqual([
      'Ada Admin: Removed “Stocktaking”.',
      'Ada Admin: Changed “Stocktaking”.',
      'Ada Admin: Entered “Inventory day”.',
    ]);
  });

  it('saves nothing at all when something on the way fails', async () => {
    const parcel = await parcelOn('2026-12-07');
    await site.db.schema.dropTable('outbox');
    await admin.post('/api/blackouts').send(oneDay('2026-12-07')).expect(500);
    expect((await stateOf(parcel)).state).toBe('booked');
    expect(await site.db('blackouts').select('id')).toEqual([]);
    expect(await site.db('history').where({ subject_kind: 'blackout' })).toEqual([]);
  });

  it('can be renamed when one of its lines has run out, but takes no new line that has', async () => {
    // The year 2020 is over for good; such a line stands in a blackout that was entered before.
    const over = yearly('BYMONTH=7;BYMONTHDAY=4;UNTIL=20200705');
    const rules = `${yearly('BYMONTH=12;BYMONTHDAY=24')}\n${over}`;
    const saved = await enter({
      ...oneDay('2026-12-24'),
      kind: 'yearly',
      startDate: null,
      rules: yearly('BYMONTH=12;BYMONTHDAY=24'),
    });
    await site.db('blackouts').where({ id: saved.id }).update({ rules });
    const renamed = await admin
      .patch(`/api/blackouts/${saved.id}`)
      .send({ title: 'Early close' })
      .expect(200);
    expect(renamed.body).toMatchObject({ title: 'Early close', rules });
    const worse = `${rules}\n${yearly('BYMONTH=8;BYMONTHDAY=4;UNTIL=20200705')}`;
    const refused = await admin.patch(`/api/blackouts/${saved.id}`).send({ rules: worse }).expect(400);
    expect(paths(refused.body)).toEqual(['rules']);
  });

  it('is held to its rules as a whole when a part is changed', async () => {
    const { id } = await enter(oneDay('2026-12-07'));
    expect(
      paths((await admin.patch(`/api/blackouts/${id}`).send({ kind: 'range' }).expect(400)).body),
    ).toContain('endDate');
    await admin.patch(`/api/blackouts/${id}`).send({ kind: 'range', endDate: '2026-12-08' }).expect(200);
    await admin.patch('/api/blackouts/999').send({ title: 'x' }).expect(404);
    await admin.delete('/api/blackouts/999').expect(404);
  });
});

describe('the preview', () => {
  it('names the days, parcels, runs and people that saving then moves, and saves nothing', async () => {
    const coordinator = await site.as('coordinator@example.org');
    const parcel = await parcelOn('2026-12-07');
    const body = {
      coordinatorId: site.ids.coordinator,
      date: '2026-12-07',
      counterId: site.ids.dropOffCounter,
      parcelIds: [parcel.id],
    };
    const run = (await coordinator.post('/api/runs').send(body).expect(201)).body as Run;
    await coordinator
      .post(`/api/runs/${run.id}/confirmation`)
      .set('If-Match', `"${run.version}"`)
      .expect(200);
    const ask = { blackout: { ...oneDay('2026-12-06'), kind: 'range', endDate: '2026-12-08' } };
    const preview = (await admin.post('/api/blackouts/preview').send(ask).expect(200))
      .body as BlackoutPreview;
    expect(preview.days).toEqual(['2026-12-06', '2026-12-07', '2026-12-08']);
    expect(preview.parcels).toEqual([
      expect.objectContaining({
        id: parcel.id,
        code: parcel.code,
        shipDate: '2026-12-07',
        what: '1 corn snake',
      }),
    ]);
    expect(preview.runs).toEqual([
      { id: run.id, date: '2026-12-07', coordinatorName: 'Cora Coordinator', parcels: 1 },
    ]);
    expect(preview.people.map(({ name }) => name).sort()).toEqual([
      'Bea Breeder',
      'Bo Buyer',
      'Cora Coordinator',
    ]);
    expect((await stateOf(parcel)).state).toBe('booked');
    expect(await site.db('blackouts').select('id')).toEqual([]);
    const sent = await site.db('outbox').max('id as last').first();
    await enter(ask.blackout);
    expect((await stateOf(parcel)).state).toBe('on-hold');
    // Those the preview names, and nobody else, are written to.
    const written = await site
      .db('outbox')
      .where('id', '>', (sent as { last: number }).last)
      .distinct('to_email as email');
    expect(written.map(({ email }) => email as string).sort()).toEqual([
      'breeder@example.org',
      'buyer@example.org',
      'coordinator@example.org',
    ]);
  });

  it('of an edit counts only what newly falls, of a removal nothing', async () => {
    const blackout = await enter(oneDay('2026-12-16'));
    const parcel = await parcelOn('2026-12-07', {});
    const preview = async (body: object) =>
      (await admin.post('/api/blackouts/preview').send(body).expect(200)).body as BlackoutPreview;
    expect((await preview({ blackout: oneDay('2026-12-16'), replaces: blackout.id })).parcels).toEqual([]);
    expect(
      (await preview({ blackout: oneDay('2026-12-08'), replaces: blackout.id })).parcels.map(({ id }) => id),
    ).toEqual([parcel.id]);
    expect(await preview({ blackout: null, replaces: blackout.id })).toEqual({
      days: [],
      parcels: [],
      runs: [],
      people: [],
    });
    await admin.post('/api/blackouts/preview').send({ blackout: null, replaces: 999 }).expect(404);
  });
});

describe('a federal holiday', () => {
  it('is a blackout like others: an admin lifts a day of it, and may change or remove it', async () => {
    // Christmas Day 2026 is a Friday (5 U.S.C. 6103(a)).
    const { id, version } = await enter({
      ...oneDay('2026-12-25'),
      title: 'Christmas Day',
      kind: 'yearly',
      startDate: null,
      rules: yearly('BYMONTH=12;BYMONTHDAY=25'),
    });
    await site.db('blackouts').where({ id }).update({ source: 'federal-holiday' });
    const days = async () =>
      ((await breeder.get('/api/blackouts?from=2026-12-01&to=2027-12-31')).body as BlackoutList).days;
    expect((await days()).map(({ date }) => date)).toEqual(['2026-12-25', '2027-12-25']);
    const edit = (body: object) => admin.patch(`/api/blackouts/${id}`).send(body).expect(200);
    const lifted = (await edit({ liftedDates: ['2026-12-25', '2026-12-25'] })).body as Blackout;
    expect(lifted).toMatchObject({
      liftedDates: ['2026-12-25'],
      source: 'federal-holiday',
      version: version + 1,
    });
    expect((await days()).map(({ date }) => date)).toEqual(['2027-12-25']);
    await edit({ scope: 'state', state: 'TX' });
    await admin.delete(`/api/blackouts/${id}`).expect(204);
    expect(await days()).toEqual([]);
  });
});

describe('the calendar', () => {
  it('lists each covered day of a window', async () => {
    const { id } = await enter({
      ...oneDay('2026-12-24'),
      kind: 'yearly',
      startDate: null,
      rules: 'FREQ=YEARLY;BYMONTH=12;BYMONTHDAY=24',
    });
    const list = (await breeder.get('/api/blackouts?from=2026-01-01&to=2027-12-31').expect(200))
      .body as BlackoutList;
    expect(list.days).toEqual([
      { date: '2026-12-24', blackoutId: id },
      { date: '2027-12-24', blackoutId: id },
    ]);
    await breeder.get('/api/blackouts?from=2026-01-01&to=2099-12-31').expect(400);
    await breeder.get('/api/blackouts?to=2199-12-31').expect(400);
    await breeder.get('/api/blackouts?from=2190-12-31').expect(200);
    await breeder.get('/api/blackouts?from=9999-12-31').expect(400);
    await breeder.get('/api/blackouts?from=2026-02-31').expect(400);
  });

  it.each(['breeder@example.org', 'coordinator@example.org', 'buyer@example.org'])(
    'is read, not kept, by %s',
    async (who) => {
      const caller = await site.as(who);
      await caller.get('/api/blackouts').expect(200);
      await caller.post('/api/blackouts').send(oneDay('2026-12-07')).expect(403);
      await caller
        .post('/api/blackouts/preview')
        .send({ blackout: oneDay('2026-12-07') })
        .expect(403);
      await caller.patch('/api/blackouts/1').send({}).expect(403);
      await caller.delete('/api/blackouts/1').expect(403);
    },
  );
});
