/**
 * Pictures of every place, phone and wide, light and dark, in shots/: `npm run shots [-- part of a place's name]`.
 * `npm run shots -- --readme` also copies those that the README shows to assets/readme/.
 */
import { copyFileSync, mkdirSync } from 'node:fs';
import path from 'node:path';

import type { Browser } from 'playwright-core';

import { type Place, type PlaceIds, places } from './places';
import { placeIds } from './pictures/placeIds';
import { readmeLimit, take } from './pictures/take';
import { launchBrowser, signInByApi, type Size, sizes } from './system/browser';
import { demoPerson } from './system/people';
import { root } from './system/root';
import { startSystem } from './system/system';

const schemes = ['light', 'dark'] as const;
const forReadme = process.argv.includes('--readme');
const wanted = process.argv.slice(2).find((word) => !word.startsWith('--')) ?? '';
const folder = path.join(root, 'shots');
const readme = path.join(root, 'assets/readme');

async function idsFor(browser: Browser, base: string): Promise<PlaceIds> {
  const [manager, vet] = [await browser.newContext(), await browser.newContext()];
  await signInByApi(manager, base, demoPerson('manager'));
  await signInByApi(vet, base, demoPerson('vet'));
  const ids = await placeIds(base, manager.request, vet.request);
  await Promise.all([manager.close(), vet.close()]);
  return ids;
}

/** Takes the pictures of some places as one person; answers how many of them have something wrong. */
async function round(browser: Browser, base: string, ids: PlaceIds, who: Place['who'], size: Size): Promise<number> {
  let wrong = 0;
  for (const colorScheme of schemes) {
    // what a service worker kept would hide what the server says now
    const context = await browser.newContext({ ...sizes[size], colorScheme, serviceWorkers: 'block', locale: 'en-AU' });
    if (who) await signInByApi(context, base, demoPerson(who));
    for (const place of places.filter((one) => one.who === who && one.name.includes(wanted))) {
      const name = `${place.name}-${size}-${colorScheme}`;
      const file = path.join(folder, `${name}.png`);
      const look = await take(context, `${base}${place.path(ids)}`, file);
      const faults = [
        ...(look.overflow > 0 ? [`${look.overflow} px too wide`] : []),
        ...look.problems.filter((line) => !place.expected?.test(line)),
      ];
      if (faults.length > 0) wrong += 1;
      console.log(`${faults.length > 0 ? 'FAULT' : 'ok   '} ${name}  ${Math.round(look.bytes / 1000)} kB`);
      for (const fault of faults) console.log(`      ${fault}`);
      if (forReadme && place.readme?.includes(`${size}-${colorScheme}`)) {
        copyFileSync(file, path.join(readme, `${name}.png`));
        if (look.bytes > readmeLimit) console.log(`      too large for the README: at most ${readmeLimit / 1000} kB`);
      }
    }
    await context.close();
  }
  return wrong;
}

mkdirSync(folder, { recursive: true });
if (forReadme) mkdirSync(readme, { recursive: true });
const system = await startSystem();
const browser = await launchBrowser();
let wrong = 0;
try {
  const ids = await idsFor(browser, system.base);
  for (const who of new Set(places.map((place) => place.who))) {
    for (const size of ['phone', 'wide'] as const) wrong += await round(browser, system.base, ids, who, size);
  }
} finally {
  await browser.close();
  await system.stop();
}
console.log(`pictures are in shots/; ${wrong} with faults`);
process.exit(wrong > 0 ? 1 : 0);
