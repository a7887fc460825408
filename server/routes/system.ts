import type { Handlers } from '../http/handler';
import { openApi } from '../openapi';

let document: string | undefined;

/** Whether the server lives, and its own description. */
export const systemHandlers: Handlers<'GET /api/health' | 'GET /api/openapi.json'> = {
  'GET /api/health': async ({ deps, res }) => {
    const database = await deps.pool.query('select 1').then(
      () => true,
      () => false,
    );
    if (!database) res.status(503);
    return { ok: database, database, time: deps.now().toISOString() };
  },
  'GET /api/openapi.json': async ({ deps }) => {
    // the same while the server runs; making it takes some 50 ms
    document ??= JSON.stringify(openApi(deps.env.PUBLIC_URL));
    return document;
  },
};
