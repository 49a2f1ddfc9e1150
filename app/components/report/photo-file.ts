import { exifOf, exifReading, heicExifBlock, noExif } from '#app/domain/photo-exif.ts';
import type { PhotoExif } from '#app/domain/photo.ts';
import { contentOf } from '#app/domain/photo.ts';
import { copyJpegExif } from './jpeg-exif.ts';

/** What the camera wrote into the file, read on this device. The reader is fetched with the first photo. */
export async function readExifOf(file: Blob): Promise<PhotoExif> {
  try {
    const { default: exifr } = await import('exifr');
    const bytes = new Uint8Array(await file.arrayBuffer());
    const block = contentOf(bytes) === 'image/heic' ? heicExifBlock(bytes) : bytes;
    return block ? exifOf(await exifr.parse(block, exifReading)) : noExif;
  } catch {
    // A block that cannot be read offers nothing; the picture itself is still good.
    return noExif;
  }
}

/** Longest side of a photo that was made smaller. [px] */
export const smallerSidePx = 2_048;
const quality = 0.86;

/**
 * The photo with at most 2048 pixels on its longer side, as JPEG; camera data goes with it. The photo itself where this
 * browser cannot read it, or where it would not get smaller.
 */
export async function makeSmaller(file: File): Promise<{ readonly file: File; readonly smaller: boolean }> {
  const unchanged = { file, smaller: false };
  if (!['image/jpeg', 'image/png', 'image/webp'].includes(file.type)) return unchanged;
  try {
    const picture = await createImageBitmap(file);
    const scale = smallerSidePx / Math.max(picture.width, picture.height);
    if (scale >= 1) return unchanged;
    const canvas = document.createElement('canvas');
    canvas.width = Math.round(picture.width * scale);
    canvas.height = Math.round(picture.height * scale);
    canvas.getContext('2d')?.drawImage(picture, 0, 0, canvas.width, canvas.height);
    picture.close();
    const drawn = await new Promise<Blob | null>((resolve) => canvas.toBlob(resolve, 'image/jpeg', quality));
    if (!drawn || drawn.size >= file.size) return unchanged;
    const bytes = copyJpegExif(new Uint8Array(await file.arrayBuffer()), new Uint8Array(await drawn.arrayBuffer()));
    return { file: new File([bytes], file.name.replace(/\.\w+$/u, '.jpg'), { type: 'image/jpeg' }), smaller: true };
  } catch {
    // The team's side may still be able to read it.
    return unchanged;
  }
}
