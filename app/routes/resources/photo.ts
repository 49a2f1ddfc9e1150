import type { Route } from './+types/photo';
import { actorContext } from '#app/auth/actor-context.ts';
import { DomainError, notFound } from '#app/domain/errors.ts';
import { clientIdSchema } from '#app/domain/report.ts';
import { statusFor } from '#app/http/to-response.server.ts';
import { photoRenditions, readPhoto } from '#app/services/photos/read-photo.server.ts';
import type { PhotoFile, PhotoRendition } from '#app/services/photos/read-photo.server.ts';

/** A photo or a copy of it, for those who may see it. The name that the file came with is never sent. */
export async function loader({ request, params, context }: Route.LoaderArgs): Promise<Response> {
  try {
    const rendition = photoRenditions.find((known) => known === params.rendition);
    const photoId = clientIdSchema.safeParse(params.photoId).data;
    if (!rendition || !photoId) throw notFound('The photo');
    const draftOf = clientIdSchema.safeParse(new URL(request.url).searchParams.get('report')).data ?? null;
    const file = await readPhoto({ actor: context.get(actorContext), photoId, rendition, draftOf });
    return file ? fileResponse(file, rendition) : sentence('This copy is being prepared. Try again in a few seconds.', 503, { 'Retry-After': '5' });
  } catch (error) {
    if (!(error instanceof DomainError)) throw error;
    return sentence(error.message, statusFor(error));
  }
}

function fileResponse({ bytes, mime, fileName }: PhotoFile, rendition: PhotoRendition): Response {
  const original = rendition === 'original';
  return new Response(new Uint8Array(bytes), {
    headers: {
      'Content-Type': mime,
      'Content-Length': String(bytes.byteLength),
      'Content-Disposition': `${original ? 'attachment' : 'inline'}; filename="${fileName}"`,
      // Copies never change under their address; an original is checked anew each time.
      'Cache-Control': original ? 'private, no-store' : 'private, max-age=3600',
      'X-Content-Type-Options': 'nosniff',
      'Cross-Origin-Resource-Policy': 'same-origin',
    },
  });
}

function sentence(text: string, status: number, headers: Record<string, string> = {}): Response {
  return new Response(text, { status, headers: { 'Content-Type': 'text/plain; charset=utf-8', 'Cache-Control': 'no-store', ...headers } });
}
