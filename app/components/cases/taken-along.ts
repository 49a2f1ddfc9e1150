import { registerServiceWorker } from '#app/components/report/service-worker-registration.ts';
import { personMark } from '#app/components/report/forget-person.ts';
import { takenPrefix, travelsAlong } from '#app/components/report/taken-pages.ts';

const files = /\/assets\/[\w./-]+\.(?:js|css|woff2)/gu;
const madeAt = /data-made-at="([^"]+)"/u;
const store = (address: string) => `${takenPrefix}${address}`;

/** Whether this browser can keep a page. Not in development: nothing would open it. */
export const canTakeAlong = (): boolean => import.meta.env.PROD && 'caches' in window && 'serviceWorker' in navigator;

/**
 * Keeps a page of a case, with the scripts and styles that it names, for a place without a signal.
 *
 * @param address Path of the page, such as `/cases/129/measurements`.
 * @throws Error When the page does not come: nothing is kept then.
 */
export async function takeAlong(address: string): Promise<void> {
  if (!travelsAlong(address)) throw new Error(`${address} is no page to take along.`);
  registerServiceWorker();
  const page = await fetch(address, { cache: 'no-store' });
  if (!page.ok || page.redirected) throw new Error(`The page answered ${page.status}.`);
  const html = await page.clone().text();
  // Marked before anything is kept: whoever signs out on this device leaves nothing behind.
  localStorage.setItem(personMark, 'yes');
  await caches.delete(store(address));
  const cache = await caches.open(store(address));
  await cache.addAll([...new Set(html.match(files) ?? [])]);
  await cache.put(address, page);
}

/** When the copy on this device was made, ISO 8601; null without one. */
export async function takenAt(address: string): Promise<string | null> {
  if (!canTakeAlong() || !(await caches.has(store(address)))) return null;
  const page = await (await caches.open(store(address))).match(address, { ignoreVary: true });
  return page ? (madeAt.exec(await page.text())?.[1] ?? null) : null;
}

export const leaveBehind = (address: string): Promise<boolean> => caches.delete(store(address));

/** Whether the team can be reached now; the browser's own word counts a network without a way out as one. */
export async function teamAnswers(): Promise<boolean> {
  if (!navigator.onLine) return false;
  return fetch('/healthz', { cache: 'no-store', signal: AbortSignal.timeout(6_000) }).then(
    ({ ok }) => ok,
    () => false,
  );
}
