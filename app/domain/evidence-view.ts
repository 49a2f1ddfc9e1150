import type { OfferFacts } from './custody-offer.ts';
import type { NoticeFacts } from './evidence-notice.ts';
import { disposalLabels, evidenceKindLabels, examKindLabels, holderRoleLabels, itemCode, itemLetter } from './evidence.ts';
import type { Disposal, EvidenceKind, ExamKind, HolderRole } from './evidence.ts';
import type { CustodyLine } from './figures/custody-figure.ts';
import { formatDayClock } from './local-time.ts';
import type { PlanFacts } from './planned-exam.ts';

/** What rows of the evidence tables hold that pages show. */
export interface ItemFacts {
  readonly item: {
    readonly id: string;
    readonly label: number;
    readonly kind: EvidenceKind;
    readonly description: string;
    readonly fromWhere: string;
    readonly collectedBy: string;
    readonly collectedAt: Date;
    readonly sealNumber: string;
    readonly disposal: Disposal;
    readonly disposalReason: string;
  };
  readonly custody: readonly {
    readonly id: string;
    readonly sequence: number;
    readonly holderRole: HolderRole;
    readonly holderName: string;
    readonly place: string;
    readonly purpose: string;
    readonly condition: string;
    readonly fromAt: Date;
    readonly toAt: Date | null;
    readonly givenBy: string;
    readonly receivedBy: string;
    readonly clientId: string;
    /** Null: the recorder typed the taker's signature. */
    readonly receiverId: string | null;
  }[];
  readonly exams: readonly {
    readonly id: string;
    readonly kind: ExamKind;
    readonly method: string;
    readonly result: string;
    readonly performedBy: string;
    readonly performedAt: Date;
    readonly noticeTo: string;
    readonly noticeAt: Date | null;
    readonly protocolAttachmentId: string | null;
    readonly wentAheadReason: string;
  }[];
  readonly plans: readonly PlanFacts[];
  readonly notices: readonly NoticeFacts[];
  readonly offers: readonly OfferFacts[];
}

export interface ItemLineView {
  readonly letter: string;
  readonly code: string;
  readonly kind: string;
  readonly description: string;
  readonly sealWords: string;
  readonly holder: string;
  readonly since: string;
  readonly exams: number;
}

export interface CustodyRowView {
  readonly id: string;
  readonly from: string;
  readonly to: string;
  readonly role: string;
  readonly name: string;
  readonly place: string;
  readonly purpose: string;
  readonly condition: string;
  readonly signed: string;
}

export interface ExamView {
  readonly id: string;
  readonly kind: string;
  readonly when: string;
  readonly by: string;
  readonly method: string;
  readonly result: string;
  /** Told beforehand, and when; null where no notice was needed or given. */
  readonly notice: string | null;
  readonly protocolId: string | null;
  /** Why it was made although something spoke against it; empty otherwise. */
  readonly wentAhead: string;
}

export interface ItemView extends ItemLineView {
  readonly fromWhere: string;
  readonly collected: string;
  readonly disposal: Disposal;
  readonly disposalWords: string;
  readonly openSequence: number;
  readonly openHolderName: string;
  readonly custody: readonly CustodyRowView[];
  readonly examinations: readonly ExamView[];
}

const openRecord = ({ custody }: ItemFacts) => custody.find((record) => record.toAt === null) ?? custody.at(-1);

export function itemLine(facts: ItemFacts, caseNumber: number, zone: string): ItemLineView {
  const { item, exams } = facts;
  const open = openRecord(facts);
  return {
    letter: itemLetter(item.label),
    code: itemCode(caseNumber, item.label),
    kind: evidenceKindLabels[item.kind],
    description: item.description,
    sealWords: item.sealNumber ? `seal ${item.sealNumber}` : 'no seal',
    holder: open ? [holderRoleLabels[open.holderRole], open.place].filter(Boolean).join(', ') : 'not known',
    since: open ? formatDayClock(open.fromAt, zone) : '',
    exams: exams.length,
  };
}

export function itemView(facts: ItemFacts, caseNumber: number, zone: string): ItemView {
  const { item } = facts;
  const open = openRecord(facts);
  return {
    ...itemLine(facts, caseNumber, zone),
    fromWhere: item.fromWhere,
    collected: `${item.collectedBy}, ${formatDayClock(item.collectedAt, zone)}`,
    disposal: item.disposal,
    disposalWords: [disposalLabels[item.disposal], item.disposalReason].filter(Boolean).join(': '),
    openSequence: open?.sequence ?? 1,
    openHolderName: open?.holderName ?? '',
    custody: facts.custody.map((record) => ({
      id: record.id,
      from: formatDayClock(record.fromAt, zone),
      to: record.toAt ? formatDayClock(record.toAt, zone) : 'holds it now',
      role: holderRoleLabels[record.holderRole],
      name: record.holderName,
      place: record.place,
      purpose: record.purpose,
      condition: record.condition,
      signed: signedWords(record, facts.offers),
    })),
    examinations: facts.exams.map((exam) => ({
      id: exam.id,
      kind: examKindLabels[exam.kind],
      when: formatDayClock(exam.performedAt, zone),
      by: exam.performedBy,
      method: exam.method,
      result: exam.result,
      notice: exam.noticeAt && exam.noticeTo ? `${exam.noticeTo}, told ${formatDayClock(exam.noticeAt, zone)}` : null,
      protocolId: exam.protocolAttachmentId,
      wentAhead: exam.wentAheadReason,
    })),
  };
}

/** Who signed, and whether on their own account or by the hand of the recorder. */
function signedWords({ sequence, givenBy, receivedBy, receiverId, clientId }: ItemFacts['custody'][number], offers: readonly OfferFacts[]): string {
  const taken = receiverId ? `${receivedBy}, on their own account` : `${receivedBy}, typed by the recorder`;
  if (sequence === 1) return taken;
  const offer = offers.find((one) => one.id === clientId);
  const giver = offer && offer.offeredBy === givenBy ? 'on their own account' : 'typed by the recorder';
  return receiverId ? `given by ${givenBy}, ${giver}; taken by ${taken}` : `given by ${givenBy}, taken by ${receivedBy}; both typed by the recorder`;
}

export function custodyLine(facts: ItemFacts, caseNumber: number): CustodyLine {
  return {
    code: itemCode(caseNumber, facts.item.label),
    description: facts.item.description,
    seal: facts.item.sealNumber ? `seal ${facts.item.sealNumber}` : '',
    holders: facts.custody.map((record) => ({ role: record.holderRole, from: record.fromAt, to: record.toAt })),
    exams: facts.exams.map((exam) => ({ kind: exam.kind, at: exam.performedAt })),
    planned: facts.plans.filter((plan) => plan.outcome === null).map((plan) => plan.plannedAt),
  };
}
