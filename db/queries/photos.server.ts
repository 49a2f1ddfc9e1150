import { and, asc, eq, isNull, lt, sql } from 'drizzle-orm';
import type { DbOrTx, Transaction } from '#db/client.server.ts';
import { cases, photos } from '#db/schema/all.ts';
import type { PhotoExif, PhotoExifAnswer, PhotoMask } from '#app/domain/photo.ts';
import type { PhotoView } from '#app/domain/incident.ts';
import type { PhotoMark } from '#app/domain/photo-marks.ts';
import type { Actor } from '#app/domain/roles.ts';
import { visibleTo } from './scope.server.ts';

export type PhotoRow = typeof photos.$inferSelect;
export type NewPhoto = typeof photos.$inferInsert;

/** A photo of a report under way, as its holder sees it. */
export interface DraftPhoto {
  readonly id: string;
  readonly fileName: string;
  readonly bytes: number;
  readonly mime: string;
  readonly state: PhotoRow['state'];
  readonly exif: PhotoExif;
  readonly exifAnswer: PhotoExifAnswer;
  readonly view: PhotoView | null;
  readonly caption: string;
  readonly clockErrorS: number;
  readonly madeSmaller: boolean;
}
const draftPhoto = {
  id: photos.id,
  fileName: photos.fileName,
  bytes: photos.bytes,
  mime: photos.mime,
  state: photos.state,
  exif: photos.exif,
  exifAnswer: photos.exifAnswer,
  view: photos.view,
  caption: photos.caption,
  clockErrorS: photos.clockErrorS,
  madeSmaller: photos.madeSmaller,
};

/** Whoever knows the client id holds the draft, except that a signed-in person's photos are theirs alone. */
const ofDraft = (clientId: string, actorId: string | null) =>
  and(
    eq(photos.reportClientId, clientId),
    isNull(photos.caseId),
    actorId ? sql`(${photos.uploadedById} is null or ${photos.uploadedById} = ${actorId})` : isNull(photos.uploadedById),
  );

export function listDraftPhotos(db: DbOrTx, params: { clientId: string; actorId: string | null }): Promise<DraftPhoto[]> {
  return db.select(draftPhoto).from(photos).where(ofDraft(params.clientId, params.actorId)).orderBy(sql`${photos.position} asc nulls last`, asc(photos.createdAt), asc(photos.id));
}

export async function findDraftPhoto(db: DbOrTx, params: { photoId: string; clientId: string; actorId: string | null }): Promise<PhotoRow | null> {
  const [row] = await db.select().from(photos).where(and(eq(photos.id, params.photoId), ofDraft(params.clientId, params.actorId)));
  return row ?? null;
}

/** Says something of a photo of a report that was not sent. @returns false when there is no such photo any more. */
export async function updateDraftPhoto(tx: Transaction, params: { photoId: string; clientId: string; actorId: string | null; change: PhotoChange }): Promise<boolean> {
  const rows = await tx.update(photos).set(params.change).where(and(eq(photos.id, params.photoId), ofDraft(params.clientId, params.actorId))).returning({ id: photos.id });
  return rows.length > 0;
}

/** Removes a photo of a report that was not sent. Photos of a case are never removed. */
export async function deleteDraftPhoto(tx: Transaction, params: { photoId: string; clientId: string; actorId: string | null }): Promise<PhotoRow | null> {
  const [row] = await tx.delete(photos).where(and(eq(photos.id, params.photoId), ofDraft(params.clientId, params.actorId))).returning();
  return row ?? null;
}

export async function findPhotoByHash(db: DbOrTx, params: { clientId: string; sha256: string }): Promise<PhotoRow | null> {
  const [row] = await db.select().from(photos).where(and(eq(photos.reportClientId, params.clientId), eq(photos.sha256, params.sha256)));
  return row ?? null;
}

export async function countReportPhotos(db: DbOrTx, clientId: string): Promise<number> {
  const [row] = await db.select({ count: sql<number>`count(*)::int` }).from(photos).where(eq(photos.reportClientId, clientId));
  return row?.count ?? 0;
}

/** Null when the same bytes are already with this report. */
export async function insertPhoto(tx: Transaction, values: NewPhoto): Promise<PhotoRow | null> {
  const [row] = await tx.insert(photos).values(values).onConflictDoNothing({ target: [photos.reportClientId, photos.sha256] }).returning();
  return row ?? null;
}

