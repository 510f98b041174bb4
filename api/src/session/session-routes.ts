import type { Request, Response } from 'express';
import { sessionInfo, signIn } from '@shared/contract';
import type { Deps } from '../deps';
import { formToken } from '../http/form-token';
import { route, type AnyRoute } from '../http/route';
import { sessionCookie } from './session-middleware';
import type { Account } from './session-queries';

/** Signing in and out. */
export function sessionRoutes(deps: Deps): AnyRoute[] {
  const { services } = deps;
  const tokens = formToken(deps.config);
  return [
    route({
      method: 'get',
      path: '/session',
      summary: 'Who is signed in',
      allow: 'anyone',
      response: sessionInfo,
      handler: ({ actor }) => services.session.info(actor?.id ?? null),
    }),
    route({
      method: 'post',
      path: '/session',
      summary: 'Sign in',
      allow: 'anyone',
      body: signIn,
      response: sessionInfo,
      handler: async ({ body, req, res }) => {
        const account = await services.session.check(body.email, body.password);
        await logIn(req, account);
        tokens.renew(res);
        return services.session.info(account.id);
      },
    }),
    route({
      method: 'delete',
      path: '/session',
      summary: 'Sign out',
      allow: 'anyone',
      response: null,
      handler: ({ req, res }) => logOut(req, res),
    }),
  ];
}

/** Passport renews the session id here (session fixation) before the account is written into it. */
function logIn(req: Request, account: Account): Promise<void> {
  return new Promise((resolve, reject) => {
    req.logIn(account, (error: unknown) => (error ? reject(error) : resolve()));
  });
}

function logOut(req: Request, res: Response): Promise<void> {
  return new Promise((resolve, reject) => {
    req.session.destroy((error: unknown) => {
      res.clearCookie(sessionCookie);
      if (error) reject(error);
      else resolve();
    });
  });
}
