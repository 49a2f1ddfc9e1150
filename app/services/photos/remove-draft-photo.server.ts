import { inTransaction } from '#db/client.server.ts';
import { deleteDraftPhoto } from '#db/queries/photos.server.ts';
import { lockReport } from '#db/queries/reports.server.ts';
import type { ReportHolder } from '#app/domain/report.ts';
import { holderId } from '#app/services/reports/report-holder.server.ts';
import { deletePhotoObjects } from './photo-objects.server.ts';

/** Takes a photo off a report that was not sent yet. Once sent, photos stay. */
export async function removeDraftPhoto(params: { holder: ReportHolder; clientId: string; photoId: string }): Promise<void> {
  const removed = await inTransaction(async (tx) => {
    await lockReport(tx, params.clientId);
    return deleteDraftPhoto(tx, { photoId: params.photoId, clientId: params.clientId, actorId: holderId(params.holder) });
  });
  if (removed) await deletePhotoObjects(removed);
}
