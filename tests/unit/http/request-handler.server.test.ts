import { once } from 'node:events';
import { createServer, request as httpRequest } from 'node:http';
import type { IncomingMessage, Server } from 'node:http';
import { text } from 'node:stream/consumers';
import express from 'express';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import type { ServerBuild } from 'react-router';
import { pageHandler } from '#app/http/request-handler.server.ts';
import { securityHeaders } from '#app/http/security-headers.server.ts';

const bodyLimitBytes = 1_000;

/** A site of two resource routes: one that repeats what it received, and one that answers any broken body with 200. */
const site = {
  entry: { module: { default: () => new Response('no pages here', { status: 500 }), handleError: () => undefined } },
  routes: {
    echo: {
      id: 'echo',
      path: 'echo',
      module: {
        loader: ({ request }: { request: Request }) => new Response(request.url),
        action: async ({ request }: { request: Request }) => new Response(String((await request.text()).length)),
      },
    },
    careless: {
      id: 'careless',
      path: 'careless',
      module: { action: ({ request }: { request: Request }) => request.text().then(() => new Response('stored'), () => new Response('stored')) },
    },
  },
  assets: { entry: { imports: [], module: '' }, routes: {}, url: '', version: '' },
  publicPath: '/',
  assetsBuildDirectory: '',
  future: { v8_middleware: true },
  ssr: true,
  isSpaMode: false,
  prerender: [],
  routeDiscovery: { mode: 'initial' },
};

// The framework's type wants a component of every route, which a resource route by definition has not.
const build = site as unknown as ServerBuild;

let server: Server;
let port = 0;

beforeAll(async () => {
  const app = express();
  app.use(securityHeaders({ photoOrigin: 'https://photos.example', tileUrl: null, https: true, development: false }));
  app.use(pageHandler({ build, mode: 'test', bodyLimitBytes }));
  server = createServer(app).listen(0, '127.0.0.1');
  await once(server, 'listening');
  const address = server.address();
  if (address !== null && typeof address === 'object') port = address.port;
});

afterAll(() => {
  server.close();
  server.closeAllConnections();
});

async function post(path: string, bytes: number, chunked: boolean): Promise<{ status: number; body: string }> {
  const outgoing = httpRequest({
    port,
    host: '127.0.0.1',
    path,
    method: 'POST',
    headers: { 'content-type': 'text/plain', ...(chunked ? { 'transfer-encoding': 'chunked' } : { 'content-length': String(bytes) }) },
  });
  for (let sent = 0; sent < bytes; sent += 100) outgoing.write('x'.repeat(Math.min(100, bytes - sent)));
  outgoing.end();
  const [response]: IncomingMessage[] = await once(outgoing, 'response');
  if (response === undefined) throw new Error('no answer');
  return { status: response.statusCode ?? 0, body: await text(response) };
}

describe('pageHandler', () => {
  test('gives the route the whole body up to the limit', async () => {
    expect(await post('/echo', bodyLimitBytes, true)).toEqual({ status: 200, body: '1000' });
  });

  test.each([
    ['a declared length', '/echo', false],
    ['no declared length', '/echo', true],
    ['no declared length, even when the route answers as if nothing had happened', '/careless', true],
  ])('answers 413 with a sentence to a longer body with %s', async (_what, path, chunked) => {
    const { status, body } = await post(path, 50_000, chunked);
    expect(status).toBe(413);
    expect(body).toMatch(/remove some photographs/);
  });

  test('tells caches on the way to keep nothing that a route has not opened to them', async () => {
    expect((await fetch(`http://127.0.0.1:${port}/echo`)).headers.get('cache-control')).toBe('private, no-cache');
  });

  test('keeps host and port as the client typed them', async () => {
    expect(await (await fetch(`http://127.0.0.1:${port}/echo?x=1`)).text()).toBe(`http://127.0.0.1:${port}/echo?x=1`);
  });
});

describe('securityHeaders', () => {
  test('each answer allows only its own scripts, by a nonce used once', async () => {
    const policies = await Promise.all([1, 2].map(async () => (await fetch(`http://127.0.0.1:${port}/echo`)).headers.get('content-security-policy') ?? ''));
    const nonces = policies.map((policy) => /script-src 'self' 'nonce-([^']+)'/.exec(policy)?.[1]);
    expect(nonces[0]).toBeTruthy();
    expect(nonces[0]).not.toBe(nonces[1]);
  });

  test('pictures come from the site and the photograph store, and nothing else comes from outside', async () => {
    const policy = (await fetch(`http://127.0.0.1:${port}/echo`)).headers.get('content-security-policy') ?? '';
    const outside = policy.split(';').flatMap((directive) => directive.match(/https?:\/\/\S+/g) ?? []);
    expect(outside).toEqual(['https://photos.example']);
    expect(policy).toContain("img-src 'self' data: blob: https://photos.example");
  });

  test('the referrer policy keeps the origin of form posts', async () => {
    const { headers } = await fetch(`http://127.0.0.1:${port}/echo`);
    expect(headers.get('referrer-policy')).toBe('strict-origin-when-cross-origin');
    expect(headers.get('strict-transport-security')).toContain('max-age=31536000');
  });
});
