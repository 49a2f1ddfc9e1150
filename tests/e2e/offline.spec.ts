import type { BrowserContext, Page } from 'playwright-core';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { demoEmail, demoPassword, demoPeople } from '#fixtures/demo/people.ts';
import { chooseAnswers, demoPhotoPath, goOn, guestReport, sendReport as send } from './support/report-form.ts';
import { signedIn } from './support/sign-in.ts';
import { openStage } from './support/stage.ts';
import type { Stage } from './support/stage.ts';

/** The report page from a cold start, with the server gone: nothing but what the device keeps is there. */
let stage: Stage;
beforeAll(async () => {
  stage = await openStage();
});
afterAll(async () => {
  await stage.close();
});

const casesWith = async (words: string) => (await stage.sql<{ photos: number; reporter: string | null }[]>`
  select (select count(*)::int from photos p where p.case_id = c.id) as photos, (select email from users u where u.id = c.reporter_id) as reporter from cases c where c.narrative = ${words}`);

const newPage = async (context: BrowserContext, address: string): Promise<Page> => {
  const page = await context.newPage();
  await page.goto(new URL(address, stage.baseUrl).toString());
  return page;
};

/** One visit with signal: the worker has taken the page over, and everything that it needs is kept. */
async function prepared(page: Page): Promise<void> {
  await page.evaluate(async () => {
    await navigator.serviceWorker.ready;
    if (!navigator.serviceWorker.controller) await new Promise((resolve) => { navigator.serviceWorker.addEventListener('controllerchange', resolve, { once: true }); });
  });
}

async function answer(page: Page, words: string): Promise<void> {
  await goOn(page);
  await page.getByLabel('In your words').fill(words);
  await chooseAnswers(page);
}

test('by the link of a site: opens, keeps words and photo through a flat battery, and is filed once when the server is back', async () => {
  const words = 'Written with no signal at all.';
  const first = await stage.visit({ size: 'phone', serviceWorkers: 'allow' });
  const context = first.context();
  await first.goto(guestReport);
  await prepared(first);
  await first.close();
  await stage.web.kill();

  const cold = await newPage(context, guestReport);
  await cold.getByText('Kestwick Court Block C').first().waitFor();
  await answer(cold, words);
  await cold.getByLabel('Photo files').setInputFiles([demoPhotoPath('03-1'), demoPhotoPath('07-2')]);
  await cold.getByText('2, on this phone').waitFor();
  expect(await cold.evaluate(() => document.fonts.check('16px "Noto Sans"'))).toBe(true);
  // The drawings of the optics are part of the page; the base map comes from the device.
  await cold.getByText('Show it on a map or plan, or type the position').click();
  await cold.locator('.leaflet-container').waitFor();
  await send(cold);
  await cold.getByText(/It goes by itself when signal returns, once only/u).waitFor();
  await cold.close();

  const again = await newPage(context, guestReport);
  await again.getByRole('heading', { name: 'Waiting to be sent: 1' }).waitFor();
  await again.close();
  expect(await casesWith(words)).toEqual([]);
  await stage.web.start();
  const back = await newPage(context, guestReport);
  await expect.poll(() => casesWith(words)).toEqual([{ photos: 2, reporter: null }]);
  await back.getByText(/Sent, receipt/u).waitFor();
  await back.reload();
  expect(await casesWith(words)).toHaveLength(1);
  await context.close();
});

test('with the page closed: the browser wakes the worker, and the report goes', async () => {
  const words = 'Sent with no page open.';
  const page = await stage.visit({ size: 'phone', serviceWorkers: 'allow' });
  const context = page.context();
  const registered = new Promise<string>((resolve) => {
    void context.newCDPSession(page).then(async (session) => {
      session.on('ServiceWorker.workerRegistrationUpdated', ({ registrations }) => { if (registrations[0]) resolve(registrations[0].registrationId); });
      await session.send('ServiceWorker.enable');
    });
  });
  await page.goto(guestReport);
  await prepared(page);
  await answer(page, words);
  await stage.web.kill();
  await send(page);
  await page.getByText(/It goes by itself when signal returns, once only/u).waitFor();
  const registrationId = await registered;
  await page.close();
  await stage.web.start();
  // What the browser itself does once it has a connection again.
  const elsewhere = await newPage(context, '/healthz');
  const session = await context.newCDPSession(elsewhere);
  await session.send('ServiceWorker.enable');
  await session.send('ServiceWorker.dispatchSyncEvent', { origin: stage.baseUrl, registrationId, tag: 'send-reports', lastChance: false });
  await expect.poll(() => casesWith(words)).toEqual([{ photos: 0, reporter: null }]);
  await context.close();
});

