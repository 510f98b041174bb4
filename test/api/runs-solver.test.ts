import { solveInWorker } from '@api/runs/pooling-solver';
import { checkPlan } from '@shared/pooling/check-plan';
import { poolCase, weekDays } from '../support/pooling-cases';

const workerFile = process.env.POOLING_WORKER_FILE ?? '';

describe('the solver', () => {
  it('works beside the event loop: what waits here is not held up by a plan of 60 parcels', async () => {
    const problem = poolCase({ seed: 5, parcels: 60, breeders: 14, coordinators: 3, dates: weekDays });
    let longestMs = 0;
    let last = performance.now();
    const ticking = setInterval(() => {
      longestMs = Math.max(longestMs, performance.now() - last);
      last = performance.now();
    }, 5);
    const from = performance.now();
    const plan = await solveInWorker(workerFile, problem);
    const wholeMs = performance.now() - from;
    clearInterval(ticking);
    expect(checkPlan(problem, plan)).toEqual([]);
    expect(plan.runs.length).toBeGreaterThan(1);
    expect(wholeMs).toBeGreaterThan(400);
    // On the event loop itself the plan would hold everything up from its beginning to its end.
    expect(longestMs).toBeLessThan(wholeMs / 4);
  }, 30_000);

  it('takes one plan at a time, and the next when that is done', async () => {
    const problem = poolCase({ seed: 6, parcels: 3, breeders: 2, coordinators: 1, dates: weekDays });
    const first = solveInWorker(workerFile, problem);
    await expect(solveInWorker(workerFile, problem)).rejects.toMatchObject({ code: 'conflict' });
    await first;
    expect(await solveInWorker(workerFile, problem)).toEqual(await first);
  });

  it('says so when the worker cannot be started, and works again afterwards', async () => {
    const problem = poolCase({ seed: 6, parcels: 3, breeders: 2, coordinators: 1, dates: weekDays });
    await expect(solveInWorker('/nowhere/pooling-worker.mjs', problem)).rejects.toThrow();
    await expect(solveInWorker('/nowhere/pooling-worker.mjs', problem)).rejects.not.toMatchObject({
      code: 'conflict',
    });
    await solveInWorker(workerFile, problem);
  });
});
