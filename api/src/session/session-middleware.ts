import type { RequestHandler } from 'express';
import session from 'express-session';
import type { Deps } from '../deps';
import type { Actor } from '../http/actor';
import { authenticatorOf } from './authenticator';
import { SessionStore } from './session-store';

export const sessionCookie = 'dayberth.sid';

declare global {
  // eslint-disable-next-line @typescript-eslint/no-namespace -- the one way Express lets its request user be typed
  namespace Express {
    interface User extends Actor {
      readonly sessionEpoch: number;
    }
  }
}

/** Sessions in the database, and the actor of each request. */
export function sessionMiddleware(deps: Deps): RequestHandler[] {
  const authenticator = authenticatorOf(deps);
  return [
    session({
      name: sessionCookie,
      secret: deps.config.SESSION_SECRET,
      resave: false,
      saveUninitialized: false,
      rolling: true,
      store: new SessionStore(deps),
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
