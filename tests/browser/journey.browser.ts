import assert from 'node:assert/strict';

import ICAL from 'ical.js';
import type { Locator, Page } from 'playwright-core';

import { mobCells, writeCsv } from '../support/mob-csv';
import { axe } from './support/axe';
import { test } from './support/harness';
import { mailTo, signInByForm } from './support/people';
import { dayPlace, localIn } from './support/place';

/**
 * The main job from end to end, as people do it: the vet designs and signs off, the manager brings in a mob and plans,
 * the vet authorises, the manager starts, a phone records, mails come, calendars follow.
 */
const vet = 'vet@quillback.example';
const protocolName = 'Journey heifers, 54 h';
const button = (within: Page | Locator, name: string | RegExp) =>
  within.getByRole('button', { name, ...(typeof name === 'string' ? { exact: true } : {}) });

test(
  'a vet copies a published protocol, changes it, sees what is wrong, and signs it off',
  async ({ page, system }) => {
    await signInByForm(page, system, vet);
    await page.getByRole('link', { name: 'Protocols' }).click();
    await page.getByRole('link', { name: /7-day device, beef heifers, 54 h/ }).click();
    await page.getByRole('heading', { name: 'Sources' }).waitFor();
    await button(page, 'Copy to Quillback Vets').click();
    await page.getByLabel('Name of the copy').fill(protocolName);
    await button(page, 'Copy and open').click();
    await page.getByRole('heading', { level: 1, name: protocolName }).waitFor();
    await button(page, 'Edit').click();
    const gap = button(page, 'Edit gap: Device out to Fixed-time AI');
    await gap.click();
    await page.getByLabel('Least', { exact: true }).fill('60');
    await button(page, 'Done').click();
    await page.getByText('figures out of order').waitFor();
    await gap.click();
    await page.getByLabel('Least', { exact: true }).fill('50');
    await page.getByLabel('Most', { exact: true }).fill('58');
    await button(page, 'Done').click();
    await page.getByText('54 h elapsed, 50 to 58').first().waitFor();
    assert.equal(await page.getByText('figures out of order').count(), 0);
    // the line is the editor too: one key moves AI by an hour
    await page.getByRole('slider', { name: 'Move AI' }).press('ArrowRight');
    await page.getByText('55 h elapsed, 51 to 59').first().waitFor();
    await button(page, 'Undo last change').click();
    await button(page, 'Save working copy').click();
    await page.getByText('Not saved yet').waitFor({ state: 'detached' });
    await button(page, 'Stop editing').click();
    assert.deepEqual(await axe(page), []);
    await button(page, 'Sign off').click();
    await button(page, 'Doses and intervals are mine to answer for: sign off').click();
    await button(page, 'Edit as next version').waitFor();
    await page.getByText('Version 1, signed off by Maren Tolhurst').waitFor();
  },
  { size: 'wide', timeout: 120_000 },
);

/** A mob as farms send it: byte-order mark, semicolons, dates that can be read both ways, a spoilt row, a double. */
function mobFile(): Buffer {
  const cells = mobCells({ head: 182, dates: 'dmy', ambiguousDates: true, spacedEids: true, decimalComma: true });
  const [head = [], ...rows] = cells;
  const all = [[...head, 'Known empty'], ...rows.map((row) => [...row, 'yes'])];
  const first = all[1] ?? [];
  all.push([...first.slice(0, 1), '999 000999999999', ...first.slice(2)]);
  all.push(['J999', '12345', 'Heifer', '', '', '', '', '', 'yes']);
  return Buffer.from(`\ufeff${writeCsv(all, ';')}`);
}

