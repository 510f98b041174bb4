import type { Request, Response } from 'express';
import {
  accountLink,
  accountLinkParams,
  accountLinkUse,
  demoInfo,
  passwordChange,
  resetRequest,
  sessionInfo,
  signIn,
} from '@shared/contract';
import { isAppError } from '@shared/errors';
import type { Deps } from '../deps';
import { formToken } from '../http/form-token';
import { route, type AnyRoute } from '../http/route';
import { closeLiveSession } from '../live/live-hub';
import { addressLimit } from './address-limit';
import { authenticate, logIn } from './authenticator';
import { sessionCookie } from './session-middleware';

/** Signing in and out, one-time links, the own password, and the demo's accounts. */
export function sessionRoutes(deps: Deps): AnyRoute[] {
  return [...signInRoutes(deps), ...linkRoutes(deps), ...passwordRoutes(deps)];
}

function signInRoutes(deps: Deps): AnyRoute[] {
  const { services, config } = deps;
  const tokens = formToken(config);
  const limit = addressLimit(config.SIGN_IN_LIMIT, { failedOnly: true });
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
      handler: async ({ req, res }) => {
        await limit(req, res);
        const account = await withRetryAfter(res, () => authenticate(deps, req, res));
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
      handler: ({ req, res }) => logOut(deps, req, res),
    }),
    route({
      method: 'get',
      path: '/demo',
      summary: 'The demo accounts, in the demo only',
      allow: 'anyone',
      response: demoInfo,
      handler: () => services.session.demo(),
    }),
  ];
}

function linkRoutes({ services, config, log }: Deps): AnyRoute[] {
  const limit = addressLimit(config.SIGN_IN_LIMIT, { failedOnly: false });
  return [
    route({
      method: 'post',
      path: '/password-resets',
      summary: 'Ask for a reset link; the answer is the same whether the address is known or not',
      allow: 'anyone',
      body: resetRequest,
      response: null,
      status: 202,
      handler: async ({ body, req, res }) => {
        await limit(req, res);
        // After the answer: what it takes to make a link must not show in the time of it.
        const send = () =>
          services.session
            .requestReset(body.email)
            .catch((err: unknown) => log.error({ err }, 'no reset link could be made'));
        setImmediate(() => void send());
      },
    }),
    route({
      method: 'get',
      path: '/account-links/:token',
      summary: 'Whose one-time link it is',
      allow: 'anyone',
      params: accountLinkParams,
      response: accountLink,
      handler: ({ params }) => services.session.openLink(params.token),
    }),
    route({
      method: 'post',
      path: '/account-links/:token',
      summary: 'Set a password through a one-time link',
      allow: 'anyone',
      params: accountLinkParams,
      body: accountLinkUse,
      response: null,
      handler: ({ params, body }) => services.session.spendLink(params.token, body.password),
    }),
  ];
}

function passwordRoutes({ services, config }: Deps): AnyRoute[] {
  const tokens = formToken(config);
  return [
    route({
      method: 'put',
      path: '/me/password',
      summary: 'Change my password; my other sessions end',
      allow: 'signed-in',
      body: passwordChange,
      response: null,
      handler: async ({ actor, body, req, res }) => {
        const change = () => services.session.changePassword(actor.id, body.current, body.next);
        await logIn(req, await withRetryAfter(res, change));
        tokens.renew(res);
      },
    }),
  ];
}

/** Says in the header, too, how long an address is shut. */
async function withRetryAfter<T>(res: Response, work: () => Promise<T>): Promise<T> {
  return work().catch((error: unknown) => {
    if (isAppError(error, 'too-many')) res.set('Retry-After', String(error.extra['retryAfterSeconds']));
    throw error;
  });
}

function logOut({ config }: Deps, req: Request, res: Response): Promise<void> {
  closeLiveSession(config, req.sessionID);
  return new Promise((resolve, reject) => {
    req.session.destroy((error?: Error | null) => {
      res.clearCookie(sessionCookie);
      if (error) reject(error);
      else resolve();
    });
  });
}
