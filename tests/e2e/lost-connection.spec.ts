import type { Page, Route } from 'playwright-core';
import { afterAll, beforeAll, beforeEach, describe, expect, test } from 'vitest';
import { chooseAnswers, demoPhotoPath, goOn, guestReport, sendReport } from './support/report-form.ts';
import { openStage } from './support/stage.ts';
import type { Stage } from './support/stage.ts';

/** What was acknowledged is stored, and nothing is stored twice, wherever the connection or the server goes away. */
let stage: Stage;
let page: Page;
beforeAll(async () => {
  stage = await openStage();
});
afterAll(async () => {
  await stage.close();
});

const photos = [demoPhotoPath('03-1'), demoPhotoPath('07-2'), demoPhotoPath('08-1')];
const photosOf = async (words: string) => (await stage.sql<{ captions: string[] }[]>`
  select coalesce((select array_agg(p.caption order by p.label) from photos p where p.case_id = c.id), '{}') as captions from cases c where c.narrative = ${words}`).map(({ captions }) => captions);

beforeEach(async () => {
  page = await stage.visit({ size: 'phone' });
  await page.goto(guestReport);
  await goOn(page);
  await chooseAnswers(page);
  return () => page.context().close();
});

const write = (words: string) => page.getByLabel('In your words').fill(words);
const choose = (paths: readonly string[]) => page.getByLabel('Photo files').setInputFiles([...paths]);
const send = () => sendReport(page);
const received = () => page.getByRole('heading', { name: 'Received. Thank you' }).waitFor();
const waits = () => page.getByText(/It goes by itself when signal returns, once only/u).waitFor();

/** Carries out what a handler says with the nth request that matches, and lets all others through. */
async function withRequest(pattern: RegExp, nth: number, what: (route: Route) => Promise<void>): Promise<void> {
  let seen = 0;
  await page.route(pattern, async (route) => {
    if (route.request().method() !== 'POST') return route.fallback();
    seen += 1;
    return seen === nth ? what(route) : route.fallback();
  });
}
const photoPosts = /\/report\/[\w-]+\/photos/u;
const wordPosts = /\/report\/[\w-]+\/words/u;
const lostOnTheWay = (route: Route) => route.abort();
/** Carried out by the server; its answer never arrives. */
const answerLost = async (route: Route) => {
  await route.fetch();
  await route.abort();
};

describe('a connection that breaks', () => {
  test('before the sending', async () => {
    await write('Cut before it was sent.');
    await page.context().setOffline(true);
    await choose(photos.slice(0, 1));
    await page.getByText('1, on this phone').waitFor();
    await send();
    await waits();
    await page.context().setOffline(false);
    await received();
    expect(await photosOf('Cut before it was sent.')).toEqual([['']]);
  });

  test('between photos', async () => {
    await write('Cut between photos.');
    await withRequest(photoPosts, 2, lostOnTheWay);
    await choose(photos);
    await send();
    await received();
    expect((await photosOf('Cut between photos.'))[0]).toHaveLength(3);
  });

  test('by Send pressed at once, while a slow phone still reads the photos', async () => {
    await write('Sent in a hurry.');
    await page.evaluate(() => {
      const { arrayBuffer } = Blob.prototype;
      Blob.prototype.arrayBuffer = async function slow() {
        await new Promise((resolve) => { setTimeout(resolve, 600); });
        return arrayBuffer.call(this);
      };
    });
    await choose(photos);
    await send();
    await received();
    expect((await photosOf('Sent in a hurry.'))[0]).toHaveLength(3);
  });

  test('after a photo was stored, before its answer', async () => {
    await write('The answer about a photo was lost.');
    await withRequest(photoPosts, 1, answerLost);
    await choose(photos.slice(0, 2));
    await send();
    await received();
    expect((await photosOf('The answer about a photo was lost.'))[0]).toHaveLength(2);
  });

  test('after the report was stored, before its answer', async () => {
    await write('The answer about the words was lost.');
    await withRequest(wordPosts, 1, answerLost);
    await choose(photos.slice(0, 1));
    await send();
    await received();
    expect((await photosOf('The answer about the words was lost.')).map((one) => one.length)).toEqual([1]);
  });
});

describe('a server that dies', () => {
  test('before the words arrive', async () => {
    await write('The server was down.');
    await stage.web.kill();
    await send();
    await waits();
    await stage.web.start();
    await page.getByRole('button', { name: 'Try now' }).click();
    await received();
    expect(await photosOf('The server was down.')).toEqual([[]]);
  });

  test('after it stored the report, with the answer on its lips', async () => {
    await write('Stored, then down.');
    await choose(photos.slice(0, 1));
    await page.getByText('1, with the team').waitFor();
    await withRequest(wordPosts, 1, async (route) => {
      await route.fetch();
      await stage.web.kill();
      await route.abort();
    });
    await send();
    await waits();
    expect(await photosOf('Stored, then down.')).toEqual([['']]);
    await stage.web.start();
    await received();
    expect(await photosOf('Stored, then down.')).toEqual([['']]);
  });
});

test('photos that were not sent are there after a reload, in their order and with their words', async () => {
  await write('Reloaded without signal.');
  await page.route(photoPosts, lostOnTheWay);
  await choose(photos.slice(0, 2));
  await page.getByText('2, on this phone').waitFor();
  for (const number of [1, 2]) {
    await page.getByRole('button', { name: new RegExp(`^Photo ${number},`, 'u') }).click();
    await page.getByLabel('What does it show?').fill(`first ${number}`);
  }
  await page.getByRole('button', { name: 'Earlier' }).click();
  await page.reload();
  await page.getByText('2, on this phone').waitFor();
  await page.getByRole('button', { name: /^Photo 1,/u }).click();
  expect(await page.getByLabel('What does it show?').inputValue()).toBe('first 2');
  await page.unroute(photoPosts);
  await send();
  await received();
  expect(await photosOf('Reloaded without signal.')).toEqual([['first 2', 'first 1']]);
});
