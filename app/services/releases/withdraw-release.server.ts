import { inTransaction } from '#db/client.server.ts';
import { lockCase } from '#db/queries/case-subject.server.ts';
import { insertLogEntry } from '#db/queries/log.server.ts';
import { insertMail } from '#db/queries/outbox.server.ts';
import { listReaders, lockRelease, markWithdrawn } from '#db/queries/releases.server.ts';
import { DomainError, notFound } from '#app/domain/errors.ts';
import type { Actor } from '#app/domain/roles.ts';
import { releaseWithdrawnMail } from '#app/mail/templates/release-withdrawn.ts';
import { authorize } from '#app/services/authorize.ts';

/**
 * Closes a release for good: one that is out is no longer open to its readers, one that waits is dropped. Its preparer may
 * do that as well, since it only takes away.
 *
 * @throws DomainError `not-found`, `forbidden`, or `invalid-state` when it is withdrawn already.
 */
export async function withdrawRelease({ actor, caseNumber, number, reason }: { readonly actor: Actor; readonly caseNumber: number; readonly number: number; readonly reason: string }): Promise<void> {
  await inTransaction(async (tx) => {
    const locked = await lockCase(tx, actor, caseNumber);
    if (!locked) throw notFound('The case');
    authorize(actor, 'release:prepare', locked.subject);
    const release = await lockRelease(tx, { caseId: locked.row.id, number });
    if (!release) throw notFound('The release');
    if (release.state === 'withdrawn') throw new DomainError('invalid-state', `Release ${number} is withdrawn already.`);
    await markWithdrawn(tx, { releaseId: release.id, reason });
    await insertLogEntry(tx, {
      actorId: actor.userId,
      actorName: actor.displayName,
      organisationId: locked.row.organisationId,
      caseId: locked.row.id,
      event: 'release.withdrawn',
      subject: 'releases',
      subjectId: release.id,
      summary: `Release ${number} withdrawn.`,
      reason,
      before: { release: release.state },
    });
    if (release.state !== 'released') return;
    for (const reader of await listReaders(tx, release.recipientOrganisationId)) {
      const message = releaseWithdrawnMail({ caseNumber, releaseNumber: number });
      await insertMail(tx, { dedupeKey: `release-withdrawn:${release.id}:${reader.userId}`, toAddress: reader.email, caseId: locked.row.id, ...message });
    }
  });
}
