import type { Transaction } from '#db/client.server.ts';
import { inTransaction } from '#db/client.server.ts';
import { getPerson } from '#db/queries/case-people.server.ts';
import { answerOffer, offerOfItem } from '#db/queries/custody-offers.server.ts';
import type { OfferLine } from '#db/queries/custody-offers.server.ts';
import { closeCustody, insertCustody, openCustody } from '#db/queries/evidence.server.ts';
import { insertMail } from '#db/queries/outbox.server.ts';
import type { OfferAnswer } from '#app/domain/custody-offer.ts';
import { DomainError, notFound } from '#app/domain/errors.ts';
import type { TakeOver } from '#app/domain/evidence-form.ts';
import { handOverObstacles, holderRoleLabels, itemLetter } from '#app/domain/evidence.ts';
import { canOnCase, withRelation } from '#app/domain/permissions.ts';
import { offerDeclinedMail } from '#app/mail/templates/custody-offered.ts';
import { authorize } from '#app/services/authorize.ts';
import { logLine } from '#app/services/log-line.server.ts';
import { lockedItem } from './locked-item.server.ts';
import type { ItemCall, LockedItem } from './locked-item.server.ts';

interface OfferCall extends ItemCall {
  readonly now: Date;
}

/** The offer under the item's lock; `repeated` when it was answered so before, as a form sent again brings. */
async function waitingOffer(tx: Transaction, { item }: LockedItem, offerId: string, answer: OfferAnswer, reason = ''): Promise<{ offer: OfferLine; repeated: boolean }> {
  const offer = await offerOfItem(tx, { itemId: item.id, offerId });
  if (!offer) throw notFound('The offer');
  if (offer.answer !== null && (offer.answer !== answer || offer.answerReason !== reason)) throw new DomainError('conflict', `The offer was ${offer.answer} in the meantime. Open the page anew to see who holds the item.`);
  return { offer, repeated: offer.answer !== null };
}

/**
 * The receiver signs on their own account: the open record ends and theirs begins now, at the same instant.
 *
 * @throws DomainError `forbidden` for anybody else; `conflict` when the offer no longer stands.
 */
export async function takeOverItem({ takeOver, now, ...call }: OfferCall & { readonly takeOver: TakeOver }): Promise<void> {
  const { actor } = call;
  return inTransaction(async (tx) => {
    const locked = await lockedItem(tx, call, 'evidence:read');
    const { row, subject, item, code } = locked;
    const { offer, repeated } = await waitingOffer(tx, locked, takeOver.offerId, 'taken');
    authorize(actor, 'evidence:take-over', withRelation(subject, 'receiver-of-item', offer.receiverId === actor.userId));
    if (repeated) return;
    const open = await openCustody(tx, item.id);
    if (open.sequence !== offer.sequence) throw new DomainError('conflict', 'The item changed hands after it was offered. Decline this offer and ask for a new one.');
    const { holderRole, purpose, givenBy } = offer;
    const problems = handOverObstacles({ openSince: open.fromAt, openRole: open.holderRole, disposal: item.disposal, legalHold: row.legalHold }, { role: holderRole, at: now }, now);
    if (Object.keys(problems).length > 0) throw new DomainError('invalid-state', 'The item cannot be taken over as it stands.', { needs: Object.values(problems).flat() });
    await answerOffer(tx, offer.id, { answer: 'taken', answerReason: '', answeredAt: now });
    await closeCustody(tx, open.id, now);
    await insertCustody(tx, { itemId: item.id, clientId: offer.id, sequence: open.sequence + 1, previousSequence: open.sequence, holderRole, holderName: actor.displayName, place: takeOver.place, purpose, condition: takeOver.condition, fromAt: now, givenBy, receivedBy: actor.displayName, receiverId: actor.userId, recordedById: actor.userId });
    await logLine(tx, actor, row, {
      event: 'evidence.handed-over',
      subject: 'evidence_items',
      subjectId: item.id,
      summary: `Item ${code} passed from ${holderRoleLabels[open.holderRole].toLowerCase()} to ${holderRoleLabels[holderRole].toLowerCase()}, signed by the receiver.`,
      reason: purpose,
      before: { sequence: open.sequence, holderRole: open.holderRole },
      after: { sequence: open.sequence + 1, holderRole, at: now.toISOString(), offerId: offer.id },
    });
  });
}

/** The receiver does not take the item; the giver holds it on. @throws DomainError `forbidden` for anybody else. */
export async function declineOffer({ offerId, reason, now, ...call }: OfferCall & { readonly offerId: string; readonly reason: string }): Promise<void> {
  const { actor, caseNumber, label } = call;
  return inTransaction(async (tx) => {
    const locked = await lockedItem(tx, call, 'evidence:read');
    const { row, subject, code } = locked;
    const { offer, repeated } = await waitingOffer(tx, locked, offerId, 'declined', reason);
    authorize(actor, 'evidence:take-over', withRelation(subject, 'receiver-of-item', offer.receiverId === actor.userId));
    if (repeated) return;
    await answerOffer(tx, offer.id, { answer: 'declined', answerReason: reason, answeredAt: now });
    await logLine(tx, actor, row, { event: 'evidence.offer-declined', subject: 'custody_offers', subjectId: offer.id, summary: `Item ${code} was not taken over: the offer was declined.`, reason, after: { answer: 'declined' } });
    const maker = await getPerson(tx, offer.offeredById);
    if (maker) await insertMail(tx, { dedupeKey: `custody-declined:${offer.id}`, toAddress: maker.email, caseId: row.id, ...offerDeclinedMail({ code, path: `/cases/${caseNumber}/evidence/${itemLetter(label)}` }) });
  });
}

/**
 * Takes an offer back before it is answered: whoever made it, or, once their account is switched off, whoever records
 * hand-overs of the case.
 *
 * @throws DomainError `forbidden` for anybody else.
 */
export async function withdrawOffer({ offerId, now, ...call }: OfferCall & { readonly offerId: string }): Promise<void> {
  const { actor } = call;
  return inTransaction(async (tx) => {
    const locked = await lockedItem(tx, call, 'evidence:read');
    const { row, subject, code } = locked;
    const { offer, repeated } = await waitingOffer(tx, locked, offerId, 'withdrawn');
    const stands = offer.offeredById === actor.userId || (offer.makerLeft && canOnCase(actor, 'evidence:write', subject));
    authorize(actor, 'evidence:withdraw-offer', withRelation(subject, 'maker-of-offer', stands));
    if (repeated) return;
    await answerOffer(tx, offer.id, { answer: 'withdrawn', answerReason: '', answeredAt: now });
    await logLine(tx, actor, row, { event: 'evidence.offer-withdrawn', subject: 'custody_offers', subjectId: offer.id, summary: `The offer of item ${code} was withdrawn.`, after: { answer: 'withdrawn' } });
  });
}
