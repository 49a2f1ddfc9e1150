import { z } from 'zod';
import { photoViews, plainText } from './incident.ts';
import { fromLocalInput } from './local-time.ts';

/** Picture formats that are read here. Everything else is refused with a sentence. */
export const photoMimes = ['image/jpeg', 'image/png', 'image/webp', 'image/heic'] as const;
export type PhotoMime = (typeof photoMimes)[number];
export const photoExtension: Record<PhotoMime, string> = { 'image/jpeg': 'jpg', 'image/png': 'png', 'image/webp': 'webp', 'image/heic': 'heic' };
export const isPhotoMime = (text: string | null): text is PhotoMime => photoMimes.some((mime) => mime === text);
/** For file fields: some systems know HEIC by its ending only. */
export const photoFileTypes = [...photoMimes, 'image/heif', '.heic', '.heif'].join(',');

/** Photographs one report may hold. Our own bound, far above what a report needs. */
export const photosPerReport = 40;
export const masksPerPhoto = 12;

/** What the file itself says; offered to the person, applied only when confirmed. */
export interface PhotoExif {
  readonly takenAtLocal: string | null;
  readonly utcOffset: string | null;
  readonly latitudeDeg: number | null;
  readonly longitudeDeg: number | null;
  readonly directionDeg: number | null;
  readonly directionReference: 'true' | 'magnetic' | null;
  readonly camera: string | null;
  /** What the device gave as the error of its place. [m] Missing in rows from before it was read. */
  readonly accuracyM?: number | null;
}

/** Which offers the person took. */
export interface PhotoExifAnswer {
  readonly time: 'accepted' | 'declined' | null;
  /** Place and direction are offered together. */
  readonly place: 'accepted' | 'declined' | null;
  readonly answeredAt: string | null;
}

/** A box to be masked in what leaves, as fractions of width and height. */
export interface PhotoMask {
  readonly leftShare: number;
  readonly topShare: number;
  readonly widthShare: number;
  readonly heightShare: number;
  readonly class: 'personal' | 'exact-place';
}

type KnownContent = PhotoMime | 'avif' | 'gif' | 'tiff' | 'bmp' | 'pdf' | 'video';

const startsWith = (bytes: Uint8Array, wanted: readonly number[], at = 0) => wanted.every((byte, index) => bytes[at + index] === byte);
const letters = (bytes: Uint8Array, at: number, length: number) => String.fromCharCode(...bytes.subarray(at, at + length));

/**
 * What the bytes are, by their first few. The name and the declared type are what somebody says; only content counts.
 *
 * Signatures: JPEG ISO/IEC 10918-1 Annex B; PNG ISO/IEC 15948 §5.2; WebP RFC 9649 §2.4; brands of ISO/IEC 14496-12 files.
 */
export function contentOf(bytes: Uint8Array): KnownContent | null {
  if (startsWith(bytes, [0xff, 0xd8, 0xff])) return 'image/jpeg';
  if (startsWith(bytes, [0x89, 0x50, 0x4e, 0x47, 0x0d, 0x0a, 0x1a, 0x0a])) return 'image/png';
  if (letters(bytes, 0, 4) === 'RIFF' && letters(bytes, 8, 4) === 'WEBP') return 'image/webp';
  if (letters(bytes, 4, 4) === 'ftyp') {
    return contentOfBrands(bytes);
  }
  if (letters(bytes, 0, 4) === 'GIF8') return 'gif';
  if (letters(bytes, 0, 4) === 'II*\0' || letters(bytes, 0, 4) === 'MM\0*') return 'tiff';
  if (letters(bytes, 0, 2) === 'BM') return 'bmp';
  if (letters(bytes, 0, 5) === '%PDF-') return 'pdf';
  return null;
}

/** Main brand and the brands it goes with: a picture of the general brand `mif1` says there what it is coded in. */
function contentOfBrands(bytes: Uint8Array): KnownContent {
  const brand = letters(bytes, 8, 4);
  const boxEnd = Math.min(new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength).getUint32(0), bytes.byteLength, 256);
  const others = letters(bytes, 16, Math.max(0, boxEnd - 16));
  if (['avif', 'avis'].includes(brand) || (brand === 'mif1' && /avif|avis/u.test(others))) return 'avif';
  return ['heic', 'heix', 'hevc', 'hevx', 'heim', 'heis', 'mif1', 'msf1'].includes(brand) ? 'image/heic' : 'video';
}

const nameLength = 80;

/**
 * A file name that can be shown: last part of a path, without control characters and direction overrides, at most 80
 * characters with the ending kept. Never used as a storage key or in a header.
 */
export function showableFileName(name: string): string {
  const last = name.normalize('NFC').split(/[/\\]/u).at(-1) ?? '';
  const plain = last.replace(/[\p{Cc}\p{Cf}\u2028\u2029]/gu, '').replace(/\s+/gu, ' ').replace(/^[.\s]+/u, '').trim();
  if (plain === '') return 'photo without a name';
  const characters = [...plain];
  if (characters.length <= nameLength) return plain;
  return `${characters.slice(0, nameLength - 13).join('')}…${characters.slice(-12).join('')}`;
}

const megabytes = (bytes: number) => `${Math.max(1, Math.floor(bytes / 1_000_000))} MB`;

