import type { Request, Response } from 'express';
import { rateLimit } from 'express-rate-limit';
import { tooMany } from './sign-in-failures';

const windowMs = 15 * 60_000;

/**
 * At most `limit` calls (or failed calls only) in 15 min from one network address; the answer rejects with `too-many`.
 * Kept in memory: a restart forgets it, the count by account does not.
 */
export function addressLimit(
  limit: number,
  options: { failedOnly: boolean },
): (req: Request, res: Response) => Promise<void> {
  const middleware = rateLimit({
    windowMs,
    limit,
    skipSuccessfulRequests: options.failedOnly,
    standardHeaders: 'draft-7',
    legacyHeaders: false,
    handler: (_req, res, next) => next(tooMany(Number(res.getHeader('Retry-After') ?? windowMs / 1000))),
  });
  return (req, res) =>
    new Promise((resolve, reject) => {
      void middleware(req, res, (error?: unknown) => (error instanceof Error ? reject(error) : resolve()));
    });
}
