import type { BrowserContext, BrowserContextOptions, Page } from 'playwright-core';

import type { Size } from '@/scripts/system/browser';
import type { System } from '@/scripts/system/system';

/** What a browser test is given. */
export interface Scene {
  page: Page;
  context: BrowserContext;
  /** The running system; shared by the tests of a run unless the test asks for its own. */
  system: System;
  /** Console errors and exceptions so far; the test fails if any is left that it doesn't allow. */
  problems: string[];
  /** Another person's or device's window onto the same system. */
  another(size?: Size): Promise<{ page: Page; context: BrowserContext }>;
}

export interface TestOptions {
  /** Default `phone`. */
  size?: Size;
  /** Milliseconds; default 60,000. */
  timeout?: number;
  /** A system with a database of its own, for tests that would disturb others. */
  ownSystem?: boolean;
  /** Console errors that belong to the test, such as those of a page that is offline. */
  allow?: RegExp;
  /** Zone, locale, colour scheme and so on of the browser. */
  browser?: BrowserContextOptions;
}

export interface BrowserTest extends TestOptions {
  name: string;
  body(scene: Scene): Promise<void>;
}

const registered: BrowserTest[] = [];

/** Declares a browser test. A file of tests is a file tests/browser/*.browser.ts that calls this. */
export function test(name: string, body: BrowserTest['body'], options: TestOptions = {}): void {
  registered.push({ name, body, ...options });
}

/** Hands over the tests declared since the last call. */
export const takeTests = (): BrowserTest[] => registered.splice(0);
