import { checkPlan, type Plan, type PlannedRun } from './check-plan';
import { allColumns, columnOf, isSmall, someColumns, type Column } from './columns';
import { explainUnplaced, type UnplacedParcel } from './explain-unplaced';
import { searchPlan } from './improve';
import { createInstance, type Instance, type SlotInfo } from './instance';
import { milpText, placementOf, valuesOf, type SolveMilp } from './milp';
import { stopsIn, objectiveCents, type Placement } from './plan';
import type { PoolProblem } from './problem';

export interface PlanOptions {
  /** The same seed, problem and solver give the same plan. */
  readonly seed: number;
  /** Rounds of the search before the solver; it also ends when `shouldStop` says so. */
  readonly rounds: number;
  readonly shouldStop: () => boolean;
  readonly milpSeconds: number;
}

export interface PlanResult extends Plan {
  readonly unplaced: readonly UnplacedParcel[];
  /** Money for the runs, what was added to confirmed ones included. */
  readonly costCents: number;
  readonly objectiveCents: number;
  readonly boundCents: number;
  /** `proven`: no plan can be cheaper than the bound; `estimate`: one that was not looked at might be. */
  readonly boundKind: 'proven' | 'estimate';
}

/**
 * Gives every parcel a safe day and a run, or leaves it with a reason. Search and solver side by side on true costs; the
 * better plan wins, after it was driven through by the checker. Small problems list every possible run, so the solver's
 * bound holds for the true cost. Throws when a plan fails the check: that would be our own fault.
 */
export function planRuns(problem: PoolProblem, solveMilp: SolveMilp, options: PlanOptions): PlanResult {
  const instance = createInstance(problem);
  const small = isSmall(instance);
  const seen = new Map<string, Column>();
  const found = searchPlan(instance, {
    ...options,
    sawRun: (slot, ids) => {
      const key = `${slot}:${ids.join(',')}`;
      const column = seen.has(key) ? null : columnOf(instance, instance.slots[slot] as SlotInfo, ids);
      if (column) seen.set(key, column);
    },
  });
  const columns = small ? allColumns(instance) : merge(seen, someColumns(instance));
  const start = valuesOf(instance, columns, found) ?? undefined;
  const answer =
    columns.length === 0 ? null : solveMilp(milpText(instance, columns), options.milpSeconds, start);
  const solved = answer?.values ? placementOf(instance, answer.values) : null;
  const placement =
    solved && objectiveCents(instance, solved) < objectiveCents(instance, found) ? solved : found;
  const plan = planOf(instance, placement);
  const violations = checkPlan(problem, plan);
  if (violations.length > 0)
    throw new Error(`A plan failed its check: ${violations.map(({ text }) => text).join(' ')}`);
  const objective = objectiveCents(instance, placement);
  return {
    ...plan,
    unplaced: placement.flatMap((at, index) =>
      at === -1 ? [explainUnplaced(problem, placement, index, instance.pricer)] : [],
    ),
    costCents: plan.runs.reduce((sum, run) => sum + run.fixedCents + run.drivingCents, 0),
    objectiveCents: objective,
    boundCents: columns.length === 0 ? objective : Math.min(objective, wholeBound(answer?.bound ?? null)),
    boundKind: small && (columns.length === 0 || answer?.bound != null) ? 'proven' : 'estimate',
  };
}

function merge(seen: ReadonlyMap<string, Column>, more: readonly Column[]): Column[] {
  const all = new Map(seen);
  for (const column of more) all.set(`${column.slot}:${column.stopIds.join(',')}`, column);
  return [...all.values()];
}

/** Every cost is a whole number of cents, so a bound may be rounded up; no cost is negative. */
const wholeBound = (bound: number | null): number =>
  Math.max(0, bound === null ? 0 : Math.ceil(bound - 1e-4));

/** Drives and prices the runs of a placement. */
export function planOf(instance: Instance, placement: Placement): Plan {
  const runs = instance.slots.flatMap((slot): PlannedRun[] => {
    const added = stopsIn(instance, placement, slot);
    if (added.length === 0) return [];
    const ids = [...new Set([...(slot.fixed?.stopIds ?? []), ...added])];
    const run = instance.pricer.price(slot, ids);
    if (!run)
      throw new Error(`The run of coordinator ${slot.coordinatorId} on ${slot.date} cannot be driven.`);
    const fixedCents = slot.fixed ? 0 : instance.problem.costs.runFixedCents;
    return [
      {
        coordinatorId: slot.coordinatorId,
        date: slot.date,
        counterId: slot.counterId,
        runId: slot.fixed?.runId ?? null,
        order: run.order,
        departMinute: run.departMinute,
        parcelIds: placement.flatMap((at, index) =>
          at === slot.index ? [instance.parcels[index]?.id ?? -1] : [],
        ),
        fixedCents,
        drivingCents: instance.cents(slot, added) - fixedCents,
      },
    ];
  });
  return {
    runs,
    unplacedIds: placement.flatMap((at, index) => (at === -1 ? [instance.parcels[index]?.id ?? -1] : [])),
  };
}
