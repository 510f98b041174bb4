import type { Parcel, Run } from '@shared/contract';
import {
  admin,
  breeder,
  buyer,
  coordinator,
  createRunSite,
  monday,
  otherBreeder,
  sharesOf,
  wednesday,
  type RunSite,
} from '../support/run-site';

let site: RunSite;
let mine: Parcel;
let theirs: Parcel;
let proposed: Run;
beforeEach(async () => {
  site = await createRunSite();
  mine = await site.booked(breeder, wednesday);
  theirs = await site.booked(otherBreeder, wednesday, {
    buyer: { name: 'Uma Unrelated', email: 'unrelated@example.org' },
  });
  proposed = await site.byHand(wednesday, [mine, theirs]);
});
afterEach(() => site.close());

type Step = 'confirmation' | 'departure' | 'hand-over' | 'call-off';
const step = async (run: { id: number; version?: number }, name: Step, body: object = {}) => {
  // A driver leaves on the day: Wednesday at noon in Texas.
  if (name === 'departure') site.setNow('2026-12-02T18:00:00.000Z');
  const call = (await site.who(coordinator)).post(`/api/runs/${run.id}/${name}`);
  if (run.version !== undefined) void call.set('If-Match', `"${run.version}"`);
  return call.send(body);
};
const done = async (run: Run, name: Step, body: object = {}): Promise<Run> => {
  const answer = await step(run, name, body);
  expect(`${name} ${answer.status}`).toBe(`${name} 200`);
  return answer.body as Run;
};
const states = async () => [(await site.parcel(mine.id)).state, (await site.parcel(theirs.id)).state];
const newMails = async (before: number) => (await site.mails()).slice(before);

describe('confirmation', () => {
  it('shares the cost to the cent and invites the driver, each breeder and each buyer once', async () => {
    const before = (await site.mails()).length;
    const run = await site.confirm(proposed);
    expect(run.state).toBe('confirmed');
    const shares = [(await site.parcel(mine.id)).shareCents, (await site.parcel(theirs.id)).shareCents];
    expect((shares[0] ?? NaN) + (shares[1] ?? NaN)).toBe(run.costCents);
    expect(sharesOf(run)).toBe(run.costCents);
    const invited = (await newMails(before)).filter(({ method }) => method === 'REQUEST').map(({ to }) => to);
    expect(invited.sort()).toEqual(
      [coordinator, breeder, otherBreeder, buyer, 'unrelated@example.org'].sort(),
    );
  });

  it('books parcels that were left open onto its day, with the verdict it rests on', async () => {
    const open = await site.seeking(breeder, wednesday, monday);
    const run = await site.byHand(monday, [open]);
    await site.confirm(run);
    expect(await site.parcel(open.id)).toMatchObject({
      state: 'booked',
      shipDate: monday,
      bookedVerdict: { verdict: 'open', date: monday },
      run: { id: run.id, state: 'confirmed' },
    });
  });

  it('happens once: a second one is refused and sends nothing', async () => {
    const run = await site.confirm(proposed);
    const before = (await site.mails()).length;
    expect((await step({ id: run.id }, 'confirmation')).status).toBe(409);
    expect((await step(proposed, 'confirmation')).status).toBe(412);
    expect(await newMails(before)).toEqual([]);
    expect(await site.run(run.id)).toEqual(run);
  });

  it('of two at the same moment one wins', async () => {
    const before = (await site.mails()).length;
    const both = await Promise.all([
      step({ id: proposed.id }, 'confirmation'),
      step({ id: proposed.id }, 'confirmation'),
    ]);
    expect(both.filter(({ status }) => status === 200)).toHaveLength(1);
    expect(both.filter(({ status }) => status === 409 || status === 412)).toHaveLength(1);
    expect((await newMails(before)).filter(({ invites }) => invites)).toHaveLength(5);
  });

  it('refuses a run seen before it changed', async () => {
    const more = await site.booked(breeder, wednesday);
    await (
      await site.who(coordinator)
    )
      .patch(`/api/runs/${proposed.id}`)
      .send({ addParcelIds: [more.id] })
      .expect(200);
    expect((await step(proposed, 'confirmation')).status).toBe(412);
    expect((await site.run(proposed.id)).state).toBe('proposed');
  });

  it('refuses a run whose day is over', async () => {
    site.setNow('2026-12-03T14:00:00.000Z');
    const answer = await step(proposed, 'confirmation');
    expect(answer.status).toBe(409);
    expect((answer.body as { detail: string }).detail).toContain('Wednesday, December 2 is over.');
  });

  it('refuses a second run of the same driver on a day', async () => {
    const more = await site.booked(breeder, wednesday);
    // Two proposals for a day cannot come about by the API; a restored backup might hold them.
    const [second] = await site
      .db('runs')
      .insert({ ...((await site.db('runs').where({ id: proposed.id }).first()) as object), id: undefined });
    await site.db('run_parcels').insert({ run_id: second, parcel_id: more.id });
    await site.confirm(proposed);
    const answer = await step({ id: second ?? 0 }, 'confirmation');
    expect(answer.status).toBe(409);
    expect((answer.body as { detail: string }).detail).toContain(
      'drives another run on Wednesday, December 2',
    );
  });

  it('refuses when a day has turned bad since, and leaves everything as it was', async () => {
    site.fake.script({ steady: { lowF: 10, highF: 20 } });
    site.setNow('2026-12-01T14:00:00.000Z');
    const before = (await site.mails()).length;
    const answer = await step(proposed, 'confirmation');
    expect(answer.status).toBe(409);
    expect((answer.body as { detail: string }).detail).toContain(
      `${mine.code} is shut on Wednesday, December 2.`,
    );
    expect(await site.run(proposed.id)).toEqual(proposed);
    expect(await states()).toEqual(['booked', 'booked']);
    expect(await newMails(before)).toEqual([]);
  });
});

