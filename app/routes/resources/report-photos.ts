import type { Route } from './+types/report-photos';
import type { PhotoDetails } from '#app/domain/photo-details.ts';
import { noDetails, readPhotoDetails } from '#app/domain/photo-details.ts';
import { clientIdSchema } from '#app/domain/report.ts';
import { clientAddressContext } from '#app/http/client-address.ts';
import { readForm } from '#app/http/multipart-form.server.ts';
import { limitReporting } from '#app/auth/report-limits.server.ts';
import { describeDraftPhoto } from '#app/services/photos/describe-draft-photo.server.ts';
import { removeDraftPhoto } from '#app/services/photos/remove-draft-photo.server.ts';
import type { PhotoOutcome } from '#app/services/photos/store-photo.server.ts';
import { storeReportPhoto } from '#app/services/photos/store-photo.server.ts';
import { holderId } from '#app/services/reports/report-holder.server.ts';
import { db } from '#db/client.server.ts';
import { listDraftPhotos } from '#db/queries/photos.server.ts';
import { inJson, requireDraft } from './report-holder.server.ts';

/** Photos of the report under way. */
export function loader(args: Route.LoaderArgs): Promise<Response> {
  return inJson(async () => {
    const { holder, clientId } = await requireDraft(args);
    return { photos: await listDraftPhotos(db, { clientId, actorId: holderId(holder) }) };
  });
}

/**
 * Takes photos, each after the part `details` that says what it shows; or says something of one that is here (`intent` =
 * `describe`), or takes one off (`intent` = `remove`). One outcome per file; a bad file does not spoil the others.
 */
export function action(args: Route.ActionArgs): Promise<Response> {
  return inJson(async () => {
    const { holder, clientId } = await requireDraft(args);
    await limitReporting('photo', holder, args.context.get(clientAddressContext));
    const photos: PhotoOutcome[] = [];
    let details: PhotoDetails = noDetails;
    const form = await readForm(args.request, async ({ fieldName, ...file }) => {
      if (fieldName === 'details') details = readPhotoDetails(new TextDecoder().decode(file.bytes));
      if (fieldName === 'photos') photos.push(await storeReportPhoto({ holder, clientId, file, details }));
    });
    const photoId = clientIdSchema.safeParse(form.get('photoId')).data;
    if (form.get('intent') === 'remove' && photoId) await removeDraftPhoto({ holder, clientId, photoId });
    if (form.get('intent') === 'describe' && photoId) await describeDraftPhoto({ holder, clientId, photoId, details });
    return { photos };
  });
}