test('keeps no page of anybody, and forgets the sites of a person who signed out', async () => {
  const page = await signedIn(stage, 'tomas', 'phone', { serviceWorkers: 'allow' });
  await page.goto('/report');
  await prepared(page);
  await page.goto('/cases');
  const kept = await page.evaluate(async () => {
    const found: { address: string; text: string }[] = [];
    for (const name of await caches.keys()) {
      const cache = await caches.open(name);
      for (const request of await cache.keys()) found.push({ address: new URL(request.url).pathname, text: request.url.includes('/assets/') ? '' : ((await (await cache.match(request))?.text()) ?? '') });
    }
    return found;
  });
  expect(kept.filter(({ address }) => !/^\/(?:assets\/|report$|favicon\.svg|manifest\.webmanifest|icon-)/u.test(address))).toEqual([]);
  expect(kept.filter(({ text }) => /Tomas|Kestwick|tallowmere/iu.test(text))).toEqual([]);
  const viewsKept = () => page.evaluate(async () => {
    const db = await new Promise<IDBDatabase>((resolve) => { const request = indexedDB.open('scorchline'); request.onsuccess = () => resolve(request.result); });
    const count = await new Promise<number>((resolve) => { const request = db.transaction('views').objectStore('views').count(); request.onsuccess = () => resolve(request.result); });
    db.close();
    return count;
  });
  expect(await viewsKept()).toBe(1);
  await page.context().clearCookies();
  await page.goto('/sign-in');
  await expect.poll(viewsKept).toBe(0);
  await page.context().close();
});

test('a session that ended meanwhile: the report stays, asks to sign in, and then goes as its writer', async () => {
  const words = 'The session had ended.';
  const writer = demoPeople.find(({ key }) => key === 'tomas');
  if (!writer) throw new Error('Nobody in the demonstration is called tomas.');
  const page = await signedIn(stage, 'tomas', 'phone', { serviceWorkers: 'allow' });
  await page.goto('/report');
  await prepared(page);
  await stage.web.kill();
  await page.reload();
  await answer(page, words);
  await page.getByRole('combobox', { name: 'Site' }).selectOption({ label: 'Kestwick Court Block C (KESTWICK-C)' });
  await page.getByLabel('Photo files').setInputFiles([demoPhotoPath('03-1')]);
  await page.getByText('1, on this phone').waitFor();
  await page.context().clearCookies();
  await stage.web.start();
  await send(page);
  await page.getByText('You are signed out. The report is kept on this device').waitFor();
  expect(await casesWith(words)).toEqual([]);
  await page.getByRole('link', { name: 'Sign in and send it' }).click();
  await page.getByLabel('Work e-mail').fill(demoEmail(writer));
  await page.getByLabel('Password').fill(demoPassword);
  await page.getByRole('button', { name: 'Sign in' }).click();
  await page.getByRole('heading', { name: 'Received. Thank you' }).waitFor();
  expect(await casesWith(words)).toEqual([{ photos: 1, reporter: demoEmail(writer) }]);
  await page.context().close();
});

test('the measurements of a case, taken along, open without the server, keep what is typed and are saved once it is back', async () => {
  const page = await signedIn(stage, 'maren', 'phone', { serviceWorkers: 'allow' });
  const context = page.context();
  const path = '/cases/129/measurements';
  await page.goto(path);
  await page.getByRole('button', { name: 'Take this page along' }).click();
  await page.getByText(/^On this device since/u).waitFor();
  await prepared(page);
  await page.close();
  await stage.web.kill();

  const roof = await newPage(context, '/report');
  await roof.getByRole('link', { name: 'Measurements of case 129' }).click();
  await roof.getByText(/^The copy on this device, of/u).waitFor();
  await roof.getByLabel('Width of the mark, value').fill('23');
  await roof.getByLabel('Width of the mark, method').selectOption({ label: 'Measured' });
  await roof.getByLabel('What was measured or changed, and by whom').fill('Tape, by hand on the roof.');
  await roof.getByRole('button', { name: /^Save as version/u }).click();
  await roof.getByText(/No signal\. Save again when it is back/u).waitFor();
  await roof.close();

  await stage.web.start();
  const back = await newPage(context, path);
  await expect.poll(() => back.getByLabel('Width of the mark, value').inputValue()).toBe('23');
  await back.getByRole('button', { name: /^Save as version/u }).click();
  await expect.poll(async () => (await stage.sql<{ note: string }[]>`
    select v.note from scenes v join cases c on c.id = v.case_id where c.number = 129 order by v.version desc limit 1`)[0]?.note).toBe('Tape, by hand on the roof.');
  await context.clearCookies();
  await back.goto(new URL('/sign-in', stage.baseUrl).toString());
  await expect.poll(() => back.evaluate(() => caches.keys().then((names) => names.filter((name) => name.startsWith('taken-along')).length))).toBe(0);
  await context.close();
});
