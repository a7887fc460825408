import type { ApiError, FindingView } from '@/shared/contracts/common';
import { t } from '@/shared/messages';
import type { CallInput, Output, RouteName } from '@/shared/routes';

import { noteReached } from './online';

export type FailureId = ApiError['error']['id'] | 'unreachable';

/** A call that did not succeed: a stable id, a sentence for people, each bad field, and the findings behind a refusal. */
export class ApiFailure extends Error {
  readonly id: FailureId;
  /** HTTP status; 0 when there was no answer. */
  readonly status: number;
  readonly fields: { path: string; message: string }[];
  readonly findings: FindingView[];

  constructor(
    id: FailureId,
    message: string,
    status = 0,
    fields: ApiFailure['fields'] = [],
    findings: FindingView[] = [],
  ) {
    super(message);
    this.name = 'ApiFailure';
    this.id = id;
    this.status = status;
    this.fields = fields;
    this.findings = findings;
  }

  /** Words for one field, for showing beside it. Paths are as in the body, such as `email` or `steps.0.reason`. */
  field(path: string): string | undefined {
    return this.fields.find((one) => one.path === path || one.path === `body.${path}`)?.message;
  }
}

/** Words for a field when the error is a refused form. */
export const fieldError = (error: unknown, path: string): string | undefined =>
  error instanceof ApiFailure ? error.field(path) : undefined;

/** What may be left out: everything in it is optional. */
type Nothing = Record<never, never>;
type Needed<I> = { [K in keyof I as undefined extends I[K] ? never : Nothing extends I[K] ? never : K]: I[K] };
type Spare<I> = { [K in keyof I as undefined extends I[K] ? never : Nothing extends I[K] ? K : never]?: I[K] };
export type CallArgs<R extends RouteName> = Needed<CallInput<R>> & Spare<CallInput<R>> & { signal?: AbortSignal };
type Rest<R extends RouteName> = Nothing extends CallArgs<R> ? [args?: CallArgs<R>] : [args: CallArgs<R>];

/** Milliseconds to wait for an answer. */
const patience = 15_000;

interface Parts {
  params?: Record<string, string>;
  query?: Record<string, unknown>;
  body?: unknown;
  signal?: AbortSignal;
}

/** Path and query of a route with its values put in. */
export function address(route: string, { params = {}, query = {} }: Pick<Parts, 'params' | 'query'>): string {
  const path = route
    .slice(route.indexOf(' ') + 1)
    .replace(/:(\w+)/g, (_, name: string) => encodeURIComponent(params[name] ?? ''));
  const pairs = Object.entries(query).flatMap(([name, value]) =>
    value === undefined || value === null ? [] : [[name, String(value)] as [string, string]],
  );
  return pairs.length > 0 ? `${path}?${new URLSearchParams(pairs)}` : path;
}

async function failureOf(response: Response): Promise<ApiFailure> {
  const body = (await response.json().catch(() => null)) as Partial<ApiError> | null;
  const error = body?.error;
  if (error) return new ApiFailure(error.id, error.message, response.status, error.fields, error.findings);
  // an answer that is not ours comes from a proxy in front of a server that is down
  const gone = response.status >= 502 && response.status <= 504;
  return new ApiFailure(
    gone ? 'unavailable' : 'server',
    t(gone ? 'error.unavailable' : 'error.unexpected'),
    response.status,
  );
}

async function reach(path: string, init: RequestInit, signal?: AbortSignal): Promise<Response> {
  const limit = new AbortController();
  const timer = setTimeout(() => limit.abort(), patience);
  const stop = () => limit.abort();
  signal?.addEventListener('abort', stop);
  try {
    const response = await fetch(path, { ...init, signal: limit.signal });
    noteReached(true);
    return response;
  } catch (error) {
    if (signal?.aborted) throw error;
    noteReached(false);
    throw new ApiFailure('unreachable', t('error.unreachable'));
  } finally {
    clearTimeout(timer);
    signal?.removeEventListener('abort', stop);
  }
}

/**
 * Calls a route of the server: `call('GET /api/cohorts/:cohortId', { params: { cohortId } })`.
 * Throws ApiFailure; no answer within 15 seconds is `unreachable`.
 */
export async function call<R extends RouteName>(route: R, ...[args]: Rest<R>): Promise<Output<R>> {
  const parts: Parts = args ?? {};
  const init: RequestInit = {
    method: route.slice(0, route.indexOf(' ')),
    credentials: 'same-origin',
    ...(parts.body === undefined
      ? {}
      : { headers: { 'content-type': 'application/json' }, body: JSON.stringify(parts.body) }),
  };
  const response = await reach(address(route, parts), init, parts.signal);
  if (!response.ok) throw await failureOf(response);
  const isJson = response.headers.get('content-type')?.includes('json');
  return (isJson ? await response.json() : await response.text()) as Output<R>;
}
