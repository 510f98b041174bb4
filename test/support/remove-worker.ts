import { rmSync } from 'node:fs';
import { dirname } from 'node:path';

/** Jest's `globalTeardown`: the worker bundle of this run goes again. */
export default function removeWorker(): void {
  const file = process.env.POOLING_WORKER_FILE;
  if (file) rmSync(dirname(file), { recursive: true, force: true });
}
