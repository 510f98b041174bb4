import { resolve } from 'node:path';
import { Worker } from 'node:worker_threads';
import { AppError } from '@shared/errors';
import type { PlanResult } from '@shared/pooling/plan-runs';
import type { PoolProblem } from '@shared/pooling/problem';
import type { PoolingJob } from './pooling-worker';

const limits = { searchSeconds: 3, milpSeconds: 8, totalMs: 25_000 };

/** Worker files that are at work: one plan at a time in a site. */
const busy = new Set<string>();

/**
 * Plans in a worker thread (`workerFile`, bundled by tools/build.ts), off the event loop; one at a time, ended when it
 * takes too long. Throws 409 when busy or out of time.
 */
export async function solveInWorker(workerFile: string, problem: PoolProblem): Promise<PlanResult> {
  if (busy.has(workerFile))
    throw new AppError('conflict', 'Runs are being worked out already. Wait for that to end.');
  busy.add(workerFile);
  const job: PoolingJob = {
    problem,
    searchSeconds: limits.searchSeconds,
    milpSeconds: limits.milpSeconds,
  };
  const worker = new Worker(resolve(workerFile), { workerData: job });
  try {
    return await answerOf(worker);
  } finally {
    busy.delete(workerFile);
    await worker.terminate();
  }
}

function answerOf(worker: Worker): Promise<PlanResult> {
  return new Promise<PlanResult>((done, fail) => {
    const timer = setTimeout(
      () => fail(new AppError('conflict', 'No plan was found in time. Try fewer days.')),
      limits.totalMs,
    );
    const end = (settle: () => void) => {
      clearTimeout(timer);
      settle();
    };
    worker.once('message', (result: PlanResult) => end(() => done(result)));
    worker.once('error', (error) => end(() => fail(error)));
    worker.once('exit', (code) => end(() => fail(new Error(`The pooling ended without a plan (${code}).`))));
  });
}
