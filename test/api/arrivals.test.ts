import type { Arrival, Parcel } from '@shared/contract';
import type { Caller } from '../support/test-site';
import { createWeatherSite, parcelBody, type WeatherSite } from '../support/weather-site';

/** Wednesday morning in Texas: the forecast reaches past a late arrival of next Monday's parcels. */
let site: WeatherSite;
let breeder: Caller;
let guest: Caller;

beforeAll(async () => {
  site = await createWeatherSite('2026-12-02T12:00:00.000Z');
  breeder = await site.as('breeder@example.org');
  guest = await site.as(null);
});
afterAll(() => site.close());

const tokenOf = (parcel: Parcel) => parcel.arrivalUrl.slice(parcel.arrivalUrl.lastIndexOf('/') + 1);
const enter = async (changes: Record<string, unknown> = {}): Promise<Parcel> =>
  (await breeder.post('/api/parcels').send(parcelBody(site, changes)).expect(201)).body as Parcel;
/** A parcel for Phoenix that ships on Monday, December 7. */
const booked = async (): Promise<Parcel> => {
  const parcel = await enter();
  return (await breeder.put(`/api/parcels/${parcel.id}/booking`).send({ date: '2026-12-07' }).expect(200))
    .body as Parcel;
};
const see = async (parcel: Parcel): Promise<Arrival> =>
  (await guest.get(`/api/arrivals/${tokenOf(parcel)}`).expect(200)).body as Arrival;
const handedOver = async (): Promise<Parcel> => {
  const parcel = await booked();
  const { parcels } = site.deps.services;
  await parcels.move(parcel.id, 'aboard', null, 'Aboard.');
  await parcels.move(parcel.id, 'handed-over', null, 'Handed over.', { trackingNumber: 'LK1' });
  return parcel;
};

describe('the buyer’s link', () => {
  it('opens without signing in and shows when and where, on the clock of the place', async () => {
    const arrival = await see(await booked());
    expect(arrival).toMatchObject({
      status: 'planned',
      arrivalDate: '2026-12-08',
      what: '1 corn snake',
      breederName: 'Third Draw Serpents',
      place: { name: 'Phoenix counter', zone: 'America/Phoenix', hours: 'Open 8:00 am to 6:00 pm' },
    });
    // Ready at 9:00 in Phoenix, which is UTC−7 all year (no daylight saving time since 1968): 16:00 UTC; two hours to collect.
    expect(arrival.collectFrom).toBe('2026-12-08T16:00:00.000Z');
    expect(arrival.collectBy).toBe('2026-12-08T18:00:00.000Z');
    expect(arrival.bring.join(' ')).toContain('photo ID in the name of Bo Buyer');
  });

  it('speaks of what is still to come as to come, and of what is done as done', async () => {
    const texts = async (parcel: Parcel) => (await see(parcel)).steps.map(({ text }) => text);
    expect(await texts(await enter())).toEqual([
      'The breeder chooses a safe day.',
      "The ride to the carrier's counter is being arranged.",
      'Hand-over to the overnight carrier.',
      'At the counter.',
      'You collect it.',
    ]);
    expect((await texts(await handedOver())).slice(0, 3)).toEqual([
      'The breeder chose a safe day.',
      "The ride to the carrier's counter is arranged.",
      'Handed over to the overnight carrier.',
    ]);
  });

  it('shows a parcel without a day as open, and tells nothing of the breeder’s other business', async () => {
    const parcel = await enter({ note: 'the buyer haggled' });
    const arrival = await see(parcel);
    expect(arrival).toMatchObject({ status: 'open', arrivalDate: null, collectFrom: null });
    expect(JSON.stringify(arrival)).not.toMatch(/haggled|buyer@example\.org|breeder@example\.org/);
  });

  it.each(['0123456789abcdef0123', 'x'.repeat(43)])('answers 404 to a guessed one (%s)', async (token) => {
    await guest.get(`/api/arrivals/${token}`).expect(404);
    await guest.put(`/api/arrivals/${token}/mornings`).send({ mornings: [] }).expect(404);
    await guest.post(`/api/arrivals/${token}/report`).send({ outcome: 'doa' }).expect(404);
  });

  it('keeps the form token: another site cannot speak for the buyer', async () => {
    const path = `/api/arrivals/${tokenOf(await booked())}/mornings`;
    await guest.put(path).set('X-XSRF-TOKEN', '').send({ mornings: [] }).expect(403);
  });
});

