import { existsSync } from 'node:fs';
import path from 'node:path';

import express, { type Express, type RequestHandler } from 'express';

const hashedFor = 'public, max-age=31536000, immutable';

/** The path as a file name; the folder itself, which is no file, when it can't be decoded. */
function decoded(url: string): string {
  try {
    return path.posix.normalize(decodeURIComponent(url));
  } catch {
    return '/';
  }
}

/** Sends `file.br` or `file.gz` when the build made one and the browser takes it. */
function precompressed(root: string): RequestHandler {
  return (req, res, next) => {
    if (req.method !== 'GET' && req.method !== 'HEAD') return next();
    const encoding = req.acceptsEncodings(['br', 'gzip']);
    const ending = encoding === 'br' ? '.br' : encoding === 'gzip' ? '.gz' : null;
    const clean = decoded(req.path);
    const file = path.join(root, clean);
    if (!ending || !file.startsWith(root + path.sep) || !existsSync(file + ending)) return next();
    res.set({ 'Content-Encoding': encoding as string, Vary: 'Accept-Encoding' });
    res.type(path.extname(clean));
    req.url = req.path + ending;
    return next();
  };
}

/**
 * The built app. Files with a hash in their name never change; the page itself is asked for anew each time. Unknown
 * paths are the page's own, but a path with a file ending that is not there is a 404, not the page.
 */
export function serveApp(app: Express, dist: string): void {
  const root = path.resolve(dist);
  if (!existsSync(path.join(root, 'index.html'))) return;
  app.use(precompressed(root));
  app.use(
    express.static(root, {
      index: false,
      cacheControl: false,
      setHeaders: (res, file) => {
        const hashed = file.includes(`${path.sep}_expo${path.sep}`) || file.includes(`${path.sep}assets${path.sep}`);
        res.setHeader('Cache-Control', hashed ? hashedFor : 'no-cache');
        if (/\.(br|gz)$/.test(file)) {
          const kind = path.extname(file.replace(/\.(br|gz)$/, ''));
          res.setHeader('Content-Type', contentTypes[kind] ?? 'application/octet-stream');
        }
      },
    }),
  );
  app.get('/{*path}', (req, res, next) => {
    if (req.path.startsWith('/api/') || path.extname(req.path) !== '' || !req.accepts('html')) return next();
    return res.set('Cache-Control', 'no-cache').sendFile('index.html', { root });
  });
}

const contentTypes: Record<string, string> = {
  '.js': 'text/javascript; charset=utf-8',
  '.css': 'text/css; charset=utf-8',
  '.html': 'text/html; charset=utf-8',
  '.svg': 'image/svg+xml',
  '.json': 'application/json; charset=utf-8',
  '.webmanifest': 'application/manifest+json',
  '.ttf': 'font/ttf',
};
