import { listUnsent } from '#app/components/report/kept-reports.ts';
import { postFromWorker } from '#app/components/report/post-report.ts';
import { deliverAlone } from '#app/components/report/report-sender.ts';
import { takenPrefix, travelsAlong } from '#app/components/report/taken-pages.ts';

/** Put in when the script is bundled: what the report page needs, and a name that grows with every build. */
declare const precacheList: readonly string[];
declare const buildName: string;

/** The parts of a service worker's surroundings that are used here. */
interface LastingEvent extends Event {
  readonly waitUntil: (work: Promise<unknown>) => void;
}
interface FetchEvent extends LastingEvent {
  readonly request: Request;
  readonly respondWith: (answer: Promise<Response>) => void;
}
interface SyncEvent extends LastingEvent {
  readonly tag: string;
}
interface WorkerEvents {
  install: LastingEvent;
  activate: LastingEvent;
  fetch: FetchEvent;
  sync: SyncEvent;
}
interface Surroundings {
  readonly addEventListener: <Name extends keyof WorkerEvents>(name: Name, listener: (event: WorkerEvents[Name]) => void) => void;
  readonly skipWaiting: () => Promise<void>;
  readonly clients: { readonly claim: () => Promise<void> };
}
declare const self: Surroundings & typeof globalThis;

const cachePrefix = 'scorchline-';
const cacheName = `${cachePrefix}${buildName}`;
/** The report page with nobody's data in it. */
const shell = '/report?shell';
/** A page that has not come after this long is opened from the device: one bar of signal is often none. [ms] */
const patienceMs = 6_000;

/** Nothing but the files of the build and the empty page is kept by itself: a page that somebody's session gave only when that person takes it along. */
async function install(): Promise<void> {
  const cache = await caches.open(cacheName);
  await cache.addAll(precacheList.map((address) => new Request(new URL(address, location.href), { cache: 'no-cache' })));
  const page = await fetch(shell, { credentials: 'omit', cache: 'no-store' });
  if (!page.ok || page.redirected) throw new Error(`The report page answered ${page.status}.`);
  await cache.put(shell, page);
  await self.skipWaiting();
}

/** Pages that are open go on with the files of the build before; older ones go. */
async function activate(): Promise<void> {
  const ours = (await caches.keys()).filter((name) => name.startsWith(cachePrefix)).sort();
  for (const name of ours.slice(0, -2)) await caches.delete(name);
  await self.clients.claim();
}

/** The newest build's copy first. */
async function kept(address: string): Promise<Response | undefined> {
  const current = await (await caches.open(cacheName)).match(address);
  return current ?? caches.match(address);
}

/** The page from the team; when it does not come in time, the one on this device. */
async function pageOr(request: Request, onDevice: () => Promise<Response | undefined>): Promise<Response> {
  const late = new Promise<null>((resolve) => {
    setTimeout(() => resolve(null), patienceMs);
  });
  const fromTeam = fetch(request).then(
    // A gateway that answers for a server that is away is no answer.
    (answer) => (answer.status >= 502 ? null : answer),
    () => null,
  );
  const answer = (await Promise.race([fromTeam, late])) ?? (await onDevice());
  return answer ?? (await fromTeam) ?? Response.error();
}

/** A page that somebody took along; the address may carry more than the copy's. */
const takenPage = async (path: string): Promise<Response | undefined> =>
  (await caches.has(takenPrefix + path)) ? (await caches.open(takenPrefix + path)).match(path, { ignoreVary: true }) : undefined;

const keptFile = async (request: Request): Promise<Response> => (await kept(request.url)) ?? fetch(request);

function onFetch(event: FetchEvent): void {
  const { request } = event;
  const address = new URL(request.url);
  if (request.method !== 'GET' || address.origin !== location.origin) return;
  if (request.mode === 'navigate') {
    if (address.pathname === '/report' && !address.searchParams.has('shell')) event.respondWith(pageOr(request, () => kept(shell)));
    else if (travelsAlong(address.pathname)) event.respondWith(pageOr(request, () => takenPage(address.pathname)));
  } else if (precacheList.includes(address.pathname) || address.pathname.startsWith('/assets/')) {
    event.respondWith(keptFile(request));
  }
}

/** With no page open: everything on this device whose Send was pressed. The team's side refuses what is not this person's. */
async function sendWaiting(): Promise<void> {
  let stopped = false;
  for (const report of await listUnsent()) {
    if ((await deliverAlone(report.clientId, { post: postFromWorker })) === 'stopped') stopped = true;
  }
  // The browser asks again later, with growing pauses.
  if (stopped) throw new Error('Some reports still wait.');
}

self.addEventListener('install', (event) => event.waitUntil(install()));
self.addEventListener('activate', (event) => event.waitUntil(activate()));
self.addEventListener('fetch', onFetch);
self.addEventListener('sync', (event) => {
  if (event.tag === 'send-reports') event.waitUntil(sendWaiting());
});
