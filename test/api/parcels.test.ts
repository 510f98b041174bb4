import type { Knex } from 'knex';
import type { Parcel } from '@shared/contract';
import type { Caller } from '../support/test-site';
import { createWeatherSite, parcelBody, type WeatherSite } from '../support/weather-site';

/** Wednesday morning in Texas: the forecast reaches past a late arrival of next Monday's parcels. */
let site: WeatherSite;
let breeder: Caller;
let other: Caller;
let coordinator: Caller;
let admin: Caller;

beforeAll(async () => {
  site = await createWeatherSite('2026-12-02T12:00:00.000Z');
  breeder = await site.as('breeder@example.org');
  other = await site.as('other@example.org');
  coordinator = await site.as('coordinator@example.org');
  admin = await site.as('admin@example.org');
});
afterAll(() => site.close());

const enter = async (changes: Record<string, unknown> = {}, who = breeder): Promise<Parcel> =>
  (await who.post('/api/parcels').send(parcelBody(site, changes)).expect(201)).body as Parcel;
const book = (parcel: Parcel, body: object, who = breeder) =>
  who.put(`/api/parcels/${parcel.id}/booking`).set('If-Match', `"${parcel.version}"`).send(body);
const mailsTo = async (email: string) =>
  (await site.db('outbox').where({ to_email: email }).orderBy('id')).map(
    (row: { subject: string }) => row.subject,
  );

describe('entering a parcel', () => {
  it('makes a draft of the breeder, dropped off at their own counter, with a code and a secret link for the buyer', async () => {
    const parcel = await enter();
    expect(parcel).toMatchObject({
      state: 'draft',
      breeder: { id: site.ids.breeder },
      buyer: { id: site.ids.buyer, name: 'Bo Buyer' },
      dropOff: { counterId: site.ids.dropOffCounter },
      destination: { counterId: site.ids.phoenixCounter, zone: 'America/Phoenix' },
      totalMassG: 160,
      shipDate: null,
      version: 1,
    });
    expect(parcel.code).toMatch(/^HC-\d{4}$/);
    // 32 random bytes in base64url: nobody guesses another buyer's link.
    expect(parcel.arrivalUrl).toMatch(/\/arrival\/[\w-]{43}$/);
  });

  it('sends the buyer the link, and makes an account without a password for a new buyer', async () => {
    const parcel = await enter({
      buyer: { name: 'New Person', email: 'New.Person@Example.org', phone: null },
    });
    expect(parcel.buyer.email).toBe('new.person@example.org');
    const [mail] = (await site.db('outbox').where({ to_email: 'new.person@example.org' })) as {
      text: string;
    }[];
    expect(mail?.text).toContain(parcel.arrivalUrl);
    const person = await site.deps.services.people.get(parcel.buyer.id);
    expect(person).toMatchObject({ roles: ['buyer'], hasPassword: false, zone: 'America/Phoenix' });
  });

  it('takes the position of a door from its ZIP', async () => {
    const door = { street: '4 Test Court', city: 'Denver', state: 'CO', postalCode: '80202' };
    const parcel = await enter({ service: 'door', holdCounterId: null, door });
    expect(parcel.destination).toMatchObject({
      counterId: null,
      postalCode: '80202',
      zone: 'America/Denver',
    });
  });

  it.each([
    ['nothing in it', { contents: [] }, 'contents'],
    ['no animal of a kind', { contents: [{ speciesId: 1, quantity: 0, massG: 100 }] }, 'contents.0.quantity'],
    ['half an animal', { contents: [{ speciesId: 1, quantity: 1.5, massG: 100 }] }, 'contents.0.quantity'],
    ['a negative mass', { contents: [{ speciesId: 1, quantity: 1, massG: -5 }] }, 'contents.0.massG'],
    [
      'a species that is not on the list',
      { contents: [{ speciesId: 999, quantity: 1, massG: 5 }] },
      'contents.0.speciesId',
    ],
    ['a box that is not on the list', { boxId: 999 }, 'boxId'],
    ['a counter that is not on the list', { holdCounterId: 999 }, 'holdCounterId'],
    ['hold service without a counter', { holdCounterId: null }, 'holdCounterId'],
    ['door service without an address', { service: 'door', holdCounterId: null }, 'door'],
    [
      'a door whose ZIP is in another state',
      {
        service: 'door',
        holdCounterId: null,
        door: { street: '1 A', city: 'B', state: 'TX', postalCode: '80202' },
      },
      'door.state',
    ],
    [
      'a ZIP that does not exist',
      {
        service: 'door',
        holdCounterId: null,
        door: { street: '1 A', city: 'B', state: 'CO', postalCode: '00000' },
      },
      'door.postalCode',
    ],
    ['a latest day before the first', { readyFrom: '2026-12-10', latestDate: '2026-12-09' }, 'latestDate'],
    ['days that are over', { readyFrom: '2026-11-01', latestDate: '2026-11-20' }, 'latestDate'],
    ['31 February', { readyFrom: '2027-02-31' }, 'readyFrom'],
    ['an address that is none', { buyer: { name: 'X', email: 'nobody' } }, 'buyer.email'],
    [
      'a name that forges a mail header',
      { buyer: { name: 'X\r\nBcc: all@example.org', email: 'x@example.org' } },
      'buyer.name',
    ],
    ['somebody else as the breeder', { breederId: 99999 }, 'breederId'],
  ])('refuses %s at its field', async (_what, changes, path) => {
    const { body } = await breeder.post('/api/parcels').send(parcelBody(site, changes)).expect(400);
    expect((body as { errors: { path: string }[] }).errors.map((error) => error.path)).toContain(path);
  });

  it('refuses two species whose bands do not meet, and names them', async () => {
    await site.db('species').insert({
      common_name: 'desert test lizard',
      scientific_name: 'Testus calidus',
      band_low_f: 90,
      band_high_f: 96,
      endurance_low_f: 85,
      endurance_high_f: 100,
      typical_mass_g: 50,
    });
    const hot = (await site.db('species').where({ common_name: 'desert test lizard' }).first()) as {
      id: number;
    };
    const contents = [site.ids.cornSnake, hot.id].map((speciesId) => ({ speciesId, quantity: 1, massG: 50 }));
    const { body } = await breeder.post('/api/parcels').send(parcelBody(site, { contents })).expect(400);
    expect(JSON.stringify(body)).toMatch(/Desert test lizard and corn snake do not go into one box/);
  });

  it('lets a coordinator enter one for a named breeder, and only a breeder', async () => {
    const parcel = await enter({ breederId: site.ids.otherBreeder }, coordinator);
    expect(parcel.breeder.id).toBe(site.ids.otherBreeder);
    await coordinator
      .post('/api/parcels')
      .send(parcelBody(site, { breederId: site.ids.buyer }))
      .expect(400);
    await coordinator.post('/api/parcels').send(parcelBody(site)).expect(400);
  });
});