test(
  'a manager brings in a mob from a file, seeing every row before anything is written',
  async ({ page, system }) => {
    const place = dayPlace(Date.now());
    await signInByForm(page, system, place.manager);
    await page.goto(`${system.base}/herd/import`);
    await page.locator('input[type=file]').setInputFiles({ name: 'mob.csv', mimeType: 'text/csv', buffer: mobFile() });
    await page.getByText('separated by semicolons').waitFor();
    await page.getByText(/Is the day or the month first/).waitFor();
    assert.ok(await button(page, /^Import \d+ animals$/).isDisabled());
    await page.getByLabel('day, month, year').check();
    await page.getByText(/Is the day or the month first/).waitFor({ state: 'detached' });
    assert.deepEqual(await axe(page), []);
    await page.getByText('Refused', { exact: true }).click();
    await page.getByRole('table', { name: 'Row by row' }).getByText('refuse', { exact: true }).first().waitFor();
    const commit = button(page, /^Import \d+ animals$/);
    const named = await commit.innerText();
    await commit.click();
    await page.getByText(/Imported: \d+ created/).waitFor();
    const created = Number(/Imported: (\d+) created/.exec(await page.locator('main').innerText())?.[1]);
    assert.ok(created >= 180 && named.includes(String(created)), `${created} created, the button said ${named}`);
  },
  { size: 'wide', timeout: 120_000 },
);

async function fillLocal(page: Page | Locator, label: string, local: string): Promise<void> {
  await page.getByLabel(`${label}: date`).fill(local.slice(0, 10));
  await page.getByLabel(`${label}: time`).fill(local.slice(11, 16));
}

async function authorise(page: Page, active: string): Promise<void> {
  await button(page, `Authorise ${active}`).click();
  await button(page, 'Issue authority').click();
  await page.getByRole('dialog').waitFor({ state: 'detached' });
}

test(
  'a cohort is planned, authorised and started; mails, calendar and Today follow it, and a move changes them all',
  async ({ page, system, another }) => {
    const now = Date.now();
    const { zone, manager, name: property } = dayPlace(now);
    await signInByForm(page, system, manager);
    // reminders now, so that the run sees them
    const clock = localIn(now, -1, zone).slice(11, 16);
    const preferences = { evening: true, morning: true, closing: true, eveningAt: clock, morningAt: clock };
    const changed = await page.request.patch(`${system.base}/api/me`, { data: { preferences } });
    assert.equal(changed.status(), 200);

    await page.goto(`${system.base}/cohorts/new`);
    await page.getByLabel('Name of the cohort').fill('Journey');
    await button(page, 'Begin planning').click();
    await page.getByRole('heading', { level: 1, name: 'Journey' }).waitFor();
    await page.getByLabel('Protocol', { exact: true }).selectOption({ label: `${protocolName}, version 1` });
    await page.getByLabel('the first treatment').check();
    await fillLocal(page, 'Date and time', localIn(now, -5, zone));
    const first = page.getByRole('group', { name: 'Group 1' });
    await first.getByText('from the herd').click();
    await button(first, /^Choose animals/).click();
    await page.getByRole('dialog').getByLabel('Tag or EID').fill('00');
    await button(page, 'Choose all that match').click();
    await page
      .getByRole('dialog')
      .getByText(/^[1-9]\d* chosen$/)
      .waitFor();
    await button(page, /^Take \d+ animals?$/).click();
    for (const [n, minutes] of [
      [2, 24 * 60],
      [3, 130],
    ] as const) {
      await button(page, 'Add a group').click();
      const group = page.getByRole('group', { name: `Group ${n}` });
      await group.getByLabel('Head', { exact: true }).fill('5');
      await group.getByLabel('Own time for this group', { exact: true }).check();
      await fillLocal(group, 'Own time for this group', localIn(now, minutes, zone));
    }
    await page.getByText('Saved', { exact: true }).waitFor();
    await page.getByText(/No authority for dinoprost/).waitFor();
    assert.ok(await button(page, 'Start this cohort').isDisabled());
    assert.deepEqual(await axe(page), []);

    // the vet sees the plan of every property that engages the practice, and authorises
    const vets = (await another('wide')).page;
    await signInByForm(vets, system, vet);
    await vets.getByRole('link', { name: 'Cohorts' }).click();
    await vets.getByRole('link', { name: /^Journey/ }).click();
    await vets.getByRole('heading', { level: 1, name: 'Journey' }).waitFor();
    for (const active of ['progesterone device', 'gonadorelin', 'dinoprost']) await authorise(vets, active);

    await page.reload();
    await page.getByText(/No authority for dinoprost/).waitFor({ state: 'detached' });
    await button(page, 'Start this cohort').click();
    await button(page, /^Start: 9 tasks$/).click();
    await page.getByRole('tab', { name: 'Tasks' }).waitFor();
    const cohortUrl = page.url();

    // each reminder once: the evening before, on the morning, and before the window closes
    const kinds = {
      evening: /^(Mon|Tue|Wed|Thu|Fri|Sat|Sun) /,
      morning: /^Due /,
      closing: /^Window closes .*Devices in/,
    };
    for (const [kind, words] of Object.entries(kinds)) {
      const mails = await mailTo(system, manager, (mail) => words.test(mail.subject));
      assert.equal(mails.length, 1, `${kind}: ${mails.map((mail) => mail.subject).join(' | ')}`);
      assert.match(mails[0]?.subject ?? '', new RegExp(property));
    }

    // a calendar link, read over HTTP by a parser that is not ours
    await page.goto(`${system.base}/people`);
    await page.getByLabel('Name of the link').fill('Phone');
    await button(page, 'Make a calendar link').click();
    const address = await page.getByRole('textbox', { name: 'Address' }).inputValue();
    const starts = async () => {
      const text = await (await fetch(address)).text();
      const calendar = new ICAL.Component(ICAL.parse(text));
      return calendar
        .getAllSubcomponents('vevent')
        .map((event) => new ICAL.Event(event))
        .filter((event) => event.summary.includes('Group 2') && event.summary.startsWith('AI'))
        .map((event) => event.startDate.toJSDate().toISOString());
    };
    const before = await starts();
    assert.equal(before.length, 1);

    // moving a task shows its effect first; calendars follow
    await page.goto(cohortUrl);
    await button(page, 'Move AI, Group 2').click();
    const dialog = page.getByRole('dialog');
    const local = localIn(Date.parse(before[0] ?? ''), 30, zone);
    await fillLocal(dialog, 'New time', local);
    await button(dialog, 'Look at what it does').click();
    await dialog.getByText('What moves').waitFor();
    await button(dialog, 'Move it').click();
    await dialog.waitFor({ state: 'detached' });
    assert.deepEqual(await starts(), [new Date(Date.parse(before[0] ?? '') + 30 * 60_000).toISOString()]);
    await page.goto(`${system.base}/people`);
    await button(page, 'Revoke Phone').click();
    await button(page.getByRole('dialog'), /Revoke/).click();
    await page.getByRole('dialog').waitFor({ state: 'detached' });
    assert.equal((await fetch(address)).status, 404);
  },
  { size: 'wide', timeout: 240_000 },
);

