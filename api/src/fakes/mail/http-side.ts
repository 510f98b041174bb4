import { createServer, type IncomingMessage, type Server, type ServerResponse } from 'node:http';
import type { KeptMail } from './kept-mail';
import { listPage, messagePage, stylesheet } from './mailbox-page';
import type { Mood } from './smtp-side';

export interface Box {
  messages(to?: string): readonly KeptMail[];
  reject(mood: Mood, count: number): void;
  clear(): void;
}

/** The mailbox as pages (`/`, `/mail/7`) and JSON (`/messages?to=`, `/messages/7`); a POST to `/__script` refuses mails. */
export function createHttpSide(box: Box): Server {
  return createServer((req, res) => {
    answer(box, req, res).catch(() => send(res, 400, 'text/plain', 'That cannot be read.'));
  });
}

async function answer(box: Box, req: IncomingMessage, res: ServerResponse): Promise<void> {
  const url = new URL(req.url ?? '/', 'http://127.0.0.1');
  const json = (status: number, value: unknown) =>
    send(res, status, 'application/json', JSON.stringify(value));
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
  if (url.pathname === '/')
    return send(res, 200, 'text/html', listPage(box.messages(to), box.messages(), to ?? ''));
  if (found) return send(res, 200, 'text/html', messagePage(found));
  return send(res, 404, 'text/plain', 'Not found');
}

function send(res: ServerResponse, status: number, type: string, body: string): void {
  res.writeHead(status, {
    'Content-Type': `${type}; charset=utf-8`,
    // The mail's own HTML brings inline styles and stands in a sandboxed frame that runs no script.
    'Content-Security-Policy':
      "default-src 'none'; style-src 'self' 'unsafe-inline'; frame-src 'self'; form-action 'self'; base-uri 'none'",
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
