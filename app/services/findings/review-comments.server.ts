import { inTransaction } from '#db/client.server.ts';
import type { Transaction } from '#db/client.server.ts';
import { lockCase } from '#db/queries/case-subject.server.ts';
import { insertReviewComment, listFindingRows, lockReviewComment, markCommentSettled } from '#db/queries/findings.server.ts';
import { insertLogEntry } from '#db/queries/log.server.ts';
import { DomainError, notFound } from '#app/domain/errors.ts';
import { reviewFieldLabels } from '#app/domain/finding.ts';
import type { ReviewField } from '#app/domain/finding.ts';
import { maySettleComment, withAuthorship } from '#app/domain/review-rights.ts';
import type { Actor } from '#app/domain/roles.ts';
import { authorize } from '#app/services/authorize.ts';

async function lockForReview(tx: Transaction, actor: Actor, caseNumber: number) {
  const found = await lockCase(tx, actor, caseNumber);
  if (!found) throw notFound('The case');
  const versions = await listFindingRows(tx, found.row.id);
  return { row: found.row, versions, subject: withAuthorship(found.subject, versions, actor.userId) };
}

/** A remark of the reviewer on one named field of the version that was sent. */
export async function addReviewComment({ actor, caseNumber, field, body }: { readonly actor: Actor; readonly caseNumber: number; readonly field: ReviewField; readonly body: string }): Promise<{ commentId: string }> {
  return inTransaction(async (tx) => {
    const { row, versions, subject } = await lockForReview(tx, actor, caseNumber);
    authorize(actor, 'finding:review', subject);
    const [latest] = versions;
    if (latest?.state !== 'sent') throw new DomainError('invalid-state', 'No version of the finding is with the reviewer.');
    const commentId = await insertReviewComment(tx, { findingId: latest.id, field, body, authorId: actor.userId });
    await insertLogEntry(tx, {
      ...line(actor, row, commentId),
      event: 'review-comment.added',
      summary: `Comment on "${reviewFieldLabels[field]}" of finding version ${latest.version}.`,
      after: { field, body },
    });
    return { commentId };
  });
}

/** Settles a comment: by the author who has dealt with it, or by a reviewer. */
export async function settleReviewComment({ actor, caseNumber, commentId, reason }: { readonly actor: Actor; readonly caseNumber: number; readonly commentId: string; readonly reason: string }): Promise<void> {
  return inTransaction(async (tx) => {
    const { row, subject } = await lockForReview(tx, actor, caseNumber);
    const comment = await lockReviewComment(tx, { caseId: row.id, commentId });
    if (!comment) throw notFound('The comment');
    if (!maySettleComment(actor, subject, comment.findingAuthorId)) throw new DomainError('forbidden', 'A comment is settled by the author of the finding, or by a technical reviewer who is not the author.');
    if (comment.settledAt) throw new DomainError('conflict', 'This comment is settled already.');
    await markCommentSettled(tx, commentId, actor.userId);
    await insertLogEntry(tx, {
      ...line(actor, row, commentId),
      event: 'review-comment.settled',
      summary: `Comment on "${reviewFieldLabels[comment.field]}" of finding version ${comment.version} settled.`,
      reason,
    });
  });
}

const line = (actor: Actor, row: { readonly id: string; readonly organisationId: string }, commentId: string) => ({
  actorId: actor.userId,
  actorName: actor.displayName,
  organisationId: row.organisationId,
  caseId: row.id,
  subject: 'review_comments',
  subjectId: commentId,
});
