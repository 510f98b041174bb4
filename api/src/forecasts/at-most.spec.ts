import { setTimeout as delay } from 'node:timers/promises';
import { atMost } from './at-most';

describe('at most', () => {
  it.each([1, 4])('%i at once, and all of them in the end', async (count) => {
    const limit = atMost(count);
    let running = 0;
    let most = 0;
    const done: number[] = [];
    await Promise.all(
      Array.from({ length: 20 }, (_, index) =>
        limit(async () => {
          most = Math.max(most, (running += 1));
          await delay(1);
          running -= 1;
          done.push(index);
        }),
      ),
    );
    expect(most).toBe(count);
    expect(done).toHaveLength(20);
  });

  it('gives a place free again after a failure', async () => {
    const limit = atMost(1);
    await expect(limit(() => Promise.reject(new Error('no')))).rejects.toThrow('no');
    await expect(limit(() => Promise.resolve('yes'))).resolves.toBe('yes');
  });
});
