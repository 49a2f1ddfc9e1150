import postgres from 'postgres';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { demoPhotoPath, fillRooftopReport, openReport } from './support/report-form.ts';
import { signedIn } from './support/sign-in.ts';
import { openStage } from './support/stage.ts';
import type { Stage } from './support/stage.ts';

/** What was acknowledged is stored, and nothing is stored twice, when the web server dies in the middle. */
let stage: Stage;
let sql: postgres.Sql;

beforeAll(async () => {
  stage = await openStage();
  sql = postgres(stage.databaseUrl, { max: 1 });
});
afterAll(async () => {
  await sql.end();
  await stage.close();
});

const casesWith = async (words: string) => (await sql<{ number: number; photos: number }[]>`
  select c.number, (select count(*)::int from photos p where p.case_id = c.id) as photos from cases c where c.narrative = ${words}`);

describe('a web server that dies while a report is sent', () => {
  it('before the answer: the report is sent again by itself and makes one case', async () => {
    const words = 'Sent while the server was down.';
    const page = await signedIn(stage, 'tomas', 'phone');
    await openReport(page);
    await fillRooftopReport(page, words);
    await stage.web.kill();
    await page.getByRole('button', { name: 'Send', exact: true }).last().click();
    await expect.poll(() => page.getByText(/No signal/u).count(), { timeout: 20_000 }).toBeGreaterThan(0);
    expect(await casesWith(words)).toHaveLength(0);
    await stage.web.start();
    await page.getByRole('button', { name: 'Try now' }).click({ timeout: 30_000 }).catch(() => undefined);
    await page.getByRole('heading', { name: 'Received. Thank you' }).waitFor({ timeout: 60_000 });
    expect(await casesWith(words)).toHaveLength(1);
  });

  it('after the report was stored and before the answer arrived: the retry finds the first case, photos and all', async () => {
    const words = 'The answer was lost on the way.';
    const page = await signedIn(stage, 'tomas', 'phone');
    await openReport(page);
    await page.getByLabel('Photo files').setInputFiles([demoPhotoPath('03-1')]);
    await fillRooftopReport(page, words);
    await expect.poll(() => page.getByText('with the team').count()).toBe(1);
    // The request reaches the server and is carried out; its answer is thrown away and the server killed.
    await page.route(/\/report(?:\.data)?\?/u, async (route) => {
      if (route.request().method() !== 'POST') return route.fallback();
      await route.fetch({ maxRedirects: 0 });
      await stage.web.kill();
      await route.abort();
    });
    await page.getByRole('button', { name: 'Send', exact: true }).last().click();
    await expect.poll(() => casesWith(words), { timeout: 30_000 }).toHaveLength(1);
    await page.unroute(/\/report(?:\.data)?\?/u);
    await stage.web.start();
    await page.getByRole('button', { name: 'Try now' }).click({ timeout: 30_000 }).catch(() => undefined);
    await page.getByRole('heading', { name: 'Received. Thank you' }).waitFor({ timeout: 60_000 });
    expect(await casesWith(words)).toEqual([{ number: expect.any(Number), photos: 1 }]);
  });
});
