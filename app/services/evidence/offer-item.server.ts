import { inTransaction } from '#db/client.server.ts';
import { insertOffer, listReceivers, offerByClientId, openOffer } from '#db/queries/custody-offers.server.ts';
import { openCustody } from '#db/queries/evidence.server.ts';
import { insertMail } from '#db/queries/outbox.server.ts';
import { holderAccount, offerObstacles } from '#app/domain/custody-offer.ts';
import { DomainError } from '#app/domain/errors.ts';
import type { OfferItem } from '#app/domain/evidence-form.ts';
import { holderRoleLabels, itemLetter } from '#app/domain/evidence.ts';
import { withRelation } from '#app/domain/permissions.ts';
import { custodyOfferedMail } from '#app/mail/templates/custody-offered.ts';
import { authorize } from '#app/services/authorize.ts';
import { logLine } from '#app/services/log-line.server.ts';
import { lockedItem } from './locked-item.server.ts';
import type { ItemCall } from './locked-item.server.ts';

/**
 * Offers an item to a person of the house, who hears of it by mail. The giver holds it until that person signs. The same
 * form sent again changes nothing.
 *
 * @throws DomainError `conflict` when the item changed hands or was offered in between; `invalid-input` beside the field.
 */
export async function offerItem({ actor, caseNumber, label, offer }: ItemCall & { readonly offer: OfferItem }): Promise<void> {
  return inTransaction(async (tx) => {
    const { row, subject, item, code } = await lockedItem(tx, { actor, caseNumber, label }, 'evidence:read');
    const open = await openCustody(tx, item.id);
    const holderId = holderAccount(open);
    authorize(actor, 'evidence:offer', withRelation(subject, 'holder-of-item', holderId === actor.userId));
    const { clientId, sequence, receiverId, holderRole, place, purpose, condition, givenBy } = offer;
    if (await offerByClientId(tx, { itemId: item.id, clientId })) return;
    if (await openOffer(tx, item.id)) throw new DomainError('conflict', 'The item is offered to somebody already, who has not answered. Whoever offered it can withdraw that first.');
    if (open.sequence !== sequence) throw new DomainError('conflict', 'Somebody recorded a hand-over of this item after you opened the page. What you typed is still below: open the page anew beside it and check who holds the item now.');
    const receivers = await listReceivers(tx, row);
    const fieldErrors = offerObstacles({ receivers, openRole: open.holderRole, holderId, actorId: actor.userId }, receiverId);
    const receiver = receivers.find((person) => person.userId === receiverId);
    if (!receiver || Object.keys(fieldErrors).length > 0) throw new DomainError('invalid-input', 'The item cannot be offered as it stands.', { fieldErrors });
    const offerId = await insertOffer(tx, { itemId: item.id, clientId, sequence, receiverId, holderRole, place, purpose, condition, givenBy, offeredById: actor.userId });
    // The form's id belongs to an offer of another item; no page of ours sends that.
    if (offerId === null) throw new DomainError('conflict', 'The form was used before. Open the page anew; what you typed can be copied from here.');
    await logLine(tx, actor, row, {
      event: 'evidence.offered',
      subject: 'custody_offers',
      subjectId: offerId,
      summary: `Item ${code} offered by ${holderRoleLabels[open.holderRole].toLowerCase()} to ${holderRoleLabels[holderRole].toLowerCase()}, who is to sign.`,
      reason: purpose,
      after: { sequence, receiverId, holderRole },
    });
    await insertMail(tx, { dedupeKey: `custody-offered:${offerId}`, toAddress: receiver.email, caseId: row.id, ...custodyOfferedMail({ code, path: `/cases/${caseNumber}/evidence/${itemLetter(label)}` }) });
  });
}
