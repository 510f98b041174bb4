import { parentPort, workerData } from 'node:worker_threads';
import highsLoader from 'highs';
import { planRuns } from '@shared/pooling/plan-runs';
import type { PoolProblem } from '@shared/pooling/problem';
import { highsSolver } from './highs-solver';

export interface PoolingJob {
  readonly problem: PoolProblem;
  readonly searchSeconds: number;
  readonly milpSeconds: number;
}

/** HiGHS is WebAssembly and blocks its thread, so the whole plan is made in this one. */
async function main(): Promise<void> {
  const job = workerData as PoolingJob;
  const solve = highsSolver(await highsLoader());
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
