import type { FieldError, PolicyAnswer, PolicyVersion } from '@shared/contract';
import { policyAnswer, policyVersion } from '@shared/contract';
import { defaultPolicy, type Policy } from '@shared/policy/policy';
import { createTestSite, type Caller, type TestSite } from '../support/test-site';

describe('The policy of the circle', () => {
  let site: TestSite;
  let admin: Caller;
  let breeder: Caller;
  beforeEach(async () => {
    site = await createTestSite();
    admin = await site.as('admin@example.org');
    breeder = await site.as('breeder@example.org');
  });
  afterEach(() => site.close());

  const read = async (who = admin): Promise<PolicyAnswer> =>
    policyAnswer.parse((await who.get('/api/policy').expect(200)).body);
  const save = (values: unknown, version?: number) => {
    const call = admin.put('/api/policy');
    if (version !== undefined) call.set('If-Match', `"${version}"`);
    return call.send(values as object);
  };
  const stricter: Policy = { ...defaultPolicy, chance: { ...defaultPolicy.chance, open: 0.97 } };
  const complaints = async (values: unknown) =>
    ((await save(values).expect(400)).body as { errors: FieldError[] }).errors.map(({ path }) => path).sort();

  it('starts as what the program came with, nobody having changed it', async () => {
    expect(await read(breeder)).toEqual({
      version: 0,
      since: null,
      by: null,
      values: defaultPolicy,
      defaults: defaultPolicy,
      versions: [{ version: 0, since: null, by: null, changed: [] }],
    });
  });

  it('keeps each change as a version with its person and moment, the newest in force', async () => {
    await save(stricter, 0).expect(200).expect('ETag', '"1"');
    site.setNow('2026-12-02T12:00:00.000Z');
    await save({ ...stricter, fastDays: 5 }, 1)
      .expect(200)
      .expect('ETag', '"2"');
    const now = await read(breeder);
    expect(now).toMatchObject({ version: 2, since: '2026-12-02T12:00:00.000Z', by: expect.any(String) });
    expect(now.values).toMatchObject({ fastDays: 5, chance: { open: 0.97 } });
    expect(now.defaults.fastDays).toBe(3);
    expect(now.versions.map(({ version, changed }) => [version, changed])).toEqual([
      [2, ['fastDays']],
      [1, ['chance.open']],
      [0, []],
    ]);
  });

  it('answers an earlier version as it was', async () => {
    await save(stricter).expect(200);
    await save(defaultPolicy).expect(200);
    const first = policyVersion.parse((await breeder.get('/api/policy/versions/1').expect(200)).body);
    expect(first.values.chance.open).toBe(0.97);
    await breeder.get('/api/policy/versions/3').expect(404);
  });

  it('restores the defaults as one more version and forgets none', async () => {
    await save(stricter).expect(200);
    await save(defaultPolicy, 1).expect(200);
    const now = await read();
    expect(now).toMatchObject({ version: 2, values: defaultPolicy });
    expect(now.versions).toHaveLength(3);
  });

  it('makes no version when nothing changed', async () => {
    await save(stricter).expect(200);
    await save(stricter, 1).expect(200);
    expect((await read()).version).toBe(1);
    expect(await site.db('policies')).toHaveLength(1);
  });

  it('refuses a change made on a version that is no longer in force, and shows the present one', async () => {
    await save(stricter, 0).expect(200);
    const answer = await save({ ...defaultPolicy, fastDays: 7 }, 0).expect(412);
    expect((answer.body as { current: PolicyVersion }).current.version).toBe(1);
    expect((await read()).values.fastDays).toBe(3);
  });

  it('is changed by an admin alone', async () => {
    for (const who of ['breeder@example.org', 'coordinator@example.org', 'buyer@example.org'])
      await (await site.as(who)).put('/api/policy').send(stricter).expect(403);
    expect((await read()).version).toBe(0);
  });

  it('enters each change into the history, with what was before and after', async () => {
    await save(stricter).expect(200);
    const [entry] = await site.db('history').where({ subject_kind: 'policy', subject_id: 1 });
    expect(entry).toMatchObject({ actor_id: site.ids.admin, text: 'Policy changed: Open from.' });
    const part = (text: string) => (JSON.parse(text) as Policy).chance.open;
    expect([part(entry.before as string), part(entry.after as string)]).toEqual([0.95, 0.97]);
  });

  it('is sent whole: a missing value and one that nobody knows are both refused', async () => {
    const { fastDays, ...rest } = defaultPolicy;
    expect(fastDays).toBe(3);
    expect(await complaints(rest)).toEqual(['fastDays']);
    const { open, ...chance } = defaultPolicy.chance;
    expect(open).toBe(0.95);
    expect(await complaints({ ...defaultPolicy, chance })).toEqual(['chance.open']);
    expect(await complaints({ ...defaultPolicy, pooling: { ...defaultPolicy.pooling, bonus: 1 } })).toEqual([
      'pooling.bonus',
    ]);
  });

  const { journey, guardRails, chance } = defaultPolicy;
  it.each<[string, Partial<Policy>, string]>([
    [
      'a lowest limit above the highest',
      { guardRails: { ...guardRails, hold: { lowF: 90, highF: 38 } } },
      'guardRails.hold.highF',
    ],
    ['a hub limit without any room', { hubRail: { lowF: 50, highF: 50 } }, 'hubRail.highF'],
    ['open as easy as tight', { chance: { ...chance, open: 0.8 } }, 'chance.open'],
    ['open easier than tight when late', { chance: { ...chance, lateOpen: 0.4 } }, 'chance.lateOpen'],
    ['a chance over one', { chance: { ...chance, open: 1.01 } }, 'chance.open'],
    [
      'more than all of the outdoor air',
      { journey: { ...journey, hub: { exposure: 1.5, indoorF: 65 } } },
      'journey.hub.exposure',
    ],
    ['a later day surer than an earlier', { sigmaF: [3, 3.8, 4.2, 4, 5.3, 6, 6.8, 7.6] }, 'sigmaF.3'],
    ['a forecast error of nothing', { sigmaF: [0, 3.8, 4.2, 4.7, 5.3, 6, 6.8, 7.6] }, 'sigmaF.0'],
    [
      'a station reached before the hub is left',
      { journey: { ...journey, linehaulInUntilMinute: 200 } },
      'journey.linehaulInUntilMinute',
    ],
    [
      'a truck that is done before it leaves',
      { journey: { ...journey, truckUntilMinute: 380 } },
      'journey.truckUntilMinute',
    ],
    ['a zone that does not exist', { circleZone: 'Mars/Olympus' }, 'circleZone'],
    ['half a slack day', { minSlackDays: 0.5 }, 'minSlackDays'],
  ])('refuses %s, at that value', async (_what, change, path) => {
    expect(await complaints({ ...defaultPolicy, ...change })).toEqual([path]);
    expect((await read()).version).toBe(0);
  });

  it('reads a version that was stored before a value existed, deep inside a group too', async () => {
    const old = { fastDays: 4, journey: { late: { hours: 36 } } };
    await site.db('policies').insert({ values: JSON.stringify(old), created_at: '2026-11-01T00:00:00.000Z' });
    const { values, by } = await read();
    expect(by).toBeNull();
    expect(values.fastDays).toBe(4);
    expect(values.journey.late).toEqual({ ...defaultPolicy.journey.late, hours: 36 });
    expect(values.boxModel).toEqual(defaultPolicy.boxModel);
  });
});
