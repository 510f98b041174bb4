import { createServer, type IncomingMessage, type ServerResponse } from 'node:http';
import type { AddressInfo } from 'node:net';
import { simpleParser, type ParsedMail } from 'mailparser';
import { SMTPServer } from 'smtp-server';
import { messagePage, listPage, stylesheet } from './mailbox-page';

/** A mail as the mailbox keeps it. */
export interface KeptMail {
  readonly id: number;
  readonly at: string;
  readonly from: string;
  readonly to: readonly string[];
  readonly subject: string;
  readonly text: string;
  readonly html: string;
  readonly calendar: string | null;
  readonly messageId: string;
  readonly raw: string;
}

type Mood = 'temporary' | 'permanent' | 'drop';

export interface MailFake {
  listen(ports: { smtpPort: number; httpPort: number }): Promise<{ smtpUrl: string; httpUrl: string }>;
  messages(to?: string): readonly KeptMail[];
  /** The next `count` mails are refused in this way. */
  reject(mood: Mood, count: number): void;
  clear(): void;
  close(): Promise<void>;
}

const keep = 500;

/** A mailbox on 127.0.0.1: takes mail over SMTP, shows it on a page and as JSON. For demos and tests. */
export function createMailFake(): MailFake {
  let kept: KeptMail[] = [];
  let nextId = 1;
  let refusals: { mood: Mood; left: number } = { mood: 'temporary', left: 0 };
  const refusal = (): Error | null => {
    if (refusals.left <= 0 || refusals.mood === 'drop') return null;
    refusals = { ...refusals, left: refusals.left - 1 };
    const permanent = refusals.mood === 'permanent';
    return Object.assign(new Error(permanent ? 'No such mailbox' : 'Try again later'), { responseCode: permanent ? 550 : 451 });
  };
  const smtp = new SMTPServer({
    authOptional: true,
    disabledCommands: ['STARTTLS'],
    disableReverseLookup: true,
    onRcptTo: (_address, _session, done) => done(refusal()),
    onData: (stream, session, done) => {
      const chunks: Buffer[] = [];
      stream.on('data', (chunk: Buffer) => chunks.push(chunk));
      stream.on('end', () => {
        if (refusals.mood === 'drop' && refusals.left > 0) {
          refusals = { ...refusals, left: refusals.left - 1 };
          // The line goes dead before the answer: the sender cannot know whether the mail arrived.
          done(Object.assign(new Error('dropped'), { responseCode: 421 }));
          return;
        }
        const raw = Buffer.concat(chunks).toString('utf8');
        const to = session.envelope.rcptTo.map((one) => one.address);
        simpleParser(raw).then(
          (parsed) => {
            kept = [toKept(nextId++, parsed, to, raw), ...kept].slice(0, keep);
            done();
          },
          (error: unknown) => done(error instanceof Error ? error : new Error(String(error))),
        );
      });
    },
  });
  // A client that goes away in the middle is the client's affair.
  smtp.on('error', () => undefined);
  const box = {
    messages: (to?: string) => (to ? kept.filter((mail) => mail.to.some((one) => one.toLowerCase() === to.toLowerCase())) : kept),
    reject: (mood: Mood, count: number) => {
      refusals = { mood, left: count };
    },
    clear: () => {
      kept = [];
    },
  };
  const http = createServer((req, res) => void answer(box, req, res));
  return {
    ...box,
    async listen({ smtpPort, httpPort }) {
      await new Promise<void>((done, fail) => {
        smtp.once('error', fail);
        smtp.listen(smtpPort, '127.0.0.1', done);
      });
      await new Promise<void>((done) => http.listen(httpPort, '127.0.0.1', done));
      return { smtpUrl: `smtp://127.0.0.1:${portOf(smtp.server)}`, httpUrl: `http://127.0.0.1:${portOf(http)}` };
    },
    async close() {
      http.closeAllConnections();
      await Promise.all([new Promise<void>((done) => http.close(() => done())), new Promise<void>((done) => smtp.close(done))]);
    },
  };
}

const portOf = (server: { address(): string | AddressInfo | null }) => (server.address() as AddressInfo).port;

function toKept(id: number, parsed: ParsedMail, to: readonly string[], raw: string): KeptMail {
  const calendar = parsed.attachments.find((one) => one.contentType === 'text/calendar');
  return {
    id,
    at: (parsed.date ?? new Date(0)).toISOString(),
    from: parsed.from?.text ?? '',
    to,
    subject: parsed.subject ?? '',
    text: parsed.text ?? '',
    html: parsed.html === false ? '' : (parsed.html ?? ''),
    calendar: calendar ? calendar.content.toString('utf8') : null,
    messageId: parsed.messageId ?? '',
    raw,
  };
}

type Box = Pick<MailFake, 'messages' | 'reject' | 'clear'>;

async function answer(box: Box, req: IncomingMessage, res: ServerResponse): Promise<void> {
  const url = new URL(req.url ?? '/', 'http://127.0.0.1');
  const json = (status: number, value: unknown) => send(res, status, 'application/json', JSON.stringify(value));
  const to = url.searchParams.get('to') ?? undefined;
  const one = /^\/(?:messages|mail)\/(\d+)$/.exec(url.pathname);
  const found = one ? box.messages().find((mail) => mail.id === Number(one[1])) : undefined;
  if (req.method === 'POST' && url.pathname === '/__script') {
    const body = JSON.parse(await read(req)) as { reject?: Mood; count?: number };
    if (body.reject) box.reject(body.reject, body.count ?? 1);
    return json(200, {});
  }
  if (req.method === 'DELETE' && url.pathname === '/messages') {
    box.clear();
    return json(200, {});
  }
  if (url.pathname === '/messages') return json(200, box.messages(to));
  if (url.pathname.startsWith('/messages/')) return found ? json(200, found) : json(404, {});
  if (url.pathname === '/style.css') return send(res, 200, 'text/css', stylesheet);
  if (url.pathname === '/') return send(res, 200, 'text/html', listPage(box.messages(to), box.messages(), to ?? ''));
  if (found) return send(res, 200, 'text/html', messagePage(found));
  return send(res, 404, 'text/plain', 'Not found');
}

function send(res: ServerResponse, status: number, type: string, body: string): void {
  res.writeHead(status, {
    'Content-Type': `${type}; charset=utf-8`,
    // The mail's own HTML brings inline styles and stands in a sandboxed frame that runs no script.
    'Content-Security-Policy': "default-src 'none'; style-src 'self' 'unsafe-inline'; frame-src 'self'; form-action 'self'; base-uri 'none'",
    'X-Content-Type-Options': 'nosniff',
    'Cache-Control': 'no-store',
  });
  res.end(body);
}

async function read(req: IncomingMessage): Promise<string> {
  const chunks: Buffer[] = [];
  for await (const chunk of req) chunks.push(chunk as Buffer);
  return Buffer.concat(chunks).toString('utf8');
}

