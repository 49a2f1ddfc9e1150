import { demoPhotos } from '#fixtures/demo/photos.ts';
import type { Transaction } from '#db/client.server.ts';
import { photos } from '#db/schema/all.ts';
import { examinePhoto } from '#app/storage/photo-intake.server.ts';
import { makeRenditions } from '#app/storage/photo-renditions.server.ts';
import { putObject } from '#app/storage/objects.server.ts';
import { moment } from './moment.ts';

/** Photos of one demonstration case, through the same intake and renditions as those of a report. */
export async function seedPhotos(tx: Transaction, target: { photoKey: number; caseId: string; clientId: string; zone: string; uploadedById: string | null; releasable: boolean }): Promise<number> {
  const wanted = demoPhotos.filter((photo) => photo.caseKey === target.photoKey);
  let label = 0;
  for (const photo of wanted) {
    const examined = await examinePhoto({ name: photo.fileName, bytes: await photo.render() });
    if (!examined.ok) throw new Error(examined.sentence);
    const { bytes, fileName, mime, sha256, widthPx, heightPx, exif } = examined.photo;
    const renditions = await makeRenditions(bytes);
    const keys = { originalKey: `originals/${sha256}`, viewKey: `views/${sha256}.jpg`, thumbnailKey: `thumbnails/${sha256}.jpg` };
    await putObject(keys.originalKey, bytes, mime);
    await putObject(keys.viewKey, renditions.view, 'image/jpeg');
    await putObject(keys.thumbnailKey, renditions.thumbnail, 'image/jpeg');
    label += 1;
    await tx.insert(photos).values({
      reportClientId: target.clientId,
      caseId: target.caseId,
      label,
      fileName,
      mime,
      bytes: bytes.byteLength,
      sha256,
      widthPx,
      heightPx,
      ...keys,
      state: 'ready',
      exif,
      exifAnswer: { time: 'accepted', place: 'declined', answeredAt: moment(photo.takenAtLocal.slice(0, 16), target.zone).toISOString() },
      view: photo.view,
      caption: photo.caption,
      altText: photo.altText,
      takenAt: moment(photo.takenAtLocal.slice(0, 16), target.zone),
      masks: photo.mask ? [{ leftShare: photo.mask.left, topShare: photo.mask.top, widthShare: photo.mask.right - photo.mask.left, heightShare: photo.mask.bottom - photo.mask.top, class: 'personal' }] : [],
      releasable: target.releasable ? 'yes' : 'undecided',
      uploadedById: target.uploadedById,
    });
  }
  return label;
}
