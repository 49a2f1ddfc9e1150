import { env } from '#app/env.server.ts';
import { foreignJpegSegments } from '#app/domain/jpeg-segments.ts';
import type { PhotoMask } from '#app/domain/photo.ts';
import { imageDecoder } from '#app/storage/image-decoder.server.ts';
import { viewSidePx } from '#app/storage/photo-renditions.server.ts';

/** Ink of the pages, as a solid. */
const boxColour = { r: 28, g: 36, b: 48 } as const;
/** Compression lets the neighbourhood of an edge ring; inside this margin of a box only its own colour remains. [px] */
const edgeMarginPx = 16;
/** How far a channel may lie from the box's colour after compression, of 255. */
const colourTolerance = 6;

interface Box {
  readonly left: number;
  readonly top: number;
  readonly width: number;
  readonly height: number;
}

/** Whole pixels that cover the mask, outward; null when it lies outside the picture. */
function boxOf(mask: PhotoMask, size: { readonly width: number; readonly height: number }): Box | null {
  const left = Math.max(0, Math.floor(mask.leftShare * size.width));
  const top = Math.max(0, Math.floor(mask.topShare * size.height));
  const right = Math.min(size.width, Math.ceil((mask.leftShare + mask.widthShare) * size.width));
  const bottom = Math.min(size.height, Math.ceil((mask.topShare + mask.heightShare) * size.height));
  return right > left && bottom > top ? { left, top, width: right - left, height: bottom - top } : null;
}

/**
 * The copy of a photo that leaves: upright, at most as large as a view copy, its boxes replaced by solid colour before
 * it is encoded, and with nothing but the picture in the file.
 *
 * @throws Error when the encoder wrote anything besides the picture.
 */
export async function renderReleasePhoto(original: Uint8Array, masks: readonly PhotoMask[]): Promise<Uint8Array> {
  const { data, info } = await imageDecoder(original, { limitInputPixels: env.PHOTO_MAX_PIXELS, failOn: 'truncated' })
    .autoOrient()
    .resize({ width: viewSidePx, height: viewSidePx, fit: 'inside', withoutEnlargement: true })
    .flatten({ background: '#ffffff' })
    .toColourspace('srgb')
    .removeAlpha()
    .raw()
    .toBuffer({ resolveWithObject: true });
  const boxes = masks.map((mask) => boxOf(mask, info)).filter((box) => box !== null);
  for (const box of boxes) fillBox(data, info, box);
  const bytes = await imageDecoder(data, { raw: { width: info.width, height: info.height, channels: info.channels } })
    // Full colour resolution, so that no colour from beside a box is spread into it.
    .jpeg({ quality: 84, chromaSubsampling: '4:4:4' })
    .toBuffer();
  const foreign = foreignJpegSegments(bytes);
  if (foreign.length > 0) throw new Error(`A photo of a release would carry ${foreign.join(', ')}.`);
  return bytes;
}

function fillBox(pixels: Uint8Array, info: { readonly width: number; readonly channels: number }, box: Box): void {
  const colour = [boxColour.r, boxColour.g, boxColour.b];
  for (let y = box.top; y < box.top + box.height; y += 1) {
    for (let x = box.left; x < box.left + box.width; x += 1) {
      const at = (y * info.width + x) * info.channels;
      for (let channel = 0; channel < info.channels; channel += 1) pixels[at + channel] = colour[channel] ?? colour[0] ?? 0;
    }
  }
}

/** Whether each mask is one solid colour in the bytes as they are, a margin at its edges left out. */
export async function masksAreSolid(bytes: Uint8Array, masks: readonly PhotoMask[]): Promise<boolean> {
  if (masks.length === 0) return true;
  const { data, info } = await imageDecoder(bytes, { limitInputPixels: env.PHOTO_MAX_PIXELS }).removeAlpha().raw().toBuffer({ resolveWithObject: true });
  return masks.every((mask) => {
    const box = boxOf(mask, info);
    return box === null || isSolid(data, info, box);
  });
}

function isSolid(pixels: Uint8Array, info: { readonly width: number; readonly channels: number }, box: Box): boolean {
  // A box thinner than its margins is looked at along its middle.
  const marginX = Math.min(edgeMarginPx, Math.floor((box.width - 1) / 2));
  const marginY = Math.min(edgeMarginPx, Math.floor((box.height - 1) / 2));
  const colour = [boxColour.r, boxColour.g, boxColour.b];
  for (let y = box.top + marginY; y < box.top + box.height - marginY; y += 1) {
    for (let x = box.left + marginX; x < box.left + box.width - marginX; x += 1) {
      const at = (y * info.width + x) * info.channels;
      if (colour.some((wanted, channel) => Math.abs((pixels[at + channel] ?? 0) - wanted) > colourTolerance)) return false;
    }
  }
  return true;
}
