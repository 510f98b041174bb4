import type { Server } from 'node:http';
import type { AddressInfo } from 'node:net';
import type { Parcel } from '@shared/contract';
import { closeLive, liveHub } from '@api/live/live-hub';
import { cookieOf, openStream, type LiveEvent, type LiveStream } from '../support/live-stream';
import type { Caller } from '../support/test-site';
import { createWeatherSite, parcelBody, type WeatherSite } from '../support/weather-site';

let site: WeatherSite;
let server: Server;
let port: number;
let breeder: Caller;
const streams: LiveStream[] = [];

beforeEach(async () => {
  site = await createWeatherSite('2026-12-02T12:00:00.000Z');
  server = site.app.listen(0, '127.0.0.1');
  await new Promise((done) => server.once('listening', done));
  port = (server.address() as AddressInfo).port;
  breeder = await site.as('breeder@example.org');
});
afterEach(async () => {
  for (const stream of streams.splice(0)) stream.close();
  closeLive(site.deps.config);
  await new Promise((done) => {
    server.close(done);
    server.closeAllConnections();
  });
  await site.close();
});

async function listen(email: string | null, path = '/live', lastEventId?: number): Promise<LiveStream> {
  const cookie = email === null ? {} : { cookie: await cookieOf(port, email) };
  const last = lastEventId === undefined ? {} : { lastEventId };
  const stream = await openStream(port, path, { ...cookie, ...last });
  streams.push(stream);
  return stream;
}
const enter = async (changes = {}): Promise<Parcel> =>
  (await breeder.post('/api/parcels').send(parcelBody(site, changes)).expect(201)).body as Parcel;
const book = (parcel: Parcel) =>
  breeder.put(`/api/parcels/${parcel.id}/booking`).send({ date: '2026-12-07' }).expect(200);
const is = (kind: string, id: number) => (event: LiveEvent) =>
  JSON.stringify(event.data) === JSON.stringify({ kind, id });
/** A blackout concerns everybody who sees verdicts: once it is heard, whatever came before would have been heard too. */
async function mark(): Promise<number> {
  const admin = await site.as('admin@example.org');
  const body = { title: 'Mark', kind: 'date', startDate: '2026-12-29', scope: 'everywhere' };
  return ((await admin.post('/api/blackouts').send(body).expect(201)).body as { id: number }).id;
}

