import { defineConfig } from '@playwright/test';

/** Debian's Chromium (tools/chromium.ts finds or installs it); one worker, for the story's steps share a circle. */
export default defineConfig({
  testDir: '.',
  outputDir: '../../test-results/browser',
  timeout: 90_000,
  expect: { timeout: 10_000 },
  workers: 1,
  fullyParallel: false,
  retries: 0,
  forbidOnly: true,
  reporter: [['list'], ['json']],
  use: {
    launchOptions: {
      executablePath: process.env['CHROMIUM_PATH'] ?? '/usr/bin/chromium',
      args: [
        '--no-sandbox',
        '--disable-quic',
        '--disable-background-networking',
        '--disable-component-update',
        '--disable-sync',
      ],
    },
    locale: 'en-US',
    timezoneId: 'America/Chicago',
    screenshot: 'only-on-failure',
    trace: 'off',
  },
});
