import { mkdtempSync, rmSync } from 'node:fs';
import { createServer } from 'node:net';
import type { AddressInfo } from 'node:net';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { pino } from 'pino';
import { readConfig } from '@api/config';
import { migrate, openDatabase } from '@api/database/connection';
import { createDeps, type Deps } from '@api/deps';
import { createMailFake, type MailFake } from '@api/fakes/mail/mail-fake';
import { startMailJob } from '@api/notices/mail-job';
import { post } from '@api/notices/outbox';

const start = Date.parse('2026-12-01T12:00:00.000Z');

describe('The outbox', () => {
  let folder: string;
  let fake: MailFake;
  let smtpUrl: string;
  let nowMs: number;
  let open: Deps[];
  let deps: Deps;
  beforeEach(async () => {
    folder = mkdtempSync(join(tmpdir(), 'dayberth-outbox-'));
    nowMs = start;
    open = [];
    fake = createMailFake();
    ({ smtpUrl } = await fake.listen({ smtpPort: 0, httpPort: 0 }));
    deps = await process(smtpUrl);
  });
  afterEach(async () => {
    for (const one of open) await one.db.destroy();
    await fake.close();
    rmSync(folder, { recursive: true });
  });

  /** What a process of its own would have: other services and another connection to the same database file. */
  async function process(url: string): Promise<Deps> {
    const config = readConfig({
      NODE_ENV: 'test',
      SESSION_SECRET: 'a secret for tests only, forty characters',
      SMTP_URL: url,
      MAIL_FROM: 'Dayberth <circle@example.org>',
      FORECAST_URL: 'http://127.0.0.1:9',
      FORECAST_USER_AGENT: '(dayberth tests, admin@example.org)',
    });
    const db = openDatabase(join(folder, 'site.sqlite'));
    await migrate(db);
    const clock = {
      nowMs: () => nowMs,
      nowIso: () => new Date(nowMs).toISOString(),
      today: () => '2026-12-01',
    };
    const made = createDeps({ config, db, clock, log: pino({ level: 'silent' }) });
    open.push(made);
    return made;
  }

  const write = (on: Deps, key: string, email = `${key}@example.org`) =>
    post(on, {
      key,
      to: { name: 'Bo', email },
      letter: { subject: `Subject ${key}`, text: 'text', html: '<p>html</p>' },
    });
  const arrived = () =>
    fake
      .messages()
      .map(({ subject }) => subject)
      .sort();
  const row = async (key: string) =>
    (await deps.db<Record<string, unknown>>('outbox').where({ idempotency_key: key }).first()) ?? {};
  const later = (minutes: number) => {
    nowMs += minutes * 60_000;
  };

  /** A port of this machine on which nobody listens. */
  async function deadPort(): Promise<string> {
    const server = createServer();
    await new Promise<void>((done) => server.listen(0, '127.0.0.1', done));
    const { port } = server.address() as AddressInfo;
    await new Promise((done) => server.close(done));
    return `smtp://127.0.0.1:${port}`;
  }

  it('sends what was written once, and one key is one mail', async () => {
    await write(deps, 'a');
    await write(deps, 'a');
    expect(await deps.services.notices.queue()).toEqual({ waiting: 1, failed: 0 });
    expect(await deps.services.notices.drain()).toEqual({ sent: 1, failed: 0 });
    expect(await deps.services.notices.drain()).toEqual({ sent: 0, failed: 0 });
    expect(arrived()).toEqual(['Subject a']);
    await write(deps, 'a');
    expect(await deps.services.notices.queue()).toEqual({ waiting: 0, failed: 0 });
  });

  it('writes nothing when the transaction is taken back, and wakes nobody', async () => {
    const job = startMailJob(deps);
    await expect(
      deps.transaction(async (tx) => {
        await write(tx, 'a');
        throw new Error('taken back');
      }),
    ).rejects.toThrow('taken back');
    await job();
    expect(await deps.services.notices.queue()).toEqual({ waiting: 0, failed: 0 });
    expect(arrived()).toEqual([]);
  });

  it('goes out by itself right after the commit', async () => {
    const stop = startMailJob(deps);
    await deps.transaction((tx) => write(tx, 'a'));
    // Far less than the five seconds after which the outbox is looked at anyway.
    for (let tries = 0; tries < 150 && arrived().length === 0; tries++)
      await new Promise((done) => setTimeout(done, 20));
    expect(arrived()).toEqual(['Subject a']);
    await stop();
  });

  it.each(['temporary', 'drop'] as const)('tries a mail again a minute after a %s failure', async (mood) => {
    fake.reject(mood, 1);
    await write(deps, 'a');
    expect(await deps.services.notices.drain()).toEqual({ sent: 0, failed: 0 });
    expect(await row('a')).toMatchObject({
      state: 'waiting',
      attempts: 1,
      last_error: expect.stringMatching(/4[25]1/),
    });
    later(0.9);
    expect(await deps.services.notices.drain()).toEqual({ sent: 0, failed: 0 });
    later(0.1);
    expect(await deps.services.notices.drain()).toEqual({ sent: 1, failed: 0 });
    expect(await row('a')).toMatchObject({
      state: 'sent',
      last_error: null,
      sent_at: new Date(nowMs).toISOString(),
    });
  });

  it('waits 1, 2, 4 … at most 60 minutes between ten tries, then gives up with the last error', async () => {
    fake.reject('temporary', 100);
    await write(deps, 'a');
    const waits: number[] = [];
    for (let attempt = 1; attempt <= 9; attempt++) {
      await deps.services.notices.drain();
      const next = Date.parse(String((await row('a'))['next_attempt_at']));
      waits.push((next - nowMs) / 60_000);
      nowMs = next;
    }
    expect(waits).toEqual([1, 2, 4, 8, 16, 32, 60, 60, 60]);
    expect(await deps.services.notices.drain()).toEqual({ sent: 0, failed: 1 });
    expect(await deps.services.notices.failedMail()).toEqual([
      {
        id: 1,
        to: 'a@example.org',
        subject: 'Subject a',
        error: expect.stringContaining('451'),
        at: '2026-12-01T12:00:00.000Z',
      },
    ]);
  });

  it('gives a mail up at once that the mail host refuses for good (5xx, RFC 5321 4.2.1); the others go out', async () => {
    fake.reject('permanent', 1);
    await write(deps, 'a');
    await write(deps, 'b');
    expect(await deps.services.notices.drain()).toEqual({ sent: 1, failed: 1 });
    const [failed] = await deps.services.notices.failedMail();
    expect(failed?.error).toMatch(/550/);
    expect(arrived()).toHaveLength(1);
    await deps.services.notices.resend(failed?.id ?? 0);
    expect(await deps.services.notices.drain()).toEqual({ sent: 1, failed: 0 });
    expect(arrived()).toEqual(['Subject a', 'Subject b']);
  });

  it('files an address that cannot be one, and the change that caused it stands', async () => {
    await write(deps, 'a', 'a@example.org, b@example.org');
    expect(await deps.services.notices.drain()).toEqual({ sent: 0, failed: 0 });
    expect(await deps.services.notices.queue()).toEqual({ waiting: 0, failed: 1 });
  });

  it('keeps everything while the mail host is away, and does not try each mail in turn', async () => {
    const away = await process(await deadPort());
    for (let i = 0; i < 12; i++) await write(away, `m${i}`);
    expect(await away.services.notices.drain()).toEqual({ sent: 0, failed: 0 });
    expect(await away.services.notices.queue()).toEqual({ waiting: 12, failed: 0 });
    const tried = await away.db('outbox').where('attempts', '>', 0);
    expect(tried.length).toBeLessThanOrEqual(5);
  });

  it('outlives the process: the next one sends what waited', async () => {
    const first = await process(await deadPort());
    await first.transaction(async (tx) => {
      await write(tx, 'a');
      await write(tx, 'b');
    });
    await first.services.notices.drain();
    await first.db.destroy();
    later(1);
    const second = await process(smtpUrl);
    expect(await second.services.notices.drain()).toEqual({ sent: 2, failed: 0 });
    expect(arrived()).toEqual(['Subject a', 'Subject b']);
  });

  it.each([
    ['four minutes ago is left to the process that has it', 4, 0],
    ['six minutes ago by a process that died is taken back', 6, 1],
  ])('a mail claimed %s', async (_, minutes, sent) => {
    await write(deps, 'a');
    const claimedAt = new Date(nowMs - minutes * 60_000).toISOString();
    await deps.db('outbox').update({ state: 'sending', attempts: 1, claimed_at: claimedAt });
    expect((await deps.services.notices.drain()).sent).toBe(sent);
    expect(arrived()).toHaveLength(sent);
  });

  it('two processes that drain beside each other send every mail once', async () => {
    const other = await process(smtpUrl);
    for (let i = 0; i < 30; i++) await write(deps, `m${i}`);
    const results = await Promise.all([deps, other, deps].map((one) => one.services.notices.drain()));
    expect(results.reduce((sum, { sent }) => sum + sent, 0)).toBe(30);
    expect(arrived()).toHaveLength(30);
    expect(new Set(arrived()).size).toBe(30);
  });

  it('a mail that is sent again keeps its Message-ID, so that the receiver can tell (RFC 5322 3.6.4)', async () => {
    await write(deps, 'a');
    await deps.services.notices.drain();
    await deps.db('outbox').update({ state: 'waiting' });
    await deps.services.notices.drain();
    const ids = fake.messages().map(({ messageId }) => messageId);
    expect(ids).toHaveLength(2);
    expect(new Set(ids).size).toBe(1);
    expect(ids[0]).toMatch(/^<[0-9a-f-]{36}@127\.0\.0\.1>$/);
  });
});
