import { existsSync } from 'node:fs';
import { chromium } from 'playwright-core';
import type { Browser, BrowserContext, BrowserContextOptions, Page } from 'playwright-core';

/** What a page did that it never should; a test asserts that the list is empty. */
export interface PageWatch {
  readonly faults: readonly string[];
}

export const viewports = {
  phone: { width: 390, height: 844 },
  smallPhone: { width: 320, height: 640 },
  desk: { width: 1440, height: 900 },
} as const;

/**
 * Debian's Chromium. As root it cannot use its sandbox, and in a container it has little shared memory. Names outside this
 * machine lead nowhere: intercepting requests would do the same, but without the browser's cache every page takes twice as long.
 */
export function launchBrowser(): Promise<Browser> {
  const path = process.env.TEST_CHROMIUM ?? ['/usr/bin/chromium-headless-shell', '/usr/bin/chromium', '/usr/bin/chromium-browser'].find((candidate) => existsSync(candidate));
  if (path === undefined) throw new Error('Chromium is missing: run npm test, which installs it, or apt-get install chromium-headless-shell.');
  return chromium.launch({
    executablePath: path,
    args: ['--no-sandbox', '--disable-dev-shm-usage', '--disable-gpu', '--disable-background-networking', '--font-render-hinting=none', '--host-resolver-rules=MAP * ~NOTFOUND, EXCLUDE 127.0.0.1, EXCLUDE localhost'],
  });
}

export interface OpenPageOptions extends BrowserContextOptions {
  readonly size?: keyof typeof viewports;
}

/**
 * A page in a context of its own, as a new visitor. Requests to anything but this machine are noted, since the
 * product fetches nothing from outside; so are errors on the page.
 */
export async function openPage(
  browser: Browser,
  { size = 'desk', ...options }: OpenPageOptions = {},
): Promise<{ context: BrowserContext; page: Page; watch: PageWatch }> {
  const context = await browser.newContext({
    viewport: viewports[size],
    hasTouch: size !== 'desk',
    locale: 'en-GB',
    timezoneId: 'Europe/Berlin',
    reducedMotion: 'reduce',
    serviceWorkers: 'block',
    ...options,
  });
  context.setDefaultTimeout(45_000);
  const faults: string[] = [];
  context.on('request', (request) => {
    if (!isOwn(new URL(request.url()))) faults.push(`request to outside: ${request.url()}`);
  });
  const page = await context.newPage();
  page.on('pageerror', (error) => faults.push(`error on ${page.url()}: ${error.message}`));
  page.on('console', (message) => {
    // The browser itself reports every answer above 399 here; statuses are asserted where they matter.
    if (message.type() !== 'error' || message.text().startsWith('Failed to load resource')) return;
    faults.push(`console on ${page.url()}: ${message.text()}`);
  });
  return { context, page, watch: { faults } };
}

function isOwn(url: URL): boolean {
  return ['127.0.0.1', 'localhost'].includes(url.hostname) || ['data:', 'blob:', 'about:'].includes(url.protocol);
}
