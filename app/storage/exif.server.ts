import exifr from 'exifr';
import { exifOf, exifReading, heicExifBlock, noExif } from '#app/domain/photo-exif.ts';
import type { PhotoExif } from '#app/domain/photo.ts';

const tiffHeader = /^(?:II\*\0|MM\0\*)/u;

/**
 * What the camera wrote.
 *
 * @param block EXIF block of the file as the decoder found it, with or without its `Exif` prefix.
 */
export async function readExif(block: Uint8Array | undefined): Promise<PhotoExif> {
  if (!block) return noExif;
  const start = [0, 6].find((at) => tiffHeader.test(String.fromCharCode(...block.subarray(at, at + 4))));
  return start === undefined ? noExif : exifOf(await parseTags(block.subarray(start)));
}

/** The same of a whole HEIC file. */
export const readHeicExif = (file: Uint8Array): Promise<PhotoExif> => readExif(heicExifBlock(file) ?? undefined);

async function parseTags(bytes: Uint8Array): Promise<unknown> {
  try {
    return await exifr.parse(bytes, exifReading);
  } catch {
    // A block that cannot be read offers nothing; the picture itself is still good.
    return {};
  }
}
