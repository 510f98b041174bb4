import type { FixedRun, PoolParcel, PoolProblem, Slot } from './problem';
import { slotKey } from './problem';
import { createRunPricer, type RunPricer } from './run-pricer';

/** A slot with what may be put into it. */
export interface SlotInfo extends Slot {
  readonly index: number;
  /** Slots of the same coordinator and day share a group: one of them at most is driven. */
  readonly group: string;
  /** Room left in litres (a confirmed run's load is taken off). */
  readonly roomL: number;
  readonly fixed: FixedRun | null;
  /** Parcels (indices) that may ride here. */
  readonly eligible: readonly number[];
}

export interface Option {
  readonly slot: number;
  readonly penaltyCents: number;
}

/** The problem with its slots laid out and runs priced; parcels and slots are named by their index. */
export interface Instance {
  readonly problem: PoolProblem;
  readonly parcels: readonly PoolParcel[];
  readonly slots: readonly SlotInfo[];
  /** By parcel: where it may ride. */
  readonly options: readonly (readonly Option[])[];
  readonly pricer: RunPricer;
  /** What driving to these breeders costs the plan in this slot; 0 for none, Infinity when it cannot be driven. */
  cents(slot: SlotInfo, stopIds: readonly number[]): number;
}

/**
 * Lays out the slots: coordinators who are free and not taken, counters that take drop-offs that day. A `pricer` of a
 * problem with the same people, places and costs may be handed on, for its answers are kept.
 */
export function createInstance(problem: PoolProblem, pricer = createRunPricer(problem)): Instance {
  const slots = slotsOf(problem, pricer);
  const options = problem.parcels.map((_, index) =>
    slots
      .filter((slot) => slot.eligible.includes(index))
      .map((slot) => ({ slot: slot.index, penaltyCents: penalty(problem, index, slot.date) })),
  );
  const base = slots.map((slot) => (slot.fixed ? (fixedCents(pricer, slot, slot.fixed) ?? 0) : 0));
  return {
    problem,
    parcels: problem.parcels,
    slots,
    options,
    pricer,
    cents(slot, stopIds) {
      const { fixed } = slot;
      if (fixed) {
        const extra = stopIds.filter((id) => !fixed.stopIds.includes(id));
        if (extra.length === 0) return 0;
        const run = pricer.price(slot, [...fixed.stopIds, ...extra]);
        return run ? run.drivingCents - (base[slot.index] as number) : Infinity;
      }
      if (stopIds.length === 0) return 0;
      const run = pricer.price(slot, stopIds);
      return run ? run.drivingCents + problem.costs.runFixedCents : Infinity;
    },
  };
}

/** What a decided run costs as it stands; null when it cannot be driven like that, and so can take nothing more. */
const fixedCents = (pricer: RunPricer, slot: Slot, fixed: FixedRun): number | null =>
  fixed.stopIds.length === 0 ? 0 : (pricer.price(slot, fixed.stopIds)?.drivingCents ?? null);

const penalty = (problem: PoolProblem, parcel: number, date: string): number =>
  problem.parcels[parcel]?.days.find((day) => day.date === date)?.penaltyCents ?? 0;

function slotsOf(problem: PoolProblem, pricer: RunPricer): SlotInfo[] {
  const fixedBy = new Map(problem.fixedRuns.map((run) => [`${run.coordinatorId}|${run.date}`, run]));
  const dates = [...new Set(problem.parcels.flatMap(({ days }) => days.map(({ date }) => date)))].sort();
  const found: SlotInfo[] = [];
  for (const date of dates)
    for (const coordinator of problem.coordinators)
      for (const counter of problem.counters) {
        const slot = { coordinatorId: coordinator.id, date, counterId: counter.id };
        const group = `${coordinator.id}|${date}`;
        const fixed = fixedBy.get(group) ?? null;
        const drives = fixed
          ? fixed.takes === 'more' && fixed.counterId === counter.id
          : coordinator.freeDates.includes(date);
        if (!drives) continue;
        if (counter.cutOffMinutes[date] === undefined) continue;
        if (fixed && fixedCents(pricer, slot, fixed) === null) continue;
        const roomL = coordinator.capacityL - (fixed?.volumeL ?? 0);
        const eligible = problem.parcels.flatMap((parcel, index) =>
          mayRide(problem, parcel, slot, roomL) ? [index] : [],
        );
        if (eligible.length > 0) found.push({ ...slot, index: found.length, group, roomL, fixed, eligible });
      }
  return found;
}

function mayRide(problem: PoolProblem, parcel: PoolParcel, slot: Slot, roomL: number): boolean {
  if (parcel.counterId !== slot.counterId || parcel.volumeL > roomL + volumeTolerance) return false;
  if (!parcel.days.some(({ date }) => date === slot.date)) return false;
  const breeder = problem.stops.find(({ id }) => id === parcel.stopId);
  if (!breeder || breeder.daysAway.includes(slot.date)) return false;
  const pin = problem.pins.find(({ parcelId }) => parcelId === parcel.id);
  return !pin || slotKey(pin) === slotKey(slot);
}

/** Litres: sums of box volumes are not exact in binary. */
export const volumeTolerance = 1e-6;
