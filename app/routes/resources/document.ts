import type { Route } from './+types/document';
import { requireActor } from '#app/auth/middleware.server.ts';
import { isUuid } from '#app/domain/case-file-address.ts';
import { DomainError, notFound } from '#app/domain/errors.ts';
import { statusFor } from '#app/http/to-response.server.ts';
import { readAttachment } from '#app/services/attachments/read-attachment.server.ts';

/** A document of a case, for whoever may read its class, after its hash was compared with that at intake. */
export async function loader({ request, context, params }: Route.LoaderArgs): Promise<Response> {
  const actor = requireActor(context, request);
  try {
    if (!isUuid(params.documentId)) throw notFound('The document');
    const { bytes, mime, fileName } = await readAttachment({ actor, attachmentId: params.documentId });
    return new Response(new Uint8Array(bytes), {
      headers: {
        'Content-Type': mime.startsWith('text/') ? `${mime}; charset=utf-8` : mime,
        'Content-Length': String(bytes.byteLength),
        'Content-Disposition': `attachment; filename="${fileName}"`,
        'Cache-Control': 'private, no-store',
        'X-Content-Type-Options': 'nosniff',
        'Content-Security-Policy': "default-src 'none'; sandbox",
        'Cross-Origin-Resource-Policy': 'same-origin',
      },
    });
  } catch (error) {
    if (!(error instanceof DomainError)) throw error;
    return new Response(error.message, { status: statusFor(error), headers: { 'Content-Type': 'text/plain; charset=utf-8', 'Cache-Control': 'no-store' } });
  }
}
