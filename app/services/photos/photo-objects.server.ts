import type { PhotoRow } from '#db/queries/photos.server.ts';
import { deleteObject } from '#app/storage/objects.server.ts';

/** Removes what the store holds of a photo whose row is gone. */
export async function deletePhotoObjects(photo: Pick<PhotoRow, 'originalKey' | 'viewKey' | 'thumbnailKey'>): Promise<void> {
  for (const key of [photo.viewKey, photo.thumbnailKey, photo.originalKey]) if (key) await deleteObject(key);
}
