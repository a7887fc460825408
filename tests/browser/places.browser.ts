import assert from 'node:assert/strict';

import type { BrowserContext } from 'playwright-core';

import { placeIds } from '@/scripts/pictures/placeIds';
import { places } from '@/scripts/places';
import { signInByApi } from '@/scripts/system/browser';
import { demoPerson, type DemoRole } from '@/scripts/system/people';
import { axe } from './support/axe';
import { test } from './support/harness';

/** Every place, at both sizes, light and dark: nothing for axe-core to say, nothing wider than the window, one h1. */
for (const size of ['phone', 'wide'] as const)
  for (const colorScheme of ['light', 'dark'] as const)
    test(
      `every place is accessible and fits, ${size}, ${colorScheme}`,
      async ({ context, system, another }) => {
        const contexts = new Map<DemoRole | null, BrowserContext>([[null, context]]);
        for (const role of ['vet', 'manager', 'staff'] as const) {
          const made = await another(size);
          await made.page.emulateMedia({ colorScheme });
          await signInByApi(made.context, system.base, demoPerson(role));
          contexts.set(role, made.context);
        }
        const requestOf = (role: DemoRole) => contexts.get(role)?.request ?? context.request;
        const ids = await placeIds(system.base, requestOf('manager'), requestOf('vet'));
        const faults: string[] = [];
        for (const place of places) {
          const page = await (contexts.get(place.who) ?? context).newPage();
          await page.emulateMedia({ colorScheme });
          await page.goto(system.base + place.path(ids));
          await page.getByRole('heading', { level: 1 }).first().waitFor();
          await page.waitForLoadState('networkidle', { timeout: 1500 }).catch(() => undefined);
          const found = await axe(page);
          const headings = await page.getByRole('heading', { level: 1 }).count();
          const wider = await page.evaluate(
            () => document.documentElement.scrollWidth - document.documentElement.clientWidth,
          );
          if (headings !== 1) found.push(`${headings} headings of level 1`);
          if (wider > 0) found.push(`${wider} px wider than the window`);
          faults.push(...found.map((fault) => `${place.name}: ${fault}`));
          await page.close();
        }
        assert.deepEqual(faults, []);
      },
      { size, timeout: 300_000, allow: /status of 4(04|10)/, browser: { colorScheme } },
    );