describe('a live page', () => {
  it('is a stream that no proxy keeps, for those who are signed in', async () => {
    const stream = await listen('breeder@example.org');
    expect(stream.status).toBe(200);
    expect(stream.headers['content-type']).toBe('text/event-stream; charset=utf-8');
    expect(stream.headers['cache-control']).toBe('no-store, no-transform');
    expect((await listen(null)).status).toBe(401);
    expect((await listen(null, `/arrivals/${'x'.repeat(43)}/live`)).status).toBe(404);
  });

  it('hears of a parcel within a second: its breeder, its buyer and the drivers, and nobody else', async () => {
    const parcel = await enter();
    const token = parcel.arrivalUrl.slice(parcel.arrivalUrl.lastIndexOf('/') + 1);
    const hears = [
      await listen('breeder@example.org'),
      await listen('buyer@example.org'),
      await listen('coordinator@example.org'),
      await listen('admin@example.org'),
      await listen(null, `/arrivals/${token}/live`),
    ];
    const other = await listen('other@example.org');
    const started = Date.now();
    await book(parcel);
    await Promise.all(hears.map((stream) => stream.until(is('parcel', parcel.id), 1000)));
    expect(Date.now() - started).toBeLessThan(1500);
    await other.until(is('blackout', await mark()));
    expect(other.events.filter(is('parcel', parcel.id))).toEqual([]);
  });

  it('shows a buyer nothing of blackouts, people or other parcels', async () => {
    const buyer = await listen('buyer@example.org');
    const watcher = await listen('breeder@example.org');
    const parcel = await enter({ buyer: { name: 'Else', email: 'else@example.org', phone: null } });
    await watcher.until(is('parcel', parcel.id));
    await watcher.until(is('blackout', await mark()));
    expect(buyer.events).toEqual([]);
  });

  it('tells nothing of what was rolled back', async () => {
    const stream = await listen('admin@example.org');
    const { history } = site.deps.services;
    const entry = { actorId: null, actorName: 'Test', subjectKind: 'run', action: 'x', text: 'x' } as const;
    await expect(
      site.deps.transaction(async (tx) => {
        await tx.services.history.add({ ...entry, subjectId: 77 });
        throw new Error('rolled back');
      }),
    ).rejects.toThrow('rolled back');
    await history.add({ ...entry, subjectId: 78 });
    await stream.until(is('run', 78));
    expect(stream.events.filter(is('run', 77))).toEqual([]);
  });

  it('tells what another process wrote, too', async () => {
    const stream = await listen('admin@example.org');
    await site.db('history').insert({
      at: '2026-12-02T12:00:00.000Z',
      actor_name: 'Another process',
      subject_kind: 'parcel',
      subject_id: 4242,
      action: 'held',
      text: 'Held.',
    });
    await stream.until(is('parcel', 4242));
  });

  it('catches up with what it missed when it comes back', async () => {
    const first = await listen('breeder@example.org');
    const parcel = await enter();
    const { id } = await first.until(is('parcel', parcel.id));
    first.close();
    await book(parcel);
    const again = await listen('breeder@example.org', '/live', Number(id));
    await again.until(is('parcel', parcel.id));
    // More than can be told one by one: read anew.
    for (let at = 0; at < 201; at++)
      await site.deps.services.history.add({
        actorId: null,
        actorName: 'Test',
        subjectKind: 'policy',
        subjectId: at + 1,
        action: 'x',
        text: 'x',
      });
    const late = await listen('breeder@example.org', '/live', Number(id));
    expect((await late.until(({ name }) => name === 'missed')).data).toEqual({});
  });

  it('ends with the session: signing out, a new password, an account that is switched off', async () => {
    const cookie = await cookieOf(port, 'breeder@example.org');
    const open = () => openStream(port, '/live', { cookie });
    const stream = await open();
    const url = `http://127.0.0.1:${port}/api/session`;
    const form = (await fetch(url, { headers: { Cookie: cookie } })).headers.getSetCookie();
    const pair = form.find((text) => text.startsWith('XSRF-TOKEN='))?.split(';')[0] ?? '';
    const out = await fetch(url, {
      method: 'DELETE',
      headers: { Cookie: `${cookie}; ${pair}`, 'X-XSRF-TOKEN': decodeURIComponent(pair.slice(11)) },
    });
    expect(out.status).toBe(204);
    await stream.ended;
    expect(stream.events.map(({ name }) => name)).toEqual(['over']);
    expect((await open()).status).toBe(401);

    const switchedOff = await listen('other@example.org');
    const admin = await site.as('admin@example.org');
    await admin.patch(`/api/people/${site.ids.otherBreeder}`).send({ active: false }).expect(200);
    await switchedOff.ended;
    expect(switchedOff.events.at(-1)?.name).toBe('over');
  });

  it('is refused to somebody with a dozen of them open, and forgets those that were closed', async () => {
    const cookie = await cookieOf(port, 'breeder@example.org');
    for (let at = 0; at < 12; at++) streams.push(await openStream(port, '/live', { cookie }));
    const refused = await openStream(port, '/live', { cookie });
    expect(refused.status).toBe(429);
    expect(liveHub(site.deps).size).toBe(12);
    for (const stream of streams) stream.close();
    for (let tries = 0; tries < 50 && liveHub(site.deps).size > 0; tries++)
      await new Promise((done) => setTimeout(done, 20));
    expect(liveHub(site.deps).size).toBe(0);
  });
});
