import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { axeViolations, firstCaseFile } from './support/axe.ts';
import { signedIn } from './support/sign-in.ts';
import { openStage } from './support/stage.ts';
import type { Stage } from './support/stage.ts';

/** Every page at a phone, in the dark, for the person who uses it. */
let stage: Stage;
beforeAll(async () => {
  stage = await openStage();
});
afterAll(async () => {
  await stage.close();
});

const open = ['/', '/sign-in', '/forgotten-password', '/progress', '/how-we-compute', '/report?at=kestwick-roof-7q4m', '/nothing-here'];
const pages: Readonly<Record<string, readonly string[]>> = {
  tomas: ['/report', '/cases', '/cases/127', '/account'],
  maren: [
    '/cases', '/cases/map', '/cases/122', '/cases/127/triage', '/cases/129/measurements', '/cases/129/measurements/sheet', '/cases/129/scene', '/cases/129/skyline', '/cases/129/weather',
    '/cases/122/photos', '/cases/122/reconstructions', '/cases/122/reconstructions/1', '/cases/118/evidence', '/cases/118/evidence/A', '/cases/118/witnesses', '/cases/118/timeline', '/cases/118/report',
    '/cases/129/hypotheses', '/cases/129/findings', '/cases/122/actions', '/cases/122/log', '/cases/101/releases', '/actions', '/sites', '/sites/KESTWICK-C', '/case-files',
  ],
  odile: ['/cases/118/findings', '/log'],
  joss: ['/cases/122', '/cases/101/releases/1'],
  lena: ['/case-files', firstCaseFile],
  bram: ['/people'],
};

describe('axe finds nothing at a phone', () => {
  it('on the pages open to everybody', async () => {
    expect(await axeViolations(await stage.visit({ size: 'phone', colorScheme: 'dark' }), open)).toEqual([]);
  });
  it.each(Object.entries(pages))('on the pages of %s', async (key, paths) => {
    const page = await signedIn(stage, key, 'phone');
    await page.emulateMedia({ colorScheme: 'dark' });
    expect(await axeViolations(page, paths)).toEqual([]);
  });
});
