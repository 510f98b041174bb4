import type { IncomingMessage } from 'node:http';
import type request from 'supertest';
import { allRoutes } from '@api/features';
import { createAccessWorld, type AccessWorld } from '../support/access-world';
import { createTestSite, type Caller, type TestSite } from '../support/test-site';

/**
 * Who may call what: for each route the answers to somebody who is not signed in, the breeder whose things they are,
 * another breeder, a coordinator, a buyer and an admin. `ok` is an answer of the route itself: 200 to a GET, and to a
 * change anything but 401, 403, 404 and 5xx (most are sent an empty body, which comes to 400 behind the door). 401 asks to sign in, 403 says that the role is wrong, 404 that it is none of the asker's business.
 */
const people = [
  null,
  'breeder@example.org',
  'other@example.org',
  'coordinator@example.org',
  'buyer@example.org',
  'admin@example.org',
] as const;

const anyone = 'ok  ok  ok  ok  ok  ok';
const signedIn = '401 ok  ok  ok  ok  ok';
const onlyAdmin = '401 403 403 403 403 ok';
const drivers = '401 403 403 ok  403 ok';
const workers = '401 ok  ok  ok  403 ok';
const owner = '401 ok  404 ok  403 ok';

/** Where the path, with `/api` left out, is found in the world; what is sent (an empty object where a body is taken). */
interface Row {
  readonly answers: string;
  readonly path?: (world: AccessWorld) => string;
  readonly body?: object;
  /** It never ends by itself: the beginning of the answer tells. */
  readonly isStream?: boolean;
}
const flexible = { flexible: { from: '2026-12-07', to: '2026-12-18' } };

/** Reads nothing of an answer and hangs up. */
const leaveAtOnce: Parameters<request.Test['parse']>[0] = (answer, done) => {
  done(null, null);
  (answer as unknown as IncomingMessage).destroy();
};

const table: Readonly<Record<string, Row>> = {
  'get /session': { answers: anyone },
  'get /demo': { answers: anyone },
  'get /health': { answers: anyone },
  'post /password-resets': { answers: anyone },
  'get /account-links/:token': { answers: anyone, path: (w) => w.accountLink },
  'post /account-links/:token': { answers: anyone, path: (w) => w.accountLink },
  'put /me/password': { answers: signedIn },
  'get /counters': { answers: signedIn },
  'get /species': { answers: signedIn },
  'get /boxes': { answers: signedIn },
  'get /carriers': { answers: signedIn },
  'get /hubs': { answers: signedIn },
  'get /postal-codes/:postalCode': { answers: signedIn, path: () => '/postal-codes/78205' },
  'get /counters/:id': { answers: signedIn, path: () => '/counters/1' },
  'post /counters': { answers: onlyAdmin },
  'patch /counters/:id': { answers: onlyAdmin, path: () => '/counters/1' },
  'get /species/:id': { answers: signedIn, path: () => '/species/1' },
  'post /species': { answers: onlyAdmin },
  'patch /species/:id': { answers: onlyAdmin, path: () => '/species/1' },
  'get /boxes/:id': { answers: signedIn, path: () => '/boxes/1' },
  'post /boxes': { answers: onlyAdmin },
  'patch /boxes/:id': { answers: onlyAdmin, path: () => '/boxes/1' },
  'get /people': { answers: onlyAdmin },
  'post /people': { answers: onlyAdmin },
  'get /people/:id': { answers: onlyAdmin, path: () => '/people/2' },
  'patch /people/:id': { answers: onlyAdmin, path: () => '/people/2' },
  'post /people/:id/invitation': { answers: onlyAdmin, path: () => '/people/2/invitation' },
  'get /coordinators': { answers: drivers },
  'get /breeders': { answers: drivers },
  'get /me': { answers: signedIn },
  'patch /me': { answers: signedIn },
  'get /me/availability': { answers: signedIn },
  'put /me/availability': { answers: signedIn },
  'get /me/calendar-feed': { answers: signedIn },
  'get /calendars/:token.ics': { answers: anyone, path: (w) => w.calendar },
  'post /me/calendar-feed': { answers: signedIn },
  'get /parcels': { answers: workers },
  'post /parcels': { answers: workers },
  'get /parcels/:id': { answers: owner, path: (w) => w.bookedParcel },
  'patch /parcels/:id': { answers: owner, path: (w) => w.bookedParcel },
  'get /parcels/:id/history': { answers: owner, path: (w) => `${w.bookedParcel}/history` },
  'get /parcels/:id/days': { answers: owner, path: (w) => `${w.bookedParcel}/days` },
  'post /route-checks': { answers: workers },
  // An admin keeps the circle's settings and books nobody's animals.
  'put /parcels/:id/booking': {
    answers: '401 ok  404 ok  403 403',
    path: (w) => `${w.draftParcel}/booking`,
    body: flexible,
  },
  'delete /parcels/:id/booking': {
    answers: '401 ok  404 ok  403 403',
    path: (w) => `${w.draftParcel}/booking`,
  },
  'get /arrivals': { answers: '401 403 403 403 ok  403' },
  'get /live': { answers: signedIn, isStream: true },
  'get /arrivals/:token/live': { answers: anyone, path: (w) => `${w.arrival}/live`, isStream: true },
  'get /arrivals/:token': { answers: anyone, path: (w) => w.arrival },
  'get /arrivals/:token/calendar.ics': { answers: anyone, path: (w) => `${w.arrival}/calendar.ics` },
  'put /arrivals/:token/mornings': { answers: anyone, path: (w) => `${w.arrival}/mornings` },
  'post /arrivals/:token/report': { answers: anyone, path: (w) => `${w.arrival}/report` },
  'get /blackouts': { answers: signedIn },
  'post /blackouts': { answers: onlyAdmin },
  'post /blackouts/preview': { answers: onlyAdmin },
  'patch /blackouts/:id': { answers: onlyAdmin, path: (w) => w.blackout },
  'delete /blackouts/:id': { answers: onlyAdmin, path: (w) => w.blackout },
  'get /policy': { answers: signedIn },
  'put /policy': { answers: onlyAdmin },
  'get /policy/versions/:id': { answers: signedIn, path: (w) => w.policyVersion },
  'get /desk': { answers: onlyAdmin },
  'post /desk/mail/:id/resend': { answers: onlyAdmin, path: (w) => `${w.failedMail}/resend` },
  'get /runs': { answers: workers },
  'post /runs': { answers: drivers },
  'post /runs/proposals': { answers: drivers, body: { from: 'no date' } },
  'get /runs/proposals/latest': { answers: drivers },
  'get /runs/:id': { answers: owner, path: (w) => w.confirmedRun },
  'patch /runs/:id': { answers: drivers, path: (w) => w.confirmedRun },
  'post /runs/:id/preview': { answers: drivers, path: (w) => `${w.confirmedRun}/preview` },
  'post /runs/:id/confirmation': { answers: drivers, path: (w) => `${w.confirmedRun}/confirmation` },
  'post /runs/:id/departure': { answers: drivers, path: (w) => `${w.confirmedRun}/departure` },
  'post /runs/:id/hand-over': { answers: drivers, path: (w) => `${w.confirmedRun}/hand-over` },
  'post /runs/:id/call-off': { answers: drivers, path: (w) => `${w.confirmedRun}/call-off` },
  'post /session': { answers: anyone },
  'delete /session': { answers: anyone },
};

