import { inTransaction } from '#db/client.server.ts';
import { listNotices } from '#db/queries/evidence-notices.server.ts';
import { examByClientId, insertExam } from '#db/queries/evidence.server.ts';
import { updatePlan } from '#db/queries/planned-exams.server.ts';
import { DomainError } from '#app/domain/errors.ts';
import type { RecordMade } from '#app/domain/evidence-form.ts';
import { examKindLabels } from '#app/domain/evidence.ts';
import { madeObstacles, toldBefore } from '#app/domain/planned-exam.ts';
import { logLine } from '#app/services/log-line.server.ts';
import { lockedItem } from './locked-item.server.ts';
import type { ItemCall } from './locked-item.server.ts';
import { protocolProblem, standingPlan } from './plan-exam.server.ts';

export interface RecordMadeRequest extends ItemCall {
  readonly made: RecordMade;
  readonly performedAt: Date;
  readonly now: Date;
}

/**
 * Records a planned examination as made. Who had been told, and when, is taken from the notice log; without a notice or a
 * protocol it is refused, and so it is without a reason when a party objected, had not been told, or the waiting time was
 * not over. The same form sent again changes nothing.
 *
 * @throws DomainError `not-found`, `forbidden`, `conflict` when the plan no longer stands, or `invalid-input` beside the field.
 */
export async function recordMadeExam({ actor, caseNumber, label, made, performedAt, now }: RecordMadeRequest): Promise<void> {
  return inTransaction(async (tx) => {
    const locked = await lockedItem(tx, { actor, caseNumber, label }, 'evidence:write');
    const { row, item, code } = locked;
    if (await examByClientId(tx, { itemId: item.id, clientId: made.clientId })) return;
    const plan = await standingPlan(tx, locked, made.planId);
    const notices = await listNotices(tx, [item.id]);
    const { clientId, performedBy, result, protocolAttachmentId, wentAheadReason } = made;
    const fieldErrors = { ...madeObstacles(plan, notices, { performedAt, protocolAttachmentId, wentAheadReason }, { collectedAt: item.collectedAt, now, zone: row.zone }), ...(await protocolProblem(tx, row.id, protocolAttachmentId)) };
    if (Object.keys(fieldErrors).length > 0) throw new DomainError('invalid-input', 'The examination cannot be recorded as made as it stands.', { fieldErrors });
    const told = toldBefore(plan, notices, performedAt);
    const examId = await insertExam(tx, { itemId: item.id, clientId, kind: 'may-alter', method: plan.method, result, performedBy, performedAt, ...told, protocolAttachmentId, wentAheadReason, recordedById: actor.userId });
    if (examId === null) throw new DomainError('conflict', 'The form was used before. Open the page anew; what you typed can be copied from here.');
    await updatePlan(tx, plan.id, { outcome: 'made', examId, settledAt: now, settledById: actor.userId });
    await logLine(tx, actor, row, {
      event: 'evidence.examined',
      subject: 'evidence_exams',
      subjectId: examId,
      summary: `Planned examination of item ${code} recorded as made: ${examKindLabels['may-alter'].toLowerCase()}.`,
      ...(wentAheadReason ? { reason: wentAheadReason } : {}),
      after: { planId: plan.id, performedAt: performedAt.toISOString(), noticeTo: told.noticeTo, noticeAt: told.noticeAt?.toISOString() ?? null, protocolAttachmentId },
    });
  });
}
