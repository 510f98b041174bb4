import type { Instance, SlotInfo } from './instance';
import { volumeTolerance } from './instance';
import { mostStops } from './problem';
import { haversineKm } from './travel';

/** A run as the set-partition model sees it: a slot and the breeders visited for new parcels. */
export interface Column {
  readonly slot: number;
  /** Ascending; a confirmed run's own stops are not listed. */
  readonly stopIds: readonly number[];
  readonly cents: number;
}

/** Up to this many breeders in a slot every subset is made a column. */
export const exactBreeders = 9;
/** More columns than this are not given to the solver whole. */
const mostColumns = 60_000;

/** Breeders with a parcel that may ride in the slot, ascending. */
export const stopsOf = (instance: Instance, slot: SlotInfo): number[] =>
  [...new Set(slot.eligible.map((parcel) => instance.parcels[parcel]?.stopId ?? -1))].sort((a, b) => a - b);

/** Whether listing every possible run is feasible: then the model's optimum is the true one. */
export function isSmall(instance: Instance): boolean {
  const sizes = instance.slots.map((slot) => stopsOf(instance, slot).length);
  return (
    sizes.every((size) => size <= exactBreeders) &&
    sizes.reduce((sum, size) => sum + 2 ** size - 1, 0) <= mostColumns
  );
}

/** Every run that could be driven, exactly priced. Only for small instances. */
export function allColumns(instance: Instance): Column[] {
  return instance.slots.flatMap((slot) => {
    const breeders = stopsOf(instance, slot);
    const columns: Column[] = [];
    for (let mask = 1; mask < 1 << breeders.length; mask++) {
      const column = columnOf(
        instance,
        slot,
        breeders.filter((_, bit) => mask & (1 << bit)),
      );
      if (column) columns.push(column);
    }
    return columns;
  });
}

/**
 * A choice of runs for a large instance: every breeder alone, close pairs and triples, and from each breeder outward the
 * growing chain of the nearest. The runs that the search saw are added by the caller.
 */
export function someColumns(instance: Instance): Column[] {
  return instance.slots.flatMap((slot) => {
    const breeders = stopsOf(instance, slot);
    const sets = new Map<string, number[]>();
    const add = (ids: readonly number[]) => {
      const sorted = [...new Set(ids)].sort((a, b) => a - b);
      sets.set(sorted.join(','), sorted);
    };
    for (const breeder of breeders) {
      const near = nearest(instance, breeder, breeders);
      for (let count = 0; count < Math.min(near.length + 1, mostStops); count++)
        add([breeder, ...near.slice(0, count)]);
      for (const [i, second] of near.slice(0, 5).entries()) {
        add([breeder, second]);
        for (const third of near.slice(i + 1, 5)) add([breeder, second, third]);
      }
    }
    return [...sets.values()].flatMap((ids) => columnOf(instance, slot, ids) ?? []);
  });
}

/** A priced column, or null when the run cannot be driven or its smallest parcels already fill the vehicle. */
export function columnOf(instance: Instance, slot: SlotInfo, stopIds: readonly number[]): Column | null {
  if (leastVolumeL(instance, slot, stopIds) > slot.roomL + volumeTolerance) return null;
  const cents = instance.cents(slot, stopIds);
  return cents === Infinity ? null : { slot: slot.index, stopIds, cents };
}

function leastVolumeL(instance: Instance, slot: SlotInfo, stopIds: readonly number[]): number {
  return stopIds.reduce((sum, id) => {
    const volumes = slot.eligible.flatMap((index) =>
      instance.parcels[index]?.stopId === id ? [instance.parcels[index].volumeL] : [],
    );
    return sum + Math.min(...volumes);
  }, 0);
}

function nearest(instance: Instance, stopId: number, among: readonly number[]): number[] {
  const place = new Map(instance.problem.stops.map((breeder) => [breeder.id, breeder]));
  const here = place.get(stopId);
  if (!here) return [];
  const far = (id: number) => haversineKm(here, place.get(id) ?? here);
  return among.filter((id) => id !== stopId).sort((a, b) => far(a) - far(b) || a - b);
}
