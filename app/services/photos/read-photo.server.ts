import { db, inTransaction } from '#db/client.server.ts';
import { caseSubject } from '#db/queries/case-subject.server.ts';
import type { CaseRow } from '#db/queries/case-subject.server.ts';
import { insertLogEntry } from '#db/queries/log.server.ts';
import { findCasePhoto, findDraftPhoto, recordHashCheck } from '#db/queries/photos.server.ts';
import type { PhotoRow } from '#db/queries/photos.server.ts';
import { DomainError, notFound } from '#app/domain/errors.ts';
import { isPhotoMime, photoExtension } from '#app/domain/photo.ts';
import type { Actor } from '#app/domain/roles.ts';
import { authorize } from '#app/services/authorize.ts';
import { getObject } from '#app/storage/objects.server.ts';
import { sha256Hex } from '#app/storage/sha256.server.ts';

export const photoRenditions = ['view', 'thumbnail', 'original'] as const;
export type PhotoRendition = (typeof photoRenditions)[number];

export interface PhotoFile {
  readonly bytes: Uint8Array;
  readonly mime: string;
  /** Made from case and label; the name that the file came with is never sent. */
  readonly fileName: string;
}

export interface PhotoRequest {
  readonly actor: Actor | null;
  readonly photoId: string;
  readonly rendition: PhotoRendition;
  /** Client id of a report under way, by which its holder sees its photos. */
  readonly draftOf: string | null;
}

/**
 * Bytes of a photo for somebody who may see them: copies for everybody who may see the case, the original for
 * investigators, reviewers and the privacy lead, after its hash was compared with that at intake.
 *
 * @returns null while the copy is still being prepared.
 * @throws DomainError `not-found`, `forbidden`, or `conflict` when the stored original is not what came in.
 */
export async function readPhoto(request: PhotoRequest): Promise<PhotoFile | null> {
  if (request.draftOf) return readDraft(request, request.draftOf);
  const found = request.actor ? await findCasePhoto(db, request.actor, request.photoId) : null;
  if (!found || !request.actor) throw notFound('The photo');
  const name = `case-${found.case.number}-photo-${found.photo.label}`;
  if (request.rendition !== 'original') return readCopy(found.photo, request.rendition, name);
  authorize(request.actor, 'photo:read-original', await caseSubject(db, request.actor, found.case));
  return readOriginal(found.photo, found.case, request.actor, name);
}

async function readDraft({ actor, photoId, rendition }: PhotoRequest, clientId: string): Promise<PhotoFile | null> {
  const photo = await findDraftPhoto(db, { photoId, clientId, actorId: actor?.userId ?? null });
  if (!photo || rendition === 'original') throw notFound('The photo');
  return readCopy(photo, rendition, 'photo');
}

async function readCopy(photo: PhotoRow, rendition: 'view' | 'thumbnail', name: string): Promise<PhotoFile | null> {
  const key = rendition === 'view' ? photo.viewKey : photo.thumbnailKey;
  const bytes = key ? await getObject(key) : null;
  return bytes ? { bytes, mime: 'image/jpeg', fileName: `${name}-${rendition}.jpg` } : null;
}

async function readOriginal(photo: PhotoRow, caseRow: CaseRow, actor: Actor, name: string): Promise<PhotoFile> {
  const { result, bytes } = await compareWithIntake(photo);
  await inTransaction(async (tx) => {
    await recordHashCheck(tx, { photoId: photo.id, result });
    await insertLogEntry(tx, {
      actorId: actor.userId,
      actorName: actor.displayName,
      organisationId: caseRow.organisationId,
      caseId: caseRow.id,
      event: result === 'same' ? 'photo.original-read' : 'photo.hash-differs',
      subject: 'photos',
      subjectId: photo.id,
      summary: result === 'same' ? `Original of photo ${photo.label} downloaded.` : `Original of photo ${photo.label} was refused: ${hashWords[result]}.`,
      after: { hashCheck: result },
    });
  });
  if (!bytes || result !== 'same') throw new DomainError('conflict', `The stored original of photo ${photo.label} is refused: ${hashWords[result]}. The log has a line about it; ask the device that took it for its own copy.`);
  const mime = isPhotoMime(photo.mime) ? photo.mime : 'image/jpeg';
  return { bytes, mime, fileName: `${name}-original.${photoExtension[mime]}` };
}

export const hashWords = {
  same: 'same as at intake',
  differs: 'its hash differs from that at intake',
  missing: 'it is missing from the store',
} as const;

/** Hashes the stored original again. */
export async function compareWithIntake(photo: Pick<PhotoRow, 'originalKey' | 'sha256'>): Promise<{ result: keyof typeof hashWords; bytes: Uint8Array | null }> {
  const bytes = await getObject(photo.originalKey);
  if (!bytes) return { result: 'missing', bytes: null };
  return { result: sha256Hex(bytes) === photo.sha256 ? 'same' : 'differs', bytes };
}
