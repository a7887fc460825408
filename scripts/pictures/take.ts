import { statSync } from 'node:fs';

import type { BrowserContext, Page } from 'playwright-core';

import { watch } from '../system/browser';

/** Tallest README picture file, so that the page opens on a poor line. */
export const readmeLimit = 250_000;

export interface Look {
  /** CSS pixels by which the page is wider than the window; 0 is well. */
  overflow: number;
  problems: string[];
  bytes: number;
}

async function settle(page: Page) {
  await page.getByRole('heading', { level: 1 }).first().waitFor({ timeout: 15_000 });
  await page.waitForLoadState('networkidle', { timeout: 5_000 }).catch(() => undefined);
  await page.evaluate(() => document.fonts.ready.then(() => undefined));
}

/** Opens an address in a fresh page, waits until it is calm, and writes its picture. */
export async function take(context: BrowserContext, url: string, file: string): Promise<Look> {
  const page = await context.newPage();
  const problems: string[] = [];
  watch(page, problems);
  try {
    await page.goto(url);
    await settle(page);
  } catch (error) {
    problems.push(`not ready: ${error instanceof Error ? error.message.split('\n')[0] : String(error)}`);
  }
  const overflow = await page.evaluate(() => {
    const { scrollWidth, clientWidth } = document.documentElement;
    return Math.max(0, scrollWidth - clientWidth);
  });
  await page.screenshot({ path: file, animations: 'disabled' });
  await page.close();
  return { overflow, problems, bytes: statSync(file).size };
}
