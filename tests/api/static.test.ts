import { mkdir, mkdtemp, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { brotliCompressSync, gzipSync } from 'node:zlib';

import type { Express } from 'express';
import request from 'supertest';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';

import { createApp } from '@/server/app';
import { freshDatabase, type Fresh } from '../support/fresh-database';

let fresh: Fresh;
let app: Express;
let dist: string;
const script = `console.log(${JSON.stringify('x'.repeat(4000))})`;
const hashed = '/_expo/static/js/web/entry-0123abcd.js';

beforeAll(async () => {
  fresh = await freshDatabase();
  dist = await mkdtemp(path.join(tmpdir(), 'yardbell-dist-'));
  await mkdir(path.join(dist, path.dirname(hashed)), { recursive: true });
  await writeFile(path.join(dist, 'index.html'), '<!doctype html><title>Yardbell</title>');
  await writeFile(path.join(dist, 'sw.js'), '// service worker');
  await writeFile(path.join(dist, hashed), script);
  await writeFile(path.join(dist, `${hashed}.br`), brotliCompressSync(script));
  await writeFile(path.join(dist, `${hashed}.gz`), gzipSync(script));
  await writeFile(path.join(path.dirname(dist), 'outside-of-dist.txt'), 'not for anybody');
  app = createApp({ ...fresh.deps, env: { ...fresh.deps.env, DIST_DIR: dist } });
});
afterAll(async () => {
  await rm(dist, { recursive: true });
  await rm(path.join(path.dirname(dist), 'outside-of-dist.txt'));
  await fresh.drop();
});

describe('the page', () => {
  it.each(['/', '/today', '/cohorts/3f1c', '/reset/a-secret'])('is answered at %s and asked for anew', async (at) => {
    const answer = await request(app).get(at).set('Accept', 'text/html').expect(200);
    expect(answer.text).toContain('<title>Yardbell</title>');
    expect(answer.get('Cache-Control')).toBe('no-cache');
  });

  it('runs no script and no frame from elsewhere, and keeps its addresses to itself', async () => {
    const answer = await request(app).get('/').set('Accept', 'text/html');
    const policy = answer.get('Content-Security-Policy') ?? '';
    expect(policy.split(';').map((rule) => rule.trim())).toEqual(
      expect.arrayContaining(["script-src 'self'", "object-src 'none'", "frame-ancestors 'none'"]),
    );
    expect(answer.get('X-Content-Type-Options')).toBe('nosniff');
    expect(answer.get('Referrer-Policy')).toBe('no-referrer');
    expect(answer.get('X-Powered-By')).toBeUndefined();
  });

  it('stands in for no file that is missing', async () => {
    await request(app).get('/_expo/static/js/web/entry-gone.js').set('Accept', '*/*').expect(404);
    await request(app).get('/favicon-gone.ico').set('Accept', 'text/html').expect(404);
  });

  it('stands in for nothing of the interface', async () => {
    const answer = await request(app).get('/api/nothing').set('Accept', 'text/html').expect(404);
    expect(answer.type).toBe('application/json');
  });
});

describe('a file', () => {
  it('with a hash in its name is kept for good', async () => {
    const answer = await request(app).get(hashed).expect(200);
    expect(answer.get('Cache-Control')).toBe('public, max-age=31536000, immutable');
  });

  it('that is the service worker is asked for anew', async () => {
    expect((await request(app).get('/sw.js').expect(200)).get('Cache-Control')).toBe('no-cache');
  });

  it.each([
    ['br, gzip', 'br'],
    ['gzip', 'gzip'],
    ['identity', undefined],
  ])('is sent as the build compressed it, for a browser that takes %s', async (takes, encoding) => {
    const answer = await request(app).get(`${hashed}?x=1`).set('Accept-Encoding', takes).buffer(true).expect(200);
    expect(answer.get('Content-Encoding')).toBe(encoding);
    expect(answer.get('Vary')).toContain('Accept-Encoding');
    expect(answer.type).toBe('text/javascript');
    expect(answer.text).toBe(script);
  });

  it.each([
    '/../outside-of-dist.txt',
    '/%2e%2e/outside-of-dist.txt',
    '/..%2foutside-of-dist.txt',
    '/x%00.js',
    '/%ff.js',
  ])('outside of the folder is not there: %s', async (at) => {
    const answer = await request(app).get(at);
    expect([400, 403, 404]).toContain(answer.status);
    expect(answer.text).not.toContain('not for anybody');
  });
});
