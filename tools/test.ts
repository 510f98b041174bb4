import { spawn } from 'node:child_process';
import { existsSync, mkdirSync, readFileSync, rmSync } from 'node:fs';
import { resolve } from 'node:path';
import { buildAll } from './build';
import { findChromium } from './chromium';

const results = 'test-results';
const counts = { passed: 0, failed: 0 };
let broken = false;

/**
 * `npm test [-- unit|browser|lint]`: lint and types, units and API in Jest, each role's path in a real browser. Ends with
 * one line "N passed, N failed"; anything that is not green makes the exit code 1.
 */
async function main(): Promise<void> {
  const only = process.argv[2];
  const wanted = (part: string) => only === undefined || only === part;
  rmSync(results, { recursive: true, force: true });
  mkdirSync(results, { recursive: true });
  if (wanted('lint')) {
    await step('Types', 'npm', ['run', '--silent', 'typecheck']);
    await step('Lint', 'npm', ['run', '--silent', 'lint']);
  }
  if (wanted('unit')) {
    await step('Units and API', process.execPath, [
      'node_modules/jest/bin/jest.js',
      '--json',
      `--outputFile=${results}/jest.json`,
      '--silent=false',
    ]);
    countJest(`${results}/jest.json`);
  }
  if (wanted('browser')) {
    const chromium = findChromium();
    await buildAll();
    await step(
      'Browser',
      process.execPath,
      ['node_modules/@playwright/test/cli.js', 'test', '--config', 'test/browser/playwright.config.ts'],
      {
        CHROMIUM_PATH: chromium,
        // Relative names would be taken from the configuration's folder.
        PLAYWRIGHT_JSON_OUTPUT_FILE: resolve(results, 'browser.json'),
      },
    );
    countPlaywright(`${results}/browser.json`);
  }
  process.stdout.write(`\n${counts.passed} passed, ${counts.failed} failed\n`);
  process.exit(broken || counts.failed > 0 ? 1 : 0);
}

function step(
  title: string,
  command: string,
  args: readonly string[],
  extra: Record<string, string> = {},
): Promise<void> {
  process.stdout.write(`\n== ${title}\n`);
  return new Promise((done) => {
    const child = spawn(command, args, { stdio: 'inherit', env: { ...process.env, ...extra } });
    child.on('exit', (code) => {
      if (code !== 0) {
        broken = true;
        process.stdout.write(`${title}: not green (${code}).\n`);
      }
      done();
    });
  });
}

function countJest(file: string): void {
  if (!existsSync(file)) return missing(file);
  const json = JSON.parse(readFileSync(file, 'utf8')) as {
    numPassedTests: number;
    numFailedTests: number;
    numFailedTestSuites: number;
  };
  counts.passed += json.numPassedTests;
  counts.failed += json.numFailedTests;
  if (json.numPassedTests === 0) broken = true;
}

function countPlaywright(file: string): void {
  if (!existsSync(file)) return missing(file);
  const json = JSON.parse(readFileSync(file, 'utf8')) as {
    stats: { expected: number; unexpected: number; flaky: number };
  };
  counts.passed += json.stats.expected;
  counts.failed += json.stats.unexpected + json.stats.flaky;
  if (json.stats.expected === 0) broken = true;
}

function missing(file: string): void {
  process.stdout.write(`${file} was not written.\n`);
  broken = true;
}

main().catch((error: unknown) => {
  process.stderr.write(`${error instanceof Error ? (error.stack ?? error.message) : String(error)}\n`);
  process.stdout.write(`\n${counts.passed} passed, ${counts.failed + 1} failed\n`);
  process.exit(1);
});
