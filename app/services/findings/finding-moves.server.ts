import type { Transaction } from '#db/client.server.ts';
import { getPerson } from '#db/queries/case-people.server.ts';
import { hasSeenOpinion, insertFindingDraft, listFindingRows, markFindingSent, markFindingSentBack, markFindingSigned, openCommentsOf, readSignedBasis } from '#db/queries/findings.server.ts';
import type { FindingRow } from '#db/queries/findings.server.ts';
import { listHypothesesOfCase } from '#db/queries/hypotheses.server.ts';
import { insertLogEntry } from '#db/queries/log.server.ts';
import { insertMail } from '#db/queries/outbox.server.ts';
import { DomainError } from '#app/domain/errors.ts';
import { certaintyFacts, selectionObstacles } from '#app/domain/finding-form.ts';
import { certaintyObstacles } from '#app/domain/finding.ts';
import type { Actor } from '#app/domain/roles.ts';
import { findingSentBackMail } from '#app/mail/templates/finding-sent-back.ts';
import { freezeReport } from '#app/services/finding-reports/freeze-report.server.ts';
import { freezeFinding } from './freeze-finding.server.ts';

export interface FindingMove {
  readonly moveId: 'send-findings' | 'send-back' | 'sign';
  readonly caseId: string;
  readonly actor: Actor;
  readonly reason: string;
}

/**
 * What a move of the case does to its finding, in the transaction and under the lock of the move, whose permission has
 * been checked. Signing also needs that the reviewer wrote no version of it and has asked to see the opinion.
 *
 * @throws DomainError `forbidden` or `invalid-state` with a sentence for the person.
 */
export async function applyFindingMove(tx: Transaction, move: FindingMove): Promise<void> {
  const versions = await listFindingRows(tx, move.caseId);
  const [latest] = versions;
  if (!latest) throw new DomainError('invalid-state', 'There is no finding yet.');
  if (move.moveId === 'send-findings') return send(tx, move, latest);
  if (versions.some((version) => version.authorId === move.actor.userId)) {
    throw new DomainError('forbidden', 'You wrote a version of this finding. Another technical reviewer reads and signs it.');
  }
  if (latest.state !== 'sent') throw new DomainError('invalid-state', 'No version of the finding is with the reviewer.');
  return move.moveId === 'sign' ? sign(tx, move, latest) : sendBack(tx, move, latest);
}

async function send(tx: Transaction, { actor, caseId, reason }: FindingMove, latest: FindingRow): Promise<void> {
  if (latest.state !== 'draft') throw new DomainError('invalid-state', 'There is no draft to send: write the opinion first.');
  if (latest.authorId !== actor.userId) throw new DomainError('forbidden', 'The author sends their own draft. Write a version in your own name, or ask the author.');
  const hypotheses = await listHypothesesOfCase(tx, caseId);
  const needs = [
    ...certaintyObstacles(latest.certainty, certaintyFacts(hypotheses, latest.selectedHypothesisId)),
    ...selectionObstacles(latest.certainty, hypotheses.find((hypothesis) => hypothesis.id === latest.selectedHypothesisId) ?? null),
  ];
  if (needs.length > 0) throw new DomainError('invalid-state', 'The certainty no longer goes with the tests.', { needs });
  await markFindingSent(tx, latest.id);
  await writeLine(tx, { actor, caseId, reason }, latest, 'finding.sent', `Finding version ${latest.version} sent to review.`);
}

async function sendBack(tx: Transaction, { actor, caseId, reason }: FindingMove, latest: FindingRow): Promise<void> {
  const openComments = await openCommentsOf(tx, latest.id);
  if (openComments === 0) throw new DomainError('invalid-state', 'Not ready to go back.', { needs: [`Write at least one comment on a field of version ${latest.version}.`] });
  await markFindingSentBack(tx, latest.id, actor.userId);
  const { opinion, selectedHypothesisId, certainty, classification, immediateCauses, underlyingCauses, rootCauses, limits } = latest;
  const copy = { opinion, selectedHypothesisId, certainty, classification, immediateCauses, underlyingCauses, rootCauses, limits };
  await insertFindingDraft(tx, { ...copy, caseId, version: latest.version + 1, authorId: latest.authorId });
  await writeLine(tx, { actor, caseId, reason }, latest, 'finding.sent-back', `Finding version ${latest.version} sent back with comments; version ${latest.version + 1} is a copy to work on.`);
  const author = await getPerson(tx, latest.authorId);
  if (!author) return;
  const { case: caseRow } = await readSignedBasis(tx, caseId);
  await insertMail(tx, { dedupeKey: `finding-sent-back:${latest.id}`, toAddress: author.email, caseId, ...findingSentBackMail({ caseNumber: caseRow.number, version: latest.version, openComments }) });
}

async function sign(tx: Transaction, { actor, caseId, reason }: FindingMove, latest: FindingRow): Promise<void> {
  if (!(await hasSeenOpinion(tx, { findingId: latest.id, userId: actor.userId }))) {
    throw new DomainError('invalid-state', 'Not ready to be signed.', { needs: ['Read the inputs, then show the opinion and read it: nobody signs what they have not seen.'] });
  }
  const signedAt = new Date();
  const { frozen, frozenHash } = await freezeFinding(tx, { finding: latest, reviewer: actor, signedAt });
  await markFindingSigned(tx, latest.id, { reviewerId: actor.userId, at: signedAt, frozen, frozenHash });
  const { case: caseRow } = await readSignedBasis(tx, caseId);
  const author = await getPerson(tx, latest.authorId);
  await freezeReport(tx, { actor, caseNumber: caseRow.number, findingId: latest.id, finding: { ...latest, state: 'signed', author: author?.displayName ?? 'the author', reviewer: actor.displayName, signedAt, frozenHash }, at: signedAt });
  await writeLine(tx, { actor, caseId, reason }, latest, 'finding.signed', `Finding version ${latest.version} signed and frozen, SHA-256 ${frozenHash}.`);
}

async function writeLine(tx: Transaction, { actor, caseId, reason }: Omit<FindingMove, 'moveId'>, finding: FindingRow, event: string, summary: string): Promise<void> {
  await insertLogEntry(tx, {
    actorId: actor.userId,
    actorName: actor.displayName,
    organisationId: actor.organisationId,
    caseId,
    event,
    subject: 'findings',
    subjectId: finding.id,
    summary,
    reason: reason.trim(),
  });
}
