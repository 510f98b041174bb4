import { randomUUID } from 'node:crypto';
import type { ErrorRequestHandler, Response } from 'express';
import type { Logger } from 'pino';
import type * as z from 'zod';
import { AppError, badInput } from '@shared/errors';

/** Turns a failed parse into a 400 with one entry a field; `prefix` names where it stood (e.g. `query`). */
export function inputError(error: z.ZodError, prefix = ''): AppError {
  return badInput(
    error.issues.flatMap((issue) => {
      const path = [prefix, ...issue.path].filter((part) => part !== '').join('.');
      if (issue.code === 'unrecognized_keys')
        return issue.keys.map((key) => ({
          path: [path, key].filter(Boolean).join('.'),
          message: 'This field is not known.',
        }));
      return [{ path, message: issue.message }];
    }),
  );
}

/** Writes an AppError as RFC 9457 problem+json. */
export function sendProblem(res: Response, error: AppError, instance: string): void {
  res
    .status(error.status)
    .type('application/problem+json')
    .send(
      JSON.stringify({
        ...error.extra,
        type: `urn:dayberth:problem:${error.code}`,
        title: error.title,
        status: error.status,
        detail: error.message,
        instance,
        code: error.code,
        errors: error.errors,
      }),
    );
}

interface BodyParserError {
  readonly type?: string;
}

/** The one place where errors become answers. What is not ours becomes a plain 500 with an id that is in the log. */
export function problemMiddleware(log: Logger): ErrorRequestHandler {
  return (thrown: unknown, req, res, next) => {
    if (res.headersSent) return next(thrown);
    const instance = `urn:uuid:${randomUUID()}`;
    const error = known(thrown);
    if (error) return sendProblem(res, error, instance);
    log.error({ err: thrown, instance, method: req.method, path: req.path }, 'request failed');
    sendProblem(
      res,
      new AppError('internal', 'It is not your fault. Try again; if it stays, tell an admin the number.'),
      instance,
    );
  };
}

function known(thrown: unknown): AppError | null {
  if (thrown instanceof AppError) return thrown;
  const type = (thrown as BodyParserError | null)?.type;
  if (type === 'entity.too.large')
    return new AppError('too-large', 'The request body is larger than 200 kB.');
  if (type === 'entity.parse.failed') return new AppError('bad-json', 'The request body is not valid JSON.');
  if (type === 'encoding.unsupported' || type === 'charset.unsupported')
    return new AppError('wrong-type', 'Send JSON in UTF-8.');
  if (thrown instanceof URIError) return new AppError('not-found', 'That address is not known.');
  return null;
}
