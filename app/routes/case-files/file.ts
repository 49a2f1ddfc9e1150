import type { Route } from './+types/file';
import { requireActor } from '#app/auth/middleware.server.ts';
import { isUuid } from '#app/domain/case-file-address.ts';
import { DomainError, notFound } from '#app/domain/errors.ts';
import { statusFor } from '#app/http/to-response.server.ts';
import { readReleaseFile } from '#app/services/releases/open-case-file.server.ts';

/** One file of a release, for those who may open it. The hash of the manifest is checked each time. */
export async function loader({ request, context, params }: Route.LoaderArgs): Promise<Response> {
  const actor = requireActor(context, request);
  try {
    if (!isUuid(params.releaseId)) throw notFound('The release');
    const { bytes, mime, fileName } = await readReleaseFile({ actor, releaseId: params.releaseId, fileName: params.fileName });
    const shown = mime.startsWith('image/') ? 'inline' : 'attachment';
    return new Response(new Uint8Array(bytes), {
      headers: {
        'Content-Type': mime,
        'Content-Length': String(bytes.byteLength),
        'Content-Disposition': `${shown}; filename="${fileName}"`,
        // A release can be withdrawn at any time; nothing of it stays in the browser.
        'Cache-Control': 'private, no-store',
        'X-Content-Type-Options': 'nosniff',
        'Cross-Origin-Resource-Policy': 'same-origin',
      },
    });
  } catch (error) {
    if (!(error instanceof DomainError)) throw error;
    return new Response(error.message, { status: statusFor(error), headers: { 'Content-Type': 'text/plain; charset=utf-8', 'Cache-Control': 'no-store' } });
  }
}
