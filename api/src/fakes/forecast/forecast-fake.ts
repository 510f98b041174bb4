import { createServer, type IncomingMessage, type Server, type ServerResponse } from 'node:http';
import type { AddressInfo } from 'node:net';
import { setTimeout as delay } from 'node:timers/promises';
import { answerFor, type Answer, type Asked } from './answers';
import { ForecastScript, type Outage, type ScriptChange } from './forecast-script';
import { problem } from './problem-answer';
import { answerScript } from './script-endpoint';

export interface ForecastFakeOptions {
  readonly seed: number;
  /** The fake's clock, UTC epoch ms. */
  readonly now: () => number;
  /** Days by which the season runs ahead of the calendar; 0 by default. */
  readonly seasonShiftDays?: number;
  /** Hours that the forecast reaches beyond the service's usual 7.5 to 8 days; 0 by default. */
  readonly furtherHours?: number;
}

/** A request as the fake saw it. */
export interface LoggedRequest {
  readonly method: string;
  readonly path: string;
  readonly status: number;
  readonly userAgent: string;
  readonly ifModifiedSince: string | null;
}

export interface ForecastFake {
  /** Listens on 127.0.0.1; port 0 takes a free one. Answers the port. */
  listen(port: number): Promise<number>;
  close(): Promise<void>;
  /** Changes the weather or how requests fail; the same as a POST to /__script. */
  script(change: ScriptChange): void;
  /** Every request but those for the script, in order of arrival of their answers; emptied by `reset`. */
  readonly log: readonly LoggedRequest[];
  /** The most requests that were open at the same time since the last `reset`. */
  mostAtOnce(): number;
}

/** A stand-in for the public weather service: the same protocol over a socket, invented weather, a script for tests. */
export function createForecastFake({
  seed,
  now,
  seasonShiftDays = 0,
  furtherHours = 0,
}: ForecastFakeOptions): ForecastFake {
  const script = new ForecastScript(seasonShiftDays, furtherHours);
  const log: LoggedRequest[] = [];
  let open = 0;
  let most = 0;
  const change = (input: ScriptChange) => {
    script.apply(input);
    if (!input.reset) return;
    log.length = 0;
    most = open;
  };
  const state = { script, seed, now };
  const serve = async (req: IncomingMessage, res: ServerResponse) => {
    if (req.url?.startsWith('/__script'))
      return answerScript(req, res, { change, log, mostAtOnce: () => most });
    open += 1;
    most = Math.max(most, open);
    res.once('close', () => (open -= 1));
    if (script.delayMs > 0) await delay(script.delayMs);
    const asked = read(req);
    const note = (status: number) =>
      log.push({
        method: req.method ?? '',
        path: req.url ?? '',
        status,
        userAgent: asked.userAgent,
        ifModifiedSince: asked.ifModifiedSince,
      });
    const outage = asked.kind ? script.takeOutage(asked.kind) : 'none';
    if (outage === 'timeout') return void note(0);
    if (outage === 'refuse') {
      note(0);
      return void req.socket.destroy();
    }
    const answer = failing(outage) ?? answerFor(state, asked);
    note(answer.status);
    write(res, answer);
  };
  const server = createServer((req, res) => {
    serve(req, res).catch((error: unknown) => {
      write(
        res,
        problem(
          500,
          'UnexpectedProblem',
          error instanceof Error ? error.message : 'An unexpected problem has occurred.',
        ),
      );
    });
  });
  return {
    listen: (port) => listen(server, port),
    close: () => close(server),
    script: change,
    log,
    mostAtOnce: () => most,
  };
}

function read(req: IncomingMessage): Asked {
  const base = `http://${req.headers.host ?? '127.0.0.1'}`;
  const url = new URL(req.url ?? '/', base);
  const path = decodeURIComponent(url.pathname);
  const kind = path.startsWith('/points/')
    ? 'points'
    : path.startsWith('/alerts/')
      ? 'alerts'
      : path.endsWith('/forecast/hourly')
        ? 'hourly'
        : path.startsWith('/gridpoints/')
          ? 'grid'
          : null;
  return {
    method: req.method ?? 'GET',
    base,
    path,
    query: url.searchParams,
    kind,
    userAgent: req.headers['user-agent'] ?? '',
    ifModifiedSince: req.headers['if-modified-since'] ?? null,
    flags: String(req.headers['feature-flags'] ?? ''),
  };
}

function failing(outage: Outage): Answer | null {
  const ok = (type: string, body: string): Answer => ({ status: 200, type, body, headers: {} });
  switch (outage) {
    case '500':
      return problem(500, 'UnexpectedProblem', 'An unexpected problem has occurred.');
    case '503':
      return problem(503, 'ForecastGridExpired', 'The requested forecast grid has expired.');
    case '404':
      return problem(404, 'NotFound', 'The requested resource was not found.');
    case '429':
      return problem(429, 'TooManyRequests', 'Please slow down.');
    case 'malformed':
      return ok(
        'application/geo+json',
        JSON.stringify({ type: 'Feature', properties: { temperature: { values: 'none' } } }),
      );
    case 'not-json':
      return ok('text/html', '<!doctype html><title>Be right back</title>');
    case 'huge':
      return ok('application/geo+json', JSON.stringify({ padding: 'x'.repeat(12_000_000) }));
    default:
      return null;
  }
}

function write(res: ServerResponse, answer: Answer): void {
  if (res.headersSent) return void res.destroy();
  res.writeHead(answer.status, { 'Content-Type': answer.type, ...answer.headers }).end(answer.body);
}

async function listen(server: Server, port: number): Promise<number> {
  await new Promise<void>((resolve, reject) => {
    server.once('error', reject);
    server.listen(port, '127.0.0.1', () => resolve());
  });
  return (server.address() as AddressInfo).port;
}

async function close(server: Server): Promise<void> {
  const closed = new Promise<void>((resolve) => server.close(() => resolve()));
  server.closeAllConnections();
  await closed;
}
