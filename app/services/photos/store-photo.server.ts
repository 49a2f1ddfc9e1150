import { inTransaction } from '#db/client.server.ts';
import type { Transaction } from '#db/client.server.ts';
import { insertLogEntry } from '#db/queries/log.server.ts';
import { countReportPhotos, findPhotoByHash, insertPhoto, lockCaseRow, nextPhotoLabel } from '#db/queries/photos.server.ts';
import type { NewPhoto, PhotoRow } from '#db/queries/photos.server.ts';
import type { SentReport } from '#db/queries/reports.server.ts';
import { findSentReport, lockReport } from '#db/queries/reports.server.ts';
import type { PhotoDetails } from '#app/domain/photo-details.ts';
import { noDetails } from '#app/domain/photo-details.ts';
import { acceptedTime, photoExtension, photoRefusal, photosPerReport } from '#app/domain/photo.ts';
import type { ReportHolder } from '#app/domain/report.ts';
import { preparePhotoJob } from '#app/jobs/definitions/prepare-photo.ts';
import { enqueue } from '#app/jobs/queue.server.ts';
import { log } from '#app/log.server.ts';
import { isHeldBy, notYourReport } from '#app/services/reports/report-holder.server.ts';
import { putObject } from '#app/storage/objects.server.ts';
import { examinePhoto } from '#app/storage/photo-intake.server.ts';
import type { ExaminedPhoto, IncomingFile } from '#app/storage/photo-intake.server.ts';
import { detailColumns } from './photo-columns.ts';

/** Stored, or a sentence that names the file. */
export type PhotoOutcome =
  | { readonly ok: true; readonly photoId: string; readonly fileName: string; readonly bytes: number; readonly repeated: boolean }
  | { readonly ok: false; readonly fileName: string; readonly sentence: string };

/** Who brings a photo: a person, or somebody without an account under the words that the log uses for them. */
export interface Uploader {
  readonly userId: string | null;
  readonly displayName: string;
}

interface Upload {
  readonly file: IncomingFile;
  /** The report that the photo belongs to, sent or not. */
  readonly clientId: string;
  readonly uploader: Uploader;
  /** What the person said of it; nothing, for a photo added to a case. */
  readonly details?: PhotoDetails;
}
interface PhotoTarget extends Pick<SentReport, 'caseId' | 'organisationId'> {
  readonly zone?: string;
}

const guestByLink: Uploader = { userId: null, displayName: 'Guest by site link' };

/**
 * Takes a photo for a report under way. The original goes to the object store first, byte for byte; only then is it
 * acknowledged. The same bytes sent again give the same photo. A photo that arrives after its report was sent by the same
 * holder joins the case.
 *
 * @throws DomainError `forbidden` when the report was sent by somebody else.
 */
export async function storeReportPhoto(params: { holder: ReportHolder; clientId: string; file: IncomingFile; details?: PhotoDetails }): Promise<PhotoOutcome> {
  const { holder, clientId, file, details = noDetails } = params;
  return storePhoto({ file, clientId, uploader: holder.kind === 'person' ? holder.actor : guestByLink, details }, async (tx) => {
    const sent = await findSentReport(tx, clientId);
    if (sent && !isHeldBy(sent, holder)) throw notYourReport();
    return sent;
  });
}

/**
 * The common path: examine, store the bytes, write the row, enqueue the preparation.
 *
 * @param findCase the case that the photo joins, null for a report under way; called under the report's lock.
 */
export async function storePhoto({ file, clientId, uploader, details = noDetails }: Upload, findCase: (tx: Transaction) => Promise<PhotoTarget | null>): Promise<PhotoOutcome> {
  const examined = await examinePhoto(file);
  if (!examined.ok) return examined;
  const { photo } = examined;
  // The same bytes of the same report always have the same key: a repeated upload leaves nothing behind.
  const originalKey = `originals/${photo.sha256}/${clientId}.${photoExtension[photo.mime]}`;
  const stored = await putOriginal(originalKey, photo);
  if (!stored) return { ok: false, fileName: photo.fileName, sentence: photoRefusal.notStored(photo.fileName) };
  return inTransaction(async (tx) => {
    await lockReport(tx, clientId);
    const target = await findCase(tx);
    const earlier = await findPhotoByHash(tx, { clientId, sha256: photo.sha256 });
    if (earlier) return outcomeOf(earlier, true);
    if ((await countReportPhotos(tx, clientId)) >= photosPerReport) return { ok: false, fileName: photo.fileName, sentence: photoRefusal.tooMany(photo.fileName) };
    const label = target ? await labelIn(tx, target.caseId) : null;
    const said = detailColumns(details, new Date());
    const takenAt = target?.zone ? acceptedTime({ exif: photo.exif, exifAnswer: said.exifAnswer }, target.zone) : null;
    const row = await insertPhoto(tx, { reportClientId: clientId, caseId: target?.caseId ?? null, label, uploadedById: uploader.userId, originalKey, ...columnsOf(photo), ...said, takenAt, madeSmaller: details.madeSmaller });
    if (!row) throw new Error('The photo was inserted by another transaction in spite of the lock.');
    if (target) await logAdded(tx, row, target, uploader);
    await enqueue(tx, preparePhotoJob, { photoId: row.id });
    return outcomeOf(row, false);
  });
}

async function putOriginal(key: string, photo: ExaminedPhoto): Promise<boolean> {
  try {
    await putObject(key, photo.bytes, photo.mime);
    return true;
  } catch (error) {
    log.error({ err: error }, 'an original could not be stored');
    return false;
  }
}

async function labelIn(tx: Transaction, caseId: string): Promise<number> {
  await lockCaseRow(tx, caseId);
  return nextPhotoLabel(tx, caseId);
}

function columnsOf(photo: ExaminedPhoto): Omit<NewPhoto, 'reportClientId' | 'originalKey' | 'exifAnswer'> {
  return {
    fileName: photo.fileName,
    mime: photo.mime,
    bytes: photo.bytes.byteLength,
    sha256: photo.sha256,
    widthPx: photo.widthPx,
    heightPx: photo.heightPx,
    exif: photo.exif,
  };
}

function outcomeOf(row: PhotoRow, repeated: boolean): PhotoOutcome {
  return { ok: true, photoId: row.id, fileName: row.fileName, bytes: row.bytes, repeated };
}

async function logAdded(tx: Transaction, row: PhotoRow, target: PhotoTarget, uploader: Upload['uploader']): Promise<void> {
  await insertLogEntry(tx, {
    actorId: uploader.userId,
    actorName: uploader.displayName,
    organisationId: target.organisationId,
    caseId: target.caseId,
    event: 'photo.added',
    subject: 'photos',
    subjectId: row.id,
    summary: `Photo ${row.label} added.`,
    after: { label: row.label, sha256: row.sha256 },
  });
}