/** Sentences for files that cannot be taken; each names the file and says how to mend it. */
export const photoRefusal = {
  empty: (name: string) => `“${name}” is empty: it holds no bytes. Take the photo again, or choose another file.`,
  tooBig: (name: string, limitBytes: number) => `“${name}” is larger than ${megabytes(limitBytes)}. Send it in a smaller size, or a part of it.`,
  tooManyPixels: (name: string, limitPixels: number) => `“${name}” has more than ${Math.floor(limitPixels / 1_000_000)} million pixels. Send it in a smaller size.`,
  damaged: (name: string) => `“${name}” is damaged or cut off, and cannot be shown. Take the photo again, or choose another file.`,
  tooMany: (name: string) => `“${name}” was not taken: a report holds at most ${photosPerReport} photos.`,
  tooManyAtOnce: (name: string, limit: number) => `“${name}” was not taken: send at most ${limit} photos at once, and the rest afterwards.`,
  notStored: (name: string) => `“${name}” could not be stored. Nothing is wrong with the photo: try it again in a minute.`,
  otherKind: (name: string, content: Exclude<KnownContent, PhotoMime> | null) => {
    if (content === 'avif') return `“${name}” is in the AVIF format, which is not read here. Share the photo as JPEG.`;
    if (content === 'video') return `“${name}” is a film. Send single pictures as JPEG, PNG, WebP or HEIC.`;
    return `“${name}” is not a JPEG, PNG, WebP or HEIC picture, whatever its name says. Choose another file.`;
  },
} as const;

/** The part of `PhotoExif` that times are made of. */
export interface ExifTime {
  readonly takenAtLocal: string | null;
  readonly utcOffset: string | null;
}

/**
 * The instant that a file states. Without an offset in the file the camera's clock is read as the clock of the place;
 * in a repeated or skipped hour it then cannot be known, and null is returned.
 */
export function exifInstant(exif: ExifTime, zone: string): Date | null {
  if (!exif.takenAtLocal) return null;
  if (exif.utcOffset) {
    const instant = new Date(`${exif.takenAtLocal}${exif.utcOffset}`);
    return Number.isNaN(instant.getTime()) ? null : instant;
  }
  const reading = fromLocalInput(exif.takenAtLocal, zone);
  return reading.kind === 'instant' ? reading.instant : null;
}

/** The time of the file, where the person took it; null otherwise. */
export const acceptedTime = (photo: { readonly exif: ExifTime; readonly exifAnswer: Pick<PhotoExifAnswer, 'time'> }, zone: string): Date | null => (photo.exifAnswer.time === 'accepted' ? exifInstant(photo.exif, zone) : null);

/** Photo and stated finding further apart than this are pointed out to the reader. Our own bound. */
export const timeDifferenceToSayMs = 30 * 60_000;

/**
 * Minutes from the stated finding to the photo, both corrected for their clock errors, when they lie more than 30
 * minutes apart; null otherwise, or when either is unknown. Negative: the photo is earlier.
 */
export function minutesFromFinding(photo: { readonly takenAt: Date | null; readonly clockErrorS: number }, found: { readonly foundAt: Date | null; readonly foundClockErrorS: number }): number | null {
  if (!photo.takenAt || !found.foundAt) return null;
  const photoMs = photo.takenAt.getTime() - photo.clockErrorS * 1000;
  const foundMs = found.foundAt.getTime() - found.foundClockErrorS * 1000;
  const differenceMs = photoMs - foundMs;
  return Math.abs(differenceMs) > timeDifferenceToSayMs ? Math.round(differenceMs / 60_000) : null;
}

const share = z.coerce.number('Write a number from 0 to 100.').min(0, 'From 0 to 100 per cent.').max(100, 'From 0 to 100 per cent.');

/** A box to be hidden in releases, as typed: its edges in per cent of width and height, from the upper left corner. */
export const maskSchema = z
  .object({ left: share, top: share, right: share, bottom: share, class: z.enum(['personal', 'exact-place']) })
  .refine((box) => box.right > box.left, { path: ['right'], message: 'The right edge lies right of the left one.' })
  .refine((box) => box.bottom > box.top, { path: ['bottom'], message: 'The lower edge lies below the upper one.' })
  .transform((box) => ({
    leftShare: box.left / 100,
    topShare: box.top / 100,
    widthShare: (box.right - box.left) / 100,
    heightShare: (box.bottom - box.top) / 100,
    class: box.class,
  }));

const photoId = z.uuid('Choose a photo of this case.');
const dayS = 86_400;

/** How far a camera's clock was ahead of true time; negative: behind. [s] */
export const clockErrorSchema = z.coerce
  .number('Write whole seconds, such as 42 or -15.')
  .int('Write whole seconds.')
  .min(-366 * dayS, 'More than a year cannot be a clock error.')
  .max(366 * dayS, 'More than a year cannot be a clock error.');

/** What may be done to one photo on the photo sheet. */
export const photoFormSchema = z.discriminatedUnion('intent', [
  z.object({
    intent: z.literal('describe'),
    photoId,
    view: z.union([z.enum(photoViews), z.literal('').transform(() => null)]),
    caption: plainText(300),
    altText: plainText(500),
    clockErrorS: clockErrorSchema,
  }),
  z.object({ intent: z.literal('answer-offer'), photoId, offer: z.enum(['time', 'place']), answer: z.enum(['accepted', 'declined']) }),
  z.object({ intent: z.literal('add-mask'), photoId }),
  z.object({ intent: z.literal('remove-mask'), photoId, mask: z.coerce.number().int().min(0).max(masksPerPhoto) }),
  z.object({ intent: z.literal('set-releasable'), photoId, releasable: z.enum(['undecided', 'yes', 'no']) }),
  z.object({ intent: z.literal('check-hashes') }),
]);
export type PhotoForm = z.infer<typeof photoFormSchema>;
