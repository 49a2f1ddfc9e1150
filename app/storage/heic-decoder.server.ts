import heicDecode from 'heic-decode';
import { z } from 'zod';

/** One picture of a HEIC file, upright as its own turns ask for. */
export interface HeicSize {
  readonly widthPx: number;
  readonly heightPx: number;
}

export interface HeicPixels extends HeicSize {
  /** Red, green, blue and opacity, one byte each, row by row from the upper left. */
  readonly rgba: Uint8Array;
}

/** The package's types leave out the size of a picture, and what frees the memory of all. */
const sized = z.object({ width: z.int().positive(), height: z.int().positive() });
const disposable = z.looseObject({ dispose: z.custom<() => void>((value) => typeof value === 'function') });

interface Picture {
  readonly width: number;
  readonly height: number;
  readonly decode: () => Promise<{ readonly data: Uint8ClampedArray }>;
}

async function withFirst<Result>(file: Uint8Array, work: (picture: Picture) => Promise<Result>): Promise<Result> {
  const pictures = await heicDecode.all({ buffer: file });
  try {
    const first = pictures[0];
    if (!first) throw new Error('The file holds no picture.');
    return await work({ ...sized.parse(first), decode: () => first.decode() });
  } finally {
    // The list is an array with one property more.
    disposable.parse({ dispose: Reflect.get(pictures, 'dispose') }).dispose();
  }
}

/** Size of the picture without decoding it. @throws when the file cannot be read. */
export const heicSize = (file: Uint8Array): Promise<HeicSize> => withFirst(file, ({ width, height }) => Promise.resolve({ widthPx: width, heightPx: height }));

/**
 * Decodes the picture, which takes seconds and holds up the process: for the worker only.
 *
 * @param limitPixels pictures with more are refused before they are decoded.
 * @throws when the file is damaged, cut off, or too large.
 */
export const heicPixels = (file: Uint8Array, limitPixels: number): Promise<HeicPixels> =>
  withFirst(file, async ({ width, height, decode }) => {
    if (width * height > limitPixels) throw new Error(`The picture has ${width * height} pixels; the limit is ${limitPixels}.`);
    const { data } = await decode();
    return { widthPx: width, heightPx: height, rgba: new Uint8Array(data.buffer, data.byteOffset, data.byteLength) };
  });

/** Whether every box of the file is there to its end. Layout: ISO/IEC 14496-12, 4.2. */
export function isHeicWhole(file: Uint8Array): boolean {
  const view = new DataView(file.buffer, file.byteOffset, file.byteLength);
  let at = 0;
  while (at + 8 <= file.byteLength) {
    const short = view.getUint32(at);
    // 0: to the end of the file; 1: the length follows in eight bytes.
    if (short === 0) return true;
    const length = short === 1 && at + 16 <= file.byteLength ? Number(view.getBigUint64(at + 8)) : short;
    if (length < 8) return false;
    at += length;
  }
  return at === file.byteLength;
}
