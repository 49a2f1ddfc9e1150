import { db } from '#db/client.server.ts';
import { getPhotoToPrepare, markPhotoFailed, markPhotoReady } from '#db/queries/photos.server.ts';
import { log } from '#app/log.server.ts';
import { getObject, putObject } from '#app/storage/objects.server.ts';
import { makeRenditions } from '#app/storage/photo-renditions.server.ts';
import type { Renditions } from '#app/storage/photo-renditions.server.ts';

/**
 * Makes the copies that pages show. Running it again, or twice at once, writes the same bytes under the same keys. A
 * missing original or an unreachable store throws, so that the job is tried again; a picture that cannot be decoded is
 * marked as failed, and its original is kept.
 */
export async function preparePhoto({ photoId }: { readonly photoId: string }): Promise<void> {
  const photo = await getPhotoToPrepare(db, photoId);
  // Taken off the report meanwhile, or done by an earlier run.
  if (!photo || photo.state === 'ready') return;
  const original = await getObject(photo.originalKey);
  if (!original) throw new Error(`The original of photo ${photoId} is not in the store.`);
  const renditions = await tryRenditions(photoId, original);
  if (!renditions) {
    await markPhotoFailed(db, photoId);
    return;
  }
  const viewKey = `renditions/${photoId}/view.jpg`;
  const thumbnailKey = `renditions/${photoId}/thumbnail.jpg`;
  await putObject(viewKey, renditions.view, 'image/jpeg');
  await putObject(thumbnailKey, renditions.thumbnail, 'image/jpeg');
  await markPhotoReady(db, { photoId, viewKey, thumbnailKey });
}

async function tryRenditions(photoId: string, original: Uint8Array): Promise<Renditions | null> {
  try {
    return await makeRenditions(original);
  } catch (error) {
    log.error({ err: error, photoId }, 'a photo could not be prepared');
    return null;
  }
}