describe('the mornings', () => {
  it('are those on which it could arrive; Saturdays, Sundays and Mondays never are, for counters that rest on weekends', async () => {
    const { mornings } = await see(await enter());
    const weekdays = mornings.map(({ date }) => new Date(`${date}T12:00:00Z`).getUTCDay());
    expect(mornings.length).toBeGreaterThan(4);
    // A parcel that arrives on Monday would have been dropped off on Sunday.
    for (const day of weekdays) expect([2, 3, 4, 5]).toContain(day);
  });

  it('count at once: a morning that does not suit shuts the ship day before it, and the breeder hears of it', async () => {
    const parcel = await enter();
    await guest
      .put(`/api/arrivals/${tokenOf(parcel)}/mornings`)
      .send({ mornings: [{ date: '2026-12-08', suits: false }] })
      .expect(200);
    const { body } = await breeder.get(`/api/parcels/${parcel.id}/days`).expect(200);
    const day = (
      body as { days: { date: string; verdict: string; reasons: { text: string; verdict: string }[] }[] }
    ).days.find(({ date }) => date === '2026-12-07');
    expect(day?.verdict).toBe('shut');
    expect(day?.reasons.find(({ verdict }) => verdict === 'shut')?.text).toMatch(/December 8|Tuesday/);
    expect(
      await site.db('outbox').where({ to_email: 'breeder@example.org' }).whereLike('subject', '%morning%'),
    ).toHaveLength(1);
    // The buyer may take the word back, so the morning stays on the list.
    expect((await see(parcel)).mornings.find(({ date }) => date === '2026-12-08')).toMatchObject({
      suits: false,
      offered: true,
    });
  });

  it.each([
    ['one that is over', [{ date: '2026-11-30', suits: true }]],
    ['one months ahead', [{ date: '2027-06-01', suits: true }]],
    [
      'one named twice',
      [
        { date: '2026-12-08', suits: true },
        { date: '2026-12-08', suits: false },
      ],
    ],
    ['a date that does not exist', [{ date: '2026-02-30', suits: true }]],
  ])('refuse %s at its field', async (_what, mornings) => {
    const { body } = await guest
      .put(`/api/arrivals/${tokenOf(await enter())}/mornings`)
      .send({ mornings })
      .expect(400);
    expect((body as { errors: { path: string }[] }).errors[0]?.path).toMatch(/^mornings\.\d\.date$/);
  });

  it('cannot change once it is on its way', async () => {
    const parcel = await handedOver();
    await guest
      .put(`/api/arrivals/${tokenOf(parcel)}/mornings`)
      .send({ mornings: [{ date: '2026-12-09', suits: true }] })
      .expect(409);
  });
});

describe('the report', () => {
  const report = (parcel: Parcel, body: object) =>
    guest.post(`/api/arrivals/${tokenOf(parcel)}/report`).send(body);

  it('waits until the parcel was handed over', async () => {
    await report(await booked(), { outcome: 'arrived-well' }).expect(409);
  });

  it('moves the parcel to arrived, keeps the words and tells the breeder', async () => {
    const parcel = await handedOver();
    const { body } = await report(parcel, { outcome: 'arrived-weak', text: 'Slow at first.' }).expect(200);
    expect(body).toMatchObject({
      status: 'arrived',
      report: { outcome: 'arrived-weak', text: 'Slow at first.' },
    });
    expect(((await breeder.get(`/api/parcels/${parcel.id}`)).body as Parcel).state).toBe('arrived');
    expect(
      await site
        .db('outbox')
        .where({ to_email: 'breeder@example.org' })
        .whereLike('text', '%Slow at first.%'),
    ).toHaveLength(1);
  });

  it('stands: a second one does not change it, but a late parcel may still arrive', async () => {
    const parcel = await handedOver();
    await report(parcel, { outcome: 'not-arrived' }).expect(200);
    expect(((await breeder.get(`/api/parcels/${parcel.id}`)).body as Parcel).state).toBe('handed-over');
    await report(parcel, { outcome: 'arrived-well' }).expect(200);
    await report(parcel, { outcome: 'doa' }).expect(409);
    expect((await see(parcel)).report?.outcome).toBe('arrived-well');
  });

  it('knows its four outcomes only', async () => {
    const { body } = await report(await handedOver(), { outcome: 'fine' }).expect(400);
    expect((body as { errors: { path: string }[] }).errors.map(({ path }) => path)).toEqual(['outcome']);
  });
});

describe('a signed-in buyer', () => {
  it('sees their own arrivals and nobody else’s', async () => {
    const parcel = await booked();
    const tokens = async (email: string) =>
      ((await (await site.as(email)).get('/api/arrivals').expect(200)).body as { token: string }[]).map(
        ({ token }) => token,
      );
    expect(await tokens('buyer@example.org')).toContain(tokenOf(parcel));
    expect(await tokens('unrelated@example.org')).toEqual([]);
    await breeder.get('/api/arrivals').expect(403);
  });
});
