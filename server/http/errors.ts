import type { ErrorRequestHandler } from 'express';
import type {} from 'pino-http';
import type { ZodError } from 'zod';

import type { ApiError, FindingView } from '@/shared/contracts/common';
import { t, type MessageKey, type MessageParams } from '@/shared/messages';

type ErrorId = ApiError['error']['id'];
type Field = { path: string; message: string };

const status: Record<ErrorId, number> = {
  invalid: 400,
  unauthenticated: 401,
  forbidden: 403,
  notFound: 404,
  conflict: 409,
  stale: 409,
  gone: 410,
  tooMany: 429,
  refused: 422,
  unavailable: 503,
  server: 500,
};

/** A failure that is told to people: a stable id, a sentence from the catalogue, and every bad field. */
export class AppError extends Error {
  override readonly name = 'AppError';
  constructor(
    readonly id: ErrorId,
    message: string,
    readonly fields?: Field[],
    readonly findings?: FindingView[],
  ) {
    super(message);
  }
  get status(): number {
    return status[this.id];
  }
}

/** An AppError with words from the catalogue. */
export const failure = (id: ErrorId, key: MessageKey, params: MessageParams = {}, fields?: Field[]): AppError =>
  new AppError(id, t(key, params), fields);

/** One bad field, named. */
export const badField = (path: string, message: string): AppError =>
  new AppError('invalid', t('server.invalid'), [{ path, message }]);

/** Zod's issues with a request as fields with their path; unknown keys are named one by one. */
export function fromZod(error: ZodError): AppError {
  const fields = error.issues.flatMap((issue): Field[] => {
    const path = issue.path.join('.');
    if (issue.code === 'unrecognized_keys')
      return issue.keys.map((key) => ({ path: path ? `${path}.${key}` : key, message: t('server.unknownField') }));
    return [{ path, message: issue.message }];
  });
  return new AppError('invalid', t('server.invalid'), fields);
}

interface Failed {
  name?: unknown;
  code?: unknown;
  type?: unknown;
  status?: unknown;
  parent?: { code?: unknown; constraint?: unknown };
}

const down = new Set([
  'ECONNREFUSED',
  'ECONNRESET',
  'ETIMEDOUT',
  'EPIPE',
  '57P01',
  '57P02',
  '57P03',
  '08006',
  '08001',
  '53300',
]);

/** What an unexpected error is to people: the database being away is said, everything else is a plain 500. */
export function toAppError(error: unknown): AppError {
  if (error instanceof AppError) return error;
  const failed = (typeof error === 'object' && error !== null ? error : {}) as Failed;
  if (failed.type === 'entity.too.large') return failure('invalid', 'server.tooLarge');
  if (failed.type === 'entity.parse.failed') return failure('invalid', 'server.notJson');
  const code = String(failed.parent?.code ?? failed.code ?? '');
  if (
    String(failed.name).startsWith('SequelizeConnection') ||
    down.has(code) ||
    /timeout exceeded when trying to connect/.test(String(error))
  )
    return failure('unavailable', 'server.databaseDown');
  if (code === '23505') return failure('conflict', 'server.alreadyThere');
  if (failed.status === 404) return failure('notFound', 'server.notFound');
  // Express and its parsers: an address that can't be decoded, a body in an unknown encoding, a request cut off
  if (Number(failed.status) >= 400 && Number(failed.status) < 500) return failure('invalid', 'server.unreadable');
  return failure('server', 'server.unexpected');
}

export const errorHandler: ErrorRequestHandler = (error, req, res, _next) => {
  const known = toAppError(error);
  if (known.status >= 500) req.log?.error({ err: error }, 'request failed');
  if (res.headersSent) return void res.end();
  const body: ApiError = {
    error: {
      id: known.id,
      message: known.message,
      ...(known.fields ? { fields: known.fields } : {}),
      ...(known.findings ? { findings: known.findings } : {}),
      requestId: String(req.id ?? ''),
    },
  };
  res.status(known.status).set('Cache-Control', 'no-store').json(body);
};
