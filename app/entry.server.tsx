import { PassThrough } from 'node:stream';
import { createReadableStreamFromReadable } from '@react-router/node';
import { isbot } from 'isbot';
import { renderToPipeableStream } from 'react-dom/server';
import { isRouteErrorResponse, ServerRouter } from 'react-router';
import type { EntryContext, HandleErrorFunction, RouterContextProvider } from 'react-router';
import { BodyTooLargeError } from '#app/http/body-meter.server.ts';
import { nonceContext } from '#app/http/nonce-context.ts';
import { log } from '#app/log.server.ts';

export const streamTimeout = 5_000;

/** Renders a page; the nonce reaches `Scripts`, `Links` and `ScrollRestoration` through `ServerRouter`. */
export default function handleRequest(
  request: Request,
  status: number,
  headers: Headers,
  routerContext: EntryContext,
  context: RouterContextProvider,
): Promise<Response> | Response {
  headers.set('Content-Type', 'text/html; charset=utf-8');
  if (request.method === 'HEAD') return new Response(null, { status, headers });
  const nonce = context.get(nonceContext);
  const waitForAll = isbot(request.headers.get('user-agent'));

  return new Promise((resolve, reject) => {
    let finalStatus = status;
    let shellSent = false;
    const answer = () => {
      shellSent = true;
      const body = new PassThrough({
        final(done) {
          clearTimeout(timer);
          done();
        },
      });
      pipe(body);
      resolve(new Response(createReadableStreamFromReadable(body), { status: finalStatus, headers }));
    };
    const { pipe, abort } = renderToPipeableStream(<ServerRouter context={routerContext} url={request.url} nonce={nonce} />, {
      nonce,
      onShellError: reject,
      onError(error: unknown) {
        finalStatus = 500;
        // Before the shell is out the failure rejects the promise and is logged there.
        if (shellSent) log.error({ err: error }, 'a part of a page could not be rendered');
      },
      ...(waitForAll ? { onAllReady: answer } : { onShellReady: answer }),
    });
    // Later than the framework's own limit, so that what timed out can still be shown as failed.
    const timer = setTimeout(abort, streamTimeout + 1_000);
  });
}

/** Failures of loaders, actions and rendering. What a visitor's address or a closed tab caused is none of ours. */
export const handleError: HandleErrorFunction = (error, { request }) => {
  if (request.signal.aborted || error instanceof BodyTooLargeError) return;
  if (isRouteErrorResponse(error) && error.status < 500) return;
  log.error({ err: error, method: request.method, area: new URL(request.url).pathname.split('/')[1] }, 'a page failed');
};
