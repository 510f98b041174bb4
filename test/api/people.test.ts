import type { Person } from '@shared/contract';
import { createTestSite, type Caller, type TestSite } from '../support/test-site';

let site: TestSite;
let admin: Caller;

beforeEach(async () => {
  site = await createTestSite();
  admin = await site.as('admin@example.org');
});
afterEach(() => site.close());

const breederBody = (changes: object = {}) => ({
  email: 'new@example.org',
  name: 'Nia New',
  roles: ['breeder'],
  postalCode: '78006',
  breeder: {
    windowOpenMinute: 540,
    windowCloseMinute: 960,
    serviceMinutes: 10,
    dropOffCounterId: site.ids.dropOffCounter,
  },
  ...changes,
});
const linkOf = async (email: string): Promise<string> => {
  const mail = (await site.db('outbox').where({ to_email: email }).orderBy('id', 'desc').first()) as {
    text: string;
  };
  return /account-link\/([\w-]+)/.exec(mail.text)?.[1] ?? '';
};

describe('inviting a person', () => {
  it('places them by their ZIP, mails a link that sets the password once, and lets them in', async () => {
    const { body } = await admin.post('/api/people').send(breederBody()).expect(201);
    // ZIP 78006 is Boerne, Texas (USPS).
    expect(body).toMatchObject({ hasPassword: false, active: true, zone: 'America/Chicago' });
    expect((body as Person).lat).toBeCloseTo(29.8, 0);
    const token = await linkOf('new@example.org');
    const guest = await site.as(null);
    expect((await guest.get(`/api/account-links/${token}`).expect(200)).body).toEqual({
      kind: 'invitation',
      name: 'Nia New',
      email: 'new@example.org',
    });
    await guest.post(`/api/account-links/${token}`).send({ password: 'short' }).expect(400);
    await guest.post(`/api/account-links/${token}`).send({ password: 'password1234' }).expect(400);
    await guest.post(`/api/account-links/${token}`).send({ password: 'six lizards asleep' }).expect(204);
    await guest.post(`/api/account-links/${token}`).send({ password: 'six lizards awake!' }).expect(410);
    await guest
      .post('/api/session')
      .send({ email: 'new@example.org', password: 'six lizards asleep' })
      .expect(200);
  });

  it('has links that live seven days, and keeps only their hash', async () => {
    await admin.post('/api/people').send(breederBody()).expect(201);
    const token = await linkOf('new@example.org');
    expect(JSON.stringify(await site.db('account_links'))).not.toContain(token);
    site.setNow('2026-12-08T12:00:01.000Z');
    await (await site.as(null)).get(`/api/account-links/${token}`).expect(410);
  });

  it.each([
    ['nobody’s roles', { roles: [] }, 'roles'],
    ['a breeder without a window', { breeder: null }, 'breeder'],
    [
      'a window that closes first',
      { breeder: { windowOpenMinute: 960, windowCloseMinute: 540, serviceMinutes: 10, dropOffCounterId: 1 } },
      'breeder.windowCloseMinute',
    ],
    [
      'a counter that is not on the list',
      {
        breeder: { windowOpenMinute: 540, windowCloseMinute: 960, serviceMinutes: 10, dropOffCounterId: 99 },
      },
      'breeder.dropOffCounterId',
    ],
    ['a coordinator without a vehicle', { roles: ['coordinator'], breeder: null }, 'coordinator'],
    ['a stop nobody can find', { postalCode: null }, 'postalCode'],
    ['an address that is none', { email: 'new' }, 'email'],
  ])('refuses %s at its field', async (_what, changes, path) => {
    const { body } = await admin.post('/api/people').send(breederBody(changes)).expect(400);
    expect((body as { errors: { path: string }[] }).errors.map((error) => error.path)).toContain(path);
    expect(await site.db('people').where({ email: 'new@example.org' })).toEqual([]);
  });

  it('refuses an address that is taken', async () => {
    const { status } = await admin.post('/api/people').send(breederBody({ email: 'Breeder@example.org' }));
    expect([400, 409]).toContain(status);
  });
});

