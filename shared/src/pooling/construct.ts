import { volumeTolerance, type Instance, type Option, type SlotInfo } from './instance';
import type { Placement } from './plan';

/** A plan being built: cheap to ask and to change. */
export interface Draft {
  readonly at: number[];
  /** By slot: parcels of each breeder in it. */
  readonly load: Map<number, number>[];
  readonly roomL: number[];
  /** By group: the slot that is driven. */
  readonly taken: Map<string, number>;
}

/** A draft with the given placement. */
export function draftOf(instance: Instance, placement: Placement): Draft {
  const draft: Draft = {
    at: instance.parcels.map(() => -1),
    load: instance.slots.map(() => new Map<number, number>()),
    roomL: instance.slots.map(({ roomL }) => roomL),
    taken: new Map(),
  };
  placement.forEach((slot, parcel) => {
    if (slot !== -1) put(instance, draft, parcel, slot);
  });
  return draft;
}

export function put(instance: Instance, draft: Draft, parcel: number, slotIndex: number): void {
  const { stopId = -1, volumeL = 0 } = instance.parcels[parcel] ?? {};
  const load = draft.load[slotIndex] as Map<number, number>;
  draft.at[parcel] = slotIndex;
  load.set(stopId, (load.get(stopId) ?? 0) + 1);
  draft.roomL[slotIndex] = (draft.roomL[slotIndex] as number) - volumeL;
  draft.taken.set((instance.slots[slotIndex] as SlotInfo).group, slotIndex);
}

export function take(instance: Instance, draft: Draft, parcel: number): void {
  const slotIndex = draft.at[parcel] as number;
  if (slotIndex === -1) return;
  const { stopId = -1, volumeL = 0 } = instance.parcels[parcel] ?? {};
  const load = draft.load[slotIndex] as Map<number, number>;
  const left = (load.get(stopId) ?? 1) - 1;
  if (left === 0) load.delete(stopId);
  else load.set(stopId, left);
  draft.at[parcel] = -1;
  draft.roomL[slotIndex] = (draft.roomL[slotIndex] as number) + volumeL;
  if (load.size === 0) draft.taken.delete((instance.slots[slotIndex] as SlotInfo).group);
}

/** What putting the parcel there would add, in cents; Infinity when it does not fit. */
export function addedCents(instance: Instance, draft: Draft, parcel: number, option: Option): number {
  const slot = instance.slots[option.slot] as SlotInfo;
  const { stopId = -1, volumeL = 0 } = instance.parcels[parcel] ?? {};
  const driven = draft.taken.get(slot.group);
  if (driven !== undefined && driven !== slot.index) return Infinity;
  if (volumeL > (draft.roomL[slot.index] as number) + volumeTolerance) return Infinity;
  const load = draft.load[slot.index] as Map<number, number>;
  if (load.has(stopId)) return option.penaltyCents;
  const present = [...load.keys()];
  return instance.cents(slot, [...present, stopId]) - instance.cents(slot, present) + option.penaltyCents;
}

interface Choice {
  readonly parcel: number;
  readonly slot: number;
  readonly added: number;
  readonly regret: number;
}

/**
 * Puts every unplaced parcel where it adds least, the one first that would lose most by waiting (regret of the second
 * choice; Potvin & Rousseau 1993). A parcel for which riding costs more than staying is left.
 */
export function fillByRegret(instance: Instance, draft: Draft): void {
  const waiting = new Set(draft.at.flatMap((slot, parcel) => (slot === -1 ? [parcel] : [])));
  const choices = new Map<number, Choice | null>();
  while (waiting.size > 0) {
    let best: Choice | null = null;
    for (const parcel of waiting) {
      if (!choices.has(parcel)) choices.set(parcel, choose(instance, draft, parcel));
      const choice = choices.get(parcel) ?? null;
      if (
        choice &&
        (!best || choice.regret > best.regret || (choice.regret === best.regret && choice.added < best.added))
      )
        best = choice;
    }
    if (!best) return;
    put(instance, draft, best.parcel, best.slot);
    waiting.delete(best.parcel);
    choices.delete(best.parcel);
    // Only who could ride in the changed coordinator-day has to think again.
    const { group } = instance.slots[best.slot] as SlotInfo;
    for (const parcel of waiting)
      if ((instance.options[parcel] ?? []).some(({ slot }) => instance.slots[slot]?.group === group))
        choices.delete(parcel);
  }
}

function choose(instance: Instance, draft: Draft, parcel: number): Choice | null {
  const { unplacedCents } = instance.problem.costs;
  let first: Option | null = null;
  let added = unplacedCents;
  let second = unplacedCents;
  for (const option of instance.options[parcel] ?? []) {
    const cents = addedCents(instance, draft, parcel, option);
    if (cents < added) {
      second = added;
      added = cents;
      first = option;
    } else if (cents < second) second = cents;
  }
  return first && { parcel, slot: first.slot, added, regret: second - added };
}
