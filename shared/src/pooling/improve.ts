import { draftOf, fillByRegret, take } from './construct';
import type { Instance } from './instance';
import { stopsIn, objectiveCents, type Placement } from './plan';

export interface ImproveOptions {
  readonly seed: number;
  readonly rounds: number;
  /** Asked between rounds; true ends the search with the best so far. */
  readonly shouldStop: () => boolean;
  /** Told every run of every plan that was accepted, as a set of breeders in a slot. */
  readonly sawRun: (slot: number, stopIds: readonly number[]) => void;
}

/** A plan by regret, then large-neighbourhood search: takes some parcels out and puts them back better (Shaw 1998). */
export function searchPlan(instance: Instance, options: ImproveOptions): Placement {
  const random = generator(options.seed);
  const first = draftOf(instance, []);
  fillByRegret(instance, first);
  let best: Placement = [...first.at];
  let bestCents = objectiveCents(instance, best);
  report(instance, best, options);
  for (let round = 0; round < options.rounds && !options.shouldStop(); round++) {
    const draft = draftOf(instance, best);
    for (const parcel of ruin(instance, best, random)) take(instance, draft, parcel);
    fillByRegret(instance, draft);
    const cents = objectiveCents(instance, draft.at);
    // A plan just as good is taken too: it leads the search out of flat places.
    if (cents > bestCents) {
      if (cents < bestCents * 1.02) report(instance, draft.at, options);
      continue;
    }
    best = [...draft.at];
    bestCents = cents;
    report(instance, best, options);
  }
  return best;
}

function report(instance: Instance, placement: Placement, options: ImproveOptions): void {
  for (const slot of instance.slots) {
    const breeders = stopsIn(instance, placement, slot);
    if (breeders.length > 0) options.sawRun(slot.index, breeders);
  }
}

/** Parcels to take out: one or two whole runs, or some breeders, or a handful at random; unplaced ones always try again. */
function ruin(instance: Instance, placement: Placement, random: () => number): number[] {
  const pick = <T>(items: readonly T[]): T | undefined => items[Math.floor(random() * items.length)];
  const placed = placement.flatMap((slot, parcel) => (slot === -1 ? [] : [parcel]));
  const way = random();
  if (way < 0.5) {
    const slots = [...new Set(placed.map((parcel) => placement[parcel]))];
    const chosen = [pick(slots), pick(slots), way < 0.2 ? pick(slots) : undefined];
    return placed.filter((parcel) => chosen.includes(placement[parcel]));
  }
  if (way < 0.8) {
    const breeders = [pick(placed), pick(placed)].map((parcel) => instance.parcels[parcel ?? -1]?.stopId);
    return placed.filter((parcel) => breeders.includes(instance.parcels[parcel]?.stopId));
  }
  const part = 0.1 + 0.2 * random();
  return placed.filter(() => random() < part);
}

/** mulberry32 (public domain, T. Ettinger): small and the same everywhere for the same seed. */
export function generator(seed: number): () => number {
  let state = seed >>> 0;
  return () => {
    state = (state + 0x6d2b79f5) >>> 0;
    let t = state;
    t = Math.imul(t ^ (t >>> 15), t | 1);
    t ^= t + Math.imul(t ^ (t >>> 7), t | 61);
    return ((t ^ (t >>> 14)) >>> 0) / 4294967296;
  };
}
