import type { Locator, Page } from 'playwright-core';
import { afterAll, beforeAll } from 'vitest';
import { signedIn } from './sign-in.ts';
import { openStage } from './stage.ts';
import type { Stage } from './stage.ts';

/** The page of one person, opened at an address. */
export type Cast = (key: string, path: string) => Promise<Page>;

/** The people of one story, each in a browser of their own that stays signed in. */
export function castOf(stage: () => Stage): Cast {
  const people = new Map<string, Page>();
  return async (key, path) => {
    const page = people.get(key) ?? (await signedIn(stage(), key));
    people.set(key, page);
    await page.goto(path);
    // Filling a field before the page has taken over its own markup can be undone by it.
    await page.waitForLoadState('networkidle');
    return page;
  };
}

/** The same, on a stage of their own that stands for the whole file. */
export function castOnStage(): Cast {
  let stage: Stage;
  beforeAll(async () => {
    stage = await openStage();
  });
  afterAll(async () => {
    await stage.close();
  });
  return castOf(() => stage);
}

/** Presses a button and waits until the server has answered the form. */
export async function send(page: Page, button: Locator): Promise<void> {
  await Promise.all([page.waitForResponse((response) => response.request().method() === 'POST'), button.click()]);
  await page.waitForLoadState('networkidle');
}
