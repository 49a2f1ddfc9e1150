import { randomUUID } from 'node:crypto';
import { createCase, createHouse } from '#tests/support/factories.ts';
import type { House } from '#tests/support/factories.ts';
import type { CaseState } from '#app/domain/case-state.ts';
import type { CollectItem, HandOver } from '#app/domain/evidence-form.ts';
import { addAttachment } from '#app/services/attachments/add-attachment.server.ts';
import { collectItem } from '#app/services/evidence/collect-item.server.ts';

export interface EvidenceStage {
  readonly house: House;
  readonly caseId: string;
  readonly caseNumber: number;
}

export async function evidenceStage(state: CaseState = 'investigation'): Promise<EvidenceStage> {
  const house = await createHouse();
  const row = await createCase(state, { site: house.site, assignedToId: house.investigator.userId, reporterId: house.reporter.userId });
  return { house, caseId: row.id, caseNumber: row.number };
}

export const at = (utc: string) => new Date(utc);
export const collectedAt = at('2026-05-10T09:00:00Z');
export const now = at('2026-06-01T12:00:00Z');

export const itemForm = (values: Partial<CollectItem> = {}): CollectItem => ({
  clientId: randomUUID(),
  kind: 'optic',
  description: 'Curved steel trim, 550 mm',
  fromWhere: 'south parapet, third bay',
  collectedBy: 'Quillon Ashgrove',
  sealNumber: '7001',
  condition: 'dusty, not cleaned',
  holderRole: 'investigator',
  holderName: 'Quillon Ashgrove',
  place: '',
  ...values,
});

export async function collected(stage: EvidenceStage): Promise<{ label: number }> {
  return collectItem({ actor: stage.house.investigator, caseNumber: stage.caseNumber, item: itemForm(), collectedAt, now });
}

export const handOverForm = (values: Partial<HandOver> = {}): HandOver => ({
  clientId: randomUUID(),
  sequence: 1,
  holderRole: 'laboratory',
  holderName: 'Laboratory Fennimore',
  place: 'bench 2',
  purpose: 'Measurement',
  condition: 'seal whole',
  givenBy: 'Quillon Ashgrove',
  receivedBy: 'Fennimore, reception',
  ...values,
});

export async function document(stage: EvidenceStage, values: Partial<Parameters<typeof addAttachment>[0]['about']> = {}, text = `A protocol, ${randomUUID()}.`): Promise<{ attachmentId: string; label: number }> {
  return addAttachment({ actor: stage.house.investigator, caseNumber: stage.caseNumber, about: { title: 'Protocol', kind: 'protocol', class: 'ordinary', ...values }, file: { name: 'protocol.txt', bytes: new TextEncoder().encode(text) } });
}
