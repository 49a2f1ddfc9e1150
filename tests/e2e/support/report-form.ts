import path from 'node:path';
import type { Page } from 'playwright-core';
import { projectRoot } from './app-process.ts';

export const demoPhotoPath = (key: string): string => path.join(projectRoot, 'fixtures', 'photos', 'demo', `${key}.jpg`);

/** The account-free link of a demonstration site. */
export const guestReport = '/report?at=kestwick-roof-7q4m';

/** Past the make-safe card. */
export async function goOn(page: Page): Promise<void> {
  await page.getByRole('button', { name: 'It is covered, or gone. Go on' }).click();
}

/** The three answers that are chips, by their values. */
export async function chooseAnswers(page: Page): Promise<void> {
  await page.locator('[name=foundWhen][value=just-now]').check();
  await page.locator('[name=sighting][value=mark]').check();
  await page.locator('[name=anyoneHurt][value=no]').check();
}

export const sendReport = (page: Page): Promise<void> => page.locator('button[value=send]').last().click();

/** Chooses one chip of a group by its words. */
export async function choose(page: Page, group: string, option: string): Promise<void> {
  await page.getByRole('group', { name: group }).getByRole('radio', { name: option, exact: true }).check();
}

/** The four answers of the rooftop scorch, at a phone, with the form open. */
export async function fillRooftopReport(page: Page, words: string): Promise<void> {
  await page.getByLabel('Site').selectOption({ label: 'Kestwick Court Block C (KESTWICK-C)' });
  await page.getByLabel('The spot, in words').fill('roof, south edge by hatch 2');
  await choose(page, 'When was it found?', 'Just now');
  await choose(page, 'What do you see?', 'Mark or scorch');
  await page.getByLabel('In your words').fill(words);
  await choose(page, 'Was anyone hurt?', 'No');
}

/** Opens the report page and goes past the make-safe card. */
export async function openReport(page: Page): Promise<void> {
  await page.goto('/report');
  await goOn(page);
  await page.getByRole('heading', { name: 'What did you find?' }).waitFor();
}
