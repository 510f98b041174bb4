import fc from 'fast-check';
import { shapleyValues, splitCost, wholeCents } from '@shared/money/split-cost';
import { orders } from '../support/by-hand';
import { seeded } from '../support/pooling-cases';

/** A game where every set of players costs as much as its dearest member: a runway as long as its largest user needs. */
const runway = (costs: readonly number[]) => (mask: number) =>
  Math.max(0, ...costs.filter((_, player) => mask & (1 << player)));

/** The definition word by word (Shapley 1953): what each adds to those before, averaged over every order of arrival. */
function averageOverOrders(players: number, costOf: (mask: number) => number): number[] {
  const all = orders(Array.from({ length: players }, (_, index) => index));
  const sums = Array.from({ length: players }, () => 0);
  for (const order of all) {
    let mask = 0;
    for (const player of order) {
      const before = mask === 0 ? 0 : costOf(mask);
      mask |= 1 << player;
      sums[player] = (sums[player] ?? 0) + costOf(mask) - before;
    }
  }
  return sums.map((sum) => sum / all.length);
}

/** A game with a random cost for every set. */
function randomGame(players: number, seed: number): (mask: number) => number {
  const random = seeded(seed);
  const costs = Array.from({ length: 1 << players }, () => Math.round(random() * 10_000));
  return (mask) => costs[mask] ?? NaN;
}

describe('the Shapley value', () => {
  it('of the airport game is what its rule gives by hand (Littlechild & Owen 1973; the rule from memory)', () => {
    // Each piece of the runway is shared by those who need it: 8/4, then 3/3, then 2/2, then 5/1.
    //   8/4 = 2;  2 + (11 − 8)/3 = 3;  3 + (13 − 11)/2 = 4;  4 + (18 − 13)/1 = 9
    const values = shapleyValues(4, runway([8, 11, 13, 18]));
    [2, 3, 4, 9].forEach((value, player) => expect(values[player]).toBeCloseTo(value, 12));
  });

  it('does not depend on who is named first', () => {
    const values = shapleyValues(4, runway([18, 8, 13, 11]));
    [9, 2, 4, 3].forEach((value, player) => expect(values[player]).toBeCloseTo(value, 12));
  });

  it.each([1, 2, 3, 4, 5, 6, 7])('is the average over every order of arrival, %i players', (players) => {
    for (const seed of [1, 2, 3]) {
      const game = randomGame(players, seed);
      const expected = averageOverOrders(players, game);
      shapleyValues(players, game).forEach((value, player) =>
        expect(value).toBeCloseTo(expected[player] ?? NaN, 6),
      );
    }
  });

  it('adds up to the cost of everybody together', () => {
    fc.assert(
      fc.property(fc.integer({ min: 1, max: 8 }), fc.nat(), (players, seed) => {
        const game = randomGame(players, seed);
        const sum = shapleyValues(players, game).reduce((a, b) => a + b, 0);
        expect(sum).toBeCloseTo(game((1 << players) - 1), 6);
      }),
      { seed: 20261201 },
    );
  });

  it('treats two who always add the same alike, and asks nothing of one who never adds anything', () => {
    // Players 0 and 1 count alike, player 2 counts twice, player 3 not at all.
    const weight = [1, 1, 2, 0];
    const game = (mask: number) => {
      const sum = weight.reduce((total, one, player) => (mask & (1 << player) ? total + one : total), 0);
      return 100 * sum - 7 * sum * sum;
    };
    const [first, second, third, idle] = shapleyValues(4, game);
    expect(first).toBeCloseTo(second ?? NaN, 12);
    expect(idle).toBeCloseTo(0, 12);
    expect(third).toBeGreaterThan(first ?? NaN);
  });

  it('asks no more than driving alone of anybody when joining never costs more than going alone', () => {
    // A subadditive game: the square root of the stops.
    const game = (mask: number) => 1000 * Math.sqrt(mask.toString(2).replaceAll('0', '').length);
    for (const value of shapleyValues(5, game)) expect(value).toBeLessThanOrEqual(1000);
  });

  it('is worked out for up to twelve players', () => {
    expect(shapleyValues(12, (mask) => mask.toString(2).replaceAll('0', '').length)).toHaveLength(12);
    expect(() => shapleyValues(13, () => 1)).toThrow(RangeError);
  });
});

