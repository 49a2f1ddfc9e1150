import { inTransaction } from '#db/client.server.ts';
import { insertNotice, insertReply, noticeByClientId, noticeOfItem } from '#db/queries/evidence-notices.server.ts';
import { DomainError, notFound } from '#app/domain/errors.ts';
import type { RecordAnswer, RecordNotice } from '#app/domain/evidence-form.ts';
import { answerObstacles, noticeAnswerLabels, noticeObstacles, partyRoleLabels } from '#app/domain/evidence-notice.ts';
import { logLine } from '#app/services/log-line.server.ts';
import { lockedItem } from './locked-item.server.ts';
import type { ItemCall } from './locked-item.server.ts';
import { standingPlan } from './plan-exam.server.ts';

/**
 * Adds a notice to the log of an item: to which party, how and when. The same form sent again changes nothing.
 *
 * @throws DomainError `not-found`, `forbidden`, or `invalid-input` beside the field.
 */
export async function recordNotice({ actor, caseNumber, label, notice, sentAt, now }: ItemCall & { readonly notice: RecordNotice; readonly sentAt: Date; readonly now: Date }): Promise<void> {
  return inTransaction(async (tx) => {
    const locked = await lockedItem(tx, { actor, caseNumber, label }, 'evidence:write');
    if (await noticeByClientId(tx, { itemId: locked.item.id, clientId: notice.clientId })) return;
    const fieldErrors = noticeObstacles(sentAt, now);
    if (Object.keys(fieldErrors).length > 0) throw new DomainError('invalid-input', 'The notice cannot be recorded as it stands.', { fieldErrors });
    if (notice.planId) await standingPlan(tx, locked, notice.planId);
    const { clientId, planId, partyRole, toWhom, way } = notice;
    const noticeId = await insertNotice(tx, { itemId: locked.item.id, clientId, planId, partyRole, toWhom, way, sentAt, recordedById: actor.userId });
    if (noticeId === null) return;
    await logLine(tx, actor, locked.row, {
      event: 'evidence.notice-recorded',
      subject: 'evidence_notices',
      subjectId: noticeId,
      summary: `Notice about ${planId ? 'the planned examination of ' : ''}item ${locked.code} to ${partyRoleLabels[partyRole].toLowerCase()} recorded.`,
      after: { planId, partyRole, way, sentAt: sentAt.toISOString() },
    });
  });
}

/** Adds what a party answered; earlier answers stay in the log. The same form sent again changes nothing. */
export async function recordAnswer({ actor, caseNumber, label, reply, answeredAt, now }: ItemCall & { readonly reply: RecordAnswer; readonly answeredAt: Date; readonly now: Date }): Promise<void> {
  return inTransaction(async (tx) => {
    const locked = await lockedItem(tx, { actor, caseNumber, label }, 'evidence:write');
    const notice = await noticeOfItem(tx, { itemId: locked.item.id, noticeId: reply.noticeId });
    if (!notice) throw notFound('The notice');
    const fieldErrors = answerObstacles(answeredAt, notice.sentAt, now);
    if (Object.keys(fieldErrors).length > 0) throw new DomainError('invalid-input', 'The answer cannot be recorded as it stands.', { fieldErrors });
    const { clientId, noticeId, answer, note } = reply;
    const replyId = await insertReply(tx, { clientId, noticeId, answer, note, answeredAt, recordedById: actor.userId });
    if (replyId === null) return;
    await logLine(tx, actor, locked.row, {
      event: 'evidence.notice-answered',
      subject: 'evidence_notices',
      subjectId: noticeId,
      summary: `Answer of ${partyRoleLabels[notice.partyRole].toLowerCase()} about item ${locked.code}: ${noticeAnswerLabels[answer].toLowerCase()}.`,
      after: { answer, answeredAt: answeredAt.toISOString() },
    });
  });
}
