import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { axeViolations, firstCaseFile } from './support/axe.ts';
import { signedIn } from './support/sign-in.ts';
import { openStage } from './support/stage.ts';
import type { Stage } from './support/stage.ts';

/** The pages that are laid out anew at a desk, in the light; all others are as at a phone. */
let stage: Stage;
beforeAll(async () => {
  stage = await openStage();
});
afterAll(async () => {
  await stage.close();
});

const pages: Readonly<Record<string, readonly string[]>> = {
  maren: ['/cases', '/cases/127/triage', '/cases/129/scene', '/cases/122/reconstructions/1', '/actions'],
  joss: ['/cases/101/releases/1'],
  lena: [firstCaseFile],
  bram: ['/people'],
};

describe('axe finds nothing at a desk', () => {
  it('on the pages open to everybody', async () => {
    expect(await axeViolations(await stage.visit({ colorScheme: 'light' }), ['/', '/sign-in', '/report?at=kestwick-roof-7q4m'])).toEqual([]);
  });
  it.each(Object.entries(pages))('on the pages of %s', async (key, paths) => {
    const page = await signedIn(stage, key);
    if (key === 'lena') await page.goto('/case-files');
    expect(await axeViolations(page, paths)).toEqual([]);
  });
});

describe('at 320 px', () => {
  it('no page scrolls sideways', async () => {
    const page = await signedIn(stage, 'maren', 'smallPhone');
    const wide: string[] = [];
    for (const path of ['/', '/report', '/cases', '/cases/122', '/cases/127/triage', '/cases/129/measurements', '/cases/129/scene', '/cases/129/weather', '/cases/122/reconstructions/1', '/cases/118/evidence', '/cases/118/timeline', '/cases/118/report', '/cases/122/findings', '/cases/122/actions', '/actions', '/sites']) {
      await page.goto(path);
      const widths = await page.evaluate(() => [document.documentElement.scrollWidth, window.innerWidth]);
      if ((widths[0] ?? 0) > (widths[1] ?? 0)) wide.push(`${path}: ${widths[0]}`);
    }
    expect(wide).toEqual([]);
  });
});
