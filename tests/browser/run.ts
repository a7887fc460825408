/** Runs the browser tests: `tsx tests/browser/run.ts [part of a file's or test's name]`. */
import { mkdirSync, readdirSync, rmSync, writeFileSync } from 'node:fs';
import path from 'node:path';

import { launchBrowser } from '@/scripts/system/browser';
import { startSystem, type System } from '@/scripts/system/system';
import { takeTests } from './support/harness';
import { type Outcome, out, runTest } from './support/runTest';

const wanted = process.argv[2] ?? '';
mkdirSync(out, { recursive: true });
for (const name of readdirSync(out)) if (/\.(png|txt)$/.test(name)) rmSync(path.join(out, name));

let system: Promise<System> | undefined;
const shared = () => (system ??= startSystem());
const stop = async () => {
  await (await system?.catch(() => undefined))?.stop();
};
for (const signal of ['SIGINT', 'SIGTERM'] as const)
  process.once(signal, () => void stop().finally(() => process.exit(143)));

const files = readdirSync(import.meta.dirname).filter((name) => name.endsWith('.browser.ts'));
const outcomes: Outcome[] = [];
const browser = await launchBrowser();
for (const file of files.sort()) {
  await import(path.join(import.meta.dirname, file));
  for (const one of takeTests().filter(({ name }) => `${file} ${name}`.includes(wanted))) {
    const outcome = await runTest(browser, shared, file, one);
    outcomes.push(outcome);
    console.log(`${outcome.ok ? 'ok  ' : 'FAIL'} ${file}: ${one.name} (${(outcome.milliseconds / 1000).toFixed(1)} s)`);
    if (outcome.error) console.log(outcome.error.replace(/^/gm, '     '));
  }
}
await browser.close();
await stop();

const failed = outcomes.filter(({ ok }) => !ok).length;
const report = { passed: outcomes.length - failed, failed, tests: outcomes };
writeFileSync(path.join(out, 'browser.json'), JSON.stringify(report, null, 2));
console.log(`browser: ${report.passed} passed, ${failed} failed`);
process.exit(failed > 0 || outcomes.length === 0 ? 1 : 0);
