/** Speeds and sizes in one run, as ratios where another machine would give another figure: `npm run bench`. */
import { mkdirSync, writeFileSync } from 'node:fs';
import { cpus } from 'node:os';
import path from 'node:path';

import { coreRows } from './bench/core';
import { pageRows } from './bench/page';
import { serverRows } from './bench/server';
import { startRows } from './bench/start';
import { printTable, type Row } from './bench/table';
import { root } from './system/root';
import { startSystem } from './system/system';

const all: Row[] = [];
async function section(title: string, measure: () => Row[] | Promise<Row[]>) {
  console.log(title);
  const rows = await measure();
  printTable(rows);
  all.push(...rows);
}

await section('Core', coreRows);
// NODE_ENV=test lifts the rate limits; the code is the production build all the same
const system = await startSystem({ worker: false });
try {
  await section('Server (demo data, 8 connections, loopback)', () => serverRows(system));
  await section('Page', () => pageRows(system));
} finally {
  await system.stop();
}
await section('Start', startRows);

const report = { node: process.version, cpu: cpus()[0]?.model, cores: cpus().length, rows: all };
mkdirSync(path.join(root, '.data'), { recursive: true });
writeFileSync(path.join(root, '.data/bench.json'), JSON.stringify(report, null, 2));
