import { AxeBuilder } from '@axe-core/playwright';
import type { Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { signedIn } from './support/sign-in.ts';
import { openStage } from './support/stage.ts';
import type { Stage } from './support/stage.ts';

/** No axe violation on any page, for the person who uses it, at a phone in the dark and at a desk in the light. */
let stage: Stage;
beforeAll(async () => {
  stage = await openStage();
});
afterAll(async () => {
  await stage.close();
});

const pages: Readonly<Record<string, readonly string[]>> = {
  tomas: ['/report', '/cases', '/cases/127'],
  maren: [
    '/cases', '/cases/map', '/cases/122', '/cases/127/triage', '/cases/129/measurements', '/cases/122/photos', '/cases/122/reconstructions', '/cases/122/reconstructions/1',
    '/cases/129/hypotheses', '/cases/129/findings', '/cases/122/actions', '/cases/122/log', '/cases/101/releases', '/actions', '/sites', '/sites/KESTWICK-C', '/case-files',
  ],
  odile: ['/cases/118/findings', '/log'],
  joss: ['/cases/122', '/cases/101/releases/1'],
  lena: ['/case-files', 'the first case file'],
  bram: ['/people', '/account', '/log'],
};
const open = ['/', '/sign-in', '/forgotten-password', '/progress', '/how-we-compute', '/report?at=kestwick-roof-7q4m', '/nothing-here'];

const tags = ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa'];

async function violations(page: Page, path: string): Promise<string[]> {
  if (path === 'the first case file') await page.locator('a[href^="/case-files/"]').first().click();
  else await page.goto(path);
  await page.waitForLoadState('networkidle');
  const { violations: found } = await new AxeBuilder({ page }).withTags(tags).analyze();
  return found.map((violation) => `${path}: ${violation.id}: ${violation.nodes.map((node) => node.target.join(' ')).slice(0, 3).join('; ')}`);
}

describe('axe finds nothing', () => {
  for (const [size, colorScheme] of [['phone', 'dark'], ['desk', 'light']] as const) {
    it(`on the pages open to everybody, ${size}`, async () => {
      const page = await stage.visit({ size, colorScheme });
      const found: string[] = [];
      for (const path of open) found.push(...(await violations(page, path)));
      expect(found).toEqual([]);
    });
    for (const [key, paths] of Object.entries(pages)) {
      it(`on the pages of ${key}, ${size}`, async () => {
        const page = await signedIn(stage, key, size);
        await page.emulateMedia({ colorScheme });
        const found: string[] = [];
        for (const path of paths) found.push(...(await violations(page, path)));
        expect(found).toEqual([]);
      });
    }
  }
});

describe('at 320 px', () => {
  it('no page scrolls sideways', async () => {
    const page = await signedIn(stage, 'maren', 'smallPhone');
    const wide: string[] = [];
    for (const path of ['/', '/report', '/cases', '/cases/122', '/cases/127/triage', '/cases/122/reconstructions/1', '/cases/122/findings', '/cases/122/actions', '/actions', '/sites']) {
      await page.goto(path);
      const widths = await page.evaluate(() => [document.documentElement.scrollWidth, window.innerWidth]);
      if ((widths[0] ?? 0) > (widths[1] ?? 0)) wide.push(`${path}: ${widths[0]}`);
    }
    expect(wide).toEqual([]);
  });
});
