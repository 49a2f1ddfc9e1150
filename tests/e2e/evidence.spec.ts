import { readFile } from 'node:fs/promises';
import type { Locator, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { choose } from './support/report-form.ts';
import { signedIn } from './support/sign-in.ts';
import { openStage } from './support/stage.ts';
import type { Stage } from './support/stage.ts';

/** From a collected item to a signed report that can be taken away, in the demonstration case of the acrylic sphere. */
let stage: Stage;
let maren: Page;
let odile: Page;
let joss: Page;

beforeAll(async () => {
  stage = await openStage();
  [maren, odile, joss] = await Promise.all([signedIn(stage, 'maren'), signedIn(stage, 'odile'), signedIn(stage, 'joss')]);
});
afterAll(async () => {
  await stage.close();
});

async function open(page: Page, path: string): Promise<void> {
  await page.goto(path);
  // Filling a field before the page has taken over its own markup can be undone by it.
  await page.waitForLoadState('networkidle');
}

async function send(page: Page, button: Locator): Promise<void> {
  await Promise.all([page.waitForResponse((response) => response.request().method() === 'POST'), button.click()]);
  await page.waitForLoadState('networkidle');
}

describe('evidence', () => {
  it('is collected with a label, and passed on without a gap', async () => {
    await open(maren, '/cases/118/evidence');
    await choose(maren, 'What it is', 'Device or fitting');
    await maren.getByLabel('Description').fill('Timer of the display lamps');
    await maren.getByLabel('Taken from').fill('fuse box behind the shop');
    await maren.getByLabel('Collected by').fill('Maren Kvist');
    await maren.getByLabel('Collected at').fill('2026-02-04T09:30');
    await maren.getByLabel('Condition').fill('whole, dusty');
    await maren.getByLabel('Held by, part').selectOption({ label: 'Investigator' });
    await maren.getByLabel('Held by, name').fill('Maren Kvist');
    await send(maren, maren.getByRole('button', { name: 'Record the item' }));
    await maren.getByRole('heading', { name: '118-E: Timer of the display lamps' }).waitFor();
    await maren.getByText('To somebody without an account').click();
    const typed = maren.locator('form').filter({ has: maren.getByRole('button', { name: 'Record the hand-over' }) });
    await typed.getByLabel('When', { exact: true }).fill('2026-02-04T09:00');
    await typed.getByLabel('Taken over by, part').selectOption({ label: 'Store' });
    await typed.getByLabel('Taken over by, name').fill('Store Vestre');
    await typed.getByLabel('Purpose').fill('Keeping');
    await typed.getByLabel('Condition of item and seal').fill('whole');
    await typed.getByLabel('Signed by the taker').fill('Store Vestre');
    await send(maren, maren.getByRole('button', { name: 'Record the hand-over' }));
    await maren.getByText('The hand-over comes after the one before it.').first().waitFor();
    expect(await typed.getByLabel('Purpose').inputValue()).toBe('Keeping');
    await typed.getByLabel('When', { exact: true }).fill('2026-02-05T09:00');
    await send(maren, maren.getByRole('button', { name: 'Record the hand-over' }));
    await maren.getByRole('region', { name: 'Chain of custody of 118-E' }).getByRole('row', { name: /Store Vestre/u }).waitFor();
    await open(maren, '/cases/118/evidence/E/label');
    await maren.getByRole('img', { name: /Code that leads to .*\/cases\/118\/evidence\/E/u }).waitFor();
  });

  it('is signed for by the receiver on their own account, and held by the giver until then', async () => {
    await open(maren, '/cases/118/evidence/E');
    const offer = maren.locator('form').filter({ has: maren.getByRole('button', { name: 'Sign as giver and offer it' }) });
    await offer.getByLabel('Who takes it over').selectOption({ label: 'Joss Penhallow' });
    await offer.getByLabel('Their part').selectOption({ label: 'Site staff' });
    await offer.getByLabel('Purpose').fill('Back to the site');
    await offer.getByLabel('Condition of item and seal').fill('whole');
    await send(maren, maren.getByRole('button', { name: 'Sign as giver and offer it' }));
    await maren.getByRole('heading', { name: 'Offered to Joss Penhallow' }).waitFor();
    await maren.getByRole('region', { name: 'Chain of custody of 118-E' }).getByRole('row', { name: /holds it now.*Store Vestre/u }).waitFor();
    await open(joss, '/cases/118/evidence');
    await joss.getByRole('region', { name: 'Waiting for a signature' }).getByRole('link', { name: '118-E' }).click();
    await joss.getByRole('heading', { name: 'Offered to you' }).waitFor();
    await joss.waitForLoadState('networkidle');
    await joss.getByLabel('Condition as you take it over').fill('whole, bag torn at a corner');
    await send(joss, joss.getByRole('button', { name: 'Take it over and sign' }));
    await joss.getByRole('region', { name: 'Chain of custody of 118-E' }).getByRole('row', { name: /holds it now.*Joss Penhallow.*bag torn.*on their own account/u }).waitFor();
  });

  it('is refused an examination that may alter it without notice and protocol', async () => {
    await open(maren, '/cases/118/evidence/E');
    await choose(maren, 'Kind of examination', 'May alter the item');
    const exam = maren.getByRole('region', { name: 'Record an examination' });
    await exam.getByLabel('When', { exact: true }).fill('2026-02-06T09:00');
    await exam.getByLabel('Made by').fill('Laboratory Halm');
    await exam.getByLabel('Method').fill('Opened');
    await exam.getByLabel('Result').fill('Contacts clean');
    await send(maren, maren.getByRole('button', { name: 'Record the examination' }));
    await maren.getByText('needs notice').first().waitFor();
    await maren.getByText('Choose the protocol file').first().waitFor();
  });

  it('takes a document, and hands back the same bytes', async () => {
    await open(maren, '/cases/118/evidence');
    const words = 'Letter of the maker: the index is 1.491.';
    await maren.getByLabel('File', { exact: true }).setInputFiles({ name: 'letter.txt', mimeType: 'text/plain', buffer: Buffer.from(words) });
    await maren.getByLabel('Title').fill('Letter of the maker about the acrylic');
    await maren.getByLabel('Kind', { exact: true }).selectOption({ label: 'Letter or e-mail' });
    await send(maren, maren.getByRole('button', { name: 'Add the document' }));
    const [download] = await Promise.all([maren.waitForEvent('download'), maren.getByRole('link', { name: 'D4' }).click()]);
    expect(await readFile(await download.path(), 'utf8')).toBe(words);
  });
});

describe('the timeline', () => {
  it('puts a reading of a clock that is fast at its true time', async () => {
    await open(maren, '/cases/118/timeline');
    await maren.getByLabel('Read from').selectOption({ label: 'Access log' });
    await maren.getByLabel('Which one').fill('staff door');
    await maren.getByLabel('Clock reading').fill('2026-02-03T10:34');
    await maren.getByLabel('Clock error, minutes').fill('4');
    await maren.getByLabel('How the error is known').fill('compared with a phone');
    await maren.getByLabel('What it shows').fill('Door opened');
    await send(maren, maren.getByRole('button', { name: 'Enter the event' }));
    const row = maren.getByRole('row', { name: /Door opened/u });
    await row.waitFor();
    expect(await row.getByRole('rowheader').innerText()).toBe('10:30');
    expect(await row.innerText()).toContain('less 4 min');
  });
});

describe('the reviewer', () => {
  it('reads data before the opinion, in the report too', async () => {
    await open(odile, '/cases/118/report');
    const main = odile.locator('main');
    expect(await main.innerText()).toContain('left out until the reviewer asks');
    expect(await main.innerText()).not.toContain('is the probable ignition source');
    await open(odile, '/cases/118/hypotheses');
    expect(await main.innerText()).toContain('What the engine computed is data, and open');
  });

  it('signs, and the report of that version is frozen and can be taken away', async () => {
    await open(odile, '/cases/118/findings');
    const settle = odile.getByRole('button', { name: /settle/iu }).first();
    if (await settle.isVisible()) await send(odile, settle);
    await send(odile, odile.getByRole('button', { name: 'Show the opinion' }));
    for (const box of await odile.getByRole('checkbox', { name: /^read/u }).all()) await box.check();
    await send(odile, odile.getByRole('button', { name: 'Sign this version' }));
    await open(odile, '/cases/118/report');
    await odile.getByText('kept as it was when signed').waitFor();
    const take = async () => {
      const [download] = await Promise.all([odile.waitForEvent('download'), odile.getByRole('link', { name: 'Take it away as PDF' }).click()]);
      return readFile(await download.path());
    };
    const first = await take();
    expect(first.subarray(0, 5).toString()).toBe('%PDF-');
    expect(first.toString('latin1')).toContain('/StructTreeRoot');
    expect((await take()).equals(first)).toBe(true);
  });
});
