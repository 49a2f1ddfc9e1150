import { env } from '#app/env.server.ts';
import { imageDecoder } from './image-decoder.server.ts';

/** Longest side of the copies that pages show. [px] */
export const viewSidePx = 1600;
export const thumbnailSidePx = 360;

export interface Renditions {
  readonly view: Uint8Array;
  readonly thumbnail: Uint8Array;
}

/**
 * Copies for the screen: turned upright, never enlarged, JPEG, and without any of the file's own data (camera, time,
 * place), which the encoder leaves out unless told otherwise.
 */
export async function makeRenditions(original: Uint8Array): Promise<Renditions> {
  const [view, thumbnail] = await Promise.all([rendition(original, viewSidePx, 84), rendition(original, thumbnailSidePx, 78)]);
  return { view, thumbnail };
}

async function rendition(original: Uint8Array, sidePx: number, quality: number): Promise<Uint8Array> {
  return imageDecoder(original, { limitInputPixels: env.PHOTO_MAX_PIXELS, failOn: 'truncated' })
    .autoOrient()
    .resize({ width: sidePx, height: sidePx, fit: 'inside', withoutEnlargement: true })
    // Transparent drawings get the ground of the sheet.
    .flatten({ background: '#ffffff' })
    .jpeg({ quality })
    .toBuffer();
}
