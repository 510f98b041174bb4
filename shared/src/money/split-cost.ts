/** A parcel whose breeder shares in the cost of a run. */
export interface Sharer {
  readonly parcelId: number;
  readonly breederId: number;
}

/**
 * The exact Shapley value of a game of up to 12 players (Shapley 1953): what each adds to the players before, averaged
 * over all orders. `costOf` is asked for every subset of the players as a bit mask; the empty one costs 0.
 */
export function shapleyValues(players: number, costOf: (mask: number) => number): number[] {
  if (players > 12)
    throw new RangeError(`The exact value is worked out for up to 12 players, not ${players}.`);
  // weight[s] = s! (n − s − 1)! / n!, by recursion to stay within small numbers
  const weight = Array.from({ length: players }, () => 1 / players);
  for (let s = 1; s < players; s++) weight[s] = ((weight[s - 1] as number) * s) / (players - s);
  const costs = Array.from({ length: 1 << players }, (_, mask) => (mask === 0 ? 0 : costOf(mask)));
  const values = Array.from({ length: players }, () => 0);
  for (let mask = 0; mask < 1 << players; mask++) {
    const size = bits(mask);
    for (let player = 0; player < players; player++)
      if (!(mask & (1 << player)))
        values[player] =
          (values[player] as number) +
          (weight[size] as number) * ((costs[mask | (1 << player)] as number) - (costs[mask] as number));
  }
  return values;
}

/** Whole cents that add up to `totalCents`, as near to the given parts as can be (largest remainder; ties to the first). */
export function wholeCents(parts: readonly number[], totalCents: number): number[] {
  const floors = parts.map((part) => Math.floor(part + 1e-9));
  const rest = totalCents - floors.reduce((sum, cents) => sum + cents, 0);
  const order = parts
    .map((part, index) => ({ index, remainder: part - (floors[index] as number) }))
    .sort((a, b) => b.remainder - a.remainder || a.index - b.index);
  const shares = [...floors];
  const step = Math.sign(rest);
  for (let given = 0; given < Math.abs(rest); given++) {
    const at = order[step > 0 ? given % order.length : order.length - 1 - (given % order.length)];
    if (at) shares[at.index] = (shares[at.index] as number) + step;
  }
  return shares;
}

/**
 * Each parcel's share of a run in whole cents, adding up to fixed and driving exactly. The fixed part falls equally on
 * every parcel; the driving falls on the breeders by the Shapley value of what each set of them alone would cost to
 * drive (`drivingOf`, breeders in ascending order as bits), and equally on a breeder's own parcels.
 */
export function splitCost(
  sharers: readonly Sharer[],
  cost: { readonly fixedCents: number; readonly drivingCents: number },
  drivingOf: (mask: number) => number,
): ReadonlyMap<number, number> {
  if (sharers.length === 0) return new Map();
  const breeders = [...new Set(sharers.map(({ breederId }) => breederId))].sort((a, b) => a - b);
  const driving = shapleyValues(breeders.length, drivingOf);
  const parts = sharers.map(({ breederId }) => {
    const own = sharers.filter((other) => other.breederId === breederId).length;
    return cost.fixedCents / sharers.length + (driving[breeders.indexOf(breederId)] as number) / own;
  });
  const cents = wholeCents(parts, cost.fixedCents + cost.drivingCents);
  return new Map(sharers.map(({ parcelId }, index) => [parcelId, cents[index] as number]));
}

function bits(mask: number): number {
  let count = 0;
  for (let rest = mask; rest; rest &= rest - 1) count++;
  return count;
}
