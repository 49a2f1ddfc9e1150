import { Readable } from 'node:stream';
import { pipeline } from 'node:stream/promises';
import { createReadableStreamFromReadable } from '@react-router/node';
import type { Request as ExpressRequest, RequestHandler, Response as ExpressResponse } from 'express';
import { createRequestHandler, RouterContextProvider } from 'react-router';
import type { ServerBuild } from 'react-router';
import { BodyMeter, tooLargeSentence } from './body-meter.server.ts';
import { clientAddressContext } from './client-address.ts';
import { nonceContext } from './nonce-context.ts';
import { nonceOf } from './security-headers.server.ts';

export interface PageHandlerOptions {
  readonly build: ServerBuild;
  readonly mode: 'development' | 'production' | 'test';
  /** Longest body that is read, in bytes, with or without a declared length. */
  readonly bodyLimitBytes: number;
}

/** How long the rest of a refused body is still read, so that the browser gets to see the answer. [ms] */
const drainMs = 10_000;

/**
 * Hands a request to the framework and its response to Express. The framework's own adapter is not used, because it
 * gives the body to the routes without counting it.
 */
export function pageHandler({ build, mode, bodyLimitBytes }: PageHandlerOptions): RequestHandler {
  const handle = createRequestHandler(build, mode);
  return async (request, response, next) => {
    if (Number(request.headers['content-length'] ?? 0) > bodyLimitBytes) {
      refuseBody(request, response, bodyLimitBytes);
      return;
    }
    const meter = new BodyMeter(bodyLimitBytes);
    try {
      const context = new RouterContextProvider();
      context.set(nonceContext, nonceOf(response));
      context.set(clientAddressContext, request.ip ?? 'unknown');
      const answer = await handle(webRequest(request, response, meter), context);
      // A route that turns the broken stream into an answer of its own does not know why it broke.
      if (meter.exceeded) refuseBody(request, response, bodyLimitBytes);
      else await send(answer, response);
    } catch (error) {
      if (meter.exceeded && !response.headersSent) refuseBody(request, response, bodyLimitBytes);
      else next(error);
    }
  };
}

function refuseBody(request: ExpressRequest, response: ExpressResponse, limitBytes: number): void {
  request.unpipe();
  request.resume();
  const timer = setTimeout(() => request.destroy(), drainMs);
  request.once('close', () => clearTimeout(timer));
  response.status(413).type('text/plain').send(tooLargeSentence(limitBytes));
}

function webRequest(request: ExpressRequest, response: ExpressResponse, meter: BodyMeter): Request {
  const headers = new Headers();
  for (const [name, values] of Object.entries(request.headersDistinct)) {
    for (const value of values ?? []) headers.append(name, value);
  }
  const aborter = new AbortController();
  response.once('close', () => {
    if (!response.writableFinished) aborter.abort();
  });
  const init: RequestInit & { duplex?: 'half' } = { method: request.method, headers, signal: aborter.signal };
  if (request.method !== 'GET' && request.method !== 'HEAD') {
    request.once('error', (error) => meter.destroy(error));
    init.body = createReadableStreamFromReadable(request.pipe(meter));
    init.duplex = 'half';
  }
  return new Request(new URL(request.originalUrl, `${request.protocol}://${hostOf(request)}`), init);
}

/** Host and port as the client typed them; Express takes them from the proxy's header only when a proxy is trusted. */
function hostOf(request: ExpressRequest): string {
  const host = request.host ?? 'localhost';
  return /^[\w.:[\]-]+$/.test(host) ? host : 'localhost';
}

async function send(answer: Response, response: ExpressResponse): Promise<void> {
  if (response.destroyed || response.writableEnded) {
    await answer.body?.cancel();
    return;
  }
  response.statusMessage = answer.statusText;
  response.status(answer.status);
  for (const [name, value] of answer.headers) response.append(name, value);
  // Pages hold what one person may see; going back to a half-filled form still works.
  if (!answer.headers.has('cache-control')) response.setHeader('Cache-Control', 'private, no-cache');
  if (answer.body === null) {
    response.end();
    return;
  }
  try {
    // A pipeline waits when the reader is slow; the framework's writer flushes the compressor after each piece and
    // leaves a listener behind every time.
    await pipeline(Readable.from(answer.body), response);
  } catch (error) {
    // The reader left before the end; there is nobody to tell.
    if (!response.destroyed) throw error;
  }
}
