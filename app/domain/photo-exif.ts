import { z } from 'zod';
import type { PhotoExif } from './photo.ts';

export const noExif: PhotoExif = { takenAtLocal: null, utcOffset: null, latitudeDeg: null, longitudeDeg: null, directionDeg: null, directionReference: null, camera: null, accuracyM: null };

/** What the reader of tags is asked for, on the server and on the phone: values as they stand in the file. */
export const exifReading = { tiff: true, exif: true, gps: true, reviveValues: false, translateValues: false, mergeOutput: true } as const;

/** Byte order, the number 42, and the first directory right behind: CIPA DC-008 (Exif 2.32), 4.5.2. */
const blockStarts = [[0x49, 0x49, 0x2a, 0, 8, 0, 0, 0], [0x4d, 0x4d, 0, 0x2a, 0, 0, 0, 8]] as const;

/**
 * The Exif block of a HEIC file, from its first byte to the end of the file; null where there is none. It is found by its
 * own first bytes, since writers differ in how their tables of contents point to it.
 */
export function heicExifBlock(file: Uint8Array): Uint8Array | null {
  for (let at = 0; at + 8 <= file.byteLength; at += 1) {
    if (blockStarts.some((start) => start.every((byte, index) => file[at + index] === byte))) return file.subarray(at);
  }
  return null;
}

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
  GPSHPositioningError: number(0, 100_000),
  GPSImgDirection: number(0, 360),
  GPSImgDirectionRef: z.enum(['T', 'M']).nullable().catch(null),
  Make: text,
  Model: text,
});

/** What the camera wrote, with every value checked; all null where there is nothing usable. Tag names: CIPA DC-008 (Exif 2.32), 4.6. */
export function exifOf(found: unknown): PhotoExif {
  const read = tagsSchema.safeParse(found);
  if (!read.success) return noExif;
  const tags = read.data;
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
    accuracyM: placed ? tags.GPSHPositioningError : null,
  };
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
