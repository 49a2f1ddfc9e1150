import { db } from '#db/client.server.ts';
import { deleteAbandonedPhoto, listAbandonedPhotos } from '#db/queries/photos.server.ts';
import { deletePhotoObjects } from './photo-objects.server.ts';

/** Photos of a report that was never sent are kept this long. Drafts on the device live for 14 days. */
export const abandonedAfterDays = 30;
const atOnce = 500;

/** Removes photos of reports that were begun and never sent. @returns How many. */
export async function purgeAbandonedPhotos(now: Date = new Date()): Promise<number> {
  const before = new Date(now.getTime() - abandonedAfterDays * 86_400_000);
  let removed = 0;
  for (const photo of await listAbandonedPhotos(db, { before, limit: atOnce })) {
    if (!(await deleteAbandonedPhoto(db, photo.id))) continue;
    await deletePhotoObjects(photo);
    removed += 1;
  }
  return removed;
}
