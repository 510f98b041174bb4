import { setTimeout as delay } from 'node:timers/promises';
import { AppError } from '@shared/errors';
import type { Limiter } from './at-most';

export interface FetcherOptions {
  /** Base of the service; no request ever leaves it, whatever an answer points to. */
  readonly baseUrl: string;
  readonly userAgent: string;
  readonly limiter: Limiter;
  /** For one try, its body included. */
  readonly timeoutMs: number;
  /** Pause before the second try; doubles with each further one. */
  readonly backOffMs: number;
  readonly attempts: number;
  readonly maxBytes: number;
}

export type Fetched =
  | { readonly kind: 'new'; readonly json: unknown; readonly lastModified: string | null }
  | { readonly kind: 'unchanged' };

export interface GetOptions {
  readonly ifModifiedSince?: string | null;
  /** Tries in all; the fetcher's own number when left out. */
  readonly attempts?: number;
}

export type JsonFetcher = (path: string, options?: GetOptions) => Promise<Fetched>;

const retryStatuses = new Set([429, 500, 502, 503, 504]);
const redirectStatuses = new Set([301, 302, 307, 308]);
const mostRedirects = 3;
/** The rate limit is not published; about this long after a 429 it answers again (from memory). */
const rateLimitPauseFactor = 10;
const longestPauseMs = 10_000;

/** What went wrong, as `extra` of the AppError: the status of the answer, null when there was no usable one. */
export interface ServiceFailure {
  readonly upstreamStatus: number | null;
}

/** The status that the service refused with; null for time-outs, broken connections and answers that are not JSON. */
export const upstreamStatus = (error: unknown): number | null =>
  error instanceof AppError ? ((error.extra as Partial<ServiceFailure>).upstreamStatus ?? null) : null;

/** A failed try, and whether another one may help. */
class Failure extends Error {
  constructor(
    message: string,
    readonly status: number | null,
    readonly mayPass: boolean,
    readonly pauseMs: number | null = null,
    options?: ErrorOptions,
  ) {
    super(message, options);
  }
}

/**
 * Gets JSON from the service: time-outs, repeated tries with growing and jittered pauses on 429, 5xx, broken
 * connections and answers that are not JSON, redirects inside the base. Throws AppError `forecast-unavailable`.
 */
export function createJsonFetcher(options: FetcherOptions): JsonFetcher {
  const base = options.baseUrl.replace(/\/+$/, '');
  return async (path, { ifModifiedSince = null, attempts = options.attempts } = {}) => {
    for (let attempt = 1; ; attempt += 1) {
      try {
        return await options.limiter(() => tryOnce(options, base, path, ifModifiedSince));
      } catch (error) {
        const failure =
          error instanceof Failure
            ? error
            : new Failure(reasonOf(error, options), null, true, null, { cause: error });
        if (!failure.mayPass || attempt >= attempts) throw asAppError(failure);
        await delay(pauseMs(options.backOffMs, attempt, failure.pauseMs));
      }
    }
  };
}

const asAppError = (failure: Failure): AppError => {
  const extra: ServiceFailure = { upstreamStatus: failure.status };
  return new AppError('forecast-unavailable', failure.message, [], { ...extra }, { cause: failure });
};

/** Doubling with half of it left to chance, so that many callers do not come back together. */
function pauseMs(backOffMs: number, attempt: number, asked: number | null): number {
  const growing = backOffMs * 2 ** (attempt - 1);
  return Math.min(longestPauseMs, Math.max(asked ?? 0, growing * (0.5 + Math.random() / 2)));
}

function reasonOf(error: unknown, { timeoutMs }: FetcherOptions): string {
  // A DOMException; not an Error of this realm when tests run in a realm of their own.
  if ((error as { name?: unknown } | null)?.name === 'TimeoutError')
    return `The forecast service did not answer within ${timeoutMs / 1000} s.`;
  return 'The forecast service cannot be reached.';
}

async function tryOnce(
  options: FetcherOptions,
  base: string,
  path: string,
  ifModifiedSince: string | null,
): Promise<Fetched> {
  const headers: Record<string, string> = { 'User-Agent': options.userAgent, Accept: 'application/geo+json' };
  if (ifModifiedSince !== null) headers['If-Modified-Since'] = ifModifiedSince;
  const signal = AbortSignal.timeout(options.timeoutMs);
  let url = base + path;
  for (let redirects = 0; ; redirects += 1) {
    const response = await fetch(url, { headers, signal, redirect: 'manual' });
    if (redirectStatuses.has(response.status)) {
      await response.body?.cancel();
      if (redirects >= mostRedirects)
        throw new Failure('The forecast service sent us round in circles.', response.status, false);
      url = redirectTarget(base, url, response);
      continue;
    }
    return read(response, options);
  }
}

function redirectTarget(base: string, from: string, response: Response): string {
  const target = new URL(response.headers.get('location') ?? '', from).href;
  if (target !== base && !target.startsWith(`${base}/`))
    throw new Failure(
      'The forecast service pointed us to another address, which we do not follow.',
      response.status,
      false,
    );
  return target;
}

async function read(response: Response, options: FetcherOptions): Promise<Fetched> {
  const { status } = response;
  if (status === 304) return { kind: 'unchanged' };
  const text = await bodyText(response, options.maxBytes);
  if (status !== 200) {
    const pause = status === 429 ? retryAfterMs(response, options.backOffMs) : null;
    throw new Failure(
      `The forecast service answered with an error (${status}${detailOf(text)}).`,
      status,
      retryStatuses.has(status),
      pause,
    );
  }
  try {
    return {
      kind: 'new',
      json: JSON.parse(text) as unknown,
      lastModified: response.headers.get('last-modified'),
    };
  } catch (cause) {
    throw new Failure('The forecast service sent something that is not JSON.', null, true, null, { cause });
  }
}

function retryAfterMs(response: Response, backOffMs: number): number {
  const seconds = Number(response.headers.get('retry-after') ?? Number.NaN);
  return Number.isFinite(seconds) && seconds > 0 ? seconds * 1000 : rateLimitPauseFactor * backOffMs;
}

/** The title of a problem document, which names the cause in one word, e.g. ForecastGridExpired. */
function detailOf(text: string): string {
  const type = /"type"\s*:\s*"[^"]*[/:]([A-Za-z]{3,40})"/.exec(text)?.[1];
  return type ? ` ${type}` : '';
}

/** What the two libraries of types that this file is checked with, Node's and the browser's, agree on. */
interface BodyReader {
  read(): Promise<{ readonly value?: Uint8Array | undefined }>;
  cancel(): Promise<void>;
}

async function bodyText(response: Response, maxBytes: number): Promise<string> {
  const parts: Uint8Array[] = [];
  const reader: BodyReader | undefined = response.body?.getReader();
  let bytes = 0;
  for (let part = await reader?.read(); part?.value; part = await reader?.read()) {
    bytes += part.value.byteLength;
    if (bytes > maxBytes) {
      await reader?.cancel();
      throw new Failure('The forecast service sent far more than a forecast.', null, false);
    }
    parts.push(part.value);
  }
  return Buffer.concat(parts).toString('utf8');
}
