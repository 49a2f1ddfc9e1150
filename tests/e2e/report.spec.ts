import { fileURLToPath } from 'node:url';
import AxeBuilder from '@axe-core/playwright';
import sharp from 'sharp';
import type { Page } from 'playwright-core';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { receiptPattern } from '#app/domain/incident.ts';
import { chooseAnswers, goOn, guestReport, sendReport as send } from './support/report-form.ts';
import { openStage } from './support/stage.ts';
import type { Stage } from './support/stage.ts';

const photoFile = (name: string) => fileURLToPath(new URL(`../../fixtures/photos/${name}`, import.meta.url));

let stage: Stage;
beforeAll(async () => {
  stage = await openStage();
});
afterAll(async () => {
  await stage.close();
});

async function expectNoViolations(page: Page): Promise<void> {
  const { violations } = await new AxeBuilder({ page }).analyze();
  expect(violations.map(({ id, nodes }) => `${id}: ${nodes.map((node) => node.target.join(' ')).join(', ')}`)).toEqual([]);
}

async function answerFour(page: Page): Promise<void> {
  await page.getByLabel('The spot, in words').fill('roof, south edge by hatch 2');
  await chooseAnswers(page);
}

const clientIdOf = (page: Page) => new URL(page.url()).searchParams.get('report') ?? '';
async function receiptOn(page: Page): Promise<string> {
  await page.waitForURL(/\/received\//u);
  return new URL(page.url()).pathname.split('/').at(-1) ?? '';
}

test('make safe comes first, with one tap to the emergency number and one button on', async () => {
  const page = await stage.visit({ size: 'phone' });
  await page.goto(guestReport);
  await expect.poll(() => page.getByRole('heading', { level: 1 }).textContent()).toBe('Smoking or burning?');
  expect(await page.getByRole('link', { name: /Call the emergency number/u }).getAttribute('href')).toMatch(/^tel:\+?\d+$/u);
  await page.getByRole('button', { name: 'It is covered, or gone. Go on' }).waitFor();
  expect(await page.locator('#report').isVisible()).toBe(false);
  await expectNoViolations(page);
});

test('a guest reports with a photo from a phone, gets a receipt, and follows it', async () => {
  const page = await stage.visit({ size: 'phone' });
  await page.goto(guestReport);
  await goOn(page);
  await page.locator('input[type=file]').setInputFiles([photoFile('with-gps-exif.jpg'), photoFile('text-renamed.jpg')]);
  await page.getByText('1, with the team').waitFor();
  await page.getByText(/“text-renamed\.jpg” is not a JPEG/u).waitFor();
  await page.getByRole('button', { name: /^Photo 1,/u }).click();
  await page.getByLabel('What does it show?').fill('The band from hatch 2');
  await answerFour(page);
  await expectNoViolations(page);
  await send(page);
  const receipt = await receiptOn(page);
  expect(receipt).toMatch(receiptPattern);
  await expectNoViolations(page);
  // Nothing of the report stays on the device.
  await expect.poll(() => page.evaluate(async () => {
    const db = await new Promise<IDBDatabase>((resolve) => { const request = indexedDB.open('scorchline'); request.onsuccess = () => resolve(request.result); });
    const all = await Promise.all(['reports', 'photos'].map((store) => new Promise<number>((resolve) => { const request = db.transaction(store).objectStore(store).count(); request.onsuccess = () => resolve(request.result); })));
    db.close();
    return all;
  })).toEqual([0, 0]);
  await page.getByRole('link', { name: 'Follow this report' }).click();
  await page.getByRole('heading', { name: 'Your report is in. The first look is still to come' }).waitFor();
  await expectNoViolations(page);
  const [row] = await stage.sql<{ state: string; photos: number }[]>`select state, (select count(*)::int from photos where case_id = cases.id) as photos from cases where receipt = ${receipt}`;
  expect(row).toEqual({ state: 'reported', photos: 1 });
});

test('a photo goes as the camera made it, and smaller only when that was asked for, with its camera data', async () => {
  const large = async () => ({
    name: 'large.jpg',
    mimeType: 'image/jpeg',
    buffer: await sharp({ create: { width: 3000, height: 1500, channels: 3, background: '#808080', noise: { type: 'gaussian', mean: 128, sigma: 30 } } })
      .jpeg({ quality: 92 })
      .withExif({ IFD0: { Make: 'None', Model: 'Box 1' }, IFD2: { DateTimeOriginal: '2026:05:09 15:10:30', OffsetTimeOriginal: '+01:00' } })
      .toBuffer(),
  });
  const page = await stage.visit({ size: 'phone' });
  await page.goto(guestReport);
  await goOn(page);
  const asItIs = await large();
  await page.getByLabel('Photo files').setInputFiles(asItIs);
  await page.getByText('1, with the team').waitFor();
  await page.getByLabel(/Make the next photos smaller/u).check();
  await page.getByLabel('Photo files').setInputFiles(await large());
  await page.getByText('2, with the team').waitFor();
  const rows = await stage.sql`select bytes::int, width_px, height_px, made_smaller, exif->>'takenAtLocal' as taken, exif->>'camera' as camera from photos where report_client_id = ${clientIdOf(page)} order by position`;
  const taken = { taken: '2026-05-09T15:10:30', camera: 'None Box 1' };
  expect(rows.map((row) => ({ ...row }))).toEqual([
    { bytes: asItIs.buffer.byteLength, width_px: 3000, height_px: 1500, made_smaller: false, ...taken },
    { bytes: expect.any(Number), width_px: 2048, height_px: 1024, made_smaller: true, ...taken },
  ]);
  expect(rows[1]?.bytes).toBeLessThan(asItIs.buffer.byteLength);
});

test('what was typed, and the photos, are there again after a reload', async () => {
  const page = await stage.visit({ size: 'phone' });
  await page.goto(guestReport);
  await goOn(page);
  await page.locator('input[type=file]').setInputFiles(photoFile('no-exif.png'));
  await page.getByText('1, with the team').waitFor();
  await page.getByLabel('In your words').fill('Brown band, about two metres');
  await page.locator('[name=opticKind][value=bottle]').check();
  await page.getByText(/Saved on this (phone|device)/u).waitFor();
  const clientId = clientIdOf(page);
  // The bare link, as scanned again at the door, finds the same report.
  await page.goto(guestReport);
  await page.waitForURL((url) => url.searchParams.get('report') === clientId);
  await expect.poll(() => page.getByLabel('In your words').inputValue()).toBe('Brown band, about two metres');
  expect(await page.locator('[name=opticKind][value=bottle]').isChecked()).toBe(true);
  await page.getByRole('button', { name: /^Photo 1,/u }).waitFor();
});

test('only the sizes of the chosen optic are asked', async () => {
  const page = await stage.visit({ size: 'phone' });
  await page.goto(guestReport);
  await goOn(page);
  const shown = async () => page.locator('fieldset:has(> legend)').filter({ has: page.locator('[name^="optic-"]') }).evaluateAll((all) => all.filter((one) => one.checkVisibility()).map((one) => one.querySelector('legend')?.textContent));
  expect(await shown()).toEqual([]);
  await page.locator('[name=opticKind][value=window-pane]').check();
  expect((await shown()).filter((text) => !text?.endsWith('How do you know?'))).toEqual(['A. How wide is the pane?', 'B. How high is the pane?', 'C. How far does the middle bow?', 'How warm was the air when you measured the bow?', 'What was the air pressure then?']);
});

test('without signal the report waits, goes by itself when it returns, and is filed once', async () => {
  const page = await stage.visit({ size: 'phone' });
  await page.goto(guestReport);
  await goOn(page);
  await answerFour(page);
  const clientId = clientIdOf(page);
  await page.context().setOffline(true);
  await send(page);
  await page.getByText(/It goes by itself when signal returns, once only/u).waitFor();
  await expectNoViolations(page);
  await page.context().setOffline(false);
  await receiptOn(page);
  expect(await stage.sql`select 1 from cases where client_id = ${clientId}`).toHaveLength(1);
});

test('without a script the same page reports, photos and all, and keeps what was typed when something is missing', async () => {
  const page = await stage.visit({ size: 'smallPhone', javaScriptEnabled: false });
  await page.goto(guestReport);
  await page.locator('#photo-files').setInputFiles(photoFile('rotated-exif6.jpg'));
  await page.getByLabel('In your words').fill('Brown band');
  await page.locator('[name=foundWhen][value=dont-know]').check();
  await page.locator('[name=sighting][value=dont-know]').check();
  await send(page);
  await page.getByRole('alert').waitFor();
  expect(await page.getByLabel('In your words').inputValue()).toBe('Brown band');
  await page.getByRole('button', { name: 'Take off rotated-exif6.jpg' }).waitFor();
  await page.locator('[name=anyoneHurt][value=dont-know]').check();
  await send(page);
  expect(await receiptOn(page)).toMatch(receiptPattern);
});

test('nothing scrolls sideways at 320 px', async () => {
  const page = await stage.visit({ size: 'smallPhone' });
  const width = () => page.evaluate(() => document.documentElement.scrollWidth);
  await page.goto(guestReport);
  await page.getByRole('button', { name: 'It is covered, or gone. Go on' }).waitFor();
  expect(await width()).toBe(320);
  await goOn(page);
  await page.locator('[name=opticKind][value=metal-trim]').check();
  await page.locator('[name=foundWhen][value=range]').check();
  expect(await width()).toBe(320);
  await page.goto('/progress');
  expect(await width()).toBe(320);
});
