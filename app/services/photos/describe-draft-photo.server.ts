import { inTransaction } from '#db/client.server.ts';
import type { PhotoChange } from '#db/queries/photos.server.ts';
import { updateDraftPhoto } from '#db/queries/photos.server.ts';
import { lockReport } from '#db/queries/reports.server.ts';
import type { PhotoDetails } from '#app/domain/photo-details.ts';
import type { ReportHolder } from '#app/domain/report.ts';
import { holderId } from '#app/services/reports/report-holder.server.ts';
import { detailColumns } from './photo-columns.ts';

interface DraftPhoto {
  readonly holder: ReportHolder;
  readonly clientId: string;
  readonly photoId: string;
}

/** Keeps what the person said of a photo of a report that was not sent yet. Once sent, photos are described on their case. */
export const describeDraftPhoto = ({ details, ...photo }: DraftPhoto & { readonly details: PhotoDetails }): Promise<boolean> => change(photo, detailColumns(details, new Date()));

/** The part that a form without a script can say. */
export const captionDraftPhoto = ({ view, caption, ...photo }: DraftPhoto & Pick<PhotoDetails, 'view' | 'caption'>): Promise<boolean> => change(photo, { view, caption });

function change({ holder, clientId, photoId }: DraftPhoto, columns: PhotoChange): Promise<boolean> {
  return inTransaction(async (tx) => {
    await lockReport(tx, clientId);
    return updateDraftPhoto(tx, { photoId, clientId, actorId: holderId(holder), change: columns });
  });
}
