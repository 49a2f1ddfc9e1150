import exifr from 'exifr';
import { z } from 'zod';
import type { PhotoExif } from '#app/domain/photo.ts';

export const noExif: PhotoExif = { takenAtLocal: null, utcOffset: null, latitudeDeg: null, longitudeDeg: null, directionDeg: null, directionReference: null, camera: null };

const number = (min: number, max: number) => z.number().min(min).max(max).nullable().catch(null);
const text = z
  .string()
  .transform((value) => value.replace(/[\p{Cc}\p{Cf}]/gu, '').trim().slice(0, 60))
  .catch('');

/** Each value stands for itself: one that is out of range is dropped, the others are kept. */
const tagsSchema = z.object({
  DateTimeOriginal: z.string().catch(''),
  OffsetTimeOriginal: z.string().catch(''),
  latitude: number(-90, 90),
  longitude: number(-180, 180),
  GPSImgDirection: number(0, 360),
  GPSImgDirectionRef: z.enum(['T', 'M']).nullable().catch(null),
  Make: text,
  Model: text,
});

const tiffHeader = /^(?:II\*\0|MM\0\*)/u;

/**
 * What the camera wrote, with every value checked; all null where there is nothing usable.
 *
 * @param block EXIF block of the file as the decoder found it, with or without its `Exif` prefix.
 */
export async function readExif(block: Uint8Array | undefined): Promise<PhotoExif> {
  if (!block) return noExif;
  const start = [0, 6].find((at) => tiffHeader.test(String.fromCharCode(...block.subarray(at, at + 4))));
  if (start === undefined) return noExif;
  const tags = tagsSchema.parse(await parseTags(block.subarray(start)));
  const takenAtLocal = localTime(tags.DateTimeOriginal);
  // Cameras without a fix write 0, 0, a spot in the Atlantic.
  const placed = tags.latitude !== null && tags.longitude !== null && (tags.latitude !== 0 || tags.longitude !== 0);
  const camera = tags.Model.toLowerCase().startsWith(tags.Make.toLowerCase()) ? tags.Model : `${tags.Make} ${tags.Model}`.trim();
  return {
    takenAtLocal,
    utcOffset: takenAtLocal ? offset(tags.OffsetTimeOriginal) : null,
    latitudeDeg: placed ? tags.latitude : null,
    longitudeDeg: placed ? tags.longitude : null,
    directionDeg: tags.GPSImgDirection,
    directionReference: tags.GPSImgDirection === null ? null : tags.GPSImgDirectionRef === 'M' ? 'magnetic' : tags.GPSImgDirectionRef === 'T' ? 'true' : null,
    camera: camera || null,
  };
}

async function parseTags(tiff: Uint8Array): Promise<Record<string, unknown>> {
  try {
    const tags: unknown = await exifr.parse(tiff, { tiff: true, exif: true, gps: true, reviveValues: false, translateValues: false, mergeOutput: true });
    return typeof tags === 'object' && tags !== null ? { ...tags } : {};
  } catch {
    // A block that cannot be read offers nothing; the picture itself is still good.
    return {};
  }
}

/** `2026:05:09 15:05:12` as `2026-05-09T15:05:12`; null for zeros, blanks and days that do not exist. */
function localTime(value: string): string | null {
  const match = /^(\d{4}):(\d{2}):(\d{2}) (\d{2}:\d{2}:\d{2})/u.exec(value);
  if (!match) return null;
  const local = `${match[1]}-${match[2]}-${match[3]}T${match[4]}`;
  const asUtc = new Date(`${local}Z`);
  const exists = !Number.isNaN(asUtc.getTime()) && asUtc.toISOString().startsWith(local);
  return exists && asUtc.getUTCFullYear() >= 1970 ? local : null;
}

function offset(value: string): string | null {
  const match = /^([+-])(\d{2}):(\d{2})$/u.exec(value.trim());
  return match && Number(match[2]) <= 14 && Number(match[3]) < 60 ? value.trim() : null;
}
