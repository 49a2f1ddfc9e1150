import { createServer } from 'node:http';
import type { AddressInfo } from 'node:net';
import { fileURLToPath } from 'node:url';
import compression from 'compression';
import express from 'express';
import type { ErrorRequestHandler, Express } from 'express';
import * as build from 'virtual:react-router/server-build';
import { env } from '#app/env.server.ts';
import { pageHandler } from '#app/http/request-handler.server.ts';
import { securityHeaders } from '#app/http/security-headers.server.ts';
import { log } from '#app/log.server.ts';
import { closeDatabase } from '#db/client.server.ts';

/** A report takes several photographs at once; more are added on the next page. */
const photosPerRequest = 8;
const formFieldsBytes = 2_000_000;
const stopAfterMs = 8_000;

function createApp(): Express {
  const web = express();
  web.disable('x-powered-by');
  web.set('trust proxy', env.TRUST_PROXY);
  web.use(
    securityHeaders({
      photoOrigin: new URL(env.S3_ENDPOINT).origin,
      tileUrl: env.MAP_TILE_URL ?? null,
      https: env.PUBLIC_URL.startsWith('https:'),
      development: import.meta.env.DEV,
    }),
  );
  web.get('/healthz', (_request, response) => {
    response.type('text/plain').send('ok');
  });
  web.use(compression());
  if (import.meta.env.PROD) serveFiles(web);
  web.use(
    pageHandler({
      build,
      mode: import.meta.env.PROD ? 'production' : 'development',
      bodyLimitBytes: photosPerRequest * env.PHOTO_MAX_BYTES + formFieldsBytes,
    }),
  );
  web.use(answerFailure);
  return web;
}

/** File names under /assets contain a hash of the contents, so a browser need never ask for them again. */
function serveFiles(web: Express): void {
  const folder = fileURLToPath(new URL('../client', import.meta.url));
  const assets = express.static(`${folder}/assets`, { immutable: true, maxAge: '1y', fallthrough: false, index: false });
  web.use('/assets', assets);
  web.use(express.static(folder, { maxAge: '1h', index: false, setHeaders: neverStale }));
}

/** A service worker that is kept would keep an old version of the whole site. */
function neverStale(response: { setHeader: (name: string, value: string) => void }, path: string): void {
  if (path.endsWith('service-worker.js')) response.setHeader('Cache-Control', 'no-cache');
}

const answerFailure: ErrorRequestHandler = (error: unknown, request, response, next) => {
  if (response.headersSent) {
    next(error);
    return;
  }
  const status = statusOf(error);
  // The path can hold a secret (an invitation's token), so only its first part is logged.
  if (status >= 500) log.error({ err: error, method: request.method, area: request.path.split('/')[1] }, 'request failed');
  const sentence = status === 404 ? 'There is nothing at this address.' : 'Something went wrong on our side. What you sent may not be stored: go back and try again.';
  response.status(status).type('text/plain').send(sentence);
};

function statusOf(error: unknown): number {
  if (typeof error !== 'object' || error === null || !('status' in error)) return 500;
  return typeof error.status === 'number' && error.status >= 400 && error.status < 600 ? error.status : 500;
}

/** Listens until SIGTERM or SIGINT; then lets running requests finish and closes the database. */
function serve(): void {
  const server = createServer(app);
  server.once('error', (error) => {
    log.fatal({ err: error }, `the web server cannot listen on ${env.HOST}:${env.PORT}`);
    process.exit(1);
  });
  server.listen(env.PORT, env.HOST, () => {
    const address: AddressInfo | string | null = server.address();
    log.info({ address }, 'web server ready');
  });
  for (const signal of ['SIGTERM', 'SIGINT'] as const) {
    process.once(signal, () => {
      log.info({ signal }, 'web server stops');
      setTimeout(() => server.closeAllConnections(), stopAfterMs).unref();
      server.close(() => {
        void closeDatabase().finally(() => process.exit(0));
      });
      server.closeIdleConnections();
    });
  }
}

/** Express with everything in front of the pages. In development the module server comes before it. */
export const app: Express = createApp();

if (import.meta.env.PROD) serve();