type Verb = keyof Caller;

describe('Who may call what', () => {
  let site: TestSite;
  let world: AccessWorld;
  let callers: Caller[];
  beforeAll(async () => {
    site = await createTestSite({ env: { DEMO: '1' } });
    world = await createAccessWorld(site);
    callers = await Promise.all(people.map((email) => site.as(email)));
  });
  afterAll(() => site.close());

  it('has a row for every route of the site and none besides', () => {
    const routes = allRoutes(site.deps).map(({ method, path }) => `${method} ${path}`);
    expect(Object.keys(table).sort()).toEqual([...routes].sort());
    expect(routes.length).toBeGreaterThan(60);
  });

  it.each(Object.entries(table))('%s', async (key, row) => {
    const [verb, path] = key.split(' ') as [Verb, string];
    const takesBody = allRoutes(site.deps).some((one) => `${one.method} ${one.path}` === key && one.body);
    const expected = row.answers.split(/\s+/);
    const given: string[] = [];
    for (const caller of callers) {
      const call = caller[verb](`/api${row.path ? row.path(world) : path}`);
      if (row.isStream) void call.buffer(false).parse(leaveAtOnce);
      const { status } = await (takesBody ? call.send(row.body ?? {}) : call);
      const isOwnAnswer = verb === 'get' ? status === 200 : status < 500 && ![401, 403, 404].includes(status);
      given.push(isOwnAnswer ? 'ok' : String(status));
    }
    expect(given).toEqual(expected);
  });
});

describe('What a role does not see', () => {
  let site: TestSite;
  let world: AccessWorld;
  beforeAll(async () => {
    site = await createTestSite();
    world = await createAccessWorld(site);
  });
  afterAll(() => site.close());

  const get = async (who: string | null, path: string) =>
    (await (await site.as(who)).get(`/api${path}`).expect(200)).body as unknown;

  it('a breeder lists their own parcels and runs; another breeder none of them', async () => {
    expect(await get('breeder@example.org', '/parcels')).toHaveLength(2);
    expect(await get('other@example.org', '/parcels')).toEqual([]);
    expect(await get('breeder@example.org', '/runs')).toHaveLength(1);
    expect(await get('other@example.org', '/runs')).toEqual([]);
  });

  it('a breeder does not see a run that is only proposed', async () => {
    await site.db('runs').update({ state: 'proposed' });
    expect(await get('breeder@example.org', '/runs')).toEqual([]);
    await (await site.as('breeder@example.org')).get(`/api${world.confirmedRun}`).expect(404);
    await site.db('runs').update({ state: 'confirmed' });
  });

  it('a buyer lists their own arrivals; another buyer none of them', async () => {
    expect(await get('buyer@example.org', '/arrivals')).toHaveLength(2);
    expect(await get('unrelated@example.org', '/arrivals')).toEqual([]);
  });

  it('a lost role holds at once, in the session that is open', async () => {
    const admin = await site.as('admin@example.org');
    await admin.get('/api/desk').expect(200);
    await site.db('person_roles').where({ person_id: site.ids.admin }).update({ role: 'breeder' });
    await admin.get('/api/desk').expect(403);
    await site.db('person_roles').where({ person_id: site.ids.admin }).update({ role: 'admin' });
  });

  it('a shut account is nobody, in the session that is open', async () => {
    const breeder = await site.as('breeder@example.org');
    await site.db('people').where({ id: site.ids.breeder }).update({ active: false });
    await breeder.get('/api/parcels').expect(401);
    await site.db('people').where({ id: site.ids.breeder }).update({ active: true });
  });
});
