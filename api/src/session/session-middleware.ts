import { ConnectSessionKnexStore } from 'connect-session-knex';
import type { RequestHandler } from 'express';
import session from 'express-session';
import passport from 'passport';
import type { Deps } from '../deps';
import type { Actor } from '../http/actor';
import { findAccount } from './session-queries';

export const sessionCookie = 'dayberth.sid';

interface StoredUser {
  readonly id: number;
  readonly epoch: number;
}

declare global {
  // eslint-disable-next-line @typescript-eslint/no-namespace -- the one way Express lets its request user be typed
  namespace Express {
    interface User extends Actor {
      readonly sessionEpoch: number;
    }
  }
}

/** Sessions in the database, and the actor read fresh at each request: a changed role or a shut account holds at once. */
export function sessionMiddleware(deps: Deps): RequestHandler[] {
  const authenticator = new passport.Passport();
  authenticator.serializeUser((user, done) =>
    done(null, { id: user.id, epoch: user.sessionEpoch } satisfies StoredUser),
  );
  authenticator.deserializeUser((stored: StoredUser, done) => {
    findAccount(deps.db, { id: stored.id }).then(
      (account) => done(null, account?.active && account.sessionEpoch === stored.epoch ? account : false),
      (error: unknown) => done(error),
    );
  });
  return [
    session({
      name: sessionCookie,
      secret: deps.config.SESSION_SECRET,
      resave: false,
      saveUninitialized: false,
      rolling: true,
      store: new ConnectSessionKnexStore({
        knex: deps.db,
        tableName: 'sessions',
        createTable: false,
        cleanupInterval: 0,
      }),
      cookie: {
        httpOnly: true,
        sameSite: 'lax',
        secure: deps.config.PUBLIC_URL.startsWith('https:'),
        maxAge: 14 * 24 * 3600 * 1000,
      },
    }),
    authenticator.initialize() as RequestHandler,
    authenticator.session() as RequestHandler,
  ];
}
