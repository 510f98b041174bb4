import highsLoader from 'highs';
import { highsSolver } from '@api/runs/highs-solver';
import { explainUnplaced } from '@shared/pooling/explain-unplaced';
import type { SolveMilp } from '@shared/pooling/milp';
import { planRuns, type PlanResult } from '@shared/pooling/plan-runs';
import type { PoolProblem } from '@shared/pooling/problem';
import { breeder, counter, driver, monday, parcel, smallPool, tuesday } from '../support/small-pool';

let solve: SolveMilp;
beforeAll(async () => {
  solve = highsSolver(await highsLoader());
});
const plan = (change: Partial<PoolProblem>): PlanResult =>
  planRuns(smallPool(change), solve, { seed: 1, rounds: 20, shouldStop: () => false, milpSeconds: 5 });
const only = (result: PlanResult, parcelId: number) => {
  const left = result.unplaced.find((one) => one.parcelId === parcelId);
  if (!left) throw new Error(`Parcel ${parcelId} was placed.`);
  return left;
};
const confirmed = {
  runId: 77,
  coordinatorId: 500,
  date: monday,
  counterId: 900,
  stopIds: [2],
  volumeL: 30,
};

describe('why a parcel stays behind', () => {
  it('says nothing of parcels that ride', () => {
    expect(plan({}).unplaced).toEqual([]);
  });

  it('none of its days is safe', () => {
    const left = only(plan({ parcels: [parcel(1, { days: [] })] }), 1);
    expect(left).toMatchObject({ reason: 'no-safe-day', help: null });
  });

  it('another day would do, and it says which', () => {
    const left = only(plan({ parcels: [parcel(1, { days: [], elsewhere: [tuesday] })] }), 1);
    expect(left.reason).toBe('no-safe-day');
    expect(left.help).toMatch(/^Booking it on Tue, Dec 8 would place it with Cora for \$\d+\.\d\d more\.$/);
    const open = only(plan({ parcels: [parcel(1, { days: [], elsewhere: [tuesday], dayFixed: false })] }), 1);
    expect(open.help).toMatch(/^Opening its span to Tue, Dec 8 /);
  });

  it('the weather is not known yet', () => {
    const left = only(plan({ parcels: [parcel(1, { days: [], unknownDates: ['2026-12-14'] })] }), 1);
    expect(left).toMatchObject({ reason: 'weather-unknown' });
    expect(left.text).toContain('Mon, Dec 14');
  });

  it('nobody is free to drive; somebody who is asked could', () => {
    const left = only(plan({ coordinators: [driver({ freeDates: [tuesday] })] }), 1);
    expect(left.reason).toBe('no-driver');
    expect(left.text).toContain('Mon, Dec 7');
    expect(left.help).toMatch(/^A driver on Mon, Dec 7 would place it: with Cora it would cost \$/);
  });

  it('the breeder is away on the day', () => {
    const left = only(plan({ stops: [breeder(1, { daysAway: [monday] }), breeder(2)] }), 1);
    expect(left).toMatchObject({ reason: 'no-safe-day', text: 'Breeder 1 is away on Mon, Dec 7.' });
  });

  it('nobody knows where the breeder lives', () => {
    const left = only(plan({ stops: [breeder(2)] }), 1);
    expect(left.reason).toBe('no-driver');
    expect(left.text).toContain('not known');
  });

  it('there is no room, and how much is lacking', () => {
    const parcels = [parcel(1, { volumeL: 60 }), parcel(2, { stopId: 2, volumeL: 55.3 })];
    const result = plan({ parcels });
    expect(result.unplaced).toHaveLength(1);
    const [left] = result.unplaced;
    expect(left?.reason).toBe('no-room');
    // One of the two rides; 100 L less its volume is left for the other: 15.3 L too little either way.
    expect(left?.help).toBe('15.3 L more room with Cora on Mon, Dec 7 would place it.');
  });

  it('it fits into no vehicle at all', () => {
    const left = only(plan({ parcels: [parcel(1, { volumeL: 130 })] }), 1);
    expect(left.reason).toBe('no-room');
    expect(left.text).toBe('It needs 130 L; the most room left on Mon, Dec 7 is 100 L.');
    expect(left.help).toBe('30 L more room with Cora on Mon, Dec 7 would place it.');
  });

  it('nobody could be at the counter in time', () => {
    const late = breeder(1, { windowOpenMinute: 985, windowCloseMinute: 1200 });
    expect(only(plan({ stops: [late, breeder(2)] }), 1).reason).toBe('too-late');
  });

  it('the run cannot make one more stop in time', () => {
    // Each alone can be met; both windows are the same minute at two places.
    const at = { windowOpenMinute: 600, windowCloseMinute: 600 };
    const result = plan({ stops: [breeder(1, at), breeder(2, at)] });
    expect(result.unplaced).toHaveLength(1);
    expect(result.unplaced[0]).toMatchObject({ reason: 'too-late' });
    expect(result.unplaced[0]?.text).toContain('one more stop');
  });

  it('the driver is bound for another counter', () => {
    const other = counter({ id: 901, name: 'Second counter' });
    const parcels = [parcel(1), parcel(3), parcel(2, { stopId: 2, counterId: 901 })];
    const left = only(plan({ parcels, counters: [counter(), other] }), 2);
    expect(left.reason).toBe('no-driver');
    expect(left.text).toContain('another counter');
  });

  it('taking it costs more than leaving it is worth', () => {
    const costs = { ...smallPool().costs, unplacedCents: 900 };
    const left = only(plan({ parcels: [parcel(1)], costs }), 1);
    expect(left.reason).toBe('too-costly');
    expect(left.text).toMatch(/would add \$\d+\.\d\d\.$/);
  });

  it('its pin is on a day that is not safe any more', () => {
    const left = only(
      plan({ pins: [{ parcelId: 1, coordinatorId: 500, date: tuesday, counterId: 900 }] }),
      1,
    );
    expect(left).toMatchObject({ reason: 'no-safe-day' });
    expect(left.text).toContain('pinned to Tue, Dec 8');
  });

  it('the driver it is pinned to is not free any more', () => {
    const coordinators = [driver({ freeDates: [] }), driver({ id: 501, name: 'Dan' })];
    const left = only(
      plan({ coordinators, pins: [{ parcelId: 1, coordinatorId: 500, date: monday, counterId: 900 }] }),
      1,
    );
    expect(left).toMatchObject({ reason: 'no-driver' });
    expect(left.text).toContain('pinned');
  });

  it('the only run is confirmed: a person may still put it there', () => {
    const left = only(plan({ fixedRuns: [{ ...confirmed, takes: 'by-hand' }], parcels: [parcel(1)] }), 1);
    expect(left.reason).toBe('no-driver');
    expect(left.text).toContain('confirmed already');
    expect(left.help).toMatch(/^Put on the confirmed run of Cora on Mon, Dec 7 by hand it would add \$/);
    const gone = only(plan({ fixedRuns: [{ ...confirmed, takes: 'nothing' }], parcels: [parcel(1)] }), 1);
    expect(gone.help).toBeNull();
  });

  it('the search was ended before it found a place', () => {
    expect(explainUnplaced(smallPool(), [-1, -1], 0).reason).toBe('not-tried');
  });
});