describe('changing a person', () => {
  const patch = async (id: number, body: object, version?: number) => {
    const seen = (await admin.get(`/api/people/${id}`).expect(200)).body as Person;
    return admin
      .patch(`/api/people/${id}`)
      .set('If-Match', `"${version ?? seen.version}"`)
      .send(body);
  };

  it('ends every session of a person who is switched off, at once', async () => {
    const breeder = await site.as('breeder@example.org');
    await breeder.get('/api/parcels').expect(200);
    expect((await patch(site.ids.breeder, { active: false })).status).toBe(200);
    await breeder.get('/api/parcels').expect(401);
    await (
      await site.as(null)
    )
      .post('/api/session')
      .send({ email: 'breeder@example.org', password: 'a quiet morning' })
      .expect(401);
  });

  it('lets a role that was taken away act no more', async () => {
    const coordinator = await site.as('coordinator@example.org');
    expect((await patch(site.ids.coordinator, { roles: ['buyer'] })).status).toBe(200);
    await coordinator
      .post('/api/runs/proposals')
      .send({})
      .expect((answer) => {
        if (![401, 403].includes(answer.status)) throw new Error(`It answered ${answer.status}.`);
      });
  });

  it('keeps the last admin who can sign in', async () => {
    for (const body of [{ active: false }, { roles: ['buyer'] }])
      expect((await patch(site.ids.admin, body)).status).toBe(409);
    await admin.get('/api/people').expect(200);
  });

  it('answers 412 to a version that is over, and changes nothing', async () => {
    await patch(site.ids.breeder, { name: 'Bea Changed' });
    expect((await patch(site.ids.breeder, { name: 'Bea Again' }, 1)).status).toBe(412);
    expect(((await admin.get(`/api/people/${site.ids.breeder}`)).body as Person).name).toBe('Bea Changed');
  });
});

describe('what a person changes of themselves', () => {
  it('is name, phone, zone, unit and own profile; roles and the counter are the admin’s', async () => {
    const breeder = await site.as('breeder@example.org');
    const { body } = await breeder.patch('/api/me').send({
      phone: '830-555-0199',
      temperatureUnit: 'C',
      breeder: { windowOpenMinute: 600 },
      roles: ['admin'],
    });
    const me = (await breeder.get('/api/me').expect(200)).body as Person;
    expect(me.roles).toEqual(['breeder']);
    if ((body as Person).phone)
      expect(me).toMatchObject({
        phone: '830-555-0199',
        temperatureUnit: 'C',
        breeder: { windowOpenMinute: 600, windowCloseMinute: 960 },
      });
  });

  it('are days away and, for those who drive, driving days; no day twice, no end before the beginning', async () => {
    const coordinator = await site.as('coordinator@example.org');
    const put = (body: object, who = coordinator) => who.put('/api/me/availability').send(body);
    const days = {
      daysAway: [{ from: '2026-12-20', to: '2026-12-27', note: 'family' }],
      drivingDays: [{ date: '2026-12-11', free: false }],
    };
    expect((await put(days).expect(200)).body).toEqual(days);
    await put({ daysAway: [{ from: '2026-12-20', to: '2026-12-19', note: '' }], drivingDays: [] }).expect(
      400,
    );
    await put({
      daysAway: [],
      drivingDays: [
        { date: '2026-12-11', free: false },
        { date: '2026-12-11', free: true },
      ],
    }).expect(400);
    await put(
      { daysAway: [], drivingDays: [{ date: '2026-12-11', free: true }] },
      await site.as('breeder@example.org'),
    ).expect(400);
  });

  it('changes the password with the present one, and ends the other sessions', async () => {
    const here = await site.as('breeder@example.org');
    const elsewhere = await site.as('breeder@example.org');
    await here.put('/api/me/password').send({ current: 'wrong', next: 'eight quiet geckos' }).expect(400);
    await here
      .put('/api/me/password')
      .send({ current: 'a quiet morning', next: 'eight quiet geckos' })
      .expect(204);
    await here.get('/api/me').expect(200);
    await elsewhere.get('/api/me').expect(401);
  });
});

describe('a lost password', () => {
  it('is reset by a link that lives an hour, and the answer does not tell whether the address is known', async () => {
    const guest = await site.as(null);
    const known = await guest.post('/api/password-resets').send({ email: 'breeder@example.org' });
    const unknown = await guest.post('/api/password-resets').send({ email: 'nobody@example.org' });
    expect([known.status, known.text]).toEqual([unknown.status, unknown.text]);
    await new Promise((next) => setTimeout(next, 50));
    const token = await linkOf('breeder@example.org');
    site.setNow('2026-12-01T13:00:01.000Z');
    await guest.post(`/api/account-links/${token}`).send({ password: 'eight quiet geckos' }).expect(410);
  });

  it('cannot be guessed: after five wrong passwords the address rests for fifteen minutes', async () => {
    const guest = await site.as(null);
    const guess = (password: string) =>
      guest.post('/api/session').send({ email: 'breeder@example.org', password });
    for (let n = 0; n < 5; n += 1) await guess(`wrong number ${n}`).expect(401);
    const shut = await guess('a quiet morning').expect(429);
    expect(Number(shut.headers['retry-after'])).toBeGreaterThan(600);
    site.setNow('2026-12-01T12:15:01.000Z');
    await guess('a quiet morning').expect(200);
  });
});
