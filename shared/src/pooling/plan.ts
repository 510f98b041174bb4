import { volumeTolerance, type Instance, type SlotInfo } from './instance';

/** Which slot each parcel rides in (index), -1 for none. */
export type Placement = readonly number[];

/** The breeders whose parcels ride in a slot, ascending (those of a confirmed run not counted). */
export function stopsIn(instance: Instance, placement: Placement, slot: SlotInfo): number[] {
  const ids = new Set<number>();
  placement.forEach((at, parcel) => {
    if (at === slot.index) ids.add(instance.parcels[parcel]?.stopId ?? -1);
  });
  return [...ids].sort((a, b) => a - b);
}

/** Litres put into a slot. */
export const volumeIn = (instance: Instance, placement: Placement, slot: SlotInfo): number =>
  placement.reduce(
    (sum, at, parcel) => (at === slot.index ? sum + (instance.parcels[parcel]?.volumeL ?? 0) : sum),
    0,
  );

/** The objective of a placement in cents: runs, preferences, unplaced parcels. Infinity when a run cannot be driven. */
export function objectiveCents(instance: Instance, placement: Placement): number {
  const { costs } = instance.problem;
  let cents = 0;
  for (const [parcel, at] of placement.entries()) {
    if (at === -1) cents += costs.unplacedCents;
    else cents += instance.options[parcel]?.find(({ slot }) => slot === at)?.penaltyCents ?? Infinity;
  }
  const groups = new Set<string>();
  for (const slot of instance.slots) {
    const breeders = stopsIn(instance, placement, slot);
    if (breeders.length === 0) continue;
    if (groups.has(slot.group) || volumeIn(instance, placement, slot) > slot.roomL + volumeTolerance)
      return Infinity;
    groups.add(slot.group);
    cents += instance.cents(slot, breeders);
  }
  return cents;
}
