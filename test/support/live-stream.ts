import { get, type IncomingMessage } from 'node:http';
import { password } from './small-circle';

export interface LiveEvent {
  readonly name: string;
  readonly id: string | null;
  readonly data: unknown;
}

export interface LiveStream {
  readonly status: number;
  readonly headers: IncomingMessage['headers'];
  readonly events: readonly LiveEvent[];
  /** Waits until an event fits; throws after `ms`, with what came instead. */
  until(fits: (event: LiveEvent) => boolean, ms?: number): Promise<LiveEvent>;
  /** Resolves once the server has ended the stream. */
  readonly ended: Promise<void>;
  close(): void;
}

/** The session cookie of somebody who signed in at a site that listens on a port. */
export async function cookieOf(port: number, email: string): Promise<string> {
  const url = `http://127.0.0.1:${port}/api/session`;
  const cookies = (answer: Response) => answer.headers.getSetCookie().map((text) => text.split(';')[0] ?? '');
  const first = cookies(await fetch(url));
  const token = decodeURIComponent(first.find((text) => text.startsWith('XSRF-TOKEN='))?.slice(11) ?? '');
  const answer = await fetch(url, {
    method: 'POST',
    headers: { 'Content-Type': 'application/json', 'X-XSRF-TOKEN': token, Cookie: first.join('; ') },
    body: JSON.stringify({ email, password }),
  });
  const session = cookies(answer).find((text) => text.startsWith('dayberth.sid='));
  if (session === undefined) throw new Error(`${email} could not sign in: ${answer.status}`);
  return session;
}

/** Opens a stream over a real socket and reads it by the rules of the HTML standard, 9.2.6 (server-sent events). */
export function openStream(
  port: number,
  path: string,
  options: { cookie?: string; lastEventId?: number } = {},
): Promise<LiveStream> {
  const headers = {
    Accept: 'text/event-stream',
    ...(options.cookie === undefined ? {} : { Cookie: options.cookie }),
    ...(options.lastEventId === undefined ? {} : { 'Last-Event-ID': String(options.lastEventId) }),
  };
  return new Promise((done, fail) => {
    const request = get({ host: '127.0.0.1', port, path: `/api${path}`, headers }, (answer) => {
      done(readStream(answer, () => request.destroy()));
    });
    request.on('error', fail);
  });
}

function readStream(answer: IncomingMessage, close: () => void): LiveStream {
  const events: LiveEvent[] = [];
  const waiting = new Set<() => void>();
  let text = '';
  answer.setEncoding('utf8');
  answer.on('data', (part: string) => {
    const blocks = (text + part).split('\n\n');
    text = blocks.pop() ?? '';
    events.push(...blocks.flatMap((block) => eventOf(block) ?? []));
    for (const look of waiting) look();
  });
  const ended = new Promise<void>((done) => {
    answer.on('end', done);
    answer.on('error', () => done());
  });
  return {
    status: answer.statusCode ?? 0,
    headers: answer.headers,
    events,
    ended,
    close,
    until: (fits, ms = 2000) =>
      new Promise((done, fail) => {
        const look = () => {
          const found = events.find(fits);
          if (!found) return;
          clearTimeout(timer);
          waiting.delete(look);
          done(found);
        };
        const timer = setTimeout(() => {
          waiting.delete(look);
          fail(new Error(`Nothing like that came in ${ms} ms: ${JSON.stringify(events)}`));
        }, ms);
        waiting.add(look);
        look();
      }),
  };
}

function eventOf(block: string): LiveEvent | null {
  const fields = block.split('\n').map((line): [string, string] => {
    const [name = '', ...rest] = line.split(':');
    return [name, rest.join(':').replace(/^ /, '')];
  });
  const of = (name: string) => fields.find(([field]) => field === name)?.[1] ?? null;
  const data = of('data');
  return data === null ? null : { name: of('event') ?? 'message', id: of('id'), data: JSON.parse(data) };
}
