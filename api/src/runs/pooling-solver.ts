import { resolve } from 'node:path';
import { Worker } from 'node:worker_threads';
import { AppError } from '@shared/errors';
import type { PlanResult } from '@shared/pooling/plan-runs';
import type { PoolProblem } from '@shared/pooling/problem';
import type { PoolingJob } from './pooling-worker';

/** Bundled beside the server (tools/build.ts); tests build it before they start. */
const workerFile = () => resolve('dist/api/pooling-worker.mjs');
const limits = { searchSeconds: 3, milpSeconds: 8, totalMs: 20_000 };

let busy = false;

/** Plans in a worker thread, off the event loop; one at a time, ended when it takes too long. Throws 409 when busy. */
export async function solveInWorker(problem: PoolProblem): Promise<PlanResult> {
  if (busy) throw new AppError('conflict', 'Runs are being worked out already. Wait for that to end.');
  busy = true;
  const job: PoolingJob = { problem, searchSeconds: limits.searchSeconds, milpSeconds: limits.milpSeconds };
  const worker = new Worker(workerFile(), { workerData: job });
  try {
    return await new Promise<PlanResult>((done, fail) => {
      const timer = setTimeout(() => fail(new AppError('conflict', 'No plan was found in time. Try fewer days.')), limits.totalMs);
      worker.once('message', (result: PlanResult) => {
        clearTimeout(timer);
        done(result);
      });
      worker.once('error', (error) => {
        clearTimeout(timer);
        fail(error);
      });
    });
  } finally {
    busy = false;
    await worker.terminate();
  }
}
