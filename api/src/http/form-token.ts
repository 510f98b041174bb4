import { createHmac, randomBytes, timingSafeEqual } from 'node:crypto';
import type { RequestHandler, Request, Response } from 'express';
import { AppError } from '@shared/errors';
import type { Config } from '../config';

const cookieName = 'XSRF-TOKEN';
const headerName = 'x-xsrf-token';

/**
 * Double-submit token: a signed random value in a cookie that only our own pages can read, sent back in a header with
 * every changing call (OWASP Cross-Site Request Forgery Prevention, "signed double-submit cookie").
 */
export function formToken(config: Config): { middleware: RequestHandler; renew: (res: Response) => void } {
  const sign = (value: string) =>
    createHmac('sha256', config.SESSION_SECRET).update(`form:${value}`).digest('base64url');
  const valid = (token: string) => {
    const [value = '', signature = ''] = token.split('.');
    return equal(signature, sign(value));
  };
  const renew = (res: Response) => {
    const value = randomBytes(18).toString('base64url');
    res.cookie(cookieName, `${value}.${sign(value)}`, {
      sameSite: 'lax',
      secure: config.PUBLIC_URL.startsWith('https:'),
      path: '/',
    });
  };
  const middleware: RequestHandler = (req, res, next) => {
    const cookie = readCookie(req, cookieName);
    if (['GET', 'HEAD', 'OPTIONS'].includes(req.method)) {
      if (!cookie || !valid(cookie)) renew(res);
      return next();
    }
    const header = req.get(headerName);
    if (!cookie || !header || !equal(cookie, header) || !valid(cookie))
      throw new AppError('bad-token', 'Reload the page and try again.');
    next();
  };
  return { middleware, renew };
}

function readCookie(req: Request, name: string): string | null {
  for (const part of (req.get('cookie') ?? '').split(';')) {
    const [key, value] = part.trim().split('=', 2);
    if (key === name && value !== undefined) return decodeURIComponent(value);
  }
  return null;
}

function equal(a: string, b: string): boolean {
  const left = Buffer.from(a);
  const right = Buffer.from(b);
  return left.length === right.length && timingSafeEqual(left, right);
}