describe('who sees a parcel', () => {
  it('is its breeder, the coordinators and the admins; to another breeder it does not exist', async () => {
    const parcel = await enter();
    for (const who of [breeder, coordinator, admin]) await who.get(`/api/parcels/${parcel.id}`).expect(200);
    for (const path of ['', '/days', '/history'])
      await other.get(`/api/parcels/${parcel.id}${path}`).expect(404);
    await other.patch(`/api/parcels/${parcel.id}`).send({ note: 'mine' }).expect(404);
    await book(parcel, { date: '2026-12-07' }, other).expect(404);
    expect(((await other.get('/api/parcels')).body as Parcel[]).map(({ id }) => id)).not.toContain(parcel.id);
  });

  it('is found by code, buyer and species, and narrowed by state', async () => {
    const parcel = await enter({ buyer: { name: 'Zora Findable', email: 'zora@example.org' } });
    const ids = async (query: string) =>
      ((await breeder.get(`/api/parcels?${query}`).expect(200)).body as Parcel[]).map(({ id }) => id);
    expect(await ids('q=findable')).toEqual([parcel.id]);
    expect(await ids(`q=${parcel.code}`)).toEqual([parcel.id]);
    expect(await ids('q=findable&state=draft,booked')).toEqual([parcel.id]);
    expect(await ids('q=findable&state=booked')).toEqual([]);
    await breeder.get('/api/parcels?state=lost').expect(400);
  });
});

