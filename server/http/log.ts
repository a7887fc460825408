import { randomUUID } from 'node:crypto';

import type { RequestHandler } from 'express';
import { pinoHttp } from 'pino-http';

import type { Deps } from '../deps';

/** Secrets stand in some paths (calendar links, resets, invitations): the log shows the path without them. */
export const withoutSecrets = (url: string): string =>
  url.replace(/(\/(?:api\/)?(?:calendar|password-resets|invitations|reset|invitation)\/)[^/?#]+/, '$1…');

interface Failed {
  type: string;
  message: string;
  stack: string;
  raw?: { code?: unknown; parent?: { code?: unknown; constraint?: unknown } };
}

/** Writes one line a request: no headers, no bodies, and of an error no statement and no values. */
export const requestLog = ({ log, env }: Deps): RequestHandler =>
  pinoHttp({
    logger: log,
    genReqId: () => randomUUID(),
    autoLogging: env.NODE_ENV !== 'test',
    serializers: {
      req: (req: { id: string; method: string; url: string }) => ({
        id: req.id,
        method: req.method,
        url: withoutSecrets(req.url),
      }),
      res: (res: { statusCode: number }) => ({ status: res.statusCode }),
      // Sequelize's errors carry the statement with its values: links, hashes, what people wrote
      err: ({ type, message, stack, raw }: Failed) => ({
        type,
        message,
        stack,
        code: raw?.parent?.code ?? raw?.code,
        constraint: raw?.parent?.constraint,
      }),
    },
  });
