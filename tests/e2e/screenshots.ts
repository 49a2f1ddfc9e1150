import { mkdir } from 'node:fs/promises';
import path from 'node:path';
import { fileURLToPath } from 'node:url';
import { launchBrowser, viewports } from '#tests/support/browser.ts';
import { demoEmail, demoPassword, demoPeople } from '#fixtures/demo/people.ts';

/**
 * Takes the pictures of the README from a running application with the demonstration in it.
 * Run `npm start` first; another address goes into the first argument.
 */
const baseURL = process.argv[2] ?? 'http://localhost:3000';
const folder = fileURLToPath(new URL('../../fixtures/screenshots', import.meta.url));

const pictures: readonly { readonly name: string; readonly who: string; readonly size: keyof typeof viewports; readonly open: string; readonly follow?: RegExp }[] = [
  { name: 'register-desk', who: 'maren', size: 'desk', open: '/cases' },
  { name: 'case-desk', who: 'maren', size: 'desk', open: '/cases/118' },
  { name: 'reconstruction-desk', who: 'maren', size: 'desk', open: '/cases/118/reconstructions/1' },
  { name: 'actions-desk', who: 'joss', size: 'desk', open: '/actions' },
  { name: 'case-file-desk', who: 'lena', size: 'desk', open: '/case-files', follow: /101/u },
  { name: 'report-phone', who: 'tomas', size: 'phone', open: '/report' },
];

await mkdir(folder, { recursive: true });
const browser = await launchBrowser();
try {
  for (const picture of pictures) {
    const person = demoPeople.find((one) => one.key === picture.who);
    if (!person) throw new Error(`Nobody is called ${picture.who}.`);
    const context = await browser.newContext({ baseURL, viewport: viewports[picture.size], locale: 'en-GB' });
    const page = await context.newPage();
    await page.goto('/sign-in');
    await page.getByLabel('Work e-mail').fill(demoEmail(person));
    await page.getByLabel('Password').fill(demoPassword);
    await page.getByRole('button', { name: 'Sign in' }).click();
    await page.waitForURL((url) => url.pathname !== '/sign-in');
    await page.goto(picture.open);
    if (picture.follow) {
      await page.getByRole('link', { name: picture.follow }).first().click();
      await page.waitForURL(/case-files\/.+/u);
    }
    await page.waitForLoadState('networkidle');
    await page.screenshot({ path: path.join(folder, `${picture.name}.png`) });
    await context.close();
    console.info(`${picture.name}.png`);
  }
} finally {
  await browser.close();
}
