import { env } from '#app/env.server.ts';
import type { PhotoExif, PhotoMime } from '#app/domain/photo.ts';
import { contentOf, photoRefusal, showableFileName } from '#app/domain/photo.ts';
import { readExif } from './exif.server.ts';
import { imageDecoder } from './image-decoder.server.ts';
import { sha256Hex } from './sha256.server.ts';

export interface IncomingFile {
  readonly name: string;
  readonly bytes: Uint8Array;
}

/** A photo that can be kept: its bytes untouched, and what they say of themselves. */
export interface ExaminedPhoto {
  readonly bytes: Uint8Array;
  readonly fileName: string;
  readonly mime: PhotoMime;
  readonly sha256: string;
  /** As shown, after the turn that the file asks for. */
  readonly widthPx: number;
  readonly heightPx: number;
  readonly exif: PhotoExif;
}

export type Examination = { readonly ok: true; readonly photo: ExaminedPhoto } | { readonly ok: false; readonly fileName: string; readonly sentence: string };

/**
 * Judges a file by its content: format, size, pixels before decoding, and that it decodes to its end. Never throws for
 * a bad file; the sentence names it.
 */
export async function examinePhoto(file: IncomingFile): Promise<Examination> {
  const fileName = showableFileName(file.name);
  const refuse = (sentence: string): Examination => ({ ok: false, fileName, sentence });
  if (file.bytes.byteLength === 0) return refuse(photoRefusal.empty(fileName));
  if (file.bytes.byteLength > env.PHOTO_MAX_BYTES) return refuse(photoRefusal.tooBig(fileName, env.PHOTO_MAX_BYTES));
  const content = contentOf(file.bytes);
  if (content !== 'image/jpeg' && content !== 'image/png' && content !== 'image/webp') return refuse(photoRefusal.otherKind(fileName, content));
  const size = await readSize(file.bytes);
  if (!size) return refuse(photoRefusal.damaged(fileName));
  if (size.widthPx * size.heightPx > env.PHOTO_MAX_PIXELS) return refuse(photoRefusal.tooManyPixels(fileName, env.PHOTO_MAX_PIXELS));
  if (!(await decodesToTheEnd(file.bytes))) return refuse(photoRefusal.damaged(fileName));
  const { exifBlock, ...shown } = size;
  return { ok: true, photo: { bytes: file.bytes, fileName, mime: content, sha256: sha256Hex(file.bytes), ...shown, exif: await readExif(exifBlock) } };
}

/** Size from the header alone; null when even that cannot be read. */
async function readSize(bytes: Uint8Array) {
  try {
    // The limit is checked by the caller, which has a sentence for it.
    const header = await imageDecoder(bytes, { limitInputPixels: false }).metadata();
    const { width, height } = header.autoOrient;
    return { widthPx: width, heightPx: height, exifBlock: header.exif };
  } catch {
    // The decoder's reasons are for programmers; the person reads that the file is damaged.
    return null;
  }
}

async function decodesToTheEnd(bytes: Uint8Array): Promise<boolean> {
  try {
    await imageDecoder(bytes, { limitInputPixels: env.PHOTO_MAX_PIXELS, failOn: 'truncated' }).resize({ width: 64, height: 64, fit: 'inside' }).raw().toBuffer();
    return true;
  } catch {
    // As above: whatever stopped the decoder, the file cannot be shown.
    return false;
  }
}
