import { mkdirSync, writeFileSync } from 'node:fs';
import path from 'node:path';

import type { Browser, BrowserContext } from 'playwright-core';

import { type Size, sizes, watch } from '@/scripts/system/browser';
import { startSystem, type System } from '@/scripts/system/system';
import type { BrowserTest, Scene } from './harness';

export const out = path.resolve(import.meta.dirname, '../../out');

export interface Outcome {
  file: string;
  name: string;
  ok: boolean;
  milliseconds: number;
  error?: string;
}

/** A page that asks who is signed in and learns nobody logs this; it is an answer, not a fault. */
const notSignedIn = /Failed to load resource: the server responded with a status of 401/;

const late = (milliseconds: number) => {
  let timer: NodeJS.Timeout | undefined;
  const promise = new Promise<never>((_, reject) => {
    timer = setTimeout(() => reject(new Error(`took longer than ${milliseconds / 1000} s`)), milliseconds);
  });
  return { promise, clear: () => clearTimeout(timer) };
};

async function keepEvidence(name: string, contexts: readonly BrowserContext[], problems: string[], system: System) {
  mkdirSync(out, { recursive: true });
  const base = path.join(out, name.replace(/[^a-z0-9]+/gi, '-').slice(0, 80));
  const pages = contexts.flatMap((context) => context.pages());
  const shots = pages.map((page, at) =>
    page.screenshot({ path: `${base}-${at + 1}.png`, timeout: 5_000 }).catch(() => null),
  );
  await Promise.all(shots);
  const where = pages.map((page) => page.url()).join('\n');
  writeFileSync(`${base}.txt`, `${where}\n\n${problems.join('\n')}\n\n${system.words()}\n`);
}

/** Opens windows onto the system and remembers them. */
const opener =
  (browser: Browser, one: BrowserTest, problems: string[], contexts: BrowserContext[]) => async (size: Size) => {
    const context = await browser.newContext({ ...sizes[size], ...one.browser });
    context.setDefaultTimeout(15_000);
    context.on('page', (page) => watch(page, problems));
    contexts.push(context);
    return { context, page: await context.newPage() };
  };

/** Runs one test in fresh windows. Never throws: what went wrong is in the outcome, and its evidence in tests/out. */
export async function runTest(
  browser: Browser,
  shared: () => Promise<System>,
  file: string,
  one: BrowserTest,
): Promise<Outcome> {
  const began = Date.now();
  const contexts: BrowserContext[] = [];
  const problems: string[] = [];
  const timer = late(one.timeout ?? 60_000);
  let system: System | undefined;
  const outcome: Outcome = { file, name: one.name, ok: true, milliseconds: 0 };
  try {
    system = one.ownSystem ? await startSystem() : await shared();
    const open = opener(browser, one, problems, contexts);
    const scene: Scene = {
      ...(await open(one.size ?? 'phone')),
      system,
      problems,
      another: (size = 'phone') => open(size),
    };
    const body = one.body(scene);
    // when the time is up first, the body goes on into closed pages: nobody waits for that error
    body.catch(() => undefined);
    await Promise.race([body, timer.promise]);
    const bad = problems.filter((line) => !notSignedIn.test(line) && !one.allow?.test(line));
    if (bad.length > 0) throw new Error(`the page complained:\n${bad.join('\n')}`);
  } catch (error) {
    outcome.ok = false;
    outcome.error = error instanceof Error ? (error.stack ?? error.message) : String(error);
    if (system) await keepEvidence(one.name, contexts, problems, system);
  } finally {
    timer.clear();
    await Promise.all(contexts.map((context) => context.close().catch(() => undefined)));
    if (one.ownSystem) await system?.stop();
  }
  return { ...outcome, milliseconds: Date.now() - began };
}
