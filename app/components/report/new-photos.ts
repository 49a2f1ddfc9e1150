import { noExif } from '#app/domain/photo-exif.ts';
import { contentOf, isPhotoMime, photoRefusal, showableFileName } from '#app/domain/photo.ts';
import { noDetails } from '#app/domain/photo-details.ts';
import type { KeptPhoto } from './device-store.ts';
import { makeSmaller, readExifOf } from './photo-file.ts';
import type { StoredPhoto } from './report-view.ts';

interface Place {
  readonly clientId: string;
  readonly position: number;
  /** The person asked for smaller files. */
  readonly smaller: boolean;
  readonly maxBytes: number;
}

/** Enough for every signature that is known. [bytes] */
const headBytes = 256;

/** Why this file will not be taken, as far as its first bytes show it: said at once, also without a connection. */
async function refusalOf(file: File): Promise<string> {
  const name = showableFileName(file.name);
  if (file.size === 0) return photoRefusal.empty(name);
  const content = contentOf(new Uint8Array(await file.slice(0, headBytes).arrayBuffer()));
  return isPhotoMime(content) ? '' : photoRefusal.otherKind(name, content);
}

/** A chosen file as it is kept: made smaller if that was asked for, with what its camera wrote. */
export async function lookAt(file: File, { clientId, position, smaller, maxBytes }: Place): Promise<{ photo: KeptPhoto; blob: Blob | null }> {
  const refused = (sentence: string) => ({ photo: { ...base, bytes: file.size, blob: null, state: 'refused' as const, sentence, exif: noExif, details: { ...noDetails, position } }, blob: null });
  const base = { key: crypto.randomUUID(), clientId, fileName: showableFileName(file.name), photoId: null, changed: false, removedAt: null };
  const sentence = await refusalOf(file).catch(() => '');
  if (sentence) return refused(sentence);
  const made = smaller ? await makeSmaller(file) : { file, smaller: false };
  if (made.file.size > maxBytes) return refused(photoRefusal.tooBig(base.fileName, maxBytes));
  const exif = await readExifOf(file);
  const photo: KeptPhoto = { ...base, fileName: showableFileName(made.file.name), bytes: made.file.size, blob: made.file, state: 'waiting', sentence: '', exif, details: { ...noDetails, position, madeSmaller: made.smaller } };
  return { photo, blob: made.file };
}

/** A photo that only the team has, as if it had been chosen here. */
export function asKept(photo: StoredPhoto, clientId: string, position: number): KeptPhoto {
  const { view, caption, clockErrorS, madeSmaller, exifAnswer } = photo;
  return {
    key: photo.id,
    clientId,
    fileName: photo.fileName,
    bytes: photo.bytes,
    blob: null,
    state: 'stored',
    sentence: '',
    photoId: photo.id,
    exif: photo.exif,
    details: { position, view, caption, clockErrorS, madeSmaller, timeAnswer: exifAnswer.time, placeAnswer: exifAnswer.place },
    changed: false,
    removedAt: null,
  };
}
