import type { Transaction } from '#db/client.server.ts';
import { inTransaction } from '#db/client.server.ts';
import { getAttachmentOfCase } from '#db/queries/attachments.server.ts';
import { lockCase } from '#db/queries/case-subject.server.ts';
import { listNotices } from '#db/queries/evidence-notices.server.ts';
import { insertExam, lockItem } from '#db/queries/evidence.server.ts';
import type { EvidenceItemRow } from '#db/queries/evidence.server.ts';
import { listPlans } from '#db/queries/planned-exams.server.ts';
import { DomainError, notFound } from '#app/domain/errors.ts';
import type { RecordExam } from '#app/domain/evidence-form.ts';
import { examKindLabels, examObstacles, itemCode } from '#app/domain/evidence.ts';
import { goAheadObstacles, objectionWords } from '#app/domain/planned-exam.ts';
import type { Actor } from '#app/domain/roles.ts';
import { authorize } from '#app/services/authorize.ts';
import { logLine } from '#app/services/log-line.server.ts';

export interface RecordExamRequest {
  readonly actor: Actor;
  readonly caseNumber: number;
  readonly label: number;
  readonly exam: RecordExam;
  readonly performedAt: Date;
  readonly noticeAt: Date | null;
  readonly now: Date;
}

/**
 * Records an examination of an item. One that may alter the item is refused without notice given before it and a protocol
 * among the documents of the case, and while a party objects also without a reason for going ahead.
 *
 * @throws DomainError `not-found`, `forbidden`, or `invalid-input` beside the field.
 */
export async function recordExam({ actor, caseNumber, label, exam, performedAt, noticeAt, now }: RecordExamRequest): Promise<void> {
  return inTransaction(async (tx) => {
    const found = await lockCase(tx, actor, caseNumber);
    if (!found) throw notFound('The case');
    authorize(actor, 'evidence:write', found.subject);
    const item = await lockItem(tx, { caseId: found.row.id, label });
    if (!item) throw notFound('The item');
    const { clientId, examKind: kind, method, result, performedBy, noticeTo, protocolAttachmentId, wentAheadReason } = exam;
    const fieldErrors = examObstacles({ kind, performedAt, noticeTo, noticeAt, protocolAttachmentId }, item.collectedAt, now);
    if (kind === 'may-alter') Object.assign(fieldErrors, goAheadObstacles(await objectionsToItem(tx, item, performedAt), wentAheadReason));
    if (protocolAttachmentId && !(await getAttachmentOfCase(tx, { caseId: found.row.id, attachmentId: protocolAttachmentId }))) fieldErrors['protocolAttachmentId'] = ['Choose one of the documents of this case.'];
    if (Object.keys(fieldErrors).length > 0) throw new DomainError('invalid-input', 'The examination cannot be recorded as it stands.', { fieldErrors });
    const examId = await insertExam(tx, { itemId: item.id, clientId, kind, method, result, performedBy, performedAt, noticeTo, noticeAt, protocolAttachmentId, wentAheadReason, recordedById: actor.userId });
    if (examId === null) return;
    await logLine(tx, actor, found.row, {
      event: 'evidence.examined',
      subject: 'evidence_exams',
      subjectId: examId,
      summary: `Examination of item ${itemCode(caseNumber, label)} recorded: ${examKindLabels[kind].toLowerCase()}.`,
      ...(wentAheadReason ? { reason: wentAheadReason } : {}),
      after: { kind, method, performedAt: performedAt.toISOString(), noticeTo, noticeAt: noticeAt?.toISOString() ?? null, protocolAttachmentId },
    });
  });
}

/** Objections to the item or to a planned examination of it that still stands. */
async function objectionsToItem(tx: Transaction, item: EvidenceItemRow, performedAt: Date): Promise<string[]> {
  const settled = new Set((await listPlans(tx, [item.id])).filter((plan) => plan.outcome !== null).map((plan) => plan.id));
  return objectionWords((await listNotices(tx, [item.id])).filter((notice) => notice.planId === null || !settled.has(notice.planId)), performedAt);
}
