import fc from 'fast-check';
import highsLoader from 'highs';
import { highsSolver } from '@api/runs/highs-solver';
import { checkPlan } from '@shared/pooling/check-plan';
import { allColumns, isSmall } from '@shared/pooling/columns';
import { draftOf, fillByRegret } from '@shared/pooling/construct';
import { searchPlan } from '@shared/pooling/improve';
import { createInstance } from '@shared/pooling/instance';
import { milpText, type SolveMilp } from '@shared/pooling/milp';
import { objectiveCents, type Placement } from '@shared/pooling/plan';
import { planOf, planRuns, type PlanOptions } from '@shared/pooling/plan-runs';
import type { PoolProblem } from '@shared/pooling/problem';
import { cheapestPlanByHand, faultsByHand } from '../support/plan-by-hand';
import { timeline } from '@shared/pooling/timeline';
import { arrival, cheapestByHand, found, legsOf } from '../support/by-hand';
import { poolCase, weekDays, type CaseSize } from '../support/pooling-cases';

jest.setTimeout(60_000);

const options: PlanOptions = { seed: 1, rounds: 40, shouldStop: () => false, milpSeconds: 5 };
const noSolver: SolveMilp = () => ({ status: 'failed', objective: null, bound: null, values: null });

let solve: SolveMilp;
beforeAll(async () => {
  solve = highsSolver(await highsLoader());
});

/** Small enough to try every assignment: at most (1 + 2 drivers × 3 days) per parcel. */
const small = Array.from({ length: 40 }, (_, index): CaseSize => ({
  seed: 1000 + index,
  parcels: 3 + (index % 3),
  breeders: 2 + (index % 3),
  coordinators: 1 + (index % 2),
  counters: 1 + (index % 4 === 3 ? 1 : 0),
  dates: weekDays.slice(0, 2 + (index % 2)),
  pins: index % 5 === 4 ? 1 : 0,
}));

describe('a plan against trying every assignment', () => {
  it.each(small)('is the cheapest there is, and its bound proves it (seed $seed)', (size) => {
    const problem = poolCase(size);
    const result = planRuns(problem, solve, options);
    const cheapest = cheapestPlanByHand(problem);
    expect(result.objectiveCents).toBe(cheapest);
    expect(result.boundCents).toBe(cheapest);
    expect(result.boundKind).toBe('proven');
    for (const run of result.runs) expect(faultsByHand(problem, run)).toEqual([]);
  });

  it.each(small)(
    'is never better than that without the solver, and then claims no bound (seed $seed)',
    (size) => {
      const problem = poolCase(size);
      const result = planRuns(problem, noSolver, options);
      expect(result.objectiveCents).toBeGreaterThanOrEqual(cheapestPlanByHand(problem));
      const nothingToSolve =
        createInstance(problem).slots.length === 0 || result.boundCents === result.objectiveCents;
      expect(result.boundKind === 'estimate' || nothingToSolve).toBe(true);
    },
  );

  it('has cases among these in which parcels stay and in which runs are pooled', () => {
    const results = small.map((size) => planRuns(poolCase(size), solve, options));
    const count = (is: (result: (typeof results)[number]) => boolean) => results.filter(is).length;
    expect(count(({ unplacedIds }) => unplacedIds.length > 0)).toBeGreaterThan(3);
    expect(count(({ runs: driven }) => driven.some(({ order }) => order.length > 1))).toBeGreaterThan(5);
    expect(count(({ runs: driven }) => driven.length > 1)).toBeGreaterThan(3);
  });

  it('costs in money what its runs cost, preferences and unplaced parcels apart', () => {
    for (const size of small) {
      const problem = poolCase(size);
      const result = planRuns(problem, solve, options);
      const money = result.runs.reduce(
        (sum, run) =>
          sum + problem.costs.runFixedCents + Math.round(cheapestByHand(legsOf(problem, run, run.order))),
        0,
      );
      expect(result.costCents).toBe(money);
    }
  });
});

const sizes = fc.record({
  seed: fc.nat(1_000_000),
  parcels: fc.integer({ min: 0, max: 14 }),
  breeders: fc.integer({ min: 1, max: 7 }),
  coordinators: fc.integer({ min: 1, max: 3 }),
  counters: fc.integer({ min: 1, max: 2 }),
  dates: fc.constantFrom(weekDays.slice(0, 1), weekDays.slice(0, 2), [...weekDays]),
  pins: fc.integer({ min: 0, max: 3 }),
  fixedRun: fc.boolean(),
});
const runs = { numRuns: 150, seed: 20261201 };

/** Parcels named once, on runs that can be driven, at most one run a driver and day, none over a decided run. */
function holds(problem: PoolProblem, plan: ReturnType<typeof planOf>): void {
  const named = [...plan.runs.flatMap(({ parcelIds }) => parcelIds), ...plan.unplacedIds];
  expect(named.toSorted((a, b) => a - b)).toEqual(problem.parcels.map(({ id }) => id));
  const days = plan.runs.map((run) => `${run.coordinatorId} ${run.date}`);
  expect(new Set(days).size).toBe(days.length);
  for (const run of plan.runs) {
    expect(faultsByHand(problem, run)).toEqual([]);
    const stops = run.order.map((id) => found(problem.stops, id));
    const driver = found(problem.coordinators, run.coordinatorId);
    const counter = found(problem.counters, run.counterId);
    const clock = timeline(driver, stops, counter, run.departMinute, problem.costs.circuity);
    const order = run.order.map((_, index) => index);
    expect(clock.arriveMinute).toBe(arrival(legsOf(problem, run, run.order), order, run.departMinute));
  }
}