describe('booking a day', () => {
  it('books an open day, keeps the verdict it rests on and tells the buyer', async () => {
    const parcel = await enter({ buyer: { name: 'Day Buyer', email: 'day@example.org' } });
    // Monday to Tuesday, with Wednesday and Thursday behind: room to spare.
    const booked = (await book(parcel, { date: '2026-12-07' }).expect(200)).body as Parcel;
    expect(booked).toMatchObject({
      state: 'booked',
      shipDate: '2026-12-07',
      arrivalDate: '2026-12-08',
      acceptedTight: null,
    });
    expect(booked.bookedVerdict).toMatchObject({ date: '2026-12-07', verdict: 'open', slackDays: 2 });
    expect(booked.version).toBeGreaterThan(parcel.version);
    expect(await mailsTo('day@example.org')).toHaveLength(2);
  });

  it('asks for acceptance in words on a tight day: a Thursday leaves no working day behind its Friday', async () => {
    const parcel = await enter();
    const refused = (await book(parcel, { date: '2026-12-03' }).expect(400)).body as {
      errors: { path: string }[];
      current: object;
    };
    expect(refused.errors.map(({ path }) => path)).toEqual(['acceptTight']);
    expect(refused.current).toMatchObject({ verdict: 'tight', slackDays: 0 });
    await book(parcel, { date: '2026-12-03', acceptTight: 'ok' }).expect(400);
    const words = 'The buyer is at the counter at nine on Friday.';
    const booked = (await book(parcel, { date: '2026-12-03', acceptTight: words }).expect(200))
      .body as Parcel;
    expect(booked).toMatchObject({ state: 'booked', shipDate: '2026-12-03', acceptedTight: words });
  });

  it.each([
    ['a Friday, which would rest over the weekend', '2026-12-04'],
    ['a Sunday', '2026-12-06'],
    ['yesterday', '2026-11-30'],
    ['a day after the latest', '2026-12-21'],
  ])('refuses %s with the present verdict', async (_what, date) => {
    const parcel = await enter();
    const { body } = await book(parcel, { date, acceptTight: 'I would like it all the same.' }).expect(409);
    expect((body as { current: object }).current).toMatchObject({ date, verdict: 'shut' });
    expect(((await breeder.get(`/api/parcels/${parcel.id}`)).body as Parcel).state).toBe('draft');
  });

  it('refuses a day that closed since the page was opened, with the reason in numbers', async () => {
    const parcel = await enter({ holdCounterId: site.ids.denverCounter });
    const seen = (await breeder.get(`/api/parcels/${parcel.id}/days`)).body as {
      days: { date: string; verdict: string }[];
    };
    expect(seen.days.find(({ date }) => date === '2026-12-07')?.verdict).toBe('open');
    site.weather.script({
      coldSnap: {
        lat: 39.85,
        lon: -104.67,
        radiusMiles: 60,
        fromIso: '2026-12-06T00:00:00Z',
        toIso: '2026-12-10T00:00:00Z',
        deltaF: -27,
      },
    });
    site.setNow('2026-12-02T14:00:00.000Z');
    const { body } = await book(parcel, { date: '2026-12-07' }).expect(409);
    const { current, detail } = body as {
      current: { reasons: { verdict: string; text: string }[] };
      detail: string;
    };
    // 47 °F less 27 is 20 °F, 18 °F under the guard rail of 38 °F.
    expect(detail).toMatch(/Denver falls to 20 °F.*18 °F under the limit of 38 °F/);
    expect(current.reasons.some(({ verdict }) => verdict === 'shut')).toBe(true);
  });

  it('takes a stale version for what it is', async () => {
    const parcel = await enter();
    await breeder
      .patch(`/api/parcels/${parcel.id}`)
      .set('If-Match', `"${parcel.version}"`)
      .send({ note: 'changed meanwhile' })
      .expect(200);
    const { body } = await book(parcel, { date: '2026-12-07' }).expect(412);
    expect(body).toMatchObject({ code: 'stale' });
  });

  it('leaves the day open inside the parcel’s own days, and outside of them says which end is wrong', async () => {
    const parcel = await enter({ readyFrom: '2026-12-07', latestDate: '2026-12-11' });
    const { body } = await book(parcel, { flexible: { from: '2026-12-01', to: '2026-12-30' } }).expect(400);
    expect((body as { errors: { path: string }[] }).errors.map(({ path }) => path)).toEqual([
      'flexible.from',
      'flexible.to',
    ]);
    const open = (await book(parcel, { flexible: { from: '2026-12-07', to: '2026-12-09' } }).expect(200))
      .body as Parcel;
    expect(open).toMatchObject({
      state: 'seeking',
      shipDate: null,
      flexible: { from: '2026-12-07', to: '2026-12-09' },
    });
  });

  it('takes it off its day again: back to a draft, and the buyer hears that the day does not stand', async () => {
    const parcel = await enter({ buyer: { name: 'Off Buyer', email: 'off@example.org' } });
    const booked = (await book(parcel, { date: '2026-12-07' }).expect(200)).body as Parcel;
    const draft = (
      await breeder
        .delete(`/api/parcels/${parcel.id}/booking`)
        .set('If-Match', `"${booked.version}"`)
        .expect(200)
    ).body as Parcel;
    expect(draft).toMatchObject({ state: 'draft', shipDate: null, bookedVerdict: null });
    expect(await mailsTo('off@example.org')).toHaveLength(3);
  });

  it('is not for an admin, who neither breeds nor drives', async () => {
    const parcel = await enter();
    await book(parcel, { date: '2026-12-07' }, admin).expect(403);
  });
});

