import { type Browser, type BrowserContext, type BrowserContextOptions, chromium, type Page } from 'playwright-core';

/** The two sizes that every place is looked at in. */
export const sizes = {
  phone: { viewport: { width: 390, height: 844 }, isMobile: true, hasTouch: true, deviceScaleFactor: 2 },
  wide: { viewport: { width: 1440, height: 900 }, deviceScaleFactor: 1 },
} as const satisfies Record<string, BrowserContextOptions>;
export type Size = keyof typeof sizes;

/** Debian's Chromium (or CHROMIUM), without its own look-ups on the network. */
export const launchBrowser = (): Promise<Browser> =>
  chromium.launch({
    executablePath: process.env.CHROMIUM ?? '/usr/bin/chromium',
    // its sandbox refuses to run as root
    chromiumSandbox: false,
    args: [
      '--disable-gpu',
      '--disable-quic',
      '--disable-dev-shm-usage',
      '--no-first-run',
      '--disable-background-networking',
      '--disable-component-update',
      '--disable-sync',
    ],
  });

/** Collects what goes wrong on a page: console errors and uncaught exceptions, one line each. */
export function watch(page: Page, problems: string[]): void {
  page.on('console', (message) => {
    if (message.type() === 'error') problems.push(`console: ${message.text()} (${message.location().url})`);
  });
  page.on('pageerror', (error) => problems.push(`error: ${error.message}`));
}

/** Signs in by the interface, so that pages of this context open as that person. */
export async function signInByApi(
  context: BrowserContext,
  base: string,
  who: { email: string; password: string },
): Promise<void> {
  const answer = await context.request.post(`${base}/api/session`, {
    data: { email: who.email, password: who.password },
    headers: { origin: base },
  });
  if (!answer.ok()) throw new Error(`sign-in of ${who.email}: ${answer.status()} ${await answer.text()}`);
}
