import { randomUUID } from 'node:crypto';
import { inTransaction } from '#db/client.server.ts';
import { lockCase } from '#db/queries/case-subject.server.ts';
import { findItemByClientId, insertCustody, insertItem, nextItemLabel } from '#db/queries/evidence.server.ts';
import { DomainError, notFound } from '#app/domain/errors.ts';
import type { CollectItem } from '#app/domain/evidence-form.ts';
import { itemCode } from '#app/domain/evidence.ts';
import type { Actor } from '#app/domain/roles.ts';
import { authorize } from '#app/services/authorize.ts';
import { logLine } from '#app/services/log-line.server.ts';
import { ownSignature } from './hand-over.server.ts';

export interface CollectItemRequest {
  readonly actor: Actor;
  readonly caseNumber: number;
  readonly item: CollectItem;
  readonly collectedAt: Date;
  readonly now: Date;
}

/**
 * Records an item with its label and its first holder, who has it from the moment of collection. The same form sent again
 * gives the same item.
 *
 * @throws DomainError `not-found`, `forbidden`, or `invalid-input` beside the field.
 */
export async function collectItem({ actor, caseNumber, item, collectedAt, now }: CollectItemRequest): Promise<{ label: number }> {
  return inTransaction(async (tx) => {
    const found = await lockCase(tx, actor, caseNumber);
    if (!found) throw notFound('The case');
    authorize(actor, 'evidence:write', found.subject);
    const earlier = await findItemByClientId(tx, { caseId: found.row.id, clientId: item.clientId });
    if (earlier) return { label: earlier.label };
    if (collectedAt.getTime() > now.getTime()) throw new DomainError('invalid-input', 'Not recorded yet.', { fieldErrors: { collectedAt: ['This is still to come. Check the day and the time.'] } });
    const label = await nextItemLabel(tx, found.row.id);
    const { clientId, kind, description, fromWhere, collectedBy, sealNumber, condition, holderRole, holderName, place } = item;
    const itemId = await insertItem(tx, { caseId: found.row.id, clientId, label, kind, description, fromWhere, collectedBy, collectedAt, sealNumber, createdById: actor.userId });
    await insertCustody(tx, { itemId, clientId: randomUUID(), sequence: 1, holderRole, holderName, place, purpose: 'Collected as evidence', condition, fromAt: collectedAt, receivedBy: holderName, receiverId: ownSignature(actor, holderName), recordedById: actor.userId });
    await logLine(tx, actor, found.row, {
      event: 'evidence.collected',
      subject: 'evidence_items',
      subjectId: itemId,
      summary: `Item ${itemCode(caseNumber, label)} collected.`,
      after: { label, kind, description, fromWhere, sealNumber, collectedAt: collectedAt.toISOString(), holderRole },
    });
    return { label };
  });
}
