// Builds the page into dist/ and the server and worker into build/. `--if-changed` leaves the page alone when nothing that
// it is made from has changed; `--page` and `--server` build one of the two.
import { spawn } from 'node:child_process';
import { createHash } from 'node:crypto';
import { once } from 'node:events';
import { existsSync, mkdirSync, readdirSync, readFileSync, renameSync, rmSync, statSync, writeFileSync } from 'node:fs';
import path from 'node:path';

import { build } from 'esbuild';

import { precompress } from './bundle/precompress.mjs';

const root = path.resolve(import.meta.dirname, '..');
process.chdir(root);

const inputs = ['app', 'components', 'hooks', 'lib', 'shared', 'protocols', 'assets', 'public', 'scripts/bundle'];
const inputFiles = ['package-lock.json', 'app.json', 'metro.config.js', 'tsconfig.json', 'scripts/build.mjs'];
const stamp = 'build/web-inputs.txt';
const fresh = 'build/web-new';
const old = 'build/web-old';

/** Every file below a folder, in a fixed order; the README's pictures are no part of the page. */
const filesBelow = (dir) =>
  existsSync(dir)
    ? readdirSync(dir, { recursive: true, withFileTypes: true })
        .filter((entry) => entry.isFile() && !entry.parentPath.startsWith('assets/readme'))
        .map((entry) => path.join(entry.parentPath, entry.name))
        .sort()
    : [];

function hashOfInputs() {
  const hash = createHash('sha256');
  for (const file of [...inputs.flatMap(filesBelow), ...inputFiles.filter((name) => existsSync(name))]) {
    hash.update(`${file}\0`).update(readFileSync(file)).update('\0');
  }
  return hash.digest('hex');
}

/** Runs one of Expo's commands; a build that is told to stop takes it along. */
async function expo(...args) {
  const env = { ...process.env, CI: '1', EXPO_NO_TELEMETRY: '1', EXPO_OFFLINE: '1', NODE_ENV: 'production' };
  const child = spawn(process.execPath, ['node_modules/expo/bin/cli', ...args], {
    env,
    stdio: ['ignore', 'pipe', 'pipe'],
  });
  const words = [];
  for (const stream of [child.stdout, child.stderr]) stream.on('data', (chunk) => words.push(chunk));
  const stop = () => {
    child.kill('SIGTERM');
    process.exit(143);
  };
  for (const signal of ['SIGTERM', 'SIGINT', 'SIGHUP']) process.once(signal, stop);
  const [code, signal] = await once(child, 'close');
  if (code === 0) return;
  console.error(Buffer.concat(words).toString('utf8'));
  throw new Error(`expo ${args[0]} ended with ${code ?? signal}`);
}

async function buildPage() {
  const hash = hashOfInputs();
  const unchanged = existsSync('dist/index.html') && existsSync(stamp) && readFileSync(stamp, 'utf8') === hash;
  if (unchanged && process.argv.includes('--if-changed')) return;
  console.log('building the page (under a minute the first time, seconds after that)');
  if (!existsSync('expo-env.d.ts')) await expo('customize', 'tsconfig.json');
  rmSync(fresh, { recursive: true, force: true });
  await expo('export', '-p', 'web', '--output-dir', fresh);
  // loaded only here: it takes longer than finding out that nothing has changed
  const { serviceWorker } = await import('./bundle/serviceWorker.mjs');
  const precached = await serviceWorker(fresh);
  const sizes = await precompress(fresh);
  // the old page stays whole until the new one is: a build that is stopped half-way breaks nothing
  rmSync(old, { recursive: true, force: true });
  if (existsSync('dist')) renameSync('dist', old);
  renameSync(fresh, 'dist');
  rmSync(old, { recursive: true, force: true });
  writeFileSync(stamp, hash);
  writeFileSync('build/sizes.json', JSON.stringify(sizes, null, 2));
  report(sizes, precached);
}

function report(sizes, precached) {
  const kb = (bytes) => `${(bytes / 1000).toFixed(1)} kB`.padStart(10);
  for (const file of sizes.filter(({ name }) => name.endsWith('.js')).slice(0, 8)) {
    console.log(`  ${kb(file.raw)} ${kb(file.gzip)} gzip ${kb(file.brotli)} brotli  ${path.basename(file.name)}`);
  }
  if (precached) console.log(`  the service worker holds ${precached.count} files, ${kb(precached.size).trim()}`);
}

async function buildServer() {
  const entryPoints = ['server/index.ts', 'server/seeds/run.ts', 'jobs/index.ts', 'scripts/system/printSignIns.ts'];
  await build({
    entryPoints,
    outdir: 'build',
    outbase: '.',
    bundle: true,
    packages: 'external',
    platform: 'node',
    format: 'esm',
    target: 'node20',
    sourcemap: true,
    tsconfig: 'tsconfig.json',
    logLevel: 'warning',
  });
  const bytes = entryPoints.map((file) => statSync(`build/${file.replace(/\.ts$/, '.js')}`).size);
  if (process.argv.includes('--if-changed')) return;
  entryPoints.forEach((file, at) => console.log(`  ${((bytes[at] ?? 0) / 1000).toFixed(1)} kB  ${file}`));
}

mkdirSync('build', { recursive: true });
if (!process.argv.includes('--page')) await buildServer();
if (!process.argv.includes('--server')) await buildPage();
