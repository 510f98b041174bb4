import type { Box, Counter, PostalCodeInfo, Species } from '@shared/contract';
import { createTestSite, type Caller, type TestSite } from '../support/test-site';

let site: TestSite;
let admin: Caller;
let coordinator: Caller;

beforeAll(async () => {
  site = await createTestSite();
  admin = await site.as('admin@example.org');
  coordinator = await site.as('coordinator@example.org');
});
afterAll(() => site.close());

const paths = (body: unknown) => (body as { errors: { path: string }[] }).errors.map(({ path }) => path);
const get = async <T>(path: string): Promise<T> => (await admin.get(path).expect(200)).body as T;

describe('counters', () => {
  const counterBody = (changes: object = {}) => ({
    carrierId: 1,
    name: 'Boise counter',
    street: '1 Ramp Road',
    city: 'Boise',
    state: 'ID',
    postalCode: '83705',
    lat: 43.56,
    lon: -116.22,
    zone: 'America/Boise',
    canDropOff: false,
    canHold: true,
    workingDays: [1, 2, 3, 4, 5],
    cutOffMinutes: {},
    openingHours: { '1': { openMinute: 480, closeMinute: 1080 } },
    commitMinute: 540,
    active: true,
    ...changes,
  });

  it('are entered by an admin and read by everybody who is signed in', async () => {
    const { body } = await admin.post('/api/counters').send(counterBody()).expect(201);
    expect(body).toMatchObject({ name: 'Boise counter', version: 1 });
    const buyer = await site.as('buyer@example.org');
    expect(
      ((await buyer.get('/api/counters').expect(200)).body as Counter[]).map(({ name }) => name),
    ).toContain('Boise counter');
    await coordinator.post('/api/counters').send(counterBody()).expect(403);
  });

  it.each([
    ['a zone nobody knows', { zone: 'America/Boisee' }, 'zone'],
    ['a ZIP of four digits', { postalCode: '8370' }, 'postalCode'],
    ['a place off the globe', { lat: 123 }, 'lat'],
    ['an eighth weekday', { workingDays: [8] }, 'workingDays.0'],
    [
      'hours that close before they open',
      { openingHours: { '1': { openMinute: 1080, closeMinute: 480 } } },
      'openingHours.1.closeMinute',
    ],
    ['a counter that does nothing', { canHold: false }, 'canHold'],
    ['drop-off without any cut-off', { canDropOff: true }, 'cutOffMinutes'],
    ['a carrier nobody knows', { carrierId: 99 }, 'carrierId'],
  ])('refuse %s at its field', async (_what, changes, path) => {
    const { body } = await admin.post('/api/counters').send(counterBody(changes)).expect(400);
    expect(paths(body)).toContain(path);
  });

  it('stay while a breeder drops off there', async () => {
    const counter = await get<Counter>(`/api/counters/${site.ids.dropOffCounter}`);
    const { body } = await admin
      .patch(`/api/counters/${counter.id}`)
      .set('If-Match', `"${counter.version}"`)
      .send({ active: false })
      .expect(409);
    expect((body as { breeders: string[] }).breeders).toContain('Bea Breeder');
  });

  it('answer 412 to a version that is over', async () => {
    const counter = await get<Counter>(`/api/counters/${site.ids.denverCounter}`);
    const change = (commitMinute: number) =>
      admin
        .patch(`/api/counters/${counter.id}`)
        .set('If-Match', `"${counter.version}"`)
        .send({ commitMinute });
    await change(570).expect(200);
    await change(600).expect(412);
    expect((await get<Counter>(`/api/counters/${counter.id}`)).commitMinute).toBe(570);
  });
});

describe('species', () => {
  it('keep the order endurance low, band low, band high, endurance high, also when one limit alone is changed', async () => {
    const corn = await get<Species>(`/api/species/${site.ids.cornSnake}`);
    const change = (body: object) =>
      admin.patch(`/api/species/${corn.id}`).set('If-Match', `"${corn.version}"`).send(body);
    expect(paths((await change({ bandLowF: 90 }).expect(400)).body)).toContain('bandLowF');
    expect(paths((await change({ enduranceHighF: 80 }).expect(400)).body).length).toBeGreaterThan(0);
    await coordinator.patch(`/api/species/${corn.id}`).send({ note: 'mine' }).expect(403);
  });
});

describe('boxes', () => {
  it('take up their outer size in litres', async () => {
    const small = await get<Box>(`/api/boxes/${site.ids.smallBox}`);
    // 12 × 9 × 6 in = 648 in³; 1 in³ = 0.016387064 L exactly (25.4 mm cubed): 10.6 L.
    expect(small.volumeL).toBeCloseTo(10.62, 1);
  });

  it('are not thinner than nothing nor thicker than themselves', async () => {
    const body = { name: 'Odd', lengthIn: 12, widthIn: 9, heightIn: 6, foamIn: -1, active: true };
    expect(paths((await admin.post('/api/boxes').send(body).expect(400)).body)).toContain('foamIn');
    const solid = await admin
      .post('/api/boxes')
      .send({ ...body, foamIn: 3 })
      .expect(400);
    expect(paths(solid.body)).toEqual(['foamIn']);
  });
});

describe('a ZIP code', () => {
  it.each([
    // USPS and GeoNames: 85001 Phoenix, 96815 Honolulu, 83702 Boise. Great-circle miles checked by hand on a map, roughly.
    ['85001', 'Phoenix', 'AZ', 'America/Phoenix'],
    ['96815', 'Honolulu', 'HI', 'Pacific/Honolulu'],
    ['83702', 'Boise', 'ID', 'America/Boise'],
  ])('%s is in %s, %s, on the clock of %s', async (postalCode, city, state, zone) => {
    expect(await get<PostalCodeInfo>(`/api/postal-codes/${postalCode}`)).toMatchObject({ city, state, zone });
  });

  it('names the counters that hold parcels, the nearest first', async () => {
    const { nearest } = await get<PostalCodeInfo>('/api/postal-codes/85001');
    expect(nearest[0]?.counterId).toBe(site.ids.phoenixCounter);
    const miles = nearest.map((one) => one.miles);
    expect(miles).toEqual(miles.toSorted((a, b) => a - b));
    // Downtown Phoenix to its airport is about 4 miles.
    expect(miles[0]).toBeLessThan(8);
  });

  it.each(['00000', 'abcde', '8500'])('%s is not found', async (postalCode) => {
    await admin.get(`/api/postal-codes/${postalCode}`).expect(404);
  });
});