describe('whole cents', () => {
  it('go to the largest remainders first', () => {
    // 100 cents in thirds: 33 each, one left for the first of equals.
    expect(wholeCents([100 / 3, 100 / 3, 100 / 3], 100)).toEqual([34, 33, 33]);
    // Remainders .2, .5 and .3: the one cent left goes to the second.
    expect(wholeCents([10.2, 20.5, 30.3], 61)).toEqual([10, 21, 30]);
    // Two cents left: .7 and .6 before .4 and .3.
    expect(wholeCents([1.4, 2.7, 3.6, 4.3], 12)).toEqual([1, 3, 4, 4]);
  });

  it('are exact for parts that are whole already', () => {
    expect(wholeCents([200, 300, 400, 900], 1800)).toEqual([200, 300, 400, 900]);
  });

  it('stay within a cent of the parts and add up', () => {
    const parts = fc.array(fc.double({ min: 0, max: 50_000, noNaN: true }), { minLength: 1, maxLength: 20 });
    fc.assert(
      fc.property(parts, (list) => {
        const total = Math.round(list.reduce((a, b) => a + b, 0));
        const cents = wholeCents(list, total);
        expect(cents.reduce((a, b) => a + b, 0)).toBe(total);
        cents.forEach((one, index) => expect(Math.abs(one - (list[index] ?? NaN))).toBeLessThan(1.001));
      }),
      { seed: 20261201 },
    );
  });
});

describe("a run's shares", () => {
  it('by hand: two breeders, three parcels', () => {
    // Driving: the near one alone 1000, the far one alone 1600, both 1800.
    //   near (1000 + (1800 − 1600)) / 2 = 600; far (1600 + (1800 − 1000)) / 2 = 1200
    // Fixed 1200 in three equal parts of 400. The near breeder has two parcels: 400 + 300 each; the far one 400 + 1200.
    const driving = [0, 1000, 1600, 1800];
    const shares = splitCost(
      [
        { parcelId: 1, breederId: 7 },
        { parcelId: 2, breederId: 9 },
        { parcelId: 3, breederId: 7 },
      ],
      { fixedCents: 1200, drivingCents: 1800 },
      (mask) => driving[mask] ?? NaN,
    );
    expect([...shares]).toEqual([
      [1, 700],
      [2, 1600],
      [3, 700],
    ]);
  });

  it('add up to fixed and driving to the cent, whatever the run', () => {
    const sharers = fc.array(fc.record({ parcelId: fc.nat(), breederId: fc.integer({ min: 1, max: 8 }) }), {
      minLength: 1,
      maxLength: 25,
    });
    fc.assert(
      fc.property(sharers, fc.nat(10_000), fc.nat(), (list, fixedCents, seed) => {
        const named = list.map((one, index) => ({ ...one, parcelId: index + 1 }));
        const players = new Set(named.map(({ breederId }) => breederId)).size;
        const game = randomGame(players, seed);
        const drivingCents = game((1 << players) - 1);
        const shares = splitCost(named, { fixedCents, drivingCents }, game);
        expect(shares.size).toBe(named.length);
        expect([...shares.values()].every(Number.isInteger)).toBe(true);
        expect([...shares.values()].reduce((a, b) => a + b, 0)).toBe(fixedCents + drivingCents);
      }),
      { seed: 20261201 },
    );
  });

  it('are none without parcels, and all of it for one alone', () => {
    expect(splitCost([], { fixedCents: 0, drivingCents: 0 }, () => 0).size).toBe(0);
    const alone = splitCost(
      [{ parcelId: 4, breederId: 2 }],
      { fixedCents: 1200, drivingCents: 3456 },
      () => 3456,
    );
    expect([...alone]).toEqual([[4, 4656]]);
  });
});
