import { parentPort, workerData } from 'node:worker_threads';
import highsLoader from 'highs';
import type { MilpAnswer, SolveMilp } from '@shared/pooling/milp';
import { planRuns } from '@shared/pooling/plan-runs';
import type { PoolProblem } from '@shared/pooling/problem';

export interface PoolingJob {
  readonly problem: PoolProblem;
  readonly searchSeconds: number;
  readonly milpSeconds: number;
}

/** HiGHS is WebAssembly and blocks its thread, so the whole plan is made in this one. */
async function main(): Promise<void> {
  const job = workerData as PoolingJob;
  const highs = await highsLoader();
  const once = (lpText: string, limitSeconds: number): MilpAnswer => {
    const solution = highs.solve(lpText, { time_limit: limitSeconds, mip_rel_gap: 0, output_flag: false });
    const optimal = solution.Status === 'Optimal';
    const values = Object.fromEntries(
      Object.entries(solution.Columns).map(([name, column]) => [name, 'Primal' in column ? Number(column.Primal) : 0]),
    );
    return {
      status: optimal ? 'optimal' : solution.Status === 'Infeasible' ? 'infeasible' : 'time-limit',
      objective: optimal ? solution.ObjectiveValue : null,
      bound: optimal ? solution.ObjectiveValue : null,
      values: optimal ? values : null,
    };
  };
  const solve: SolveMilp = (lpText, limitSeconds) => {
    try {
      return once(lpText, limitSeconds);
    } catch {
      // The package rarely says that the model was not solved; a second try on a fresh instance does it.
      return once(lpText, limitSeconds);
    }
  };
  const endsAt = Date.now() + job.searchSeconds * 1000;
  const result = planRuns(job.problem, solve, {
    seed: 1,
    rounds: 400,
    shouldStop: () => Date.now() > endsAt,
    milpSeconds: job.milpSeconds,
  });
  parentPort?.postMessage(result);
}

void main();
