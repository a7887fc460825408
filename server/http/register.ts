import express, { type Express, type Request, type RequestHandler, type Response } from 'express';
import { rateLimit, ipKeyGenerator } from 'express-rate-limit';
import { ZodError, type ZodType } from 'zod';

import { routes, type RouteName } from '@/shared/routes';
import type { RouteSpec } from '@/shared/routes/spec';
import type { Sessions } from '../auth/sessions';
import type { Deps } from '../deps';
import type { Actor } from '../policies/actor';
import { authorise } from '../policies/authorise';
import { loadActor } from '../policies/loadActor';
import { locate } from '../policies/locate';
import { failure, fromZod } from './errors';
import type { Handlers, HandlerRequest, Place } from './handler';

type AnyHandler = (request: HandlerRequest<RouteName>) => Promise<unknown>;

/** Requests a minute from one address: for what guesses secrets, for large bodies, for everything else. */
const perMinute = { auth: 20, upload: 60, general: 1200 } as const;

function limiter(deps: Deps, limit: keyof typeof perMinute): RequestHandler {
  return rateLimit({
    windowMs: 60_000,
    // tests and benchmarks call from one address; what is limited is proven with the limit set in a test of its own
    limit: deps.env.NODE_ENV === 'test' ? perMinute[limit] * 1000 : perMinute[limit],
    standardHeaders: 'draft-8',
    legacyHeaders: false,
    keyGenerator: (req) => ipKeyGenerator(req.ip ?? ''),
    handler: (_req, _res, next) => next(failure('tooMany', 'server.tooMany')),
  });
}

/**
 * Registers every route of the table, each in one order: limit, authenticate, validate, authorise, act, present.
 * A route without a handler does not compile.
 */
export function register(app: Express, deps: Deps, sessions: Sessions, handlers: Handlers<RouteName>): void {
  const limits = { auth: limiter(deps, 'auth'), upload: limiter(deps, 'upload'), general: limiter(deps, 'general') };
  const small = express.json({ limit: '600kb' });
  const large = express.json({ limit: '6.5mb' });
  for (const [name, spec] of Object.entries(routes) as [RouteName, RouteSpec][]) {
    const [method = '', path = ''] = name.split(' ');
    const handler = handlers[name] as AnyHandler;
    const verb = method.toLowerCase() as 'get' | 'post' | 'put' | 'patch' | 'delete';
    app[verb](path, limits[spec.limit ?? 'general'], async (req, res) => {
      const actor = await authenticate(req, res, deps, sessions, spec);
      await readBody(spec.limit === 'upload' ? large : small, req, res);
      const input = validate(req, spec);
      const place = await judge(deps, actor, spec, input);
      const output = await handler({ input: input as never, actor, place, deps, req, res });
      present(res, spec, output, deps);
    });
  }
}

async function authenticate(
  req: Request,
  res: Response,
  deps: Deps,
  sessions: Sessions,
  spec: RouteSpec,
): Promise<Actor | null> {
  if (spec.who === 'anyone') return null;
  const id = sessions.readSessionCookie(req.headers.cookie ?? '');
  const { user, session } = id ? await sessions.validateSession(id) : { user: null, session: null };
  if (!user) throw failure('unauthenticated', 'server.signIn');
  if (session.fresh) res.append('Set-Cookie', sessions.createSessionCookie(session.id).serialize());
  return loadActor(deps.pool, { id: user.id, name: user.name, email: user.email }, deps.now());
}

/** Reads the body only now: from who is not let in, nothing is read. */
const readBody = (parser: RequestHandler, req: Request, res: Response): Promise<void> =>
  new Promise((resolve, reject) => void parser(req, res, (error?: unknown) => (error ? reject(error) : resolve())));

interface Parts {
  params: Record<string, unknown> | undefined;
  query: Record<string, unknown> | undefined;
  body: Record<string, unknown> | undefined;
}

function validate(req: Request, spec: RouteSpec): Parts {
  const parse = (schema: ZodType | undefined, value: unknown) =>
    schema ? (schema.parse(value ?? {}) as Record<string, unknown>) : undefined;
  try {
    return {
      params: parse(spec.params, req.params),
      query: parse(spec.query, req.query),
      body: parse(spec.body, req.body),
    };
  } catch (error) {
    // an id that is no id can't be anybody's
    if (spec.params && !spec.params.safeParse(req.params).success) throw failure('notFound', 'server.notFound');
    // only here is it the caller who was wrong: any other ZodError is a fault of the server
    throw error instanceof ZodError ? fromZod(error) : error;
  }
}

async function judge(deps: Deps, actor: Actor | null, spec: RouteSpec, input: Parts): Promise<Place> {
  if (typeof spec.who === 'string' || spec.who.at === 'all' || !actor) return {};
  const from = 'in' in spec.who && spec.who.in === 'body' ? input.body : input.params;
  const place = await locate(deps.pool, spec.who.at, String(from?.[spec.who.at]));
  await authorise(deps.pool, actor, spec.who.ability, place, deps.now());
  return place ?? {};
}

function present(res: Response, spec: RouteSpec, output: unknown, deps: Deps): void {
  if (res.headersSent) return;
  // a handler may have set another status, as health does when the database is away
  if (res.statusCode === 200) res.status(spec.status ?? 200);
  if ('media' in spec.output) {
    res.type(spec.output.media).send(output as string);
    return;
  }
  // outside production a contract that is not kept fails the request; in production it is trusted
  const body = deps.env.NODE_ENV === 'production' ? output : spec.output.parse(output);
  res.set('Cache-Control', 'no-store').json(body);
}