describe('the drive', () => {
  it('goes from departure to hand-over with tracking numbers, and buyers hear of theirs', async () => {
    const underway = await done(await site.confirm(proposed), 'departure');
    expect(underway.state).toBe('underway');
    expect(await states()).toEqual(['aboard', 'aboard']);
    const before = (await site.mails()).length;
    site.setNow('2026-12-02T22:00:00.000Z');
    const tracking = [{ parcelId: mine.id, number: 'LK 0001' }];
    const over = await done(underway, 'hand-over', { tracking });
    expect(over.state).toBe('handed-over');
    expect(await states()).toEqual(['handed-over', 'handed-over']);
    expect((await site.parcel(mine.id)).trackingNumber).toBe('LK 0001');
    expect((await site.parcel(theirs.id)).trackingNumber).toBeNull();
    expect((await newMails(before)).map(({ to }) => to)).toEqual(
      expect.arrayContaining([buyer, 'unrelated@example.org']),
    );
    const history = (await site.db('history').where({ subject_kind: 'run', subject_id: over.id })) as {
      text: string;
    }[];
    expect(history.map(({ text }) => text)).toContain('Handed over before the cut-off.');
  });

  it('notes a hand-over after the cut-off as what it is', async () => {
    const underway = await done(await site.confirm(proposed), 'departure');
    site.setNow('2026-12-02T23:00:01.000Z');
    const over = await done(underway, 'hand-over');
    const history = (await site.db('history').where({ subject_kind: 'run', subject_id: over.id })) as {
      text: string;
    }[];
    expect(history.map(({ text }) => text)).toContain('Handed over after the cut-off.');
  });

  it('leaves behind what is not aboard: it goes on hold, and the rest carry the whole cost', async () => {
    const run = await site.confirm(proposed);
    const before = (await site.mails()).length;
    const underway = await done(run, 'departure', { aboardParcelIds: [mine.id] });
    expect(underway.parcels.map(({ id }) => id)).toEqual([mine.id]);
    expect(underway.stops.map(({ breederId }) => breederId)).toEqual([site.ids.breeder]);
    expect(await site.parcel(theirs.id)).toMatchObject({
      state: 'on-hold',
      shipDate: null,
      shareCents: null,
      run: null,
    });
    expect((await site.parcel(mine.id)).shareCents).toBe(underway.costCents);
    expect((await newMails(before)).map(({ to }) => to)).toEqual(
      expect.arrayContaining([otherBreeder, 'unrelated@example.org']),
    );
  });

  it('goes on without a parcel that is put on hold on the way', async () => {
    const underway = await done(await site.confirm(proposed), 'departure');
    await site.deps.services.parcels.putOnHold(mine.id, 'The buyer has called it off.', null);
    expect(await site.parcel(mine.id)).toMatchObject({ state: 'on-hold', run: null });
    const left = await site.run(underway.id);
    expect(left.parcels.map(({ id }) => id)).toEqual([theirs.id]);
    expect((await site.parcel(theirs.id)).shareCents).toBe(left.costCents);
    expect((await done(left, 'hand-over')).state).toBe('handed-over');
  });

  it('refuses what is not on the run, field by field', async () => {
    const run = await site.confirm(proposed);
    const elsewhere = await step(run, 'departure', { aboardParcelIds: [mine.id, 999] });
    expect(elsewhere.status).toBe(400);
    expect(elsewhere.body).toMatchObject({ errors: [{ path: 'aboardParcelIds.1' }] });
    const nothing = await step(run, 'departure', { aboardParcelIds: [] });
    expect(nothing.body).toMatchObject({ errors: [{ path: 'aboardParcelIds' }] });
    const underway = await done(run, 'departure');
    const twice = [mine.id, mine.id, 999].map((parcelId, index) => ({ parcelId, number: `LK ${index}` }));
    const wrong = await step(underway, 'hand-over', { tracking: twice });
    expect(wrong.status).toBe(400);
    expect((wrong.body as { errors: { path: string }[] }).errors.map(({ path }) => path)).toEqual([
      'tracking.1.parcelId',
      'tracking.2.parcelId',
    ]);
    const empty = await step(underway, 'hand-over', { tracking: [{ parcelId: mine.id, number: ' ' }] });
    expect(empty.status).toBe(400);
    expect(await states()).toEqual(['aboard', 'aboard']);
  });
});

