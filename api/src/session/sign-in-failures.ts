import { createHash } from 'node:crypto';
import { AppError } from '@shared/errors';
import type { Deps } from '../deps';

interface FailureRow {
  key: string;
  count: number;
  first_at: string;
  last_at: string;
}

/** So many wrong passwords within the window shut the address for the window's length. Assumption, no source. */
const mostFailures = 5;
const windowMs = 15 * 60_000;

/** Unknown addresses are counted as well, so the table holds no address in plain text. */
const keyOf = (email: string) => createHash('sha256').update(`sign-in:${email.toLowerCase()}`).digest('hex');

/**
 * Counts a try for an address before its password is looked at, so that many tries at once do not slip through; a right
 * password takes it back with `forgetFailures`. Throws `too-many` while the address is shut, known or not.
 */
export async function countTry(deps: Deps, email: string): Promise<void> {
  const key = keyOf(email);
  await deps.transaction(async ({ db, clock }) => {
    const row = await db<FailureRow>('sign_in_failures').where({ key }).first();
    const now = clock.nowMs();
    const openAgainMs = row && row.count >= mostFailures ? Date.parse(row.last_at) + windowMs : 0;
    if (openAgainMs > now) throw tooMany(Math.ceil((openAgainMs - now) / 1000));
    const goesOn = row && row.count < mostFailures && Date.parse(row.first_at) + windowMs > now;
    const next = {
      key,
      count: goesOn ? row.count + 1 : 1,
      first_at: goesOn ? row.first_at : clock.nowIso(),
      last_at: clock.nowIso(),
    };
    await db('sign_in_failures').insert(next).onConflict('key').merge();
  });
}

export async function forgetFailures({ db }: Deps, email: string): Promise<void> {
  await db('sign_in_failures')
    .where({ key: keyOf(email) })
    .delete();
}

/** 429 with the seconds to wait; the route puts them into Retry-After. */
export function tooMany(retryAfterSeconds: number): AppError {
  const minutes = Math.max(1, Math.ceil(retryAfterSeconds / 60));
  const message = `There were too many tries. Wait ${minutes} minute${minutes === 1 ? '' : 's'}, then try again.`;
  return new AppError('too-many', message, [], { retryAfterSeconds });
}
