import { AxeBuilder } from '@axe-core/playwright';
import type { Page } from 'playwright-core';

const tags = ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa'];

/** A release has an address of its own; its reader comes to it by the list. */
export const firstCaseFile = 'the first case file';

/** Opens each page in turn. @returns What axe finds against WCAG 2.2 A and AA, a line each. */
export async function axeViolations(page: Page, paths: readonly string[]): Promise<string[]> {
  const found: string[] = [];
  for (const path of paths) {
    if (path === firstCaseFile) await page.locator('a[href^="/case-files/"]').first().click();
    else await page.goto(path);
    await page.waitForLoadState('networkidle');
    // No page of ours has a frame, for which axe would otherwise open a page more.
    const { violations } = await new AxeBuilder({ page }).setLegacyMode(true).options({ resultTypes: ['violations'] }).withTags(tags).analyze();
    found.push(...violations.map((violation) => `${path}: ${violation.id}: ${violation.nodes.map((node) => node.target.join(' ')).slice(0, 3).join('; ')}`));
  }
  return found;
}
