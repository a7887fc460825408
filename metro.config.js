import { request } from 'node:http';
import { createRequire } from 'node:module';
import path from 'node:path';

import { standIn } from './scripts/bundle/leftOut.js';

const require = createRequire(import.meta.url);
const { getDefaultConfig } = require('expo/metro-config');

const config = getDefaultConfig(import.meta.dirname);

// What is built, stored or tested is no part of the page. Anchored to this folder: packages have folders of these names too.
const here = import.meta.dirname.replace(/[\\^$.*+?()[\]{}|]/g, '\\$&');
const skip = new RegExp(`^${here}/(?:dist|build|\\.data|coverage|shots|server|jobs|tests)/.*`);
config.resolver.blockList = [...[config.resolver.blockList].flat().filter(Boolean), skip];

// While developing, page and API share one origin, so that the session cookie works: /api goes on to the server.
const api = new URL(process.env.API_ORIGIN ?? 'http://127.0.0.1:3000');

function forward(req, res) {
  const headers = { ...req.headers, 'x-forwarded-host': req.headers.host };
  const upstream = request(
    { host: api.hostname, port: api.port, path: req.url, method: req.method, headers },
    (answer) => {
      res.writeHead(answer.statusCode ?? 502, answer.headers);
      answer.pipe(res);
    },
  );
  upstream.on('error', () => {
    if (!res.headersSent) res.writeHead(502);
    res.end();
  });
  req.pipe(upstream);
}

config.server.enhanceMiddleware = (metro) => (req, res, next) =>
  req.url?.startsWith('/api/') ? forward(req, res) : metro(req, res, next);

config.resolver.resolveRequest = (context, name, platform) => {
  const instead = standIn(context.originModulePath.replaceAll(path.sep, '/'), name);
  if (!instead) return context.resolveRequest(context, name, platform);
  if (instead.instead) return context.resolveRequest(context, instead.instead, platform);
  if (!instead.stub) return { type: 'empty' };
  return { type: 'sourceFile', filePath: path.join(import.meta.dirname, 'scripts/bundle/stubs', instead.stub) };
};

export default config;
