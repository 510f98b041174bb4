import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { bestPath, sequenceTable, type SequenceProblem } from '@shared/pooling/sequence';
import { centsOf, cheapestByHand, isKept, orders } from '../support/by-hand';
import { seeded } from '../support/pooling-cases';

jest.setTimeout(30_000);

interface Burma {
  readonly optimum: number;
  readonly towns: readonly (readonly [number, number])[];
}
const burma14 = JSON.parse(
  readFileSync(join(__dirname, '../fixtures/pooling/burma14.json'), 'utf8'),
) as Burma;

/** TSPLIB 95, section 2.4: GEO distances, with the π and the radius that the format prescribes. */
function geo(a: readonly [number, number], b: readonly [number, number]): number {
  const rad = (x: number) => {
    const degrees = Math.trunc(x);
    return (3.141592 * (degrees + (5 * (x - degrees)) / 3)) / 180;
  };
  const q1 = Math.cos(rad(a[1]) - rad(b[1]));
  const q2 = Math.cos(rad(a[0]) - rad(b[0]));
  const q3 = Math.cos(rad(a[0]) + rad(b[0]));
  return Math.trunc(6378.388 * Math.acos(0.5 * ((1 + q1) * q2 - (1 - q1) * q3)) + 1);
}

/** A round trip from the first town is a run that starts and ends there. */
function roundTrip(towns: Burma['towns']): SequenceProblem {
  const [home, ...rest] = towns;
  if (!home) throw new Error('No town.');
  const leg = (a: readonly [number, number], b: readonly [number, number]) => ({
    minutes: 0,
    cents: geo(a, b),
  });
  return {
    stops: rest.map((town) => ({
      openMinute: 0,
      closeMinute: 1440,
      serviceMinutes: 0,
      fromStart: leg(home, town),
      toEnd: leg(town, home),
    })),
    between: rest.map((a) => rest.map((b) => (a === b ? { minutes: 0, cents: 0 } : leg(a, b)))),
    earliestDepartMinute: 0,
    latestArriveMinute: 1440,
    longestMinutes: 1440,
  };
}

/** Stops scattered on a square; windows of two hours or so, some of which cannot be met. */
function randomRun(seed: number, stops: number): SequenceProblem {
  const random = seeded(seed);
  const place = () => ({ x: random() * 60, y: random() * 60 });
  const leg = (a: { x: number; y: number }, b: { x: number; y: number }) => {
    const far = Math.hypot(a.x - b.x, a.y - b.y);
    // Dear and slow need not go together: tolls, mileage, traffic.
    return { minutes: Math.ceil(far), cents: Math.round(far * (60 + 80 * random())) };
  };
  const start = place();
  const end = place();
  const places = Array.from({ length: stops }, place);
  return {
    stops: places.map((here) => {
      const openMinute = Math.floor(random() * 200);
      return {
        openMinute,
        closeMinute: openMinute + 20 + Math.floor(random() * 150),
        serviceMinutes: Math.floor(random() * 15),
        fromStart: leg(start, here),
        toEnd: leg(here, end),
      };
    }),
    between: places.map((a) => places.map((b) => leg(a, b))),
    earliestDepartMinute: Math.floor(random() * 60),
    latestArriveMinute: 260 + Math.floor(random() * 140),
    longestMinutes: 150 + Math.floor(random() * 150),
  };
}

