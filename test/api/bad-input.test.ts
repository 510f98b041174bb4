import request from 'supertest';
import type { FieldError } from '@shared/contract';
import { allRoutes } from '@api/features';
import { defaultPolicy } from '@shared/policy/policy';
import { createAccessWorld, type AccessWorld } from '../support/access-world';
import { createTestSite, type Caller, type TestSite } from '../support/test-site';

type Verb = keyof Caller;
const admin = 'admin@example.org';
const coordinator = 'coordinator@example.org';
const breeder = 'breeder@example.org';

/** What is sent where a route needs more than an empty object to get as far as looking for the thing. */
const fitBodies: Readonly<Record<string, object>> = {
  'put /parcels/:id/booking': { flexible: { from: '2026-12-07', to: '2026-12-18' } },
  'post /runs/:id/call-off': { reason: 'Ice on the roads.' },
  'put /policy': defaultPolicy,
};

/** For each route that takes a body: what is sent, and the paths that are complained of. */
const wrongBodies: Readonly<Record<string, readonly [unknown, readonly string[]]>> = {
  'post /session': [{}, ['email', 'password']],
  'post /password-resets': [{ email: 'nobody' }, ['email']],
  'post /account-links/:token': [{ password: 'short' }, ['password']],
  'put /me/password': [{}, ['current', 'next']],
  'post /counters': [
    {},
    [
      'active',
      'canDropOff',
      'canHold',
      'carrierId',
      'city',
      'commitMinute',
      'cutOffMinutes',
      'lat',
      'lon',
      'name',
      'openingHours',
      'postalCode',
      'state',
      'street',
      'workingDays',
      'zone',
    ],
  ],
  'patch /counters/:id': [
    {
      name: ' ',
      zone: 'Mars/Olympus',
      commitMinute: 1441,
      openingHours: { 1: { openMinute: 600, closeMinute: 500 } },
    },
    ['commitMinute', 'name', 'openingHours.1.closeMinute', 'zone'],
  ],
  'post /species': [
    {},
    [
      'active',
      'bandHighF',
      'bandLowF',
      'commonName',
      'enduranceHighF',
      'enduranceLowF',
      'note',
      'outdoorHighF',
      'outdoorLowF',
      'scientificName',
      'typicalMassG',
      'venomous',
    ],
  ],
  'patch /species/:id': [{ bandLowF: 'warm', typicalMassG: -1 }, ['bandLowF', 'typicalMassG']],
  'post /boxes': [{}, ['active', 'foamIn', 'heightIn', 'lengthIn', 'name', 'widthIn']],
  'patch /boxes/:id': [{ lengthIn: 0, foamIn: 7 }, ['foamIn', 'lengthIn']],
  'post /people': [{}, ['email', 'name', 'roles']],
  'patch /people/:id': [{ roles: [], zone: 'nowhere', lat: 91 }, ['lat', 'roles', 'zone']],
  'patch /me': [{ name: 'a\r\nb', temperatureUnit: 'K' }, ['name', 'temperatureUnit']],
  'put /me/availability': [{}, ['daysAway', 'drivingDays']],
  'post /parcels': [{}, ['boxId', 'buyer', 'contents', 'latestDate', 'readyFrom', 'service']],
  'patch /parcels/:id': [
    { contents: [{ speciesId: 1, quantity: 0, massG: 0 }], readyFrom: '2026-02-30', state: 'aboard' },
    ['contents.0.massG', 'contents.0.quantity', 'readyFrom', 'state'],
  ],
  'put /parcels/:id/booking': [{ date: '2026-02-30' }, ['date']],
  'put /arrivals/:token/mornings': [
    { mornings: [{ date: '2026-13-01', suits: 'yes' }] },
    ['mornings.0.date', 'mornings.0.suits'],
  ],
  'post /arrivals/:token/report': [{}, ['outcome']],
  'post /runs': [{}, ['coordinatorId', 'date']],
  'post /runs/proposals': [{ from: 'soon', to: '2026-12-32' }, ['from', 'to']],
  'patch /runs/:id': [{ addParcelIds: [0], note: 5 }, ['addParcelIds.0', 'note']],
  'post /runs/:id/preview': [{ pin: [{ parcelId: 1 }] }, ['pin.0.pinned']],
  'post /runs/:id/departure': [{ aboardParcelIds: 'all' }, ['aboardParcelIds']],
  'post /runs/:id/hand-over': [{ tracking: [{ parcelId: 1, number: '' }] }, ['tracking.0.number']],
  'post /runs/:id/call-off': [{}, ['reason']],
  'post /route-checks': [{}, ['boxId', 'contents', 'destination', 'service']],
  'post /blackouts': [{}, ['kind', 'scope', 'title']],
  'post /blackouts/preview': [{}, ['blackout']],
  'put /policy': [
    { ...defaultPolicy, circleName: '', chance: { ...defaultPolicy.chance, open: 2 }, sigmaF: [3], extra: 1 },
    ['chance.open', 'circleName', 'extra', 'sigmaF'],
  ],
  'patch /blackouts/:id': [
    { startDate: '2026-02-30', liftedDates: ['never'] },
    ['liftedDates.0', 'startDate'],
  ],
};

