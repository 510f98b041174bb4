import type { Run, RunPreview } from '@shared/contract';
import {
  breeder,
  coordinator,
  createRunSite,
  friday,
  largeBoxL,
  monday,
  otherBreeder,
  saturday,
  sharesOf,
  thursday,
  today,
  wednesday,
  type RunSite,
} from '../support/run-site';

let site: RunSite;
beforeEach(async () => {
  site = await createRunSite();
});
afterEach(() => site.close());

const send = async (verb: 'post' | 'patch', path: string, body: object, version?: number) => {
  const call = (await site.who(coordinator))[verb](path);
  if (version !== undefined) void call.set('If-Match', `"${version}"`);
  return call.send(body);
};
const patch = (run: Run, body: object, version = run.version) =>
  send('patch', `/api/runs/${run.id}`, body, version);
const preview = async (run: Run, body: object) => {
  const answer = await send('post', `/api/runs/${run.id}/preview`, body);
  expect(answer.status).toBe(200);
  return answer.body as RunPreview;
};
const refusal = async (run: Run) => {
  const answer = await send('post', `/api/runs/${run.id}/confirmation`, {});
  expect(answer.status).toBe(409);
  return answer.body as { detail: string; run: Run };
};

describe('POST /runs by hand', () => {
  it('begins empty, and says that nothing is on it', async () => {
    const run = await site.byHand(wednesday, []);
    expect(run).toMatchObject({ state: 'proposed', date: wednesday, parcels: [], costCents: 0 });
    expect(run.problems).toEqual(['No parcel is on this run yet.']);
    expect((await refusal(run)).detail).toContain('No parcel');
  });

  it('takes parcels along, works the drive out and goes to the counter they are checked for', async () => {
    const parcel = await site.booked(breeder, wednesday);
    const run = await site.byHand(wednesday, [parcel]);
    expect(run.problems).toEqual([]);
    expect(run.counter.id).toBe(site.ids.dropOffCounter);
    expect(run.stops.map(({ parcelIds }) => parcelIds)).toEqual([[parcel.id]]);
    expect(sharesOf(run)).toBe(run.costCents);
    expect((await site.parcel(parcel.id)).run).toMatchObject({ id: run.id, state: 'proposed' });
  });

  it('refuses field by field', async () => {
    const { ids } = site;
    const parcel = await site.draft(breeder);
    const good = { coordinatorId: ids.coordinator, date: wednesday };
    const complaint = async (change: object) => {
      const answer = await send('post', '/api/runs', { ...good, ...change });
      expect(answer.status).toBe(400);
      return (answer.body as { errors: { path: string }[] }).errors.map(({ path }) => path);
    };
    expect(await complaint({ coordinatorId: ids.breeder })).toEqual(['coordinatorId']);
    expect(await complaint({ counterId: ids.phoenixCounter })).toEqual(['counterId']);
    expect(await complaint({ date: '2026-11-30' })).toEqual(['date']);
    expect(await complaint({ parcelIds: [parcel.id, 999] })).toEqual(['parcelIds.0', 'parcelIds.1']);
    expect(await complaint({ date: 'tomorrow' })).toContain('date');
    await site.byHand(wednesday, []);
    expect(await complaint({})).toEqual(['date']);
    expect((await (await site.who(coordinator)).get('/api/runs').expect(200)).body).toHaveLength(1);
  });

  it('may be drawn up for a day off, a closed counter or a shut day, and is refused until that is put right', async () => {
    const free = { daysAway: [], drivingDays: [{ date: wednesday, free: false }] };
    await (await site.who(coordinator)).put('/api/me/availability').send(free).expect(200);
    const run = await site.byHand(wednesday, [await site.booked(breeder, wednesday)]);
    expect(run.problems).toEqual(['Cora Coordinator does not drive on Wednesday, December 2.']);
    await refusal(run);
    const weekend = await site.byHand(saturday, [await site.seeking(otherBreeder, thursday, monday)]);
    expect(weekend.problems.join(' ')).toMatch(
      /does not drive on Saturday.*takes no drop-off on Saturday.*is shut on Saturday/,
    );
    await refusal(weekend);
    // The driver takes Wednesday on after all: confirming looks again.
    await (
      await site.who(coordinator)
    )
      .put('/api/me/availability')
      .send({ daysAway: [], drivingDays: [] })
      .expect(200);
    expect((await site.confirm(run)).problems).toEqual([]);
  });

  it('drawn up for today too late in the day, is refused', async () => {
    const parcel = await site.booked(breeder, today);
    site.setNow('2026-12-01T21:30:00.000Z');
    const run = await site.byHand(today, [parcel]);
    expect(run.problems).toEqual(['It is too late today: the driver would have had to leave already.']);
    await refusal(run);
  });
});

