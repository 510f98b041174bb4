import { checkPlan, type Plan, type PlannedRun, type Violation } from '@shared/pooling/check-plan';
import type { PoolProblem } from '@shared/pooling/problem';
import { breeder, counter, driver, monday, parcel, smallPool, tuesday } from '../support/small-pool';

/**
 * A run laid out by hand: leaving at 10:00 every leg here is under 20 minutes (the places are within 15 km), so both
 * stops are met in their windows (09:00 to 14:00) and the counter well before 16:30.
 */
const goodRun: PlannedRun = {
  runId: null,
  coordinatorId: 500,
  date: monday,
  counterId: 900,
  order: [1, 2],
  departMinute: 600,
  parcelIds: [1, 2],
  fixedCents: 1200,
  drivingCents: 0,
};
const goodPlan: Plan = { runs: [goodRun], unplacedIds: [] };
const withRun = (change: Partial<PlannedRun>): Plan => ({ ...goodPlan, runs: [{ ...goodRun, ...change }] });
const confirmed = {
  takes: 'more',
  runId: 77,
  coordinatorId: 500,
  date: monday,
  counterId: 900,
  stopIds: [2],
  volumeL: 30,
} as const;

interface Broken {
  readonly code: Violation['code'];
  readonly what: string;
  readonly problem?: Partial<PoolProblem>;
  readonly plan?: Plan;
}

const broken: readonly Broken[] = [
  { code: 'parcel-lost', what: 'forgets a parcel', plan: withRun({ parcelIds: [1], order: [1] }) },
  { code: 'parcel-twice', what: 'names a parcel twice', plan: { ...goodPlan, unplacedIds: [2] } },
  { code: 'parcel-unknown', what: 'names a parcel nobody has', plan: { ...goodPlan, unplacedIds: [9] } },
  {
    code: 'day-not-safe',
    what: 'ships on a day that is not safe',
    problem: {
      parcels: [parcel(1, { days: [{ date: tuesday, penaltyCents: 0 }] }), parcel(2, { stopId: 2 })],
    },
  },
  {
    code: 'wrong-counter',
    what: 'takes a parcel to a counter it was not judged for',
    problem: { parcels: [parcel(1, { counterId: 901 }), parcel(2, { stopId: 2 })] },
  },
  {
    code: 'breeder-away',
    what: 'calls at somebody who is away',
    problem: { stops: [breeder(1, { daysAway: [monday] }), breeder(2)] },
  },
  {
    code: 'pin-broken',
    what: 'moves a pin',
    problem: { pins: [{ parcelId: 1, coordinatorId: 500, date: tuesday, counterId: 900 }] },
  },
  { code: 'no-stop', what: 'does not stop for a parcel', plan: withRun({ order: [2] }) },
  {
    code: 'idle-stop',
    what: 'stops where nothing waits',
    problem: { stops: [breeder(1), breeder(2), breeder(3)] },
    plan: withRun({ order: [1, 2, 3] }),
  },
  { code: 'stop-twice', what: 'stops twice at one place', plan: withRun({ order: [1, 2, 1] }) },
  {
    code: 'confirmed-stop-lost',
    what: 'leaves out a confirmed stop',
    problem: { fixedRuns: [confirmed], parcels: [parcel(1)] },
    plan: withRun({ runId: 77, order: [1], parcelIds: [1] }),
  },
  {
    code: 'capacity',
    what: 'overloads the vehicle',
    problem: { coordinators: [driver({ capacityL: 39.9 })] },
  },
  {
    code: 'capacity',
    what: 'overloads a vehicle that is loaded already',
    problem: {
      fixedRuns: [{ ...confirmed, volumeL: 60.5 }],
      parcels: [parcel(1), parcel(2, { stopId: 2 })],
    },
    plan: withRun({ runId: 77 }),
  },
  {
    code: 'window',
    what: 'comes after a window has closed',
    problem: { stops: [breeder(1, { windowOpenMinute: 540, windowCloseMinute: 600 }), breeder(2)] },
  },
  {
    code: 'cut-off',
    what: 'misses the cut-off',
    problem: { counters: [counter({ cutOffMinutes: { [monday]: 640 } })] },
  },
  {
    code: 'cut-off',
    what: 'is in time for the cut-off but not for the minutes before it',
    problem: { counters: [counter({ cutOffMinutes: { [monday]: 690 } })] },
    plan: withRun({ departMinute: 625 }),
  },
  {
    code: 'too-long',
    what: 'is on the road too long',
    problem: { coordinators: [driver({ longestRunMinutes: 40 })] },
  },
  {
    code: 'too-long',
    what: 'waits so long that it is too long',
    problem: { stops: [breeder(1, { windowOpenMinute: 800 }), breeder(2, { windowCloseMinute: 1000 })] },
    plan: withRun({ departMinute: 500 }),
  },
  { code: 'too-early', what: 'leaves before now', problem: { earliestMinutes: { [monday]: 601 } } },
  {
    code: 'driver-not-free',
    what: 'takes a driver who is not free',
    problem: { coordinators: [driver({ freeDates: [tuesday] })] },
  },
  {
    code: 'driver-twice',
    what: 'sends a driver out twice',
    plan: {
      ...goodPlan,
      runs: [
        { ...goodRun, order: [1], parcelIds: [1] },
        { ...goodRun, order: [2], parcelIds: [2] },
      ],
    },
  },
  {
    code: 'driver-twice',
    what: 'sends out a driver whose run is confirmed',
    problem: { fixedRuns: [confirmed] },
  },
  {
    code: 'run-closed',
    what: 'adds to a run that only people add to',
    problem: { fixedRuns: [{ ...confirmed, takes: 'by-hand' }] },
    plan: withRun({ runId: 77 }),
  },
  {
    code: 'counter-closed',
    what: 'drives to a counter that takes nothing that day',
    problem: { counters: [counter({ cutOffMinutes: { [tuesday]: 1020 } })] },
  },
  { code: 'unknown', what: 'names a driver nobody knows', plan: withRun({ coordinatorId: 999 }) },
];

describe('the checker', () => {
  it('lets a plan pass that can be carried out', () => {
    expect(checkPlan(smallPool(), goodPlan)).toEqual([]);
    const onHold: Plan = { runs: [], unplacedIds: [1, 2] };
    expect(checkPlan(smallPool(), onHold)).toEqual([]);
  });

  it('lets parcels onto a confirmed run that has room and time', () => {
    const problem = smallPool({ fixedRuns: [confirmed], parcels: [parcel(1)] });
    expect(checkPlan(problem, withRun({ runId: 77, parcelIds: [1] }))).toEqual([]);
  });

  it.each(broken)('finds a plan that $what ($code)', ({ code, problem, plan }) => {
    const codes = checkPlan(smallPool(problem), plan ?? goodPlan).map((violation) => violation.code);
    expect(codes).toContain(code);
  });
});
