import type {} from 'passport';
import { Router, type RequestHandler } from 'express';
import type * as z from 'zod';
import { AppError } from '@shared/errors';
import { has, type Actor } from './actor';
import { inputError } from './problem';
import type { AnyRoute } from './route';

/** Mounts declared routes. `checkAnswers` parses every answer with its schema too (tests): a wrong one is a 500. */
export function createRouter(routes: readonly AnyRoute[], options: { checkAnswers: boolean }): Router {
  const router = Router();
  for (const spec of routes) router[spec.method](spec.path, handle(spec, options.checkAnswers));
  return router;
}

function handle(spec: AnyRoute, checkAnswers: boolean): RequestHandler {
  return async (req, res) => {
    const actor = authorize(spec, (req.user as Actor | undefined) ?? null);
    // An id that cannot exist is simply not found, as one that does not.
    const params = spec.params?.safeParse(req.params);
    if (params && !params.success) throw new AppError('not-found', 'Nothing is found under that address.');
    const query = parse(spec.query, req.query, 'query');
    const body = parse(spec.body, req.body as unknown, '');
    const ifMatch = readIfMatch(req.get('if-match'));
    const answer: unknown = await spec.handler({
      actor,
      params: params?.data,
      query,
      body,
      ifMatch,
      req,
      res,
    } as never);
    if (spec.raw) return;
    if (spec.textType) {
      res
        .status(spec.status ?? 200)
        .type(`${spec.textType}; charset=utf-8`)
        .send(answer);
      return;
    }
    if (spec.response === null) {
      res.status(spec.status ?? 204).end();
      return;
    }
    const sent = checkAnswers ? spec.response.parse(answer) : answer;
    const version = (sent as { version?: unknown } | null)?.version;
    if (typeof version === 'number') res.set('ETag', `"${version}"`);
    res.status(spec.status ?? 200).json(sent);
  };
}

/** The authorization rule of every route, in one place: 401 without a session, 403 with the wrong role. */
function authorize(spec: AnyRoute, actor: Actor | null): Actor | null {
  if (spec.allow === 'anyone') return actor;
  if (!actor) throw new AppError('not-signed-in', 'Sign in to go on.');
  if (spec.allow !== 'signed-in' && !has(actor, ...spec.allow))
    throw new AppError('forbidden', `This is for: ${spec.allow.join(', ')}.`);
  return actor;
}

function parse(schema: z.ZodType | undefined, value: unknown, prefix: string): unknown {
  if (!schema) return undefined;
  const result = schema.safeParse(value);
  if (!result.success) throw inputError(result.error, prefix);
  return result.data;
}

/** `"7"` → 7, absent → null. Anything else can match no version: 412. */
function readIfMatch(header: string | undefined): number | null {
  if (header === undefined || header === '*') return null;
  const match = /^(?:W\/)?"(\d+)"$/.exec(header.trim());
  if (!match) throw new AppError('stale', 'The If-Match header names no version of this.');
  return Number(match[1]);
}

/** Throws 412 when the caller worked on another version than the present one; `current` goes into the answer. */
export function checkVersion(ifMatch: number | null, version: number, current?: unknown): void {
  if (ifMatch !== null && ifMatch !== version)
    throw new AppError(
      'stale',
      'Somebody changed this while you had it open. Look at the present state and try again.',
      [],
      { current },
    );
}
