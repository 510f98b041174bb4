import { spawn, type ChildProcess } from 'node:child_process';
import { mkdtempSync, rmSync } from 'node:fs';
import { createServer, type AddressInfo } from 'node:net';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { test as base, type Page } from '@playwright/test';

/** A demo site of its own, started the way `npm start` does, on free ports and a fresh database. */
export interface Site {
  readonly url: string;
  readonly mailbox: Mailbox;
  /** Base of the forecast stand-in: POST to `${forecastUrl}/__script`. */
  readonly forecastUrl: string;
}

export interface Mail {
  readonly to: readonly string[];
  readonly subject: string;
  readonly text: string;
  readonly html: string;
  readonly calendar: string | null;
  readonly raw: string;
}

/** Tuesday 1 December 2026, 06:00 in Texas: the story plays on this morning, whatever today is. */
export const storyNow = '2026-12-01T12:00:00.000Z';
export const demoPassword = 'first-light';

export class Mailbox {
  constructor(readonly url: string) {}

  async to(email: string): Promise<Mail[]> {
    const answer = await fetch(`${this.url}/messages?to=${encodeURIComponent(email)}`);
    return (await answer.json()) as Mail[];
  }

  /** The newest mail to a person whose subject matches; waits for the outbox to be drained. */
  async find(email: string, subject: RegExp): Promise<Mail> {
    const until = Date.now() + 20_000;
    for (;;) {
      const mails = await this.to(email);
      const found = mails.find((mail) => subject.test(mail.subject));
      if (found) return found;
      if (Date.now() > until)
        throw new Error(
          `No mail to ${email} matches ${subject}: ${mails.map((mail) => mail.subject).join(' | ')}`,
        );
      await new Promise((next) => setTimeout(next, 250));
    }
  }
}

/** Tests with a site for each worker; pages live on the site's frozen morning. */
export const test = base.extend<object, { site: Site }>({
  site: [
    // eslint-disable-next-line no-empty-pattern -- Playwright reads the fixtures a function needs from this pattern
    async ({}, use) => {
      const running = await startSite();
      await use(running.site);
      await running.stop();
    },
    { scope: 'worker', timeout: 180_000 },
  ],
  baseURL: async ({ site }, use) => use(site.url),
  page: async ({ page }, use) => {
    await page.clock.install({ time: storyNow });
    await use(page);
  },
});
export { expect } from '@playwright/test';

async function startSite(): Promise<{ site: Site; stop: () => Promise<void> }> {
  const folder = mkdtempSync(join(tmpdir(), 'dayberth-site-'));
  const port = await freePort();
  const child = spawn(process.execPath, ['node_modules/tsx/dist/cli.mjs', 'tools/start.ts'], {
    env: {
      ...process.env,
      DEMO: '1',
      PORT: String(port),
      FAKES_PORT: '0',
      PUBLIC_URL: `http://127.0.0.1:${port}`,
      DATABASE_FILE: join(folder, 'circle.sqlite'),
      DAYBERTH_NOW: storyNow,
      NODE_ENV: 'development',
      SIGN_IN_LIMIT: '1000',
    },
    stdio: ['ignore', 'pipe', 'pipe'],
  });
  const said = await firstWords(child, [
    /listens on port/,
    /forecasts come from (\S+)/,
    /mailbox is at (\S+)/,
  ]);
  const word = (pattern: RegExp) => pattern.exec(said)?.[1] ?? '';
  return {
    site: {
      url: `http://127.0.0.1:${port}`,
      mailbox: new Mailbox(word(/mailbox is at (\S+)/)),
      forecastUrl: word(/forecasts come from (\S+)/),
    },
    stop: () =>
      new Promise((done) => {
        child.once('exit', () => {
          rmSync(folder, { recursive: true, force: true });
          done();
        });
        child.kill('SIGTERM');
      }),
  };
}

function firstWords(child: ChildProcess, wanted: readonly RegExp[]): Promise<string> {
  return new Promise((done, fail) => {
    let text = '';
    const hear = (chunk: Buffer) => {
      text += chunk.toString();
      if (wanted.every((pattern) => pattern.test(text))) done(text);
    };
    child.stdout?.on('data', hear);
    child.stderr?.on('data', hear);
    child.once('exit', (code) => fail(new Error(`The site ended with ${code}:\n${text}`)));
  });
}

function freePort(): Promise<number> {
  return new Promise((done) => {
    const server = createServer();
    server.listen(0, '127.0.0.1', () => {
      const { port } = server.address() as AddressInfo;
      server.close(() => done(port));
    });
  });
}

/** Signs a demo person in through the page. */
export async function signIn(page: Page, email: string): Promise<void> {
  await page.goto('/sign-in');
  await page.getByLabel('E-mail').fill(email);
  await page.getByLabel('Password', { exact: true }).fill(demoPassword);
  await page.getByRole('button', { name: 'Sign in' }).click();
  await page.waitForURL((url) => !url.pathname.startsWith('/sign-in'));
}

/** Ends the present person's session, so that the next can sign in. */
export async function signOut(page: Page): Promise<void> {
  await page.context().clearCookies();
}
