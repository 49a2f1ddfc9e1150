import { db, inTransaction } from '#db/client.server.ts';
import { findEndedRelease, findReleasedTo, insertOpening, organisationOfCase } from '#db/queries/case-files.server.ts';
import type { ReleaseForReader } from '#db/queries/case-files.server.ts';
import { findKeptReleaseById, type ReleaseFile } from '#db/queries/releases.server.ts';
import { insertLogEntry } from '#db/queries/log.server.ts';
import { DomainError, notFound } from '#app/domain/errors.ts';
import { formatDayClock } from '#app/domain/local-time.ts';
import type { Actor } from '#app/domain/roles.ts';
import { getObject } from '#app/storage/objects.server.ts';
import { hashOf, sha256Hex } from '#app/storage/sha256.server.ts';

/**
 * A release for one of its readers, as it was frozen. The opening is noted, and stands in the log of the case.
 *
 * @throws DomainError `not-found`, with the reason where the release was addressed to this reader and has ended; `conflict`
 *   when what is stored is not what was approved.
 */
export async function openCaseFile({ actor, releaseId }: { readonly actor: Actor; readonly releaseId: string }): Promise<ReleaseForReader> {
  const release = await findForReader(actor, releaseId);
  if (hashOf(release.released) !== release.releasedHash) throw new DomainError('conflict', `Release ${release.number} is not shown: what is stored is not what was approved. The site team can see that too; ask them for a new release.`);
  await inTransaction(async (tx) => {
    await insertOpening(tx, { releaseId, userId: actor.userId });
    await insertLogEntry(tx, {
      actorId: actor.userId,
      actorName: actor.displayName,
      organisationId: await organisationOfCase(tx, release.caseId),
      caseId: release.caseId,
      event: 'release.opened',
      subject: 'releases',
      subjectId: releaseId,
      summary: `Release ${release.number} opened by a reader.`,
    });
  });
  return release;
}

async function findForReader(actor: Actor, releaseId: string): Promise<ReleaseForReader> {
  const release = await findReleasedTo(db, { actor, releaseId });
  if (release) return release;
  const ended = await findEndedRelease(db, { actor, releaseId });
  if (!ended) throw notFound('The release');
  if (ended.state === 'withdrawn') throw new DomainError('not-found', `Release ${ended.number} was withdrawn and is no longer open. Newer releases, where there are any, stand under Case files.`);
  throw new DomainError('not-found', `Release ${ended.number} could be read until ${formatDayClock(ended.expiresAt, ended.zone)} (${ended.zone.replaceAll('_', ' ')}). Ask the site team for a new one.`);
}

export interface CaseFileDownload {
  readonly bytes: Uint8Array;
  readonly mime: string;
  /** Made from case, release and manifest. */
  readonly fileName: string;
}

/**
 * One file of a release: for its readers while it is open, and for those who prepare or approve releases of its case.
 *
 * @throws DomainError `not-found`, or `conflict` when the stored bytes are not those of the manifest.
 */
export async function readReleaseFile({ actor, releaseId, fileName }: { readonly actor: Actor; readonly releaseId: string; readonly fileName: string }): Promise<CaseFileDownload> {
  const kept = await findKeptReleaseById(db, { actor, releaseId });
  const release = kept ? { ...kept.release, caseNumber: kept.caseNumber } : await forReader(actor, releaseId);
  const file = release.files.find((one) => one.name === fileName);
  if (!file) throw notFound('The file');
  const bytes = await verifiedBytes(file, release.number);
  if (!kept && !file.mime.startsWith('image/')) await noteDownload(actor, release, file);
  return { bytes, mime: file.mime, fileName: `case-${release.caseNumber}-release-${release.number}-${file.name}` };
}

async function forReader(actor: Actor, releaseId: string) {
  const release = await findForReader(actor, releaseId);
  return { ...release, caseNumber: release.released.caseNumber };
}

async function verifiedBytes(file: ReleaseFile, number: number): Promise<Uint8Array> {
  const bytes = await getObject(file.objectKey);
  if (!bytes || sha256Hex(bytes) !== file.sha256) throw new DomainError('conflict', `${file.name} of release ${number} is not sent: what is stored is ${bytes ? 'not the file of the manifest' : 'missing'}. Ask the site team for a new release.`);
  return bytes;
}

/** Taking a file away is noted like an opening; photos come with the page. */
async function noteDownload(actor: Actor, release: { readonly id: string; readonly caseId: string; readonly number: number }, file: ReleaseFile): Promise<void> {
  await inTransaction(async (tx) =>
    insertLogEntry(tx, {
      actorId: actor.userId,
      actorName: actor.displayName,
      organisationId: await organisationOfCase(tx, release.caseId),
      caseId: release.caseId,
      event: 'release.file-read',
      subject: 'releases',
      subjectId: release.id,
      summary: `${file.name} of release ${release.number} taken away by a reader.`,
    }),
  );
}
