import { inTransaction } from '#db/client.server.ts';
import { lockCase } from '#db/queries/case-subject.server.ts';
import { lockItem, updateDisposal } from '#db/queries/evidence.server.ts';
import { DomainError, notFound } from '#app/domain/errors.ts';
import type { DecideDisposal } from '#app/domain/evidence-form.ts';
import { disposalLabels, itemCode } from '#app/domain/evidence.ts';
import type { Actor } from '#app/domain/roles.ts';
import { authorize } from '#app/services/authorize.ts';
import { logLine } from '#app/services/log-line.server.ts';

/**
 * Keeps what is to become of an item, with the reason. Carrying it out is a hand-over like any other.
 *
 * @throws DomainError `invalid-state` for destruction under a legal hold.
 */
export async function decideDisposal({ actor, caseNumber, label, decision }: { readonly actor: Actor; readonly caseNumber: number; readonly label: number; readonly decision: DecideDisposal }): Promise<void> {
  return inTransaction(async (tx) => {
    const found = await lockCase(tx, actor, caseNumber);
    if (!found) throw notFound('The case');
    authorize(actor, 'evidence:write', found.subject);
    const item = await lockItem(tx, { caseId: found.row.id, label });
    if (!item) throw notFound('The item');
    if (decision.disposal === 'destroy' && found.row.legalHold) throw new DomainError('invalid-state', 'The case is under a legal hold.', { fieldErrors: { disposal: ['Nothing of this case is destroyed until the hold is lifted.'] } });
    if (decision.disposal === item.disposal && decision.reason === item.disposalReason) return;
    await updateDisposal(tx, item.id, { disposal: decision.disposal, disposalReason: decision.reason });
    await logLine(tx, actor, found.row, {
      event: 'evidence.disposal-decided',
      subject: 'evidence_items',
      subjectId: item.id,
      summary: `Item ${itemCode(caseNumber, label)}: ${disposalLabels[decision.disposal].toLowerCase()}.`,
      reason: decision.reason,
      before: { disposal: item.disposal },
      after: { disposal: decision.disposal },
    });
  });
}
