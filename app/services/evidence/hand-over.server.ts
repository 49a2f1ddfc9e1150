import { inTransaction } from '#db/client.server.ts';
import { lockCase } from '#db/queries/case-subject.server.ts';
import { listReceivers, openOffer } from '#db/queries/custody-offers.server.ts';
import { closeCustody, custodyByClientId, insertCustody, lockItem, openCustody } from '#db/queries/evidence.server.ts';
import { personNamed, typedSignatureObstacles } from '#app/domain/custody-offer.ts';
import { DomainError, notFound } from '#app/domain/errors.ts';
import type { HandOver } from '#app/domain/evidence-form.ts';
import { handOverObstacles, holderRoleLabels, itemCode } from '#app/domain/evidence.ts';
import type { Actor } from '#app/domain/roles.ts';
import { authorize } from '#app/services/authorize.ts';
import { logLine } from '#app/services/log-line.server.ts';

export interface HandOverRequest {
  readonly actor: Actor;
  readonly caseNumber: number;
  readonly label: number;
  readonly handOver: HandOver;
  readonly handedAt: Date;
  readonly now: Date;
}

/**
 * Passes an item to a holder without an account, whose signature the recorder types, or to the recorder: the open record
 * ends and the next begins at the same instant. Anybody else of the house is offered the item. The same form sent again
 * changes nothing.
 *
 * @throws DomainError `conflict` when somebody else recorded a hand-over in between or the item is offered to somebody;
 *   `invalid-input` beside the field.
 */
export async function handOverItem({ actor, caseNumber, label, handOver, handedAt, now }: HandOverRequest): Promise<void> {
  return inTransaction(async (tx) => {
    const found = await lockCase(tx, actor, caseNumber);
    if (!found) throw notFound('The case');
    authorize(actor, 'evidence:write', found.subject);
    const item = await lockItem(tx, { caseId: found.row.id, label });
    if (!item) throw notFound('The item');
    if (await custodyByClientId(tx, { itemId: item.id, clientId: handOver.clientId })) return;
    const open = await openCustody(tx, item.id);
    if (open.sequence !== handOver.sequence) throw new DomainError('conflict', 'Somebody recorded a hand-over of this item after you opened the page. What you typed is still below: open the page anew beside it and check who holds the item now.');
    if (await openOffer(tx, item.id)) throw new DomainError('conflict', 'The item is offered to somebody who has not answered. Whoever offered it can withdraw that first.');
    const { clientId, holderRole, holderName, place, purpose, condition, givenBy, receivedBy } = handOver;
    const handing = handOverObstacles({ openSince: open.fromAt, openRole: open.holderRole, disposal: item.disposal, legalHold: found.row.legalHold }, { role: holderRole, at: handedAt }, now);
    const fieldErrors = { ...handing, ...typedSignatureObstacles(await listReceivers(tx, found.row), actor.userId, { holderName, receivedBy }) };
    if (Object.keys(fieldErrors).length > 0) throw new DomainError('invalid-input', 'The hand-over cannot be recorded as it stands.', { fieldErrors });
    await closeCustody(tx, open.id, handedAt);
    await insertCustody(tx, { itemId: item.id, clientId, sequence: open.sequence + 1, previousSequence: open.sequence, holderRole, holderName, place, purpose, condition, fromAt: handedAt, givenBy, receivedBy, receiverId: ownSignature(actor, receivedBy), recordedById: actor.userId });
    await logLine(tx, actor, found.row, {
      event: 'evidence.handed-over',
      subject: 'evidence_items',
      subjectId: item.id,
      summary: `Item ${itemCode(caseNumber, label)} passed from ${holderRoleLabels[open.holderRole].toLowerCase()} to ${holderRoleLabels[holderRole].toLowerCase()}.`,
      reason: purpose,
      before: { sequence: open.sequence, holderRole: open.holderRole },
      after: { sequence: open.sequence + 1, holderRole, at: handedAt.toISOString() },
    });
  });
}

/** The account of the recorder, when the name that they typed is their own. */
export const ownSignature = (actor: Actor, name: string): string | null => personNamed([actor], name)?.userId ?? null;
