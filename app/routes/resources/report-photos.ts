import type { Route } from './+types/report-photos';
import { actorContext } from '#app/auth/actor-context.ts';
import { DomainError } from '#app/domain/errors.ts';
import type { ReportHolder } from '#app/domain/report.ts';
import { clientIdSchema } from '#app/domain/report.ts';
import { clientAddressContext } from '#app/http/client-address.ts';
import { readForm } from '#app/http/multipart-form.server.ts';
import { limitReporting } from '#app/auth/report-limits.server.ts';
import { statusFor } from '#app/http/to-response.server.ts';
import { removeDraftPhoto } from '#app/services/photos/remove-draft-photo.server.ts';
import type { PhotoOutcome } from '#app/services/photos/store-photo.server.ts';
import { storeReportPhoto } from '#app/services/photos/store-photo.server.ts';
import { holderId, identifyHolder } from '#app/services/reports/report-holder.server.ts';
import { db } from '#db/client.server.ts';
import { listDraftPhotos } from '#db/queries/photos.server.ts';

/** Who asks, and for which report under way. */
async function requireDraft({ request, context, params }: Pick<Route.ActionArgs, 'request' | 'context' | 'params'>): Promise<{ holder: ReportHolder; clientId: string }> {
  const clientId = clientIdSchema.safeParse(params.clientId).data;
  if (!clientId) throw new DomainError('not-found', 'There is no such report.');
  const holder = await identifyHolder(context.get(actorContext), new URL(request.url).searchParams.get('at'));
  if (!holder) throw new DomainError('forbidden', 'Your session has ended. Sign in again in another tab; this page keeps the photo.');
  return { holder, clientId };
}

/** Answers in JSON, refusals included: a script reads it. */
async function inJson(work: () => Promise<unknown>): Promise<Response> {
  try {
    return Response.json(await work(), { headers: { 'Cache-Control': 'no-store' } });
  } catch (error) {
    if (!(error instanceof DomainError)) throw error;
    return Response.json({ code: error.code, message: error.message }, { status: statusFor(error) });
  }
}

/** Photos of the report under way. */
export function loader(args: Route.LoaderArgs): Promise<Response> {
  return inJson(async () => {
    const { holder, clientId } = await requireDraft(args);
    return { photos: await listDraftPhotos(db, { clientId, actorId: holderId(holder) }) };
  });
}

/** Takes photos, or takes one off (`intent` = `remove`). One outcome per file; a bad file does not spoil the others. */
export function action(args: Route.ActionArgs): Promise<Response> {
  return inJson(async () => {
    const { holder, clientId } = await requireDraft(args);
    await limitReporting('photo', holder, args.context.get(clientAddressContext));
    const photos: PhotoOutcome[] = [];
    const form = await readForm(args.request, async ({ fieldName, ...file }) => {
      if (fieldName === 'photos') photos.push(await storeReportPhoto({ holder, clientId, file }));
    });
    const photoId = clientIdSchema.safeParse(form.get('photoId')).data;
    if (form.get('intent') === 'remove' && photoId) await removeDraftPhoto({ holder, clientId, photoId });
    return { photos };
  });
}
