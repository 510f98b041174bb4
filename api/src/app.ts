import { randomBytes } from 'node:crypto';
import { existsSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import express, { type Express, type RequestHandler } from 'express';
import helmet from 'helmet';
import { pinoHttp } from 'pino-http';
import { AppError } from '@shared/errors';
import { appVersion } from './app-version';
import type { Deps } from './deps';
import { allRoutes } from './features';
import { formToken } from './http/form-token';
import { openApi } from './http/openapi';
import { problemMiddleware } from './http/problem';
import { createRouter } from './http/router';
import { sessionMiddleware } from './session/session-middleware';

export interface AppOptions {
  /** Folder of the built pages (with index.html); left out in API tests. */
  readonly webRoot?: string;
}

/** Makes the whole site without listening. */
export function createApp(deps: Deps, options: AppOptions = {}): Express {
  const { config, log } = deps;
  const app = express();
  app.disable('x-powered-by');
  app.set('trust proxy', 'loopback');
  app.set('query parser', 'simple');
  app.use(nonce, securityHeaders(config.PUBLIC_URL.startsWith('https:')));
  if (config.LOG_LEVEL !== 'silent')
    app.use(
      pinoHttp({
        logger: log,
        redact: ['req.headers.cookie', 'req.headers["x-xsrf-token"]', 'res.headers["set-cookie"]'],
        customLogLevel: () => 'debug',
      }),
    );
  app.use('/api', api(deps));
  if (options.webRoot) app.use(pages(options.webRoot));
  app.use((_req, _res, next) => next(new AppError('not-found', 'That address is not known.')));
  app.use(problemMiddleware(log));
  return app;
}

function api(deps: Deps): express.Router {
  const router = express.Router();
  const tokens = formToken(deps.config);
  router.use((_req, res, next) => {
    res.set('Cache-Control', 'no-store');
    next();
  });
  router.use(jsonOnly, express.json({ limit: '200kb', strict: true }));
  const routes = allRoutes(deps);
  router.use(tokens.middleware, ...sessionMiddleware(deps));
  const document = openApi(routes, appVersion);
  router.get('/openapi.json', (_req, res) => void res.json(document));
  router.use(createRouter(routes, { checkAnswers: deps.config.NODE_ENV === 'test' }));
  return router;
}

/** A body that is not declared as JSON would be ignored silently; say so instead. */
const jsonOnly: RequestHandler = (req, _res, next) => {
  const hasBody = req.get('content-length') !== undefined && req.get('content-length') !== '0';
  if (hasBody && !req.is('application/json'))
    throw new AppError('wrong-type', 'Send the body as application/json.');
  next();
};

const nonce: RequestHandler = (_req, res, next) => {
  res.locals['nonce'] = randomBytes(16).toString('base64');
  next();
};

function securityHeaders(https: boolean): RequestHandler {
  const withNonce = (_req: unknown, res: unknown) =>
    `'nonce-${(res as express.Response).locals['nonce'] as string}'`;
  return helmet({
    contentSecurityPolicy: {
      useDefaults: false,
      directives: {
        defaultSrc: ["'self'"],
        scriptSrc: ["'self'", withNonce],
        styleSrc: ["'self'", withNonce],
        imgSrc: ["'self'", 'data:'],
        fontSrc: ["'self'"],
        connectSrc: ["'self'"],
        objectSrc: ["'none'"],
        baseUri: ["'self'"],
        formAction: ["'self'"],
        frameAncestors: ["'none'"],
        ...(https ? { upgradeInsecureRequests: [] } : {}),
      },
    },
    strictTransportSecurity: https ? { maxAge: 15552000, includeSubDomains: false } : false,
  });
}

/** The built Angular pages: files with a hash in their name for ever, index.html with a fresh nonce each time. */
function pages(webRoot: string): express.Router {
  const router = express.Router();
  const indexFile = join(webRoot, 'index.html');
  const index = existsSync(indexFile) ? readFileSync(indexFile, 'utf8') : null;
  router.use(
    express.static(webRoot, {
      index: false,
      setHeaders: (res, path) =>
        res.setHeader(
          'Cache-Control',
          /-[A-Z0-9]{8}\./.test(path) ? 'public, max-age=31536000, immutable' : 'no-cache',
        ),
    }),
  );
  router.get('/{*any}', (req, res, next) => {
    if (!index || /\.[a-z0-9]{2,5}$/i.test(req.path)) return next();
    res
      .set('Cache-Control', 'no-store')
      .type('html')
      .send(index.replaceAll('__CSP_NONCE__', String(res.locals['nonce'])));
  });
  return router;
}
