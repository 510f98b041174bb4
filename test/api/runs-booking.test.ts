import type { DaysAnswer, Parcel, Run } from '@shared/contract';
import {
  admin,
  breeder,
  coordinator,
  createRunSite,
  monday,
  otherBreeder,
  sharesOf,
  wednesday,
  type RunSite,
} from '../support/run-site';

let site: RunSite;
beforeEach(async () => {
  site = await createRunSite();
});
afterEach(() => site.close());

const both = async (): Promise<{ mine: Parcel; theirs: Parcel; run: Run }> => {
  const mine = await site.booked(breeder, wednesday);
  const theirs = await site.booked(otherBreeder, wednesday);
  return { mine, theirs, run: await site.byHand(wednesday, [mine, theirs]) };
};
const book = async (email: string, parcel: Parcel, body: object) =>
  (await site.who(email)).put(`/api/parcels/${parcel.id}/booking`).send(body).expect(200);

describe('a day that has a run', () => {
  it('is marked in the strip with the room that is left', async () => {
    const { run } = await both();
    const waiting = await site.draft(breeder);
    const caller = await site.who(breeder);
    const notch = async () => {
      const { body } = await caller.get(`/api/parcels/${waiting.id}/days`).expect(200);
      return (body as DaysAnswer).days.find(({ date }) => date === wednesday)?.run;
    };
    const roomL = Math.round((300 - run.loadL) * 10) / 10;
    expect(await notch()).toEqual({ id: run.id, state: 'proposed', roomL });
    await site.confirm(run);
    expect(await notch()).toEqual({ id: run.id, state: 'confirmed', roomL });
  });

  it('takes a booking without putting it on the run: the coordinator decides', async () => {
    const { run } = await both();
    await site.confirm(run);
    const late = await site.booked(breeder, wednesday);
    expect(late.run).toBeNull();
    expect((await site.run(run.id)).parcels).toHaveLength(2);
  });
});

describe('a parcel that leaves its day', () => {
  it('leaves its proposed run, which is sequenced and shared anew', async () => {
    const { mine, theirs, run } = await both();
    await book(breeder, mine, { date: monday });
    const after = await site.run(run.id);
    expect(after.parcels.map(({ id }) => id)).toEqual([theirs.id]);
    expect(after.stops.map(({ breederId, seq }) => [breederId, seq])).toEqual([[site.ids.otherBreeder, 1]]);
    expect(after.costCents).not.toBe(run.costCents);
    expect(sharesOf(after)).toBe(after.costCents);
    expect(after.version).toBeGreaterThan(run.version);
  });

  it('leaves its confirmed run; the others carry the cost and those whose plan changes are told', async () => {
    const { mine, theirs, run } = await both();
    await site.confirm(run);
    const before = (await site.mails()).length;
    await (await site.who(breeder)).delete(`/api/parcels/${mine.id}/booking`).expect(200);
    const after = await site.run(run.id);
    expect(after.state).toBe('confirmed');
    expect((await site.parcel(theirs.id)).shareCents).toBe(after.costCents);
    expect((await site.parcel(mine.id)).shareCents).toBeNull();
    const cancelled = (await site.mails()).slice(before).filter(({ method }) => method === 'CANCEL');
    expect(cancelled.map(({ to }) => to)).toContain(breeder);
  });

  it('calls the run off when it was the last on it', async () => {
    const { mine, theirs, run } = await both();
    await site.confirm(run);
    await book(breeder, mine, { date: monday });
    await (
      await site.who(otherBreeder)
    )
      .patch(`/api/parcels/${theirs.id}`)
      .send({ state: 'cancelled' })
      .expect(200);
    expect(await site.run(run.id)).toMatchObject({ state: 'called-off', parcels: [] });
  });

  it('stays on its run when it is booked again on the same day', async () => {
    const { mine, run } = await both();
    await book(breeder, mine, { date: wednesday });
    expect((await site.run(run.id)).parcels).toHaveLength(2);
  });

  it('is taken off by a closing on its day, and the run goes on without it', async () => {
    const { mine, theirs, run } = await both();
    await site.confirm(run);
    await site.deps.services.parcels.putOnHold(mine.id, 'Its counter is closed.', null);
    expect(await site.parcel(mine.id)).toMatchObject({ state: 'on-hold', run: null, shareCents: null });
    const after = await site.run(run.id);
    expect(after.parcels.map(({ id }) => id)).toEqual([theirs.id]);
    expect(sharesOf(after)).toBe(after.costCents);
    // A second time changes nothing and tells nobody.
    const mails = await site.mails();
    await site.deps.services.parcels.putOnHold(mine.id, 'Its counter is closed.', null);
    expect(await site.mails()).toEqual(mails);
    expect(await site.run(run.id)).toEqual(after);
  });
});

describe('a day off', () => {
  const dayOff = { daysAway: [{ from: wednesday, to: wednesday, note: '' }], drivingDays: [] };

  it('of the driver keeps a proposed run from being confirmed', async () => {
    const { run } = await both();
    await (await site.who(coordinator)).put('/api/me/availability').send(dayOff).expect(200);
    const answer = await (await site.who(admin)).post(`/api/runs/${run.id}/confirmation`).expect(409);
    expect((answer.body as { detail: string }).detail).toContain(
      'Cora Coordinator does not drive on Wednesday',
    );
  });

  it('of a breeder does too', async () => {
    const { mine, run } = await both();
    await (await site.who(breeder)).put('/api/me/availability').send(dayOff).expect(200);
    const answer = await (await site.who(coordinator)).post(`/api/runs/${run.id}/confirmation`).expect(409);
    expect((answer.body as { detail: string }).detail).toContain(`${mine.code} is shut on Wednesday`);
  });
});

describe("the circle's clock", () => {
  it('is what minutes mean, also on the day the clocks change', async () => {
    const sunday = '2027-03-14';
    site.setNow('2027-03-13T14:00:00.000Z');
    const everyDay = JSON.stringify(Object.fromEntries([1, 2, 3, 4, 5, 6, 7].map((day) => [day, 1020])));
    await site
      .db('counters')
      .update({ working_days: '[1,2,3,4,5,6,7]', cut_off_minutes: everyDay })
      .where({ can_drop_off: true });
    const parcel = await site.draft(breeder, { readyFrom: sunday, latestDate: '2027-03-20' });
    await site.deps.services.parcels.move(parcel.id, 'booked', null, 'Booked.', { shipDate: sunday });
    const run = await site.byHand(sunday, [parcel]);
    // Clocks went forward at 02:00: 17:00 in Texas is 22:00 UTC, an hour earlier than on the day before.
    expect(run.cutOffAt).toBe('2027-03-14T22:00:00.000Z');
    // The stop is met between 09:00 and 16:00 on the clock, 14:00 to 21:00 UTC, and the counter by 16:30.
    expect(Date.parse(run.stops[0]?.arriveAt ?? '')).toBeLessThanOrEqual(
      Date.parse('2027-03-14T21:00:00.000Z'),
    );
    expect(run.slackMinutes).toBeGreaterThanOrEqual(30);
    // Driving, waiting and service fill the time between: nothing is lost or won with the hour.
    const [stop] = run.stops;
    const minutes = (from: string, to: string) => (Date.parse(to) - Date.parse(from)) / 60_000;
    expect(minutes(run.departAt, stop?.arriveAt ?? '')).toBe(stop?.driveMinutes);
    expect(minutes(stop?.leaveAt ?? '', run.arriveAt)).toBe(run.lastLegMinutes);
  });
});
