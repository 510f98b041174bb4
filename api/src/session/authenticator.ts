import type { Request, Response } from 'express';
import passport from 'passport';
import { Strategy } from 'passport-local';
import { AppError } from '@shared/errors';
import type { Deps } from '../deps';
import { findAccount, type Account } from './session-queries';

interface StoredUser {
  readonly id: number;
  readonly epoch: number;
}

const made = new WeakMap<Deps, passport.Authenticator>();

/**
 * The site's one passport: e-mail and password checked by the session service, and the actor read fresh at each
 * request, so that a changed role or a shut account holds at once.
 */
export function authenticatorOf(deps: Deps): passport.Authenticator {
  const known = made.get(deps);
  if (known) return known;
  const authenticator: passport.Authenticator = new passport.Passport();
  made.set(deps, authenticator);
  authenticator.use(
    new Strategy({ usernameField: 'email' }, (email, password, done) => {
      deps.services.session.check(email, password).then(
        (account) => done(null, account),
        (error: unknown) => done(error),
      );
    }),
  );
  authenticator.serializeUser((user, done) =>
    done(null, { id: user.id, epoch: user.sessionEpoch } satisfies StoredUser),
  );
  authenticator.deserializeUser((stored: StoredUser, done) => {
    findAccount(deps.db, { id: stored.id }).then(
      (account) => done(null, account?.active && account.sessionEpoch === stored.epoch ? account : false),
      (error: unknown) => done(error),
    );
  });
  return authenticator;
}

/** The account that the e-mail and password in the body open. Throws what the session service threw. */
export function authenticate(deps: Deps, req: Request, res: Response): Promise<Account> {
  return new Promise((resolve, reject) => {
    const answer = (error: Error | null, account: Account | false | undefined) => {
      if (error) reject(error);
      else if (account) resolve(account);
      else reject(new AppError('wrong-credentials', 'Check both and try again, or ask for a new password.'));
    };
    const handler = authenticatorOf(deps).authenticate('local', answer) as (
      req: Request,
      res: Response,
      next: (error: Error) => void,
    ) => void;
    handler(req, res, (error) => reject(error));
  });
}

/** Writes the account into a new session; passport renews the session id before (session fixation). */
export function logIn(req: Request, account: Account): Promise<void> {
  return new Promise((resolve, reject) => {
    req.logIn(account, (error?: Error | null) => (error ? reject(error) : resolve()));
  });
}