describe('the life of a parcel', () => {
  it('goes from booked to packed and back; a packed one keeps its day until it is unpacked', async () => {
    const parcel = await enter();
    await book(parcel, { date: '2026-12-07' }).expect(200);
    const patch = (body: object) => breeder.patch(`/api/parcels/${parcel.id}`).send(body);
    expect(((await patch({ state: 'packed' }).expect(200)).body as Parcel).state).toBe('packed');
    const { version } = (await breeder.get(`/api/parcels/${parcel.id}`)).body as Parcel;
    await book({ ...parcel, version }, { date: '2026-12-09' }).expect(409);
    expect(((await patch({ state: 'booked' }).expect(200)).body as Parcel).state).toBe('booked');
  });

  it.each(['packed', 'booked', 'closed'])('refuses to make a draft %s', async (state) => {
    const parcel = await enter();
    await breeder.patch(`/api/parcels/${parcel.id}`).send({ state }).expect(409);
  });

  it('is cancelled once and for all', async () => {
    const parcel = await enter();
    expect(
      (
        (await breeder.patch(`/api/parcels/${parcel.id}`).send({ state: 'cancelled' }).expect(200))
          .body as Parcel
      ).state,
    ).toBe('cancelled');
    await book(parcel, { date: '2026-12-07' }).expect(412);
    await breeder.put(`/api/parcels/${parcel.id}/booking`).send({ date: '2026-12-07' }).expect(409);
  });

  it('does not let a booked parcel become one whose day would be shut', async () => {
    const parcel = await enter();
    const booked = (await book(parcel, { date: '2026-12-07' }).expect(200)).body as Parcel;
    await breeder
      .patch(`/api/parcels/${parcel.id}`)
      .set('If-Match', `"${booked.version}"`)
      .send({ latestDate: '2026-12-04' })
      .expect(409);
    expect(((await breeder.get(`/api/parcels/${parcel.id}`)).body as Parcel).latestDate).toBe('2026-12-18');
  });

  it('gives a new buyer a new link, so that the old buyer’s shows nothing any more', async () => {
    const parcel = await enter();
    const changed = (
      await breeder
        .patch(`/api/parcels/${parcel.id}`)
        .send({ buyer: { name: 'Second', email: 'second@example.org' } })
        .expect(200)
    ).body as Parcel;
    expect(changed.arrivalUrl).not.toBe(parcel.arrivalUrl);
    const token = parcel.arrivalUrl.slice(parcel.arrivalUrl.lastIndexOf('/') + 1);
    await (await site.as(null)).get(`/api/arrivals/${token}`).expect(404);
  });

  it('writes down who did what, newest first, and nobody can change it', async () => {
    const parcel = await enter();
    await book(parcel, { date: '2026-12-07' }).expect(200);
    const { body } = await coordinator.get(`/api/parcels/${parcel.id}/history`).expect(200);
    const texts = (body as { text: string; who: string }[]).map(({ who, text }) => `${who}: ${text}`);
    expect(texts[0]).toBe('Bea Breeder: Booked for Monday, December 7.');
    expect(texts.at(-1)).toBe(
      `Bea Breeder: Entered ${parcel.code}: 1 corn snake for Bo Buyer in Phoenix, AZ.`,
    );
    // The driver's errors are of another realm than the test's, so their words are compared.
    const tamper = (change: (history: Knex.QueryBuilder) => PromiseLike<unknown>) =>
      change(site.db('history')).then(
        () => 'it was changed',
        (error: unknown) => String(error),
      );
    expect(await tamper((history) => history.update({ text: 'nothing' }))).toContain('append-only');
    expect(await tamper((history) => history.delete())).toContain('append-only');
  });
});
