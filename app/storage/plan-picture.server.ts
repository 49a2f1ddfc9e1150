import { env } from '#app/env.server.ts';
import { imageDecoder } from './image-decoder.server.ts';

/** Longest side of a drawing as it is shown on the map: fine enough for a roof at 2 cm a pixel. [px] */
const planSidePx = 3_000;

export interface PlanCopy {
  readonly bytes: Uint8Array;
  readonly widthPx: number;
  readonly heightPx: number;
}

/** The drawing as it is shown: upright, lossless, and without any of the file's own data. */
export async function planPicture(original: Uint8Array): Promise<PlanCopy> {
  const { data, info } = await imageDecoder(original, { limitInputPixels: env.PHOTO_MAX_PIXELS, failOn: 'truncated' })
    .autoOrient()
    .resize({ width: planSidePx, height: planSidePx, fit: 'inside', withoutEnlargement: true })
    .png({ palette: true, quality: 90 })
    .toBuffer({ resolveWithObject: true });
  return { bytes: data, widthPx: info.width, heightPx: info.height };
}
