import type { Deps } from '../deps';
import { onWake } from '../jobs/wake';
import { drainOutbox } from './outbox';

/** The outbox is looked at this often, besides right after every commit that filled it. */
const everyMs = 5_000;

/** Drains the outbox until stopped, one drain at a time; `stop` waits for the one under way. */
export function startMailJob(deps: Deps): () => Promise<void> {
  let stopped = false;
  let again = false;
  let running: Promise<void> | null = null;

  const run = async () => {
    do {
      again = false;
      try {
        await drainOutbox(deps, () => !stopped);
      } catch (error) {
        deps.log.error({ err: error }, 'the outbox could not be drained');
      }
    } while (again && !stopped);
  };
  const wake = () => {
    if (stopped) return;
    again = true;
    running ??= run().finally(() => {
      running = null;
    });
  };

  const timer = setInterval(wake, everyMs);
  const offMail = onWake(deps.config, 'mail', wake);
  wake();
  return async () => {
    stopped = true;
    clearInterval(timer);
    offMail();
    await running;
  };
}
