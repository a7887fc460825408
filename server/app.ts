import compression from 'compression';
import express, { type Express } from 'express';
import helmet from 'helmet';

import type { RouteName } from '@/shared/routes';
import { createLucia } from './auth/sessions';
import type { Deps } from './deps';
import { sameSite } from './http/csrf';
import { errorHandler, failure } from './http/errors';
import type { Handlers } from './http/handler';
import { requestLog } from './http/log';
import { register } from './http/register';
import { serveApp } from './http/static';
import { handlers as ours } from './routes';

/** style-src needs inline: react-native-web and expo-font write their style elements by script. */
const contentSecurityPolicy = {
  useDefaults: false,
  directives: {
    defaultSrc: ["'self'"],
    scriptSrc: ["'self'"],
    styleSrc: ["'self'", "'unsafe-inline'"],
    imgSrc: ["'self'", 'data:', 'blob:'],
    fontSrc: ["'self'", 'data:'],
    connectSrc: ["'self'"],
    workerSrc: ["'self'"],
    manifestSrc: ["'self'"],
    objectSrc: ["'none'"],
    baseUri: ["'self'"],
    formAction: ["'self'"],
    frameAncestors: ["'none'"],
  },
};

/** The whole server as an Express application; nothing listens yet. Tests may put handlers of their own in. */
export function createApp(deps: Deps, { handlers = ours }: { handlers?: Handlers<RouteName> } = {}): Express {
  const { env } = deps;
  const app = express();
  app.disable('x-powered-by');
  app.set('trust proxy', env.TRUST_PROXY);
  app.use(requestLog(deps));
  app.use(
    helmet({
      contentSecurityPolicy,
      strictTransportSecurity: env.NODE_ENV === 'production',
      referrerPolicy: { policy: 'no-referrer' },
    }),
  );
  app.use(compression());
  app.use(sameSite(env.PUBLIC_URL));
  register(app, deps, createLucia(deps.pool, env.NODE_ENV === 'production'), handlers);
  app.use('/api', (_req, _res, next) => next(failure('notFound', 'server.noSuchRoute')));
  serveApp(app, env.DIST_DIR);
  app.use((_req, res) => {
    res.status(404).type('text').send('Not found');
  });
  app.use(errorHandler);
  return app;
}
