import { attachmentClassLabels, attachmentCode, attachmentKindLabels } from './attachment.ts';
import type { AttachmentClass, AttachmentKind } from './attachment.ts';
import { disposalLabels, evidenceKindLabels, examKindLabels, holderRoleLabels, itemCode, itemLetter } from './evidence.ts';
import type { Disposal, EvidenceKind, ExamKind, HolderRole } from './evidence.ts';
import type { CustodyLine } from './figures/custody-figure.ts';
import { formatDayClock } from './local-time.ts';

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
  }[];
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
      signed: record.sequence === 1 ? record.receivedBy : `given by ${record.givenBy}, taken by ${record.receivedBy}`,
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
    })),
  };
}

export function custodyLine(facts: ItemFacts, caseNumber: number): CustodyLine {
  return {
    code: itemCode(caseNumber, facts.item.label),
    description: facts.item.description,
    seal: facts.item.sealNumber ? `seal ${facts.item.sealNumber}` : '',
    holders: facts.custody.map((record) => ({ role: record.holderRole, from: record.fromAt, to: record.toAt })),
    exams: facts.exams.map((exam) => ({ kind: exam.kind, at: exam.performedAt })),
  };
}

export interface DocumentFacts {
  readonly id: string;
  readonly label: number;
  readonly title: string;
  readonly kind: AttachmentKind;
  readonly class: AttachmentClass;
  readonly mime: string;
  readonly bytes: number;
  readonly sha256: string;
  readonly hashCheck: 'same' | 'differs' | 'missing' | null;
  readonly hashCheckedAt: Date | null;
  readonly createdAt: Date;
  readonly uploadedBy: string;
}

export interface DocumentView {
  readonly id: string;
  readonly code: string;
  readonly title: string;
  readonly kind: string;
  readonly class: string;
  readonly size: string;
  readonly sha256: string;
  readonly hashCheck: DocumentFacts['hashCheck'];
  readonly hashWords: string;
  readonly added: string;
}

const formats: Readonly<Record<string, string>> = { 'application/pdf': 'PDF', 'text/csv': 'CSV', 'text/plain': 'text', 'image/jpeg': 'JPEG', 'image/png': 'PNG', 'image/webp': 'WebP' };

export function documentView(document: DocumentFacts, zone: string): DocumentView {
  const when = document.hashCheckedAt ? `, ${formatDayClock(document.hashCheckedAt, zone)}` : '';
  const checked = { same: `same as at intake${when}`, differs: `differs, not handed out${when}`, missing: `missing from the store${when}` };
  return {
    id: document.id,
    code: attachmentCode(document.label),
    title: document.title,
    kind: attachmentKindLabels[document.kind],
    class: attachmentClassLabels[document.class],
    size: `${formats[document.mime] ?? document.mime}, ${document.bytes < 1_000_000 ? `${Math.max(1, Math.ceil(document.bytes / 1000))} kB` : `${(document.bytes / 1_000_000).toFixed(1)} MB`}`,
    sha256: document.sha256,
    hashCheck: document.hashCheck,
    hashWords: document.hashCheck ? checked[document.hashCheck] : 'hashed again at each download',
    added: `${document.uploadedBy}, ${formatDayClock(document.createdAt, zone)}`,
  };
}

/** The finding of the page, weakest fact first. */
export function evidenceHeading(items: readonly ItemFacts[], documents: readonly DocumentFacts[], caseNumber: number): string {
  const broken = documents.filter((document) => document.hashCheck === 'differs' || document.hashCheck === 'missing').map((document) => attachmentCode(document.label));
  if (broken.length > 0) return `The stored file of document ${broken.join(', ')} is not what came in`;
  if (items.length === 0) return 'No item has been collected';
  const codes = (list: readonly ItemFacts[]) => list.map(({ item }) => itemCode(caseNumber, item.label)).join(', ');
  const unsealed = items.filter(({ item }) => item.sealNumber === '' && item.kind !== 'record');
  if (unsealed.length > 0) return `${codes(unsealed)} ${unsealed.length === 1 ? 'has' : 'have'} no seal`;
  const undecided = items.filter(({ item }) => item.disposal === 'undecided');
  if (undecided.length > 0) return `What becomes of ${codes(undecided)} is not decided`;
  return items.length === 1 ? 'One item, in known hands since it was collected' : `${items.length} items, in known hands since they were collected`;
}
