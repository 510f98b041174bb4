/** Runs a task when a place is free. */
export type Limiter = <T>(task: () => Promise<T>) => Promise<T>;

/** Lets at most `count` tasks run at the same time; the others wait in the order they came. */
export function atMost(count: number): Limiter {
  const waiting: (() => void)[] = [];
  let running = 0;
  return async (task) => {
    // A place that is given up is handed on, so that `running` never exceeds `count`.
    if (running >= count) await new Promise<void>((resolve) => waiting.push(resolve));
    else running += 1;
    try {
      return await task();
    } finally {
      const next = waiting.shift();
      if (next) next();
      else running -= 1;
    }
  };
}
