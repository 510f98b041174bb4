import { spawn } from 'node:child_process';
import { existsSync, readdirSync, statSync } from 'node:fs';
import { join, resolve } from 'node:path';
import { build as bundle } from 'esbuild';

/** Node entry points and where their bundles go. A worker thread is an entry of its own. */
const entries = {
  'api/server': 'api/src/main.ts',
  'api/pooling-worker': 'api/src/runs/pooling-worker.ts',
  'fakes/forecast': 'api/src/fakes/forecast/main.ts',
  'fakes/mail': 'api/src/fakes/mail/main.ts',
};

/** Bundles the server, its worker and the fakes into dist/ (milliseconds). */
export async function buildServer(): Promise<void> {
  await bundle({
    entryPoints: Object.fromEntries(Object.entries(entries).filter(([, file]) => existsSync(file))),
    outdir: 'dist',
    outExtension: { '.js': '.mjs' },
    bundle: true,
    platform: 'node',
    target: 'node20',
    format: 'esm',
    packages: 'external',
    alias: {
      '@shared': resolve('shared/src'),
      // Its entry for Node is CommonJS whose names an ES module cannot see; a path is bundled instead.
      rrule: resolve('node_modules/rrule/dist/esm/index.js'),
    },
    sourcemap: true,
    logLevel: 'warning',
  });
}

/** Builds the Angular pages, unless dist/ is newer than everything they are made of. */
export async function buildWeb(): Promise<void> {
  const built = 'dist/web/browser/index.html';
  const newest = Math.max(
    ...['web', 'shared/src', 'angular.json', 'package-lock.json', 'tsconfig.json'].map(newestMs),
  );
  if (existsSync(built) && statSync(built).mtimeMs > newest) return;
  await run(process.execPath, ['node_modules/@angular/cli/bin/ng.js', 'build'], {
    ...process.env,
    NG_CLI_ANALYTICS: 'false',
  });
}

function newestMs(path: string): number {
  if (!existsSync(path)) return 0;
  const stat = statSync(path);
  if (!stat.isDirectory()) return stat.mtimeMs;
  return Math.max(stat.mtimeMs, ...readdirSync(path).map((name) => newestMs(join(path, name))));
}

/** Runs a program to its end; rejects when it fails. */
export function run(command: string, args: readonly string[], env = process.env): Promise<void> {
  return new Promise((done, fail) => {
    const child = spawn(command, args, { stdio: 'inherit', env });
    child.on('error', fail);
    child.on('exit', (code) =>
      code === 0 ? done() : fail(new Error(`${[command, ...args].join(' ')} ended with ${code}`)),
    );
  });
}

export async function buildAll(): Promise<void> {
  await Promise.all([buildServer(), buildWeb()]);
}
