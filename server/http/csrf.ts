import type { RequestHandler } from 'express';

import { failure } from './errors';

const safe = new Set(['GET', 'HEAD', 'OPTIONS']);

/**
 * Writes must come from this very site. Browsers say where a request comes from (Sec-Fetch-Site, else Origin) and
 * pages can't forge it; together with SameSite=Lax and JSON only, no other site can write in a person's name.
 * A request without either header comes from no browser.
 */
export const sameSite = (publicUrl: string): RequestHandler => {
  // `null` and other origins that are no address belong to nobody
  const isOurs = (origin: string, host: string | undefined): boolean =>
    URL.canParse(origin) && (origin === new URL(publicUrl).origin || new URL(origin).host === host);
  return (req, _res, next) => {
    if (safe.has(req.method)) return next();
    const site = req.get('sec-fetch-site');
    const origin = req.get('origin');
    const allowed = site ? site === 'same-origin' || site === 'none' : !origin || isOurs(origin, req.get('host'));
    if (!allowed) return next(failure('forbidden', 'server.crossSite'));
    const length = Number(req.get('content-length') ?? 0);
    if (length > 0 && !req.is('application/json')) return next(failure('invalid', 'server.wrongType'));
    return next();
  };
};
