import { inTransaction } from '#db/client.server.ts';
import type { Transaction } from '#db/client.server.ts';
import { lockCase } from '#db/queries/case-subject.server.ts';
import { getPhotoOfCase, updatePhoto } from '#db/queries/photos.server.ts';
import { canonicalJson } from '#app/domain/canonical-json.ts';
import { DomainError, notFound } from '#app/domain/errors.ts';
import { marksPerPhoto, markWords } from '#app/domain/photo-marks.ts';
import type { PhotoMark } from '#app/domain/photo-marks.ts';
import type { Actor } from '#app/domain/roles.ts';
import { authorize } from '#app/services/authorize.ts';
import { logLine } from '#app/services/log-line.server.ts';

export interface MarkPhoto {
  readonly actor: Actor;
  readonly caseNumber: number;
  readonly photoId: string;
}

/** The photo with its marks, under the lock of the case. */
async function lockMarks(tx: Transaction, { actor, caseNumber, photoId }: MarkPhoto) {
  const found = await lockCase(tx, actor, caseNumber);
  if (!found) throw notFound('The case');
  authorize(actor, 'evidence:write', found.subject);
  const photo = await getPhotoOfCase(tx, { caseId: found.row.id, photoId });
  if (!photo) throw notFound('The photo');
  return { row: found.row, photo };
}

/**
 * Adds a mark to the layer over a photo. Neither the original nor a copy of it is touched. The same mark sent again
 * changes nothing.
 *
 * @throws DomainError `invalid-state` when the layer is full.
 */
export async function addMark(request: MarkPhoto & { readonly mark: PhotoMark }): Promise<void> {
  return inTransaction(async (tx) => {
    const { row, photo } = await lockMarks(tx, request);
    const { mark, actor } = request;
    if (photo.marks.some((known) => canonicalJson(known) === canonicalJson(mark))) return;
    if (photo.marks.length >= marksPerPhoto) throw new DomainError('invalid-state', `A photo holds at most ${marksPerPhoto} marks. Remove one first.`);
    await updatePhoto(tx, photo.id, { marks: [...photo.marks, mark] });
    await logLine(tx, actor, row, { event: 'photo.mark-added', subject: 'photos', subjectId: photo.id, summary: `Mark drawn over a copy of photo ${photo.label}.`, after: { mark } });
  });
}

/** Takes a mark off the layer; `position` is its place in the list, `words` how it read there. */
export async function removeMark(request: MarkPhoto & { readonly position: number; readonly words: string }): Promise<void> {
  return inTransaction(async (tx) => {
    const { row, photo } = await lockMarks(tx, request);
    const mark = photo.marks[request.position];
    if (!mark || markWords(mark) !== request.words) throw new DomainError('conflict', 'The marks of this photo changed after you opened the page. Nothing was removed: look again.');
    await updatePhoto(tx, photo.id, { marks: photo.marks.filter((_unused, index) => index !== request.position) });
    await logLine(tx, request.actor, row, { event: 'photo.mark-removed', subject: 'photos', subjectId: photo.id, summary: `Mark taken off a copy of photo ${photo.label}.`, before: { mark } });
  });
}