describe('POST /runs/:id/preview', () => {
  it('shows what a parcel more would cost, and saves nothing', async () => {
    const first = await site.booked(breeder, wednesday);
    const second = await site.booked(otherBreeder, wednesday);
    const run = await site.byHand(wednesday, [first]);
    const mails = await site.mails();
    const { before, after, costChangeCents, problems } = await preview(run, { addParcelIds: [second.id] });
    expect(before).toEqual(run);
    expect(after.parcels.map(({ id }) => id).sort()).toEqual([first.id, second.id].sort());
    expect(after.stops).toHaveLength(2);
    expect(costChangeCents).toBe(after.costCents - run.costCents);
    expect(costChangeCents).toBeGreaterThan(0);
    expect(sharesOf(after)).toBe(after.costCents);
    expect(problems).toEqual([]);
    expect(await site.run(run.id)).toEqual(run);
    expect((await site.parcel(second.id)).run).toBeNull();
    expect(await site.mails()).toEqual(mails);
  });

  it('shows a confirmed run that would break instead of refusing to look', async () => {
    const run = await site.confirm(await site.byHand(wednesday, [await site.booked(breeder, wednesday)]));
    const other = await site.booked(otherBreeder, monday);
    const { problems } = await preview(run, { addParcelIds: [other.id] });
    expect(problems).toEqual([`${other.code} is booked on Monday, December 7.`]);
    expect(await site.run(run.id)).toEqual(run);
  });

  it('shows that a run would be left empty', async () => {
    const parcel = await site.booked(breeder, wednesday);
    const run = await site.byHand(wednesday, [parcel]);
    const { after, costChangeCents, problems } = await preview(run, { removeParcelIds: [parcel.id] });
    expect(problems).toEqual(['No parcel is on this run yet.']);
    expect(after.costCents).toBe(0);
    expect(costChangeCents).toBe(-run.costCents);
  });
});

