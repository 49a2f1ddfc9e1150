/** Items of evidence and their chain of custody: words and rules. */

export const evidenceKinds = ['optic', 'target', 'residue', 'exemplar', 'device', 'record', 'other'] as const;
export type EvidenceKind = (typeof evidenceKinds)[number];
export const evidenceKindLabels: Record<EvidenceKind, string> = {
  optic: 'Optic, or part of it',
  target: 'Target with the mark',
  residue: 'Residue or debris',
  exemplar: 'Exemplar: the same kind, unmarked',
  device: 'Device or fitting',
  record: 'Print or recording',
  other: 'Other',
};

/** Who holds an item, by part in the matter. Releases name the part, never the person. */
export const holderRoles = ['investigator', 'site-staff', 'store', 'courier', 'laboratory', 'owner', 'fire-service', 'police', 'insurer-expert', 'other', 'disposed'] as const;
export type HolderRole = (typeof holderRoles)[number];
export const holderRoleLabels: Record<HolderRole, string> = {
  investigator: 'Investigator',
  'site-staff': 'Site staff',
  store: 'Store',
  courier: 'Courier',
  laboratory: 'Laboratory',
  owner: 'Owner',
  'fire-service': 'Fire service',
  police: 'Police',
  'insurer-expert': 'Expert of the insurer',
  other: 'Other holder',
  disposed: 'Disposed of',
};

export const examKinds = ['visual', 'non-destructive', 'may-alter'] as const;
export type ExamKind = (typeof examKinds)[number];
export const examKindLabels: Record<ExamKind, string> = {
  visual: 'Looked at',
  'non-destructive': 'Examined, nothing altered',
  'may-alter': 'May alter the item',
};

export const disposals = ['undecided', 'keep', 'return-to-owner', 'destroy'] as const;
export type Disposal = (typeof disposals)[number];
export const disposalLabels: Record<Disposal, string> = {
  undecided: 'Not decided',
  keep: 'Keep',
  'return-to-owner': 'Return to the owner',
  destroy: 'Destroy',
};

/** `A` for the first item of a case, `AA` after `Z`. */
export function itemLetter(label: number): string {
  const index = label - 1;
  const last = String.fromCharCode(65 + (index % 26));
  return index < 26 ? last : `${itemLetter(Math.floor(index / 26))}${last}`;
}

/** `118-A`, as on the label. */
export const itemCode = (caseNumber: number, label: number): string => `${caseNumber}-${itemLetter(label)}`;

/** The number of an item from the letters in an address; 0, which none has, when they are no letters. */
export function readItemLetter(text: string): number {
  if (!/^[A-Z]{1,3}$/u.test(text)) return 0;
  return [...text].reduce((total, letter) => total * 26 + (letter.charCodeAt(0) - 64), 0);
}

/** A store keeps an item without anybody carrying it; every other holder is a person who answers for it. */
export const isStored = (role: HolderRole): boolean => role === 'store' || role === 'disposed';

export interface HandOverFacts {
  /** Start of the record that is open now. */
  readonly openSince: Date;
  readonly openRole: HolderRole;
  readonly disposal: Disposal;
  readonly legalHold: boolean;
}

/** Why a hand-over to `role` at `at` cannot stand, by field; empty when it can. */
export function handOverObstacles(facts: HandOverFacts, next: { readonly role: HolderRole; readonly at: Date }, now: Date): Record<string, string[]> {
  if (facts.openRole === 'disposed') return { holderRole: ['The item was disposed of; nobody can take it over.'] };
  const problems: Record<string, string[]> = {};
  if (next.at.getTime() <= facts.openSince.getTime()) problems['handedAt'] = ['The hand-over comes after the one before it. Check the day and the time.'];
  else if (next.at.getTime() > now.getTime()) problems['handedAt'] = ['This is still to come. Record a hand-over when it has happened.'];
  if (next.role === 'disposed' && facts.legalHold) problems['holderRole'] = ['The case is under a legal hold: nothing of it is disposed of until the hold is lifted.'];
  else if (next.role === 'disposed' && facts.disposal !== 'destroy') problems['holderRole'] = ['Record the decision to destroy the item first.'];
  return problems;
}

export interface ExamFacts {
  readonly kind: ExamKind;
  readonly performedAt: Date;
  readonly noticeTo: string;
  readonly noticeAt: Date | null;
  readonly protocolAttachmentId: string | null;
}

/**
 * What an examination still lacks before it may be recorded, by field. One that may alter the item needs a protocol and
 * notice to others beforehand (practice of ASTM E860: scope only was read).
 */
export function examObstacles(exam: ExamFacts, collectedAt: Date, now: Date): Record<string, string[]> {
  const problems: Record<string, string[]> = {};
  if (exam.performedAt.getTime() < collectedAt.getTime()) problems['performedAt'] = ['The item had not been collected then. Check the day and the time.'];
  else if (exam.performedAt.getTime() > now.getTime()) problems['performedAt'] = ['This is still to come. Record an examination when it has been made.'];
  if (exam.kind !== 'may-alter') return problems;
  if (exam.noticeTo.trim() === '') problems['noticeTo'] = ['Say who was told beforehand: owner, insurer, maker, other parties. An examination that may alter the item needs notice.'];
  if (!exam.noticeAt) problems['noticeAt'] = ['Give the day and time of the notice.'];
  else if (exam.noticeAt.getTime() >= exam.performedAt.getTime()) problems['noticeAt'] = ['Notice comes before the examination, not after it.'];
  if (!exam.protocolAttachmentId) problems['protocolAttachmentId'] = ['Choose the protocol file. Add it under Documents first if it is not in the list.'];
  return problems;
}
