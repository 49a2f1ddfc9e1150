import { db, inTransaction } from '#db/client.server.ts';
import type { Transaction } from '#db/client.server.ts';
import { readCaseBeforeRedaction } from '#db/queries/case-before-redaction.server.ts';
import { lockCase } from '#db/queries/case-subject.server.ts';
import type { CaseRow } from '#db/queries/case-subject.server.ts';
import { insertLogEntry } from '#db/queries/log.server.ts';
import { insertMail } from '#db/queries/outbox.server.ts';
import { findKeptRelease, listReaders, lockRelease, markReleased } from '#db/queries/releases.server.ts';
import type { ReleaseRow } from '#db/queries/releases.server.ts';
import { DomainError, notFound } from '#app/domain/errors.ts';
import { formatDayClock } from '#app/domain/local-time.ts';
import type { CaseSubject } from '#app/domain/permissions.ts';
import type { Actor } from '#app/domain/roles.ts';
import { releaseMadeMail } from '#app/mail/templates/release-made.ts';
import { authorize } from '#app/services/authorize.ts';
import { hashOf } from '#app/storage/sha256.server.ts';
import { inspectRelease } from './check-release.server.ts';

/** The case as the permission to approve sees it: whoever prepared a release is known as such. */
export function subjectFor(subject: CaseSubject, release: Pick<ReleaseRow, 'preparedById'>, actor: Actor): CaseSubject {
  return release.preparedById === actor.userId ? { ...subject, relations: [...subject.relations, 'preparer-of-release'] } : subject;
}

/**
 * Lets a prepared release out, once another person than its preparer has read it and every search of its bytes passed.
 * Writes to the readers of the recipient.
 *
 * @throws DomainError `not-found`, `forbidden` for the preparer too, or `invalid-state` with what is in the way.
 */
export async function releaseCaseFile({ actor, caseNumber, number }: { readonly actor: Actor; readonly caseNumber: number; readonly number: number }): Promise<void> {
  const found = await findKeptRelease(db, { actor, caseNumber, number });
  if (!found) throw notFound('The release');
  // The files are read from the store before the case is locked; what they are is fixed by their hashes.
  const first = await inspectRelease(db, { actor, caseNumber, release: found.release });
  await inTransaction(async (tx) => {
    const locked = await lockCase(tx, actor, caseNumber);
    if (!locked) throw notFound('The case');
    const release = await lockRelease(tx, { caseId: locked.row.id, number });
    if (!release) throw notFound('The release');
    authorize(actor, 'release:approve', subjectFor(locked.subject, release, actor));
    refuseUnlessPrepared(release);
    const current = await readCaseBeforeRedaction(tx, { actor, caseNumber });
    if (!current || hashOf(current.source) !== first.sourceHash) throw new DomainError('conflict', 'The case changed at this moment. Nothing was released: read the page again.');
    if (!first.passed) {
      throw new DomainError('invalid-state', 'A search of what would leave found something. Prepare it again with that held back.', { needs: first.checks.filter((check) => !check.passed).map((check) => `${check.label}: ${check.note}.`) });
    }
    await markReleased(tx, { releaseId: release.id, approvedById: actor.userId });
    await tell(tx, actor, locked.row, release);
  });
}

function refuseUnlessPrepared(release: ReleaseRow): void {
  if (release.state === 'released') throw new DomainError('invalid-state', `Release ${release.number} is out already.`);
  if (release.state === 'withdrawn') throw new DomainError('invalid-state', `Release ${release.number} was withdrawn. Prepare a new one: it gets the next number.`);
  if (release.expiresAt.getTime() <= Date.now()) throw new DomainError('invalid-state', 'The day on which this release was to end has passed. Prepare a new one with a later day.');
}

async function tell(tx: Transaction, actor: Actor, row: CaseRow, release: ReleaseRow): Promise<void> {
  await insertLogEntry(tx, {
    actorId: actor.userId,
    actorName: actor.displayName,
    organisationId: row.organisationId,
    caseId: row.id,
    event: 'release.released',
    subject: 'releases',
    subjectId: release.id,
    summary: `Release ${release.number} approved and released.`,
    after: { number: release.number, releasedHash: release.releasedHash },
  });
  const endsWords = `${formatDayClock(release.expiresAt, row.zone)} (${row.zone.replaceAll('_', ' ')})`;
  for (const reader of await listReaders(tx, release.recipientOrganisationId)) {
    const message = releaseMadeMail({ caseNumber: row.number, releaseNumber: release.number, releaseId: release.id, endsWords });
    await insertMail(tx, { dedupeKey: `release-made:${release.id}:${reader.userId}`, toAddress: reader.email, caseId: row.id, ...message });
  }
}
