import { get } from 'node:http';

import { launchBrowser, signInByApi, sizes } from '../system/browser';
import { demoPerson } from '../system/people';
import type { System } from '../system/system';
import type { Row } from './table';

/** Bytes of the body as the server sends it with this encoding. */
const bytesSent = (url: string, encoding: string): Promise<number> =>
  new Promise((resolve, reject) => {
    get(url, { headers: { 'accept-encoding': encoding } }, (answer) => {
      let bytes = 0;
      answer.on('data', (chunk: Buffer) => (bytes += chunk.length));
      answer.on('end', () => resolve(bytes));
    }).on('error', reject);
  });

/** What a phone loads before Today stands there: scripts as sent, and the time on this machine. */
export async function pageRows(system: System): Promise<Row[]> {
  const browser = await launchBrowser();
  try {
    const context = await browser.newContext({ ...sizes.phone, serviceWorkers: 'block' });
    await signInByApi(context, system.base, demoPerson('manager'));
    const page = await context.newPage();
    const scripts: string[] = [];
    page.on('response', (response) => {
      if (response.request().resourceType() === 'script' && response.ok()) scripts.push(response.url());
    });
    const began = performance.now();
    await page.goto(system.base);
    await page.getByRole('heading', { level: 1 }).first().waitFor();
    const milliseconds = performance.now() - began;
    await page.waitForLoadState('networkidle');
    const sum = async (encoding: string) => {
      const sizesOf = await Promise.all(scripts.map((url) => bytesSent(url, encoding)));
      return sizesOf.reduce((total, bytes) => total + bytes, 0) / 1000;
    };
    const raw = await sum('identity');
    const row = (what: string, value: number): Row => ({
      what,
      value,
      unit: 'kB',
      ratio: value / raw,
      beside: 'uncompressed',
    });
    return [
      row(`first load of Today, ${scripts.length} scripts, gzip`, await sum('gzip')),
      row(`first load of Today, ${scripts.length} scripts, brotli`, await sum('br')),
      { what: 'from address to heading of Today', value: milliseconds, unit: 'ms' },
    ];
  } finally {
    await browser.close();
  }
}
