import type { Proposal, Run } from '@shared/contract';
import {
  admin,
  breeder,
  buyer,
  coordinator,
  createRunSite,
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

const everybody = [null, buyer, breeder, coordinator, admin] as const;
/** Status for a run that does not exist: who is let in gets 404. */
const drivers = [401, 403, 403, 404, 404] as const;
const routes = [
  ['get', '/api/runs', [401, 403, 200, 200, 200]],
  ['post', '/api/runs', [401, 403, 403, 400, 400]],
  ['get', '/api/runs/99', [401, 403, 404, 404, 404]],
  ['patch', '/api/runs/99', drivers],
  ['post', '/api/runs/99/preview', drivers],
  ['post', '/api/runs/99/confirmation', drivers],
  ['post', '/api/runs/99/departure', drivers],
  ['post', '/api/runs/99/hand-over', drivers],
  ['post', '/api/runs/99/call-off', drivers],
  ['get', '/api/runs/proposals/latest', drivers],
  // Last, for it leaves a proposal behind.
  ['post', '/api/runs/proposals', [401, 403, 403, 200, 200]],
] as const;

describe('who may do what with runs', () => {
  it('is one table of roles and routes', async () => {
    const callers = await Promise.all(everybody.map((email) => site.as(email)));
    for (const [verb, path, statuses] of routes)
      for (const [at, caller] of callers.entries()) {
        const body = path.endsWith('call-off') ? { reason: 'The van is broken.' } : {};
        const sent = verb === 'get' ? await caller.get(path) : await caller[verb](path).send(body);
        const asked = `${everybody[at]}: ${verb} ${path}`;
        expect(`${asked} ${sent.status}`).toBe(`${asked} ${statuses[at]}`);
      }
  });

  it.each(routes.filter(([verb]) => verb !== 'get').map(([verb, path]) => [verb, path] as const))(
    '%s %s without the form token is refused',
    async (verb, path) => {
      const caller = await site.as(coordinator);
      const answer = await caller[verb](path).set('X-XSRF-TOKEN', '').send({});
      expect(answer.status).toBe(403);
      expect(answer.type).toBe('application/problem+json');
    },
  );
});

describe('POST /runs/proposals', () => {
  it('puts parcels of one day on one run, in an order that is driven, with room, cost, bound and gap', async () => {
    const mine = await site.booked(breeder, wednesday);
    const theirs = await site.booked(otherBreeder, wednesday);
    const proposal = await site.propose();
    expect(proposal.unplaced).toEqual([]);
    expect(proposal.runs).toHaveLength(1);
    const [run] = proposal.runs;
    if (!run) throw new Error('No run.');
    expect(run).toMatchObject({ state: 'proposed', date: wednesday, problems: [] });
    expect(run.parcels.map(({ id }) => id).sort()).toEqual([mine.id, theirs.id].sort());
    expect(run.stops.map(({ breederId }) => breederId).sort()).toEqual(
      [site.ids.breeder, site.ids.otherBreeder].sort(),
    );
    // At the counter half an hour before the 17:00 cut-off (23:00 UTC in winter), inside every collection window.
    expect(run.cutOffAt).toBe('2026-12-02T23:00:00.000Z');
    expect(run.slackMinutes).toBeGreaterThanOrEqual(30);
    for (const stop of run.stops) {
      expect(Date.parse(stop.arriveAt)).toBeLessThanOrEqual(Date.parse('2026-12-02T22:00:00.000Z'));
      expect(Date.parse(stop.leaveAt)).toBeGreaterThanOrEqual(Date.parse('2026-12-02T15:10:00.000Z'));
    }
    expect(run.costCents).toBe(run.fixedCents + run.drivingCents);
    expect(sharesOf(run)).toBe(run.costCents);
    expect(proposal.costCents).toBe(run.costCents);
    expect(proposal.boundKind).toBe('proven');
    expect(proposal.boundCents).toBe(proposal.objectiveCents);
    expect(proposal.gap).toBe(0);
    expect(proposal.aloneCents).toBe(run.aloneCents);
    // Each breeder sees their own part of what driving alone would cost; the parts make up the whole.
    expect(run.stops.reduce((sum, stop) => sum + stop.aloneCents, 0)).toBe(run.aloneCents);
    expect(run.stops.every((stop) => stop.aloneCents > 0)).toBe(true);
    // Nobody hears of a proposal, and no parcel has moved.
    expect((await site.mails()).filter(({ invites }) => invites)).toEqual([]);
    expect(await site.parcel(mine.id)).toMatchObject({
      state: 'booked',
      shipDate: wednesday,
      shareCents: null,
    });
  });

  it('gives a parcel that was left open the day of a run that goes anyway', async () => {
    await site.booked(otherBreeder, monday);
    const open = await site.seeking(breeder, wednesday, monday);
    const { runs } = await site.propose();
    expect(runs).toHaveLength(1);
    expect(runs[0]?.date).toBe(monday);
    expect(runs[0]?.parcels.map(({ id }) => id)).toContain(open.id);
  });

  it('leaves a parcel out that does not fit, and says how much room is lacking', async () => {
    await site.db('coordinator_profiles').update({ capacity_l: Math.ceil(largeBoxL) });
    const boxId = site.ids.largeBox;
    await site.booked(breeder, wednesday, { boxId });
    await site.booked(otherBreeder, wednesday, { boxId });
    const { runs, unplaced } = await site.propose();
    expect(runs.flatMap(({ parcels }) => parcels)).toHaveLength(1);
    expect(unplaced).toHaveLength(1);
    expect(unplaced[0]).toMatchObject({ reason: 'no-room', what: 'corn snake', destination: 'Phoenix, AZ' });
    expect(unplaced[0]?.help).toContain('more room with Cora Coordinator');
  });

  it('counts on no tight day that the breeder has not accepted, and says so', async () => {
    await site.seeking(breeder, thursday, thursday);
    const { runs, unplaced } = await site.propose();
    expect(runs).toEqual([]);
    expect(unplaced[0]?.text).toBe(
      'Only tight days are left: Thu, Dec 3. The breeder has to accept one in words.',
    );
  });

  it('has no run on a day that the coordinator does not drive, and says that a driver is missing', async () => {
    const parcel = await site.booked(breeder, wednesday, { readyFrom: wednesday, latestDate: wednesday });
    const free = { daysAway: [], drivingDays: [{ date: wednesday, free: false }] };
    await (await site.who(coordinator)).put('/api/me/availability').send(free).expect(200);
    const { runs, unplaced } = await site.propose();
    expect(runs).toEqual([]);
    expect(unplaced).toEqual([expect.objectContaining({ parcelId: parcel.id, reason: 'no-driver' })]);
    expect(unplaced[0]?.help).toContain('A driver on Wed, Dec 2');
  });

  it('leaves a parcel out when its breeder goes away on the day it is booked on', async () => {
    const parcel = await site.booked(breeder, wednesday);
    const away = { daysAway: [{ from: wednesday, to: wednesday, note: '' }], drivingDays: [] };
    await (await site.who(breeder)).put('/api/me/availability').send(away).expect(200);
    const { runs, unplaced } = await site.propose();
    expect(runs).toEqual([]);
    expect(unplaced).toEqual([expect.objectContaining({ parcelId: parcel.id, reason: 'no-safe-day' })]);
  });

  it('sends nobody out in the past: at 16:00 it is too late for today', async () => {
    const parcel = await site.booked(breeder, today);
    expect((await site.propose()).runs).toHaveLength(1);
    site.setNow('2026-12-01T22:00:00.000Z');
    const { runs, unplaced } = await site.propose();
    expect(runs).toEqual([]);
    expect(unplaced).toEqual([expect.objectContaining({ parcelId: parcel.id, reason: 'too-late' })]);
  });

  it('goes by the cut-off of the weekday', async () => {
    const parcel = await site.booked(breeder, wednesday);
    const cutOffs = { '1': 1020, '2': 1020, '3': 600, '4': 1020, '5': 1020 };
    await site
      .db('counters')
      .where({ id: site.ids.dropOffCounter })
      .update({ cut_off_minutes: JSON.stringify(cutOffs) });
    // On Wednesdays 10:00, handed over by 09:30: nobody opens before 09:00 half an hour away.
    const { unplaced } = await site.propose();
    expect(unplaced).toEqual([expect.objectContaining({ parcelId: parcel.id, reason: 'too-late' })]);
  });

  it('replaces what was proposed before and keeps what is confirmed', async () => {
    await site.booked(breeder, wednesday);
    const confirmed = await site.confirm((await site.propose()).runs[0] as Run);
    const before = await site.run(confirmed.id);
    await site.booked(otherBreeder, monday);
    const first = await site.propose();
    const second = await site.propose();
    expect(await site.run(confirmed.id)).toEqual(before);
    expect(second.runs.map(({ date }) => date)).toEqual([monday]);
    expect(second.runs[0]?.id).not.toBe(first.runs[0]?.id);
    const all = (await (await site.who(coordinator)).get('/api/runs').expect(200)).body as Run[];
    expect(all.map(({ id }) => id).sort()).toEqual([confirmed.id, second.runs[0]?.id].sort());
    expect(second.costCents).toBe(first.costCents);
  });

  it('adds nothing to a confirmed run, but says that a person may', async () => {
    await site.booked(breeder, wednesday);
    await site.confirm((await site.propose()).runs[0] as Run);
    const late = await site.booked(otherBreeder, wednesday);
    const { runs, unplaced } = await site.propose();
    expect(runs).toEqual([]);
    expect(unplaced).toEqual([expect.objectContaining({ parcelId: late.id, reason: 'no-driver' })]);
    expect(unplaced[0]?.help).toContain('Put on the confirmed run of Cora Coordinator on Wed, Dec 2 by hand');
  });

  it('keeps a pin, though another day would be cheaper', async () => {
    const open = await site.seeking(breeder, wednesday, monday);
    const run = await site.byHand(monday, [open]);
    const pin = { pin: [{ parcelId: open.id, pinned: true }] };
    await (await site.who(coordinator)).patch(`/api/runs/${run.id}`).send(pin).expect(200);
    await site.booked(otherBreeder, wednesday);
    const { runs } = await site.propose();
    expect(runs.map(({ date, parcels }) => [date, parcels.map(({ pinned }) => pinned)])).toEqual([
      [wednesday, [false]],
      [monday, [true]],
    ]);
  });

  it('says that the weather of a day left open is not known yet', async () => {
    const parcel = await site.seeking(breeder, '2026-12-14', '2026-12-14');
    const { unplaced } = await site.propose();
    expect(unplaced).toEqual([expect.objectContaining({ parcelId: parcel.id, reason: 'weather-unknown' })]);
  });

  it('answers other requests while it works', async () => {
    for (const email of [breeder, otherBreeder])
      for (const date of [wednesday, monday]) await site.booked(email, date);
    const caller = await site.who(coordinator);
    let isDone = false;
    const proposing = caller
      .post('/api/runs/proposals')
      .send({})
      .then((answer) => {
        isDone = true;
        return answer;
      });
    let meanwhile = 0;
    while (!isDone) {
      await caller.get('/api/species').expect(200);
      if (!isDone) meanwhile += 1;
    }
    expect((await proposing).status).toBe(200);
    expect(meanwhile).toBeGreaterThan(5);
  });

  it('makes one plan at a time', async () => {
    await site.booked(breeder, wednesday);
    const caller = await site.who(coordinator);
    const both = await Promise.all([1, 2].map(() => caller.post('/api/runs/proposals').send({})));
    expect(both.map(({ status }) => status).sort()).toEqual([200, 409]);
    expect((await caller.get('/api/runs').expect(200)).body).toHaveLength(1);
  });

  it('begins again when a parcel is taken off its day while the plan is made', async () => {
    const leaving = await site.booked(breeder, wednesday);
    const staying = await site.booked(otherBreeder, wednesday);
    const proposing = (await site.who(coordinator))
      .post('/api/runs/proposals')
      .send({})
      .then((answer) => answer);
    // The solver is a thread that takes a while to start; the parcel goes meanwhile.
    await new Promise((later) => setTimeout(later, 60));
    await (await site.who(breeder)).delete(`/api/parcels/${leaving.id}/booking`).expect(200);
    const answer = await proposing;
    expect(answer.status).toBe(200);
    const { runs, costCents } = answer.body as Proposal;
    expect(runs.flatMap(({ parcels }) => parcels.map(({ id }) => id))).toEqual([staying.id]);
    expect(costCents).toBe(runs[0]?.costCents);
    expect((await site.parcel(leaving.id)).state).toBe('draft');
  });

  it('begins again when a run is confirmed while the plan is made, and leaves that run alone', async () => {
    const parcel = await site.booked(breeder, wednesday);
    await site.booked(otherBreeder, monday);
    const early = (await site.propose()).runs.find(({ date }) => date === wednesday) as Run;
    const proposing = (await site.who(coordinator))
      .post('/api/runs/proposals')
      .send({})
      .then((answer) => answer);
    await new Promise((later) => setTimeout(later, 60));
    const confirmed = await site.confirm(early);
    const answer = await proposing;
    expect(answer.status).toBe(200);
    expect((answer.body as Proposal).runs.map(({ date }) => date)).toEqual([monday]);
    expect(await site.run(confirmed.id)).toEqual(confirmed);
    expect((await site.parcel(parcel.id)).run).toMatchObject({ id: confirmed.id, state: 'confirmed' });
  });

  it('keeps the last proposal to be looked at again, with its runs as they are now', async () => {
    await site.booked(breeder, wednesday);
    const proposal = await site.propose();
    const run = await site.confirm(proposal.runs[0] as Run);
    const { body } = await (await site.who(coordinator)).get('/api/runs/proposals/latest').expect(200);
    expect(body).toEqual({ ...proposal, runs: [run] });
  });

  it('refuses days that are none', async () => {
    const answer = await (await site.who(coordinator)).post('/api/runs/proposals').send({ from: 'soon' });
    expect(answer.status).toBe(400);
    expect(answer.body).toMatchObject({
      errors: expect.arrayContaining([expect.objectContaining({ path: 'from' })]) as unknown,
    });
  });
});

describe('GET /runs', () => {
  it('shows coordinators and admins all of a run, and breeders their own part of it once it is confirmed', async () => {
    const mine = await site.booked(breeder, wednesday);
    await site.booked(otherBreeder, wednesday);
    await site.booked(otherBreeder, monday);
    const { runs } = await site.propose();
    const seen = async (email: string) =>
      (await (await site.who(email)).get('/api/runs').expect(200)).body as Run[];
    expect(await seen(admin)).toEqual(runs);
    expect(await seen(breeder)).toEqual([]);
    for (const run of runs) await site.confirm(run);
    expect(await seen(coordinator)).toHaveLength(2);
    expect(await seen(otherBreeder)).toHaveLength(2);
    const [own, ...more] = await seen(breeder);
    expect(more).toEqual([]);
    expect(own?.parcels.map(({ id }) => id)).toEqual([mine.id]);
    expect(own?.stops.map(({ breederId }) => breederId)).toEqual([site.ids.breeder]);
    // Where the driver lives is not theirs to know.
    expect(own?.coordinator).toMatchObject({ lat: 0, lon: 0 });
    expect(JSON.stringify(own)).not.toContain('Otto');
  });

  it("answers 404 for somebody else's run and for a proposal, as for one that is not there", async () => {
    await site.booked(breeder, wednesday);
    const [run] = (await site.propose()).runs;
    if (!run) throw new Error('No run.');
    const status = async (email: string) => (await (await site.who(email)).get(`/api/runs/${run.id}`)).status;
    expect(await status(breeder)).toBe(404);
    await site.confirm(run);
    expect(await status(breeder)).toBe(200);
    expect(await status(otherBreeder)).toBe(404);
    expect(await status(buyer)).toBe(403);
  });

  it('takes a window of days and states', async () => {
    await site.booked(breeder, wednesday);
    await site.booked(otherBreeder, monday);
    const { runs } = await site.propose();
    const early = runs.find(({ date }) => date === wednesday) as Run;
    await site.confirm(early);
    const caller = await site.who(coordinator);
    const dates = async (query: string) =>
      ((await caller.get(`/api/runs?${query}`).expect(200)).body as Run[]).map(({ date }) => date);
    expect(await dates(`from=${thursday}`)).toEqual([monday]);
    expect(await dates(`to=${saturday}`)).toEqual([wednesday]);
    expect(await dates('state=proposed')).toEqual([monday]);
    expect(await dates('state=confirmed,proposed')).toEqual([wednesday, monday]);
    const wrong = await caller.get('/api/runs?state=flying').expect(400);
    expect(wrong.body).toMatchObject({ errors: [{ path: 'state' }] });
  });
});