describe('the best order of the stops', () => {
  it('finds the optimal tour of burma14, 3323 (TSPLIB 95)', () => {
    const path = bestPath(roundTrip(burma14.towns));
    expect(path?.cents).toBe(burma14.optimum);
    expect([...(path?.order ?? [])].sort((a, b) => a - b)).toEqual(Array.from({ length: 13 }, (_, at) => at));
  });

  it('reads the coordinates as TSPLIB means them: towns 1 and 2 are 153 km apart', () => {
    // 16°47' N, 96°10' E and 94°44' E: 1°26' of longitude, 1.4333° · cos 16.783° · 111.32 km = 152.8, rounded up by the format.
    expect(geo([16.47, 96.1], [16.47, 94.44])).toBe(153);
  });

  const cases = Array.from({ length: 60 }, (_, index) => ({ seed: index + 1, stops: 1 + (index % 5) }));
  it.each(cases)(
    'costs what trying every order at every minute costs (seed $seed, $stops stops)',
    ({ seed, stops }) => {
      const problem = randomRun(seed, stops);
      const path = bestPath(problem);
      expect(path?.cents ?? Infinity).toBeCloseTo(cheapestByHand(problem), 6);
      if (!path) return;
      expect(centsOf(problem, path.order)).toBeCloseTo(path.cents, 6);
      expect(isKept(problem, path.order, path.departMinute)).toBe(true);
      // It is the latest departure: a minute later something is missed.
      expect(isKept(problem, path.order, path.departMinute + 1)).toBe(false);
    },
  );

  it('is right in six hundred more cases with narrow windows and little time', () => {
    for (let seed = 5000; seed < 5600; seed++) {
      const wide = randomRun(seed, 5);
      const problem = {
        ...wide,
        stops: wide.stops.map((stop) => ({ ...stop, closeMinute: stop.openMinute + 40 + (seed % 3) * 30 })),
        latestArriveMinute: 400,
        longestMinutes: 110 + (seed % 10) * 15,
      };
      expect(bestPath(problem)?.cents ?? Infinity).toBeCloseTo(cheapestByHand(problem), 6);
    }
  });

  it('has both kinds among these cases: runs that can be driven and runs that cannot', () => {
    const paths = cases.map(({ seed, stops }) => bestPath(randomRun(seed, stops)));
    expect(paths.filter((path) => path === null).length).toBeGreaterThan(5);
    expect(paths.filter((path) => path !== null).length).toBeGreaterThan(20);
  });

  it('answers every subset of the stops as if it were asked alone', () => {
    for (const seed of [101, 102, 103, 104]) {
      const whole = randomRun(seed, 4);
      const table = sequenceTable(whole);
      for (let mask = 1; mask < 16; mask++) {
        const some = [0, 1, 2, 3].filter((at) => mask & (1 << at));
        const alone: SequenceProblem = {
          ...whole,
          stops: some.flatMap((at) => whole.stops[at] ?? []),
          between: some.map((a) => some.flatMap((b) => whole.between[a]?.[b] ?? [])),
        };
        expect(table.cents(mask)).toBeCloseTo(cheapestByHand(alone), 6);
      }
    }
  });

  it('waits at home rather than at a closed door', () => {
    // One stop, 30 minutes away, open from 09:00: leaving at 08:30 or later keeps nobody waiting.
    const problem: SequenceProblem = {
      stops: [
        {
          openMinute: 540,
          closeMinute: 600,
          serviceMinutes: 10,
          fromStart: { minutes: 30, cents: 100 },
          toEnd: { minutes: 20, cents: 50 },
        },
      ],
      between: [[{ minutes: 0, cents: 0 }]],
      earliestDepartMinute: 0,
      latestArriveMinute: 605,
      longestMinutes: 60,
    };
    // At the counter by 10:05 means leaving the stop by 09:45, so being there by 09:35 and leaving home at 09:05.
    expect(bestPath(problem)).toEqual({ order: [0], cents: 150, departMinute: 545 });
  });

  it('takes both ends of a window and of the cut-off as still in time', () => {
    const exact: SequenceProblem = {
      stops: [
        {
          openMinute: 540,
          closeMinute: 540,
          serviceMinutes: 0,
          fromStart: { minutes: 10, cents: 1 },
          toEnd: { minutes: 10, cents: 1 },
        },
      ],
      between: [[{ minutes: 0, cents: 0 }]],
      earliestDepartMinute: 530,
      latestArriveMinute: 550,
      longestMinutes: 20,
    };
    expect(bestPath(exact)?.departMinute).toBe(530);
    expect(bestPath({ ...exact, latestArriveMinute: 549 })).toBeNull();
    expect(bestPath({ ...exact, longestMinutes: 19 })).toBeNull();
    expect(bestPath({ ...exact, earliestDepartMinute: 531 })).toBeNull();
  });

  it('has no path through no stops, and refuses more than sixteen', () => {
    expect(bestPath({ ...randomRun(1, 1), stops: [], between: [] })).toBeNull();
    expect(() => bestPath(randomRun(1, 17))).toThrow(RangeError);
  });

  it('counts the orders that the comparison goes through', () => {
    expect(orders([1, 2, 3, 4, 5])).toHaveLength(120);
  });
});
