import type { Page } from 'playwright-core';

import { demoPassword } from '@/server/seeds/signIns';
import type { System } from '@/scripts/system/system';

/** Signs in as a person does: by the form. */
export async function signInByForm(page: Page, system: System, email: string): Promise<void> {
  await page.goto(`${system.base}/sign-in`);
  await page.getByLabel('E-mail').fill(email);
  await page.getByLabel('Password').fill(demoPassword);
  await page.getByRole('button', { name: 'Sign in', exact: true }).click();
  await page.getByRole('navigation').first().waitFor();
}

export interface Mail {
  subject: string;
  text: string;
  to: { address: string }[];
}

/** Mails of a person in the mail catcher, asked for until one fits or the time is over. */
export async function mailTo(
  system: System,
  address: string,
  fits: (mail: Mail) => boolean,
  seconds = 30,
): Promise<Mail[]> {
  const end = Date.now() + seconds * 1000;
  for (;;) {
    const all = (await (await fetch(`${system.mail}/email`)).json()) as Mail[];
    const mine = all.filter((mail) => mail.to.some((to) => to.address === address) && fits(mail));
    if (mine.length > 0 || Date.now() > end) return mine;
    await new Promise((resolve) => setTimeout(resolve, 500));
  }
}
