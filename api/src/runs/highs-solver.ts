import type { Highs } from 'highs';
import type { MilpAnswer, SolveMilp } from '@shared/pooling/milp';

/**
 * HiGHS behind the plan's `SolveMilp`. It blocks its thread for up to the limit and a second. What it has at the time
 * limit is passed on too: the plan prices and checks whatever it gets.
 */
export function highsSolver(highs: Highs): SolveMilp {
  const once = (lpText: string, limitSeconds: number): MilpAnswer => {
    const solution = highs.solve(lpText, { time_limit: limitSeconds, mip_rel_gap: 0, output_flag: false });
    const status = statuses[solution.Status] ?? 'failed';
    const objective = status === 'optimal' ? solution.ObjectiveValue : null;
    const values =
      status === 'optimal' || status === 'time-limit' ? valuesOf(Object.entries(solution.Columns)) : null;
    return { status, objective, bound: objective, values };
  };
  return (lpText, limitSeconds) => {
    try {
      return once(lpText, limitSeconds);
    } catch {
      // The package rarely says that the model was not solved; a second try on a fresh instance does it.
      return once(lpText, limitSeconds);
    }
  };
}

const statuses: Readonly<Record<string, MilpAnswer['status']>> = {
  Optimal: 'optimal',
  Infeasible: 'infeasible',
  'Time limit reached': 'time-limit',
};

function valuesOf(columns: readonly (readonly [string, object])[]): Record<string, number> {
  return Object.fromEntries(
    columns.map(([name, column]) => [name, 'Primal' in column ? Number(column.Primal) : 0]),
  );
}
