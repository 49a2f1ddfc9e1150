import type { Page } from 'playwright-core';
import { demoEmail, demoPassword, demoPeople } from '#fixtures/demo/people.ts';
import type { OpenPageOptions } from '#tests/support/browser.ts';
import type { Stage } from './stage.ts';

/** Signs a person of the demonstration in through the form, in a browser of their own. */
export async function signedIn(stage: Stage, key: string, size: 'phone' | 'desk' | 'smallPhone' = 'desk', options: OpenPageOptions = {}): Promise<Page> {
  const person = demoPeople.find((one) => one.key === key);
  if (!person) throw new Error(`Nobody in the demonstration is called ${key}.`);
  const page = await stage.visit({ size, ...options });
  await page.goto('/sign-in');
  await page.getByLabel('Work e-mail').fill(demoEmail(person));
  await page.getByLabel('Password').fill(demoPassword);
  await page.getByRole('button', { name: 'Sign in' }).click();
  await page.waitForURL((url) => url.pathname !== '/sign-in');
  return page;
}
