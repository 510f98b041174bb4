import { mkdirSync, mkdtempSync } from 'node:fs';
import { join, resolve } from 'node:path';
import { build } from 'esbuild';

/**
 * Jest's `globalSetup`: bundles the pooling worker (Jest runs before the build) and names the bundle in
 * POOLING_WORKER_FILE, which test sites pass on. It lies under node_modules, so that `highs` is found from there.
 */
export default async function buildWorker(): Promise<void> {
  const root = resolve(__dirname, '../..');
  const cache = join(root, 'node_modules/.cache/dayberth-tests');
  mkdirSync(cache, { recursive: true });
  const outfile = join(mkdtempSync(join(cache, 'worker-')), 'pooling-worker.mjs');
  await build({
    entryPoints: [join(root, 'api/src/runs/pooling-worker.ts')],
    outfile,
    bundle: true,
    platform: 'node',
    target: 'node20',
    format: 'esm',
    packages: 'external',
    alias: { '@shared': join(root, 'shared/src') },
    logLevel: 'warning',
  });
  process.env.POOLING_WORKER_FILE = outfile;
}