describe('a departure', () => {
  it('is not before the day of the run', async () => {
    const run = await site.confirm(proposed);
    const answer = await (await site.who(coordinator)).post(`/api/runs/${run.id}/departure`).send({});
    expect(answer.status).toBe(409);
    expect(answer.body.detail).toContain('Wednesday, December 2');
    expect(await states()).toEqual(['booked', 'booked']);
  });
});

describe('call-off', () => {
  it('of a confirmed run takes everybody off it and tells them all; the parcels keep their day', async () => {
    const run = await site.confirm(proposed);
    const before = (await site.mails()).length;
    const off = await done(run, 'call-off', { reason: 'The van does not start.' });
    expect(off).toMatchObject({ state: 'called-off', parcels: [] });
    for (const { id } of [mine, theirs])
      expect(await site.parcel(id)).toMatchObject({
        state: 'booked',
        shipDate: wednesday,
        run: null,
        shareCents: null,
      });
    const told = (await newMails(before)).map(({ to }) => to);
    expect(told).toEqual(expect.arrayContaining([breeder, otherBreeder]));
    expect((await newMails(before)).filter(({ method }) => method === 'CANCEL').map(({ to }) => to)).toEqual(
      expect.arrayContaining([coordinator, breeder, otherBreeder]),
    );
    // They wait for another run.
    const [again] = (await site.propose()).runs;
    expect(again?.parcels).toHaveLength(2);
  });

  it('of a run underway brings the parcels back from aboard', async () => {
    const underway = await done(await site.confirm(proposed), 'departure');
    await done(underway, 'call-off', { reason: 'A flat tyre in Boerne.' });
    expect(await states()).toEqual(['booked', 'booked']);
  });

  it('of a proposal tells nobody', async () => {
    const before = (await site.mails()).length;
    await done(proposed, 'call-off', { reason: 'Drawn up by mistake.' });
    expect(await newMails(before)).toEqual([]);
    expect(await states()).toEqual(['booked', 'booked']);
  });

  it('needs a reason', async () => {
    for (const body of [{}, { reason: ' x ' }]) {
      const answer = await step(proposed, 'call-off', body);
      expect(answer.status).toBe(400);
      expect(answer.body).toMatchObject({ errors: [{ path: 'reason' }] });
    }
  });
});

describe('steps out of turn', () => {
  const steps: readonly Step[] = ['confirmation', 'departure', 'hand-over', 'call-off'];
  const bodies: Partial<Record<Step, object>> = { 'call-off': { reason: 'Not today.' } };
  const ways: readonly (readonly [Run['state'], readonly Step[], readonly Step[]])[] = [
    ['proposed', [], ['departure', 'hand-over']],
    ['confirmed', ['confirmation'], ['confirmation', 'hand-over']],
    ['underway', ['confirmation', 'departure'], ['confirmation', 'departure']],
    ['handed-over', ['confirmation', 'departure', 'hand-over'], steps],
    ['called-off', ['call-off'], steps],
  ];

  it.each(ways)('from %s are refused with 409 and change nothing', async (state, taken, refused) => {
    for (const name of taken) await done(await site.run(proposed.id), name, bodies[name]);
    const before = await site.run(proposed.id);
    expect(before.state).toBe(state);
    for (const name of refused) {
      const answer = await step({ id: before.id, version: before.version }, name, bodies[name]);
      expect(`${name} ${answer.status}`).toBe(`${name} 409`);
      expect(answer.type).toBe('application/problem+json');
    }
    expect(await site.run(proposed.id)).toEqual(before);
  });

  it('a run that has left is not changed any more', async () => {
    const underway = await done(await site.confirm(proposed), 'departure');
    const answer = await (
      await site.who(admin)
    )
      .patch(`/api/runs/${underway.id}`)
      .send({ removeParcelIds: [mine.id] });
    expect(answer.status).toBe(409);
  });

  it.each(['departure', 'hand-over', 'call-off'] as const)('a stale %s is refused', async (name) => {
    const run = await site.confirm(proposed);
    if (name === 'hand-over') await done(run, 'departure');
    const answer = await step({ id: run.id, version: proposed.version }, name, bodies[name]);
    expect(answer.status).toBe(412);
  });
});
