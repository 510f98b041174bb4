import ICAL from 'ical.js';
import { addParcel, addRun } from '../support/run-rows';
import { createTestSite, type TestSite } from '../support/test-site';

const pathOf = (url: string) => new URL(url).pathname;

describe('Calendars by link', () => {
  let site: TestSite;
  let parcelId: number;
  beforeEach(async () => {
    site = await createTestSite();
    parcelId = await addParcel(site, {
      code: 'TD-1',
      breederId: site.ids.breeder,
      buyerId: site.ids.buyer,
      holdCounterId: site.ids.phoenixCounter,
      shipDate: '2026-12-08',
    });
  });
  afterEach(() => site.close());

  async function confirmRun(): Promise<void> {
    const runId = await addRun(site, {
      date: '2026-12-08',
      departAt: '2026-12-08T14:30:00.000Z',
      arriveAt: '2026-12-08T18:00:00.000Z',
      cutOffAt: '2026-12-08T23:00:00.000Z',
      stops: [
        {
          breederId: site.ids.breeder,
          arriveAt: '2026-12-08T16:30:00.000Z',
          leaveAt: '2026-12-08T16:40:00.000Z',
          parcelIds: [parcelId],
        },
      ],
    });
    await site.deps.services.notices.tell({ kind: 'run-confirmed', runId });
  }

  const feedOf = async (email: string): Promise<string> => {
    const { body } = await (await site.as(email)).get('/api/me/calendar-feed').expect(200);
    return pathOf((body as { url: string }).url);
  };
  /** Fetched by a calendar program: no session, no form token. */
  async function read(path: string) {
    const answer = await (await site.as(null)).get(path).expect(200);
    expect(answer.headers['content-type']).toBe('text/calendar; charset=utf-8');
    const calendar = new ICAL.Component(ICAL.parse(answer.text));
    for (const one of calendar.getAllSubcomponents('vtimezone')) {
      const zone = new ICAL.Timezone(one);
      ICAL.TimezoneService.register(zone, zone.tzid);
    }
    const events = calendar.getAllSubcomponents('vevent').map((one) => new ICAL.Event(one));
    return { calendar, events };
  }

  it('has one address a person, the same each time it is asked for', async () => {
    const first = await feedOf('breeder@example.org');
    expect(first).toMatch(/^\/api\/calendars\/[\w-]{32}\.ics$/);
    expect(await feedOf('breeder@example.org')).toBe(first);
    expect(await feedOf('buyer@example.org')).not.toBe(first);
  });

  it('shows a breeder the collection, a coordinator the drive and a buyer the arrival', async () => {
    await confirmRun();
    const spans: Record<string, unknown> = {};
    for (const who of ['breeder', 'coordinator', 'buyer']) {
      const { calendar, events } = await read(await feedOf(`${who}@example.org`));
      expect(calendar.getFirstPropertyValue('method')).toBe('PUBLISH');
      spans[who] = events.map((one) => [one.startDate.toJSDate().toISOString(), one.startDate.zone?.tzid]);
    }
    expect(spans).toEqual({
      breeder: [['2026-12-08T16:30:00.000Z', 'America/Chicago']],
      coordinator: [['2026-12-08T14:30:00.000Z', 'America/Chicago']],
      buyer: [['2026-12-09T16:00:00.000Z', 'America/Phoenix']],
    });
  });

  it('shows the others nothing of it', async () => {
    await confirmRun();
    for (const who of ['other', 'unrelated', 'admin'])
      expect((await read(await feedOf(`${who}@example.org`))).events).toEqual([]);
  });

  it('shows the buyer a booked arrival before any run goes, under the UID that the invitation will have', async () => {
    const feed = await feedOf('buyer@example.org');
    const before = (await read(feed)).events;
    expect(before.map((one) => one.startDate.toJSDate().toISOString())).toEqual(['2026-12-09T16:00:00.000Z']);
    await confirmRun();
    const after = (await read(feed)).events;
    expect(after.map(({ uid }) => uid)).toEqual(before.map(({ uid }) => uid));
  });

  it('drops a run that is called off', async () => {
    await confirmRun();
    const off = { kind: 'run-called-off', runId: 1, parcelIds: [parcelId], reason: 'Ice.' } as const;
    await site.deps.services.notices.tell(off);
    for (const who of ['breeder', 'coordinator', 'buyer'])
      expect((await read(await feedOf(`${who}@example.org`))).events).toEqual([]);
  });

  it('gets a new address at a word, and the old one opens nothing any more', async () => {
    const old = await feedOf('breeder@example.org');
    const breeder = await site.as('breeder@example.org');
    const { body } = await breeder.post('/api/me/calendar-feed').expect(200);
    const fresh = pathOf((body as { url: string }).url);
    expect(fresh).not.toBe(old);
    await (await site.as(null)).get(old).expect(404);
    await read(fresh);
    expect(await feedOf('breeder@example.org')).toBe(fresh);
  });

  it('is shut with the account', async () => {
    const feed = await feedOf('breeder@example.org');
    await site.db('people').where({ id: site.ids.breeder }).update({ active: false });
    await (await site.as(null)).get(feed).expect(404);
  });

  it.each(['/api/calendars/short.ics', '/api/calendars/a-token-that-nobody-has-been-given.ics'])(
    'answers 404 to %s',
    async (path) => {
      const answer = await (await site.as(null)).get(path).expect(404);
      expect(answer.headers['content-type']).toMatch(/^application\/problem\+json/);
    },
  );

  it('gives a buyer the one arrival to save', async () => {
    const path = '/api/arrivals/arrival-token-of-TD-1';
    const { body } = await (await site.as(null)).get(path).expect(200);
    expect(body).toMatchObject({ calendarUrl: `${path}/calendar.ics` });
    const { events } = await read(`${path}/calendar.ics`);
    expect(events.map(({ summary, location }) => [summary, location])).toEqual([
      ['Collect your corn snake', 'Phoenix counter, 100 Ramp Road, Phoenix, AZ 00000'],
    ]);
  });

  it.each([
    ['no day stands', { state: 'seeking', ship_date: null }],
    ['it is on hold', { state: 'on-hold', ship_date: null }],
    ['it is cancelled', { state: 'cancelled', ship_date: null }],
  ])('has no arrival to save while %s', async (_, columns) => {
    await site.db('parcels').where({ id: parcelId }).update(columns);
    const path = '/api/arrivals/arrival-token-of-TD-1/calendar.ics';
    await (await site.as(null)).get(path).expect(404);
  });

  it('is described as text/calendar in the OpenAPI document', async () => {
    const { body } = await (await site.as(null)).get('/api/openapi.json').expect(200);
    const { paths } = body as {
      paths: Record<string, { get: { responses: Record<string, { content: object }> } }>;
    };
    for (const path of ['/api/calendars/{token}.ics', '/api/arrivals/{token}/calendar.ics'])
      expect(Object.keys(paths[path]?.get.responses['200']?.content ?? {})).toEqual(['text/calendar']);
  });

  it('answers 404 for an arrival that does not exist', async () => {
    await (await site.as(null)).get('/api/arrivals/no-such-arrival-token/calendar.ics').expect(404);
  });
});
