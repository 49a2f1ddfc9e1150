import { afterEach, beforeEach, describe, expect, test, vi } from 'vitest';

const origin = 'https://scorchline.example';
type Listener = (event: Record<string, unknown>) => void;

/** Caches by name; addresses are compared as the browser does, from the origin. */
function fakeCaches() {
  const all = new Map<string, Map<string, Response>>();
  const full = (request: Request | string) => new URL(typeof request === 'string' ? request : request.url, origin).toString();
  const open = (name: string) => {
    const kept = all.get(name) ?? new Map<string, Response>();
    all.set(name, kept);
    return Promise.resolve({
      addAll: async (requests: readonly Request[]) => { for (const request of requests) kept.set(full(request), await fetch(request)); },
      put: (request: string, answer: Response) => Promise.resolve(void kept.set(full(request), answer)),
      match: (request: string) => Promise.resolve(kept.get(full(request))),
    });
  };
  return {
    all,
    caches: {
      open,
      keys: () => Promise.resolve([...all.keys()]),
      has: (name: string) => Promise.resolve(all.has(name)),
      delete: (name: string) => Promise.resolve(all.delete(name)),
      match: (request: string) => Promise.resolve([...all.values()].map((kept) => kept.get(full(request))).find(Boolean)),
    },
  };
}

const text = (body: string, status = 200) => new Response(body, { status });

async function start(build: string, store = fakeCaches()) {
  const listeners = new Map<string, Listener>();
  const net = vi.fn((request: Request | string): Promise<Response> => Promise.resolve(text(`net ${typeof request === 'string' ? request : new URL(request.url).pathname}`)));
  vi.stubGlobal('self', { addEventListener: (name: string, listener: Listener) => listeners.set(name, listener), skipWaiting: () => Promise.resolve(), clients: { claim: () => Promise.resolve() } });
  vi.stubGlobal('caches', store.caches);
  vi.stubGlobal('fetch', net);
  vi.stubGlobal('location', { origin, href: `${origin}/service-worker.js` });
  vi.stubGlobal('precacheList', ['/assets/report-1.js', '/favicon.svg']);
  vi.stubGlobal('buildName', build);
  vi.resetModules();
  await import('#app/service-worker.ts');
  const lasting = async (name: string) => {
    let work: unknown;
    listeners.get(name)?.({ waitUntil: (promise: unknown) => { work = promise; } });
    await work;
  };
  /** The worker's answer, or null when it leaves the request to the browser. */
  const ask = async (address: string, { mode = 'cors', method = 'GET' } = {}): Promise<string | null> => {
    let answer: Promise<Response> | null = null;
    listeners.get('fetch')?.({ request: { url: new URL(address, origin).toString(), mode, method }, respondWith: (given: Promise<Response>) => { answer = given; } });
    return answer === null ? null : (await (answer as Promise<Response>)).clone().text();
  };
  return { store, net, ask, install: () => lasting('install'), activate: () => lasting('activate') };
}

beforeEach(() => vi.useRealTimers());
afterEach(() => void vi.unstubAllGlobals());

describe('what is kept', () => {
  test('the files of the build, and the report page as nobody', async () => {
    const { net, store, install } = await start('2026-05-09-a');
    await install();
    expect([...(store.all.get('scorchline-2026-05-09-a')?.keys() ?? [])]).toEqual([`${origin}/assets/report-1.js`, `${origin}/favicon.svg`, `${origin}/report?shell`]);
    expect(net).toHaveBeenCalledWith('/report?shell', { credentials: 'omit', cache: 'no-store' });
  });

  test('nothing, when the page does not come: the worker before stays', async () => {
    const { net, install } = await start('2026-05-09-a');
    net.mockImplementation((request) => Promise.resolve(request === '/report?shell' ? text('down', 503) : text('file')));
    await expect(install()).rejects.toThrow('503');
  });

  test('this build and the one before it, for pages that are still open', async () => {
    const store = fakeCaches();
    for (const build of ['2026-05-01-x', '2026-05-05-y', '2026-05-09-z']) {
      const { install, activate } = await start(build, store);
      await install();
      await activate();
    }
    expect([...store.all.keys()]).toEqual(['scorchline-2026-05-05-y', 'scorchline-2026-05-09-z']);
  });

  test('a file of the build before is found when the team has only the new ones', async () => {
    const store = fakeCaches();
    await (await store.caches.open('scorchline-2026-05-01-x')).put('/assets/old-7.js', text('old file'));
    const { ask, install, net } = await start('2026-05-09-z', store);
    await install();
    net.mockImplementation(() => Promise.resolve(text('gone', 404)));
    expect(await ask('/assets/old-7.js')).toBe('old file');
    expect(await ask('/assets/report-1.js')).toBe('net /assets/report-1.js');
  });
});

describe('a look at the report page', () => {
  const navigate = { mode: 'navigate' };

  test('comes from the team while the team answers, refusals included', async () => {
    const { ask, install, net } = await start('a');
    await install();
    expect(await ask('/report?at=roof', navigate)).toBe('net /report');
    net.mockImplementation(() => Promise.resolve(text('This link is closed', 404)));
    expect(await ask('/report?at=roof', navigate)).toBe('This link is closed');
  });

  test.each([
    ['the connection is gone', () => Promise.reject(new TypeError('Failed to fetch'))],
    ['a gateway answers for a server that is away', () => Promise.resolve(text('Bad gateway', 502))],
  ])('comes from the device when %s', async (_what, answer) => {
    const { ask, install, net } = await start('a');
    await install();
    net.mockImplementation(answer);
    expect(await ask('/report?at=roof&report=1', navigate)).toBe('net /report?shell');
  });

  test('comes from the device when the team takes longer than six seconds', async () => {
    const { ask, install, net } = await start('a');
    await install();
    vi.useFakeTimers();
    net.mockImplementation(() => new Promise(() => undefined));
    const answer = ask('/report', navigate);
    await vi.advanceTimersByTimeAsync(6_001);
    expect(await answer).toBe('net /report?shell');
  });
});

describe('the measurements of a case that were taken along', () => {
  const navigate = { mode: 'navigate' };
  const path = '/cases/129/measurements';

  test('come from the team while it answers, else from the device, of that case only', async () => {
    const { ask, store, net } = await start('a');
    await (await store.caches.open(`taken-along ${path}`)).put(path, text('the copy'));
    expect(await ask(path, navigate)).toBe(`net ${path}`);
    net.mockImplementation(() => Promise.reject(new TypeError('Failed to fetch')));
    expect(await ask(`${path}?saved=1`, navigate)).toBe('the copy');
    // An error as of the network: the browser says in its own words that there is no connection.
    expect(await ask('/cases/118/measurements', navigate)).toBe('');
  });

  test('stay when a new build comes', async () => {
    const { store, install, activate } = await start('b');
    await (await store.caches.open(`taken-along ${path}`)).put(path, text('the copy'));
    await install();
    await activate();
    expect([...store.all.keys()]).toContain(`taken-along ${path}`);
  });
});

test.each([
  ['another page', '/cases', { mode: 'navigate' }],
  ['the data of a page', '/cases/118.data', {}],
  ['a photo', '/photos/1/view', {}],
  ['what is sent', '/report/1/words', { method: 'POST' }],
  ['another site', 'https://elsewhere.example/assets/report-1.js', {}],
  ['the page with nobody in it, asked for by name', '/report?shell', { mode: 'navigate' }],
])('%s is left to the browser', async (_what, address, how) => {
  const { ask, install } = await start('a');
  await install();
  expect(await ask(address, how)).toBeNull();
});