/** Routes whose thing two people may have open at once: a stale If-Match is refused. */
const versioned: Readonly<Record<string, string>> = {
  'patch /counters/:id': admin,
  'patch /species/:id': admin,
  'patch /boxes/:id': admin,
  'patch /people/:id': admin,
  'patch /me': breeder,
  'patch /parcels/:id': breeder,
  'put /parcels/:id/booking': breeder,
  'delete /parcels/:id/booking': breeder,
  'patch /blackouts/:id': admin,
  'delete /blackouts/:id': admin,
  'put /policy': admin,
  'patch /runs/:id': coordinator,
  'post /runs/:id/confirmation': coordinator,
  'post /runs/:id/departure': coordinator,
  'post /runs/:id/hand-over': coordinator,
  'post /runs/:id/call-off': coordinator,
};

describe('Bad input', () => {
  let site: TestSite;
  let world: AccessWorld;
  let callers: ReadonlyMap<string, Caller>;
  beforeAll(async () => {
    site = await createTestSite();
    world = await createAccessWorld(site);
    const names = [admin, coordinator, breeder, 'buyer@example.org'];
    callers = new Map(await Promise.all(names.map(async (name) => [name, await site.as(name)] as const)));
  });
  afterAll(() => site.close());

  const routes = () => allRoutes(site.deps);
  const caller = (email: string): Caller => callers.get(email) as Caller;
  /** Somebody who may call the route. */
  const oneWhoMay = (key: string): Caller => {
    const allow = routes().find(({ method, path }) => `${method} ${path}` === key)?.allow;
    if (!allow) throw new Error(`${key} is no route.`);
    if (allow === 'anyone' || allow === 'signed-in') return caller(breeder);
    const role = ['breeder', 'coordinator', 'admin', 'buyer'].find((one) => allow.includes(one as never));
    return caller(`${role}@example.org`);
  };
  const addressOf = (key: string): string => {
    const path = key.split(' ')[1] as string;
    const own: readonly [string, string][] = [
      ['/parcels/:id', world.draftParcel],
      ['/runs/:id', world.confirmedRun],
      ['/blackouts/:id', world.blackout],
      ['/desk/mail/:id', world.failedMail],
      ['/arrivals/:token', world.arrival],
      ['/account-links/:token', world.accountLink],
    ];
    const found = own.find(([prefix]) => path.startsWith(prefix));
    return `/api${found ? path.replace(found[0], found[1]) : path.replace(':id', '1')}`;
  };
  const call = (key: string, who: Caller, address = addressOf(key)) =>
    who[key.split(' ')[0] as Verb](address);
  /** Every version in the database, by table and id. */
  const versions = async () => {
    const tables = ['runs', 'parcels', 'people', 'counters', 'species', 'boxes', 'blackouts'];
    const rows = await Promise.all(
      tables.map((table) => site.db(table).select('id', 'version').orderBy('id')),
    );
    return Object.fromEntries(tables.map((table, index) => [table, rows[index]]));
  };
  const isProblem = (answer: request.Response, status: number, code: string) => {
    expect([answer.status, answer.headers['content-type']?.split(';')[0]]).toEqual([
      status,
      'application/problem+json', // RFC 9457 3
    ]);
    expect(answer.body).toMatchObject({ status, code, title: expect.any(String) });
  };

  it('has a wrong body for every route that takes one', () => {
    const withBody = routes().flatMap(({ method, path, body }) => (body ? [`${method} ${path}`] : []));
    expect(Object.keys(wrongBodies).sort()).toEqual(withBody.sort());
  });

  it.each(Object.entries(wrongBodies))('%s complains of each field', async (key, [body, paths]) => {
    const answer = await call(key, oneWhoMay(key)).send(body as object);
    isProblem(answer, 400, 'bad-input');
    const { errors } = answer.body as { errors: FieldError[] };
    expect([...new Set(errors.map(({ path }) => path))].sort()).toEqual(paths);
    for (const { message } of errors) expect(message).toMatch(/^[A-Z].*[.?:]$|^Invalid|^Too|^Use/);
  });

  it.each(Object.keys(wrongBodies))('%s answers 400 to a body that is no object', async (key) => {
    for (const body of ['[]', '["a"]']) {
      const answer = await call(key, oneWhoMay(key)).set('Content-Type', 'application/json').send(body);
      isProblem(answer, 400, 'bad-input');
    }
  });

  it('every route with an id answers 404 to one that does not exist and one that cannot', async () => {
    const withId = routes().filter(({ path }) => path.includes(':id'));
    expect(withId.length).toBeGreaterThan(20);
    for (const { method, path } of withId) {
      const key = `${method} ${path}`;
      for (const id of ['999999', '0', '-1', '1.5', 'abc', '1e3', '9'.repeat(40)]) {
        const answer = await call(key, oneWhoMay(key), `/api${path.replace(':id', id)}`).send(
          fitBodies[key] ?? {},
        );
        expect([key, id, answer.status]).toEqual([key, id, 404]);
      }
    }
  });

  it('every route with a secret link answers 404 to one that was never given out', async () => {
    const withToken = routes().filter(({ path }) => path.includes(':token'));
    expect(withToken.length).toBeGreaterThan(5);
    const fit = { mornings: [], outcome: 'arrived-well', password: 'a long enough password' };
    for (const { method, path } of withToken) {
      const key = `${method} ${path}`;
      for (const token of ['nobody-has-been-given-this-one', 'x', '%00', 'a'.repeat(300)]) {
        const answer = await call(key, oneWhoMay(key), `/api${path.replace(':token', token)}`).send(fit);
        expect([key, token, answer.status]).toEqual([key, token, 404]);
      }
    }
  });

  it('holds every change of a single thing to its version', () => {
    const changes = routes().filter(
      ({ method, path }) =>
        ['put', 'patch', 'delete'].includes(method) && (path.includes(':id') || path === '/me'),
    );
    const keys = changes.map(({ method, path }) => `${method} ${path}`);
    expect(keys.filter((key) => !(key in versioned))).toEqual([]);
  });

  it.each(Object.entries(versioned))('%s refuses a stale If-Match (RFC 9110 13.1.1)', async (key, who) => {
    const before = await versions();
    for (const stale of ['"999"', 'W/"999"', '"abc"', 'nonsense']) {
      const answer = await call(key, caller(who))
        .set('If-Match', stale)
        .send(fitBodies[key] ?? {});
      isProblem(answer, 412, 'stale');
    }
    expect(await versions()).toEqual(before);
  });

  it('gives every versioned answer its ETag (RFC 9110 8.8.3)', async () => {
    for (const path of [
      '/counters/1',
      '/species/1',
      '/boxes/1',
      world.draftParcel,
      world.confirmedRun,
      '/people/2',
      '/me',
    ]) {
      const answer = await caller(path.startsWith('/parcels') ? breeder : admin)
        .get(`/api${path}`)
        .expect(200);
      expect(answer.headers['etag']).toBe(`"${(answer.body as { version: number }).version}"`);
    }
  });

  it('every change without the form token is refused, whoever asks', async () => {
    const changes = routes().filter(({ method }) => method !== 'get');
    expect(changes.length).toBeGreaterThan(30);
    for (const { method, path } of changes) {
      const key = `${method} ${path}`;
      const answer = await request(site.app)[method](addressOf(key)).send({});
      expect([key, answer.status, (answer.body as { code: string }).code]).toEqual([key, 403, 'bad-token']);
    }
  });

  it('refuses a form token of somebody’s own making', async () => {
    const answer = await request(site.app)
      .post('/api/session')
      .set('Cookie', 'XSRF-TOKEN=made.up')
      .set('X-XSRF-TOKEN', 'made.up')
      .send({});
    isProblem(answer, 403, 'bad-token');
  });

  it('answers 413 to a body over 200 kB and takes one under it', async () => {
    const note = (length: number) => ({ note: 'x'.repeat(length) });
    isProblem(await call('patch /parcels/:id', caller(breeder)).send(note(210_000)), 413, 'too-large');
    isProblem(await call('patch /parcels/:id', caller(breeder)).send(note(150_000)), 400, 'bad-input');
  });

  it.each(['{"email":', '{email: 1}', '"text"', 'null', '\u0000'])(
    'answers 400 to %j, which is no JSON object',
    async (text) => {
      const answer = await caller(breeder)
        .post('/api/session')
        .set('Content-Type', 'application/json')
        .send(text);
      isProblem(answer, 400, 'bad-json');
    },
  );

  it.each([
    'text/plain',
    'application/x-www-form-urlencoded',
    'application/xml',
    'multipart/form-data; boundary=x',
  ])('answers 415 to a body of %s', async (type) => {
    isProblem(
      await caller(breeder).post('/api/session').set('Content-Type', type).send('a=1'),
      415,
      'wrong-type',
    );
  });

  it.each([
    ['get', '/api/nothing'],
    ['post', '/api/nothing'],
    ['get', '/api/parcels/1/nothing'],
    ['delete', '/api/species'],
    ['get', '/api/..%2f..%2fetc%2fpasswd'],
    ['get', '/nothing'],
  ] as const)('answers 404 to %s %s', async (verb, path) => {
    isProblem(await caller(admin)[verb](path), 404, 'not-found');
  });

  it('answers 400 to an address that is no UTF-8', async () => {
    const answer = await caller(admin).get('/api/postal-codes/%E0%A4%A');
    expect([400, 404]).toContain(answer.status);
    expect(answer.headers['content-type']).toMatch(/^application\/problem\+json/);
  });

  it.each([
    ['/api/parcels?state=flying', 'breeder@example.org'],
    ['/api/parcels?breederId=abc', 'coordinator@example.org'],
    [`/api/parcels?q=${'x'.repeat(101)}`, 'breeder@example.org'],
    ['/api/runs?from=soon', 'coordinator@example.org'],
    ['/api/runs?state=flying', 'coordinator@example.org'],
    ['/api/blackouts?from=2026-02-30', 'breeder@example.org'],
    ['/api/blackouts?from=2026-12-31&to=2026-01-01', 'breeder@example.org'],
  ])('answers 400 to %s', async (path, who) => {
    isProblem(await caller(who).get(path), 400, 'bad-input');
  });
});