/** Next free label of a case; the caller holds the case's row lock. */
export async function nextPhotoLabel(tx: Transaction, caseId: string): Promise<number> {
  const [row] = await tx.select({ last: sql<number>`coalesce(max(${photos.label}), 0)::int` }).from(photos).where(eq(photos.caseId, caseId));
  return (row?.last ?? 0) + 1;
}

/** Locks the row of the case, so that labels are given out one at a time. */
export async function lockCaseRow(tx: Transaction, caseId: string): Promise<void> {
  await tx.select({ id: cases.id }).from(cases).where(eq(cases.id, caseId)).for('update');
}

/** For the job that prepares copies; not for pages. */
export async function getPhotoToPrepare(db: DbOrTx, photoId: string): Promise<PhotoRow | null> {
  const [row] = await db.select().from(photos).where(eq(photos.id, photoId));
  return row ?? null;
}

export async function markPhotoReady(db: DbOrTx, params: { photoId: string; viewKey: string; thumbnailKey: string }): Promise<void> {
  const { photoId, ...keys } = params;
  await db.update(photos).set({ ...keys, state: 'ready' }).where(eq(photos.id, photoId));
}

export async function markPhotoFailed(db: DbOrTx, photoId: string): Promise<void> {
  await db.update(photos).set({ state: 'failed' }).where(eq(photos.id, photoId));
}

/** A photo of a case that the actor may see, with what permissions need to know of the case. */
export async function findCasePhoto(db: DbOrTx, actor: Actor, photoId: string) {
  const [row] = await db.select({ photo: photos, case: cases }).from(photos).innerJoin(cases, eq(cases.id, photos.caseId)).where(and(visibleTo(actor), eq(photos.id, photoId)));
  return row ?? null;
}

/** All photos of a case, by label. */
export async function listCasePhotos(db: DbOrTx, params: { actor: Actor; caseNumber: number }): Promise<PhotoRow[]> {
  const rows = await db
    .select({ photo: photos })
    .from(photos)
    .innerJoin(cases, eq(cases.id, photos.caseId))
    .where(and(visibleTo(params.actor), eq(cases.number, params.caseNumber)))
    .orderBy(asc(photos.label));
  return rows.map((row) => row.photo);
}

/** One photo of a visible case, by label. */
export async function findPhotoByLabel(db: DbOrTx, params: { actor: Actor; caseNumber: number; label: number }): Promise<PhotoRow | null> {
  const [row] = await db.select({ photo: photos }).from(photos).innerJoin(cases, eq(cases.id, photos.caseId)).where(and(visibleTo(params.actor), eq(cases.number, params.caseNumber), eq(photos.label, params.label)));
  return row?.photo ?? null;
}

/** A photo of the locked case. */
export async function getPhotoOfCase(tx: Transaction, params: { caseId: string; photoId: string }): Promise<PhotoRow | null> {
  const [row] = await tx.select().from(photos).where(and(eq(photos.caseId, params.caseId), eq(photos.id, params.photoId)));
  return row ?? null;
}

export interface PhotoChange {
  readonly view?: PhotoView | null;
  readonly caption?: string;
  readonly altText?: string;
  readonly clockErrorS?: number;
  readonly takenAt?: Date | null;
  readonly exifAnswer?: PhotoExifAnswer;
  readonly position?: number | null;
  readonly masks?: readonly PhotoMask[];
  readonly marks?: readonly PhotoMark[];
  readonly releasable?: PhotoRow['releasable'];
}

export async function updatePhoto(tx: Transaction, photoId: string, change: PhotoChange): Promise<void> {
  await tx.update(photos).set(change).where(eq(photos.id, photoId));
}

export async function recordHashCheck(db: DbOrTx, params: { photoId: string; result: NonNullable<PhotoRow['hashCheck']> }): Promise<void> {
  await db.update(photos).set({ hashCheck: params.result, hashCheckedAt: sql`now()` }).where(eq(photos.id, params.photoId));
}

/** Photos of reports that were begun long ago and never sent. */
export function listAbandonedPhotos(db: DbOrTx, params: { before: Date; limit: number }): Promise<PhotoRow[]> {
  return db
    .select()
    .from(photos)
    .where(and(isNull(photos.caseId), lt(photos.createdAt, params.before)))
    .orderBy(asc(photos.createdAt))
    .limit(params.limit);
}

/** Removes the row unless the report was sent meanwhile. */
export async function deleteAbandonedPhoto(db: DbOrTx, photoId: string): Promise<boolean> {
  const gone = await db.delete(photos).where(and(eq(photos.id, photoId), isNull(photos.caseId))).returning({ id: photos.id });
  return gone.length > 0;
}
