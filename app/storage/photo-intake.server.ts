import { env } from '#app/env.server.ts';
import type { PhotoExif, PhotoMime } from '#app/domain/photo.ts';
import { contentOf, isPhotoMime, photoRefusal, showableFileName } from '#app/domain/photo.ts';
import { readExif, readHeicExif } from './exif.server.ts';
import { heicSize, isHeicWhole } from './heic-decoder.server.ts';
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
  if (!isPhotoMime(content)) return refuse(photoRefusal.otherKind(fileName, content));
  const look = content === 'image/heic' ? heic : ordinary;
  const size = await look.size(file.bytes);
  if (!size) return refuse(photoRefusal.damaged(fileName));
  if (size.widthPx * size.heightPx > env.PHOTO_MAX_PIXELS) return refuse(photoRefusal.tooManyPixels(fileName, env.PHOTO_MAX_PIXELS));
  if (!(await look.isWhole(file.bytes))) return refuse(photoRefusal.damaged(fileName));
  return { ok: true, photo: { bytes: file.bytes, fileName, mime: content, sha256: sha256Hex(file.bytes), ...size, exif: await look.exif(file.bytes) } };
}

interface Look {
  /** From the head of the file alone; null when even that cannot be read. */
  readonly size: (bytes: Uint8Array) => Promise<{ widthPx: number; heightPx: number } | null>;
  readonly isWhole: (bytes: Uint8Array) => Promise<boolean>;
  readonly exif: (bytes: Uint8Array) => Promise<PhotoExif>;
}

const ordinary: Look = { size: readSize, isWhole: decodesToTheEnd, exif: async (bytes) => readExif((await readHeader(bytes)).exif) };

/** A HEIC picture takes seconds to decode, so that here only its boxes are looked at; the worker decodes it for its copies. */
const heic: Look = {
  size: async (bytes) => {
    try {
      return await heicSize(bytes);
    } catch {
      // As below: the decoder's reasons are for programmers.
      return null;
    }
  },
  isWhole: (bytes) => Promise.resolve(isHeicWhole(bytes)),
  exif: readHeicExif,
};

// The limit is checked by the caller, which has a sentence for it.
const readHeader = (bytes: Uint8Array) => imageDecoder(bytes, { limitInputPixels: false }).metadata();

async function readSize(bytes: Uint8Array) {
  try {
    const { width, height } = (await readHeader(bytes)).autoOrient;
    return { widthPx: width, heightPx: height };
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
