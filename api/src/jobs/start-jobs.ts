import type { Deps } from '../deps';
import { startMailJob } from '../notices/mail-job';

/** Starts what runs by itself beside the requests; the answer stops all of it and waits for what is under way. */
export function startJobs(deps: Deps): () => Promise<void> {
  return startMailJob(deps);
}
