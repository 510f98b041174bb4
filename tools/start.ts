import { fork } from 'node:child_process';
import { buildAll } from './build';
import { demoEnvironment, isDemo, readEnvironment, type Environment } from './environment';
import { startFakes, type Fakes } from './fakes';
import { seed } from './seed';

/** `npm start`: builds, starts the fakes in the demo, migrates, seeds the demo once, serves until it is told to stop. */
async function main(): Promise<void> {
  let env: Environment = readEnvironment();
  await buildAll();
  let fakes: Fakes | null = null;
  if (isDemo(env)) {
    env = demoEnvironment(env);
    // Next to the site's own port, so that other commands find them; 0 takes free ones.
    fakes = await startFakes(env, Number(env['FAKES_PORT'] ?? Number(env['PORT']) + 1));
    env = {
      ...env,
      FORECAST_URL: fakes.forecastUrl,
      SMTP_URL: fakes.smtpUrl,
      DEMO_MAILBOX_URL: fakes.mailboxUrl,
    };
    if (await seed(env)) say('The demo circle has been seeded.');
  }
  const server = fork('dist/api/server.mjs', { env, stdio: 'inherit' });
  const stop = () => server.kill('SIGTERM');
  process.on('SIGINT', stop);
  process.on('SIGTERM', stop);
  server.on('exit', (code) => {
    fakes?.stop();
    process.exit(code ?? 1);
  });
  if (fakes) {
    say(`Open ${env['PUBLIC_URL']}/demo for the demo accounts.`);
    say(`The demo mailbox is at ${fakes.mailboxUrl}`);
    say(`Its forecasts come from ${fakes.forecastUrl}`);
  }
}

function say(text: string): void {
  process.stdout.write(`${text}\n`);
}

main().catch((error: unknown) => {
  process.stderr.write(`${error instanceof Error ? error.message : String(error)}\n`);
  process.exit(1);
});
