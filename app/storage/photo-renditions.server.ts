import type { Sharp } from 'sharp';
import { env } from '#app/env.server.ts';
import { contentOf } from '#app/domain/photo.ts';
import { heicPixels } from './heic-decoder.server.ts';
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
  const open = await opener(original);
  const [view, thumbnail] = await Promise.all([rendition(open(), viewSidePx, 84), rendition(open(), thumbnailSidePx, 78)]);
  return { view, thumbnail };
}

/** The picture decoder at the pixels of the file; HEIC comes to it already decoded and upright. */
async function opener(original: Uint8Array): Promise<() => Sharp> {
  if (contentOf(original) !== 'image/heic') return () => imageDecoder(original, { limitInputPixels: env.PHOTO_MAX_PIXELS, failOn: 'truncated' }).autoOrient();
  const { rgba, widthPx, heightPx } = await heicPixels(original, env.PHOTO_MAX_PIXELS);
  return () => imageDecoder(rgba, { raw: { width: widthPx, height: heightPx, channels: 4 } });
}

async function rendition(open: Sharp, sidePx: number, quality: number): Promise<Uint8Array> {
  return open
    .resize({ width: sidePx, height: sidePx, fit: 'inside', withoutEnlargement: true })
    // Transparent drawings get the ground of the sheet.
    .flatten({ background: '#ffffff' })
    .jpeg({ quality })
    .toBuffer();
}
