import type { OfferFacts } from './custody-offer.ts';
import { noticeAnswerLabels, noticeWayLabels, partyList, partyRoleLabels, standingAnswer } from './evidence-notice.ts';
import type { NoticeFacts, PartyRole } from './evidence-notice.ts';
import { holderRoleLabels, itemCode, itemLetter } from './evidence.ts';
import type { ItemFacts } from './evidence-view.ts';
import { formatDay, formatDayClock, toLocalInput } from './local-time.ts';
import { noticesFor, objectionWords, planNeeds } from './planned-exam.ts';
import type { PlanNeed } from './planned-exam.ts';

/** What waits on an item: planned examinations, notices and offers, in the words of the pages. */

interface Reading {
  readonly caseNumber: number;
  readonly zone: string;
  readonly now: Date;
}

export interface PlanView {
  readonly id: string;
  readonly code: string;
  readonly letter: string;
  readonly when: string;
  /** For a field, in the zone of the place. */
  readonly plannedLocal: string;
  readonly passed: boolean;
  readonly by: string;
  readonly method: string;
  readonly waitingDays: number;
  readonly tellRoles: readonly PartyRole[];
  readonly told: string;
  readonly protocolId: string | null;
  readonly revision: number;
  readonly needs: readonly PlanNeed[];
  readonly against: readonly string[];
}

/** Plans that stand, soonest first. `documentWords` names a document that this reader may open. */
export function planViews({ item, plans, notices }: ItemFacts, { caseNumber, zone, now }: Reading, documentWords: (id: string) => string | undefined): PlanView[] {
  return plans.filter((plan) => plan.outcome === null).map((plan) => ({
    id: plan.id,
    code: itemCode(caseNumber, item.label),
    letter: itemLetter(item.label),
    when: formatDayClock(plan.plannedAt, zone),
    plannedLocal: toLocalInput(plan.plannedAt, zone),
    passed: plan.plannedAt.getTime() <= now.getTime(),
    by: plan.performedBy,
    method: plan.method,
    waitingDays: plan.waitingDays,
    tellRoles: plan.tellRoles,
    told: partyList(plan.tellRoles),
    protocolId: plan.protocolAttachmentId,
    revision: plan.revision,
    needs: planNeeds(plan, notices, { now, zone }).map((need) => (need.key === 'protocol' && plan.protocolAttachmentId ? { ...need, note: documentWords(plan.protocolAttachmentId) ?? need.note } : need)),
    against: objectionWords(noticesFor(plan.id, notices), now),
  }));
}

/** Plans that were cancelled, as a line each. */
export const cancelledPlans = ({ plans }: Pick<ItemFacts, 'plans'>, zone: string): { readonly id: string; readonly words: string }[] =>
  plans.filter((plan) => plan.outcome === 'cancelled').map((plan) => ({ id: plan.id, words: `${plan.method}, planned for ${formatDayClock(plan.plannedAt, zone)}: cancelled. ${plan.cancelReason}` }));

export interface NoticeView {
  readonly id: string;
  readonly code: string;
  readonly letter: string;
  readonly role: string;
  readonly toWhom: string;
  readonly about: string;
  readonly sent: string;
  readonly sentDay: string;
  readonly way: string;
  /** Null while there is none. */
  readonly answer: { readonly words: string; readonly came: string; readonly note: string; readonly objects: boolean } | null;
  /** Answers that a newer one took the place of. */
  readonly earlier: readonly string[];
}

/** The notice log of an item, first sent first. */
export function noticeViews({ item, plans, notices }: ItemFacts, { caseNumber, zone, now }: Reading): NoticeView[] {
  return notices.map((notice) => {
    const standing = standingAnswer(notice, now);
    const plan = plans.find((one) => one.id === notice.planId);
    return {
      id: notice.id,
      code: itemCode(caseNumber, item.label),
      letter: itemLetter(item.label),
      role: partyRoleLabels[notice.partyRole],
      toWhom: notice.toWhom,
      about: plan ? planAbout(plan, zone) : 'the item',
      sent: formatDayClock(notice.sentAt, zone),
      sentDay: formatDay(notice.sentAt, zone),
      way: noticeWayLabels[notice.way],
      answer: standing && { words: noticeAnswerLabels[standing.answer], came: formatDayClock(standing.answeredAt, zone), note: standing.note, objects: standing.answer === 'objects' },
      earlier: notice.answers.filter((one) => one !== standing).map((one) => `${noticeAnswerLabels[one.answer].toLowerCase()}, ${formatDay(one.answeredAt, zone)}`),
    };
  });
}

const planAbout = ({ plannedAt, outcome }: ItemFacts['plans'][number], zone: string): string => `${outcome === null ? 'planned examination' : outcome === 'made' ? 'examination made' : 'cancelled examination'}, ${formatDay(plannedAt, zone)}`;

/** `Maker, sent 9 Jul 2026`: a notice in a list to choose from. */
export const noticeChoice = ({ partyRole, sentAt, toWhom }: NoticeFacts, zone: string): string => `${partyRoleLabels[partyRole]}, ${toWhom}, sent ${formatDay(sentAt, zone)}`;

export interface OfferView {
  readonly id: string;
  readonly code: string;
  readonly letter: string;
  readonly receiver: string;
  readonly mine: boolean;
  readonly role: string;
  readonly place: string;
  readonly purpose: string;
  readonly condition: string;
  readonly givenBy: string;
  readonly offered: string;
}

/** The offer of an item that waits for its receiver; null when there is none. */
export function waitingOfferView({ item, offers }: Pick<ItemFacts, 'item' | 'offers'>, { caseNumber, zone }: Omit<Reading, 'now'>, actorId: string): OfferView | null {
  const offer = offers.find((one) => one.answer === null);
  return offer
    ? {
        id: offer.id,
        code: itemCode(caseNumber, item.label),
        letter: itemLetter(item.label),
        receiver: offer.receiver,
        mine: offer.receiverId === actorId,
        role: holderRoleLabels[offer.holderRole],
        place: offer.place,
        purpose: offer.purpose,
        condition: offer.condition,
        givenBy: offer.givenBy,
        offered: `${formatDayClock(offer.createdAt, zone)} by ${offer.offeredBy}`,
      }
    : null;
}

/** Offers that came to nothing, as a line each. */
export const pastOffers = (offers: readonly OfferFacts[], zone: string): { readonly id: string; readonly words: string }[] =>
  offers.filter((offer) => offer.answer === 'declined' || offer.answer === 'withdrawn').map((offer) => ({
    id: offer.id,
    words: `Offered to ${offer.receiver} ${formatDayClock(offer.createdAt, zone)}, ${offer.answer === 'declined' ? `declined ${formatDayClock(offer.answeredAt ?? offer.createdAt, zone)}: ${offer.answerReason}` : `withdrawn ${formatDayClock(offer.answeredAt ?? offer.createdAt, zone)}`}`,
  }));
