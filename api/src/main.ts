import { resolve } from 'node:path';
import { readConfig } from './config';
import { startSite } from './server';

/** The server process: reads the environment, serves, and stops cleanly on SIGTERM and SIGINT. */
async function main(): Promise<void> {
  const config = readConfig(process.env);
  const site = await startSite(config, resolve('dist/web/browser'));
  process.stdout.write(`Dayberth listens on port ${site.port}: ${config.PUBLIC_URL}\n`);
  let stopping = false;
  const stop = () => {
    if (stopping) return;
    stopping = true;
    site.stop().then(
      () => process.exit(0),
      () => process.exit(1),
    );
  };
  process.on('SIGTERM', stop);
  process.on('SIGINT', stop);
  // Started by tools/start.ts, the server goes when its parent goes.
  process.on('disconnect', stop);
}

main().catch((error: unknown) => {
  process.stderr.write(`${error instanceof Error ? error.message : String(error)}\n`);
  process.exit(1);
});