describe('PATCH /runs/:id', () => {
  it('puts parcels on and takes them off, with the order, the cost and the shares anew', async () => {
    const first = await site.booked(breeder, wednesday);
    const second = await site.booked(otherBreeder, wednesday);
    const run = await site.byHand(wednesday, [first]);
    const both = await patch(run, { addParcelIds: [second.id], note: 'Ring twice.' });
    expect(both.status).toBe(200);
    const wider = both.body as Run;
    expect(wider.stops).toHaveLength(2);
    expect(wider.note).toBe('Ring twice.');
    expect(sharesOf(wider)).toBe(wider.costCents);
    expect(both.headers.etag).toBe(`"${wider.version}"`);
    const one = (await patch(wider, { removeParcelIds: [first.id] })).body as Run;
    expect(one.parcels.map(({ id }) => id)).toEqual([second.id]);
    expect(sharesOf(one)).toBe(one.costCents);
    expect((await site.parcel(first.id)).run).toBeNull();
  });

  it('refuses a stale version and changes nothing', async () => {
    const run = await site.byHand(wednesday, [await site.booked(breeder, wednesday)]);
    expect((await patch(run, { note: 'First.' })).status).toBe(200);
    const late = await patch(run, { note: 'Second.' });
    expect(late.status).toBe(412);
    expect(late.body).toMatchObject({ current: { note: 'First.' } });
    expect((await site.run(run.id)).note).toBe('First.');
  });

  it('pins, and takes a pin out again', async () => {
    const parcel = await site.booked(breeder, wednesday);
    const run = await site.byHand(wednesday, [parcel]);
    const pinned = (await patch(run, { pin: [{ parcelId: parcel.id, pinned: true }] })).body as Run;
    expect(pinned.parcels[0]?.pinned).toBe(true);
    const loose = (await patch(pinned, { pin: [{ parcelId: parcel.id, pinned: false }] })).body as Run;
    expect(loose.parcels[0]?.pinned).toBe(false);
    const wrong = await patch(loose, { pin: [{ parcelId: 999, pinned: true }] });
    expect(wrong.status).toBe(400);
    expect(wrong.body).toMatchObject({ errors: [{ path: 'pin.0.parcelId' }] });
  });

  it('refuses a parcel that is not there, is a draft or is on a confirmed run', async () => {
    const taken = await site.booked(breeder, wednesday);
    await site.confirm(await site.byHand(wednesday, [taken]));
    const draft = await site.draft(breeder);
    const run = await site.byHand(monday, []);
    const answer = await patch(run, { addParcelIds: [taken.id, draft.id, 999] });
    expect(answer.status).toBe(400);
    expect((answer.body as { errors: { path: string }[] }).errors.map(({ path }) => path)).toEqual([
      'addParcelIds.0',
      'addParcelIds.1',
      'addParcelIds.2',
    ]);
  });

  it('takes a parcel from another proposal; one that is emptied by that is called off', async () => {
    const parcel = await site.seeking(breeder, wednesday, monday);
    const early = await site.byHand(wednesday, [parcel]);
    const late = await site.byHand(monday, []);
    expect(((await patch(late, { addParcelIds: [parcel.id] })).body as Run).problems).toEqual([]);
    expect(await site.run(early.id)).toMatchObject({ state: 'called-off', parcels: [] });
  });

  it('shows room that is short, a day that is not safe and a day not asked for, and refuses to confirm', async () => {
    await site.db('coordinator_profiles').update({ capacity_l: Math.ceil(largeBoxL) });
    const boxId = site.ids.largeBox;
    const first = await site.booked(breeder, wednesday, { boxId });
    const second = await site.booked(otherBreeder, wednesday, { boxId });
    const full = await site.byHand(wednesday, [first, second]);
    expect(full.problems).toEqual([`The boxes take ${(2 * largeBoxL).toFixed(1)} L, the vehicle has 38 L.`]);
    expect((await refusal(full)).run.problems).toEqual(full.problems);
    const open = await site.seeking(breeder, wednesday, monday);
    const shut = await site.byHand(friday, [open]);
    expect(shut.problems.join(' ')).toContain(`${open.code} is shut on Friday, December 4.`);
    await refusal(shut);
    const notAsked = await site.byHand(monday, [await site.booked(otherBreeder, thursday)]);
    expect(notAsked.problems.join(' ')).toContain('is booked on Thursday, December 3.');
    await refusal(notAsked);
  });

  it('shows a drive that cannot be done before the cut-off, and refuses to confirm', async () => {
    const run = await site.byHand(wednesday, [await site.booked(breeder, wednesday)]);
    await site.db('breeder_profiles').update({ window_open_minute: 985, window_close_minute: 1100 });
    const later = (await patch(run, { note: 'Looked at again.' })).body as Run;
    expect(later.problems).toEqual([
      'No order of the stops keeps the collection windows, the cut-off and the longest run.',
    ]);
    await refusal(later);
  });

  it('waits for the breeder to accept a tight day in words, and sees at once when they have', async () => {
    const parcel = await site.seeking(breeder, thursday, thursday);
    const run = await site.byHand(thursday, [parcel]);
    expect(run.problems).toEqual([
      `${parcel.code} is tight on Thursday, December 3, which Bea Breeder has not accepted yet.`,
    ]);
    await refusal(run);
    const words = { date: thursday, acceptTight: 'The buyer collects at nine.' };
    await (await site.who(breeder)).put(`/api/parcels/${parcel.id}/booking`).send(words).expect(200);
    expect((await site.run(run.id)).problems).toEqual([]);
    await site.confirm(await site.run(run.id));
  });

  it('sees an outage of the weather service as a day that nobody can call safe', async () => {
    const parcel = await site.seeking(breeder, wednesday, monday);
    site.fake.script({ outage: 'refuse' });
    // Thirteen hours on the last forecast is too old to be trusted, and there is no newer one.
    site.setNow('2026-12-02T01:00:00.000Z');
    const run = await site.byHand(monday, [parcel]);
    expect(run.problems.join(' ')).toMatch(new RegExp(`${parcel.code} is (tight|shut|far) on Monday`));
    await refusal(run);
  });

  it('keeps a confirmed run one that can be driven', async () => {
    await site.db('coordinator_profiles').update({ capacity_l: Math.ceil(largeBoxL) });
    const boxId = site.ids.largeBox;
    const only = await site.booked(breeder, wednesday, { boxId });
    const run = await site.confirm(await site.byHand(wednesday, [only]));
    const more = await site.booked(otherBreeder, wednesday, { boxId });
    const full = await patch(run, { addParcelIds: [more.id] });
    expect(full.status).toBe(409);
    expect((full.body as { detail: string }).detail).toContain('The boxes take');
    const empty = await patch(run, { removeParcelIds: [only.id] });
    expect(empty.status).toBe(409);
    expect(await site.run(run.id)).toEqual(run);
  });

  it('lets a parcel be taken off a confirmed run whatever else is wrong with it', async () => {
    const first = await site.booked(breeder, wednesday);
    const second = await site.booked(otherBreeder, wednesday);
    const run = await site.confirm(await site.byHand(wednesday, [first, second]));
    const free = { daysAway: [], drivingDays: [{ date: wednesday, free: false }] };
    await (await site.who(coordinator)).put('/api/me/availability').send(free).expect(200);
    const answer = await patch(run, { removeParcelIds: [first.id] });
    expect(answer.status).toBe(200);
    expect(answer.body).toMatchObject({
      problems: ['Cora Coordinator does not drive on Wednesday, December 2.'],
    });
    // A breeder is not told of what the coordinators have to put right.
    const { body } = await (await site.who(otherBreeder)).get(`/api/runs/${run.id}`).expect(200);
    expect(body).toMatchObject({ problems: [] });
    const third = await site.booked(breeder, wednesday);
    expect((await patch(answer.body as Run, { addParcelIds: [third.id] })).status).toBe(409);
  });

  it('never books an open parcel onto a confirmed run on a day that is not safe for it', async () => {
    const run = await site.confirm(await site.byHand(monday, [await site.booked(breeder, monday)]));
    const open = await site.seeking(otherBreeder, wednesday, monday);
    site.fake.script({
      alert: {
        lat: 33.43,
        lon: -112.01,
        fromIso: '2026-12-07T00:00:00Z',
        toIso: '2026-12-09T00:00:00Z',
        event: 'Extreme Heat Warning',
      },
    });
    site.setNow('2026-12-01T14:00:00.000Z');
    const answer = await patch(run, { addParcelIds: [open.id] });
    expect(answer.status).toBe(409);
    expect((answer.body as { detail: string }).detail).toContain(
      `${open.code} is shut on Monday, December 7.`,
    );
    expect(await site.parcel(open.id)).toMatchObject({ state: 'seeking', run: null });
  });

  it('tells the people of a confirmed run whose plan changes, and books who joins', async () => {
    const first = await site.booked(breeder, wednesday);
    const run = await site.confirm(await site.byHand(wednesday, [first]));
    const before = (await site.mails()).length;
    const open = await site.seeking(otherBreeder, wednesday, monday);
    const after = (await patch(run, { addParcelIds: [open.id] })).body as Run;
    expect(await site.parcel(open.id)).toMatchObject({ state: 'booked', shipDate: wednesday });
    const shares = await Promise.all(
      [first.id, open.id].map(async (id) => (await site.parcel(id)).shareCents),
    );
    expect(shares.reduce<number>((sum, cents) => sum + (cents ?? NaN), 0)).toBe(after.costCents);
    const invited = (await site.mails()).slice(before).filter(({ invites }) => invites);
    expect(invited.map(({ to }) => to)).toContain(otherBreeder);
  });
});