test(
  'a phone records animals one by one, an exception, the rest at once, and takes one back',
  async ({ page, system }) => {
    const { manager } = dayPlace(Date.now());
    await signInByForm(page, system, manager);
    await page.getByRole('link', { name: /Devices in, Group 1/ }).click();
    await page.getByRole('heading', { level: 1, name: 'Devices in' }).waitFor();
    await page.getByText('Wear gloves.').first().waitFor();
    await page
      .getByText(/2 mL|100 µg/)
      .first()
      .waitFor();
    assert.deepEqual(await axe(page), []);
    const left = async () => Number(/Left (\d+)/.exec(await page.getByText(/^Left \d+$/).innerText())?.[1]);
    const start = await left();
    await button(page, /^Record .+ as done$/)
      .first()
      .click();
    await page.getByText(`Left ${start - 1}`, { exact: true }).waitFor();
    await button(page, /^Something is different with/)
      .first()
      .click();
    await page.getByLabel('could not be done').check();
    await button(page, 'Record it').click();
    await page.getByText(`Left ${start - 2}`, { exact: true }).waitFor();
    await page.getByText(/^Done \d+$/).click();
    await button(page, /^Undo the record of/)
      .first()
      .click();
    await page.getByText(`Left ${start - 1}`, { exact: true }).waitFor();
    await page.getByText(/^Left \d+$/).click();
    await button(page, `Record the rest: ${start - 1} head`).click();
    await button(page, `Record ${start - 1} head`).click();
    await page.getByText('Every head is recorded').waitFor();
    // it is the server's too, not only this phone's
    await page.getByText(/kept on this phone/).waitFor({ state: 'detached' });
    await page.reload();
    await page.getByText('Every head is recorded').waitFor();
  },
  { timeout: 120_000 },
);
