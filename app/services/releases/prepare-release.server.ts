import { randomUUID } from 'node:crypto';
import { db, inTransaction } from '#db/client.server.ts';
import type { Transaction } from '#db/client.server.ts';
import { readCaseBeforeRedaction } from '#db/queries/case-before-redaction.server.ts';
import type { ReleaseSource } from '#db/queries/case-before-redaction.server.ts';
import { lockCase } from '#db/queries/case-subject.server.ts';
import { insertLogEntry } from '#db/queries/log.server.ts';
import { insertRelease, listRecipientOrganisations } from '#db/queries/releases.server.ts';
import type { ReleaseFile } from '#db/queries/releases.server.ts';
import type { CaseBeforeRedaction } from '#app/domain/case-before-redaction.ts';
import { DomainError, notFound } from '#app/domain/errors.ts';
import { heldWords, redactCase } from '#app/domain/redaction.ts';
import { linesToDecide } from '#app/domain/lines-to-decide.ts';
import { readExpiry } from '#app/domain/release-form.ts';
import { audienceLabels } from '#app/domain/release-policy.ts';
import type { Audience } from '#app/domain/release-policy.ts';
import { findHits, searcherFor } from '#app/domain/redact-text.ts';
import type { Decisions, Redaction } from '#app/domain/redaction.ts';
import type { Actor } from '#app/domain/roles.ts';
import { authorize } from '#app/services/authorize.ts';
import { deleteObject, putObject } from '#app/storage/objects.server.ts';
import { hashOf, sha256Hex } from '#app/storage/sha256.server.ts';
import { dataFileName, makeReleaseFiles } from './release-files.server.ts';
import type { MadeFile } from './release-files.server.ts';

/**
 * Stands for what the preparer has before them: every line that this reader could get, and every photo with its boxes.
 * Decisions that were made on something else are not applied.
 */
export function basisOf(source: CaseBeforeRedaction, audience: Audience): string {
  return hashOf({ lines: linesToDecide(source, audience), photos: source.photos.map(({ photoId, label, masks, releasable }) => ({ photoId, label, masks, releasable })) });
}

export interface PrepareRequest {
  readonly actor: Actor;
  readonly caseNumber: number;
  readonly audience: Audience;
  readonly recipientOrganisationId: string;
  readonly changeNote: string;
  /** The last day, on the clock of the place, or the instant itself. */
  readonly expires: { readonly on: string } | { readonly at: Date };
  readonly decisions: Decisions;
  /** `basisOf` what was shown; null where nobody looked at a page, as when the demonstration is seeded. */
  readonly basis: string | null;
}

/**
 * Freezes a redacted copy of the case under the next number: the released case, its files and their hashes. It stays in
 * the house until another person releases it.
 *
 * @returns The number of the release.
 * @throws DomainError `not-found`, `forbidden`, `invalid-input` for a recipient that is none, a day that cannot be, or a note that tells something, or `conflict` when the case
 *   changed since it was shown or while the copy was made.
 */
export async function prepareRelease(request: PrepareRequest): Promise<number> {
  const { actor, caseNumber, audience, decisions } = request;
  const before = await readCaseBeforeRedaction(db, { actor, caseNumber });
  if (!before) throw notFound('The case');
  authorize(actor, 'release:prepare', before.subject);
  if (request.basis !== null && request.basis !== basisOf(before.source, audience)) {
    throw new DomainError('conflict', 'The case changed while this page was open. Your decisions are still here: read the lines and photos again, then prepare.');
  }
  refuseTellingNote(request.changeNote, before.source, audience);
  const expiresAt = expiryOf(request.expires, before.source.zone);
  const redaction = redactCase(before.source, audience, decisions);
  const id = randomUUID();
  const files = await storeFiles(id, await makeReleaseFiles(redaction, before.source, audience));
  try {
    return await inTransaction((tx) => store(tx, { request, before, redaction, id, files, expiresAt }));
  } catch (error) {
    // Nothing refers to these objects; what cannot be removed now only takes room.
    await Promise.allSettled(files.map((file) => deleteObject(file.objectKey)));
    throw error;
  }
}

/** The note goes out as it is typed, so it may hold nothing that would be cut from a line. */
function refuseTellingNote(changeNote: string, source: CaseBeforeRedaction, audience: Audience): void {
  if (findHits(changeNote, searcherFor(heldWords(source, audience))).length === 0) return;
  const sentence = 'The change note goes out as it stands: leave out names, contacts, places, health and legal matters.';
  throw new DomainError('invalid-input', sentence, { fieldErrors: { changeNote: [sentence] } });
}

function expiryOf(expires: PrepareRequest['expires'], zone: string): Date {
  if ('at' in expires) return expires.at;
  const reading = readExpiry(expires.on, new Date(), zone);
  if (!reading.ok) throw new DomainError('invalid-input', reading.sentence, { fieldErrors: { expiresOn: [reading.sentence] } });
  return reading.expiresAt;
}

async function storeFiles(releaseId: string, made: readonly MadeFile[]): Promise<ReleaseFile[]> {
  const files: ReleaseFile[] = [];
  for (const { name, change, mime, bytes } of made) {
    const objectKey = `releases/${releaseId}/${name}`;
    await putObject(objectKey, bytes, mime);
    files.push({ name, change, mime, bytes: bytes.byteLength, sha256: sha256Hex(bytes), objectKey });
  }
  return files;
}

interface Prepared {
  readonly request: PrepareRequest;
  readonly before: ReleaseSource;
  readonly redaction: Redaction;
  readonly id: string;
  readonly files: readonly ReleaseFile[];
  readonly expiresAt: Date;
}

async function store(tx: Transaction, { request, before, redaction, id, files, expiresAt }: Prepared): Promise<number> {
  const { actor, caseNumber, audience, decisions, recipientOrganisationId } = request;
  const locked = await lockCase(tx, actor, caseNumber);
  if (!locked) throw notFound('The case');
  authorize(actor, 'release:prepare', locked.subject);
  const now = await readCaseBeforeRedaction(tx, { actor, caseNumber });
  if (!now || hashOf(now.source) !== hashOf(before.source)) throw new DomainError('conflict', 'The case changed while the copy was being made. Nothing was stored: read it again, then prepare.');
  const recipients = await listRecipientOrganisations(tx, { organisationId: before.organisationId, audience });
  const recipient = recipients.find((one) => one.id === recipientOrganisationId);
  if (!recipient) throw new DomainError('invalid-input', 'Choose an organisation that may read releases of this kind.', { fieldErrors: { recipientOrganisationId: ['Choose an organisation from the list.'] } });
  const releasedHash = hashOf(redaction.released);
  if (files.find((file) => file.name === dataFileName)?.sha256 !== releasedHash) throw new Error('The data file of a release is not the released case.');
  const number = await insertRelease(tx, {
    id,
    caseId: before.caseId,
    audience,
    recipientOrganisationId,
    changeNote: request.changeNote,
    released: redaction.released,
    withheld: redaction.withheld,
    files,
    releasedHash,
    decisions,
    preparedById: actor.userId,
    expiresAt,
  });
  await insertLogEntry(tx, {
    actorId: actor.userId,
    actorName: actor.displayName,
    organisationId: before.organisationId,
    caseId: before.caseId,
    event: 'release.prepared',
    subject: 'releases',
    subjectId: id,
    summary: `Release ${number} prepared for ${recipient.name} (${audienceLabels[audience].toLowerCase()}).`,
    after: { number, audience, recipientOrganisationId, releasedHash, expiresAt: expiresAt.toISOString() },
  });
  return number;
}