describe('whatever the input', () => {
  it('no run is over capacity, past its cut-off or on a shut day, and no pin is moved', () => {
    fc.assert(
      fc.property(sizes, (size) => {
        const problem = poolCase(size);
        holds(problem, planRuns(problem, noSolver, options));
      }),
      runs,
    );
  });

  it('the same holds with the solver', () => {
    fc.assert(
      fc.property(sizes, (size) => {
        const problem = poolCase(size);
        holds(problem, planRuns(problem, solve, { ...options, rounds: 5 }));
      }),
      { ...runs, numRuns: 40 },
    );
  });

  it('what is built and what is improved can be driven, and improving never costs more', () => {
    fc.assert(
      fc.property(sizes, (size) => {
        const problem = poolCase(size);
        const instance = createInstance(problem);
        const built = draftOf(instance, []);
        fillByRegret(instance, built);
        const improved = searchPlan(instance, { ...options, sawRun: () => undefined });
        for (const placement of [built.at, improved] satisfies Placement[])
          holds(problem, planOf(instance, placement));
        expect(objectiveCents(instance, improved)).toBeLessThanOrEqual(objectiveCents(instance, built.at));
      }),
      { ...runs, numRuns: 60 },
    );
  });

  it('the same seed gives the same plan, and nothing that came in is changed', () => {
    fc.assert(
      fc.property(sizes, (size) => {
        const problem = poolCase(size);
        const before = JSON.stringify(problem);
        const first = planRuns(problem, noSolver, options);
        expect(planRuns(problem, noSolver, options)).toEqual(first);
        expect(JSON.stringify(problem)).toBe(before);
      }),
      { ...runs, numRuns: 25 },
    );
  });

  it('the bound never exceeds the cost of the plan', () => {
    fc.assert(
      fc.property(sizes, (size) => {
        const result = planRuns(poolCase(size), solve, { ...options, rounds: 2 });
        expect(result.boundCents).toBeLessThanOrEqual(result.objectiveCents);
      }),
      { ...runs, numRuns: 25 },
    );
  });
});

describe('the columns of the model', () => {
  it('list every set of breeders that can be driven, at its cheapest', () => {
    for (const size of small.slice(0, 12)) {
      const problem = poolCase({ ...size, pins: 0 });
      const instance = createInstance(problem);
      expect(isSmall(instance)).toBe(true);
      const columns = allColumns(instance);
      for (const slot of instance.slots) {
        const breeders = [...new Set(slot.eligible.map((at) => problem.parcels[at]?.stopId ?? -1))];
        for (let mask = 1; mask < 1 << breeders.length; mask++) {
          const ids = breeders.filter((_, bit) => mask & (1 << bit)).sort((a, b) => a - b);
          const cents = Math.round(cheapestByHand(legsOf(problem, slot, ids))) + problem.costs.runFixedCents;
          const column = columns.find((one) => one.slot === slot.index && one.stopIds.join() === ids.join());
          const least = ids.reduce(
            (sum, id) =>
              sum +
              Math.min(
                ...slot.eligible.flatMap((at) =>
                  problem.parcels[at]?.stopId === id ? [problem.parcels[at].volumeL] : [],
                ),
              ),
            0,
          );
          if (cents === Infinity || least > slot.roomL) expect(column).toBeUndefined();
          else expect(column?.cents).toBe(cents);
        }
      }
    }
  });

  it('make a model that HiGHS reads and solves to a plan of the very cost it names', () => {
    for (const size of small.slice(0, 12)) {
      const instance = createInstance(poolCase(size));
      const columns = allColumns(instance);
      if (columns.length === 0) continue;
      const text = milpText(instance, columns);
      expect(Math.max(...text.split('\n').map((line) => line.length))).toBeLessThanOrEqual(255);
      const answer = solve(text, 5);
      expect(answer.status).toBe('optimal');
      expect(answer.objective).toBeCloseTo(cheapestPlanByHand(instance.problem), 3);
    }
  });
});

describe('a decided run', () => {
  const base = poolCase({
    seed: 3,
    parcels: 6,
    breeders: 3,
    coordinators: 1,
    dates: weekDays.slice(0, 1),
    fixedRun: true,
  });

  it('that only people add to gets nothing from a plan', () => {
    const problem = {
      ...base,
      fixedRuns: base.fixedRuns.map((run) => ({ ...run, takes: 'by-hand' as const })),
    };
    const result = planRuns(problem, solve, options);
    expect(result.runs).toEqual([]);
    expect(result.unplacedIds).toHaveLength(6);
    expect(checkPlan(problem, result)).toEqual([]);
  });
});
