import { connect } from 'node:net';
import { readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { createMailFake, type MailFake } from './mail-fake';

describe('The mailbox of the demo', () => {
  let fake: MailFake;
  let smtpPort: number;
  let httpUrl: string;
  beforeEach(async () => {
    fake = createMailFake();
    const urls = await fake.listen({ smtpPort: 0, httpPort: 0 });
    smtpPort = Number(new URL(urls.smtpUrl).port);
    httpUrl = urls.httpUrl;
  });
  afterEach(() => fake.close());

  /** Speaks SMTP by hand (RFC 5321): sends each line when the reply to the last has come, answers all replies. */
  function speak(lines: readonly string[]): Promise<string[]> {
    return new Promise((done, fail) => {
      const socket = connect(smtpPort, '127.0.0.1');
      const replies: string[] = [];
      let rest = '';
      socket.setEncoding('utf8');
      socket.on('error', fail);
      socket.on('close', () => done(replies));
      socket.on('data', (chunk: string) => {
        rest += chunk;
        const last = rest.split('\r\n').at(-2);
        if (!rest.endsWith('\r\n') || !last || !/^\d{3} /.test(last)) return;
        replies.push(last.slice(0, 3));
        rest = '';
        const next = lines[replies.length - 1];
        if (next === undefined) socket.end();
        else socket.write(`${next}\r\n`);
      });
    });
  }

  const letter = (subject: string, body = 'Hello') => [
    'EHLO test',
    'MAIL FROM:<circle@example.org>',
    'RCPT TO:<bo@example.org>',
    'DATA',
    `From: Dayberth <circle@example.org>\r\nTo: Bo <bo@example.org>\r\nSubject: ${subject}\r\n\r\n${body}\r\n.`,
    'QUIT',
  ];
  const page = async (path: string) => {
    const answer = await fetch(`${httpUrl}${path}`);
    return { status: answer.status, headers: answer.headers, text: await answer.text() };
  };

  it('takes a mail over SMTP and keeps it', async () => {
    expect(await speak(letter('Planned arrival'))).toEqual(['220', '250', '250', '250', '354', '250', '221']);
    expect(fake.messages('BO@example.org')).toMatchObject([
      { subject: 'Planned arrival', to: ['bo@example.org'], text: 'Hello\n' },
    ]);
    expect(fake.messages('somebody@example.org')).toEqual([]);
  });

  it('shows what a mail holds without running or loading any of it', async () => {
    await speak(letter('<script>alert(1)</script>', '<img src=x onerror=alert(1)>'));
    const list = await page('/');
    const one = await page('/mail/1');
    for (const { text, headers } of [list, one]) {
      expect(text).not.toMatch(/<script|<img/);
      expect(text).toContain('&lt;script&gt;');
      expect(headers.get('content-security-policy')).toMatch(/^default-src 'none'/);
    }
    expect((await page('/mail/2')).status).toBe(404);
  });

  it.each([
    ['temporary', '451'],
    ['permanent', '550'],
  ])('refuses the next mails in a %s way when told to, then takes them again', async (reject, code) => {
    await fetch(`${httpUrl}/__script`, { method: 'POST', body: JSON.stringify({ reject, count: 1 }) });
    expect(await speak(letter('a').slice(0, 3))).toContain(code);
    expect((await speak(letter('b'))).at(-2)).toBe('250');
    expect(fake.messages().map(({ subject }) => subject)).toEqual(['b']);
  });

  it('can be emptied, and answers nonsense with a complaint instead of falling over', async () => {
    await speak(letter('a'));
    await fetch(`${httpUrl}/messages`, { method: 'DELETE' });
    expect(JSON.parse((await page('/messages')).text)).toEqual([]);
    const answer = await fetch(`${httpUrl}/__script`, { method: 'POST', body: 'no json' });
    expect(answer.status).toBe(400);
  });

  it('is a process of its own: nothing of the site knows it', () => {
    const api = join(__dirname, '../..');
    const files = readdirSync(api, { recursive: true, encoding: 'utf8' }).filter(
      (file) => file.endsWith('.ts') && !file.startsWith('fakes'),
    );
    expect(files.length).toBeGreaterThan(50);
    expect(files.filter((file) => readFileSync(join(api, file), 'utf8').includes('fakes/mail'))).toEqual([]);
  });
});
