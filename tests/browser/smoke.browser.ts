import assert from 'node:assert/strict';

import { test } from './support/harness';

test('the system is healthy and a stranger is asked to sign in', async ({ page, system }) => {
  const health = await fetch(`${system.base}/api/health`);
  assert.deepEqual([health.status, ((await health.json()) as { database: boolean }).database], [200, true]);
  await page.goto(system.base);
  await page.getByRole('heading', { level: 1 }).waitFor();
  await page.locator('input[type=password]').waitFor();
  await page.locator('input[type=email]').waitFor();
});

test(
  'the first load has no validation library and no page without a name',
  async ({ page, system }) => {
    const scripts: string[] = [];
    page.on('response', (response) => {
      if (response.url().endsWith('.js') && response.ok()) scripts.push(response.url());
    });
    await page.goto(system.base);
    await page.locator('input[type=password]').waitFor();
    assert.ok(scripts.length > 0);
    for (const url of scripts) {
      const text = await (await fetch(url)).text();
      // every error that zod makes carries this name
      assert.ok(!text.includes('ZodError'), `${url} contains zod`);
    }
    assert.match(await page.title(), /Yardbell/);
  },
  { size: 'wide' },
);
