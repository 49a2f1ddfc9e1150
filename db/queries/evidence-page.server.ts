import type { DbOrTx } from '#db/client.server.ts';
import { listAttachments, readableClasses } from './attachments.server.ts';
import { findCase } from './case-subject.server.ts';
import { listReceivers } from './custody-offers.server.ts';
import { listEvidence } from './evidence.server.ts';
import type { EvidenceWhole } from './evidence.server.ts';
import { holderAccount } from '#app/domain/custody-offer.ts';
import { documentView } from '#app/domain/document-view.ts';
import type { DocumentFacts } from '#app/domain/document-view.ts';
import { DomainError } from '#app/domain/errors.ts';
import { evidenceHeading } from '#app/domain/evidence-heading.ts';
import { cancelledPlans, noticeChoice, noticeViews, pastOffers, planViews, waitingOfferView } from '#app/domain/evidence-steps-view.ts';
import { custodyLine, itemLine, itemView } from '#app/domain/evidence-view.ts';
import { canOnCase, whoCan, withRelation } from '#app/domain/permissions.ts';
import type { CaseSubject } from '#app/domain/permissions.ts';
import { objectionWords } from '#app/domain/planned-exam.ts';
import type { Actor } from '#app/domain/roles.ts';

interface PageQuery {
  readonly actor: Actor;
  readonly caseNumber: number;
  readonly now: Date;
}

/** Names a document that this reader may open, by its id. */
const documentWords = (documents: readonly DocumentFacts[], zone: string) => (id: string): string | undefined => {
  const document = documents.find((one) => one.id === id);
  return document && `${documentView(document, zone).code} ${document.title}`;
};

/** Items, what waits on them, and documents of a case; null when the case is not theirs to see. @throws DomainError `forbidden` */
export async function getEvidencePage(db: DbOrTx, { actor, caseNumber, now }: PageQuery) {
  const found = await findCase(db, actor, caseNumber);
  if (!found) return null;
  const { row, subject } = found;
  if (!canOnCase(actor, 'evidence:read', subject)) throw new DomainError('forbidden', `The evidence is not open to you. ${whoCan('evidence:read')}`);
  const items = await listEvidence(db, { actor, caseNumber });
  const documents = await listAttachments(db, { actor, caseNumber, classes: readableClasses(actor, subject) });
  const reading = { caseNumber, zone: row.zone, now };
  return {
    caseNumber,
    zone: row.zone,
    heading: evidenceHeading(items, documents, reading),
    legalHold: row.legalHold,
    items: items.map((one) => itemLine(one, caseNumber, row.zone)),
    lines: items.map((one) => custodyLine(one, caseNumber)),
    offers: items.flatMap((one) => waitingOfferView(one, reading, actor.userId) ?? []),
    plans: items.flatMap((one) => planViews(one, reading, documentWords(documents, row.zone))),
    notices: items.flatMap((one) => noticeViews(one, reading)),
    documents: documents.map((one) => documentView(one, row.zone)),
    mayCollect: canOnCase(actor, 'evidence:write', subject),
    mayAddDocument: canOnCase(actor, 'attachment:add', subject),
    whoCollects: whoCan('evidence:write'),
  };
}

/** One item with its chain and what waits on it; null when there is none or the case is not theirs to see. @throws DomainError `forbidden` */
export async function getItemPage(db: DbOrTx, { actor, caseNumber, label, now }: PageQuery & { readonly label: number }) {
  const found = await findCase(db, actor, caseNumber);
  if (!found) return null;
  const { row, subject } = found;
  if (!canOnCase(actor, 'evidence:read', subject)) throw new DomainError('forbidden', `The evidence is not open to you. ${whoCan('evidence:read')}`);
  const one = (await listEvidence(db, { actor, caseNumber })).find(({ item }) => item.label === label);
  if (!one) return null;
  const documents = await listAttachments(db, { actor, caseNumber, classes: readableClasses(actor, subject) });
  const reading = { caseNumber, zone: row.zone, now };
  const rights = rightsOn(one, actor, subject);
  const standing = one.plans.filter((plan) => plan.outcome === null);
  return {
    caseNumber,
    caseTitle: row.title,
    zone: row.zone,
    legalHold: row.legalHold,
    item: itemView(one, caseNumber, row.zone),
    line: custodyLine(one, caseNumber),
    offer: waitingOfferView(one, reading, actor.userId),
    pastOffers: pastOffers(one.offers, row.zone),
    plans: planViews(one, reading, documentWords(documents, row.zone)),
    cancelled: cancelledPlans(one, row.zone),
    notices: noticeViews(one, reading),
    noticeChoices: one.notices.map((notice) => ({ id: notice.id, words: noticeChoice(notice, row.zone) })),
    /** Clauses that speak against any examination that may alter the item. */
    against: objectionWords(one.notices.filter((notice) => notice.planId === null || standing.some((plan) => plan.id === notice.planId)), now),
    documents: documents.map((document) => ({ id: document.id, words: `${documentView(document, row.zone).code} ${document.title}`, protocol: document.kind === 'protocol' })),
    ...rights,
    receivers: rights.mayOffer ? (await listReceivers(db, row)).filter((person) => person.userId !== actor.userId && person.userId !== holderOf(one)).map(({ userId, displayName }) => ({ userId, displayName })) : [],
  };
}

const openRecord = ({ custody }: EvidenceWhole) => custody.find((record) => record.toAt === null) ?? null;

/** The account of whoever holds the item now. */
function holderOf(one: EvidenceWhole): string | null {
  const open = openRecord(one);
  return open && holderAccount(open);
}

/** What this person may do to the item now, by the one table. */
function rightsOn(one: EvidenceWhole, actor: Actor, subject: CaseSubject) {
  const offer = one.offers.find((each) => each.answer === null);
  const mayWrite = canOnCase(actor, 'evidence:write', subject);
  const maker = offer?.offeredById === actor.userId || (Boolean(offer?.makerLeft) && mayWrite);
  return {
    mayWrite,
    mayOffer: openRecord(one)?.holderRole !== 'disposed' && canOnCase(actor, 'evidence:offer', withRelation(subject, 'holder-of-item', holderOf(one) === actor.userId)),
    mayTakeOver: canOnCase(actor, 'evidence:take-over', withRelation(subject, 'receiver-of-item', offer?.receiverId === actor.userId)),
    mayWithdraw: canOnCase(actor, 'evidence:withdraw-offer', withRelation(subject, 'maker-of-offer', maker)),
    whoWrites: whoCan('evidence:write'),
  };
}
