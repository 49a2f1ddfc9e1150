import type { DbOrTx } from '#db/client.server.ts';
import { listAttachments, readableClasses } from './attachments.server.ts';
import { findCase } from './case-subject.server.ts';
import { listEvidence } from './evidence.server.ts';
import { DomainError } from '#app/domain/errors.ts';
import { custodyLine, documentView, evidenceHeading, itemLine, itemView } from '#app/domain/evidence-view.ts';
import { canOnCase, whoCan } from '#app/domain/permissions.ts';
import type { Actor } from '#app/domain/roles.ts';

interface PageQuery {
  readonly actor: Actor;
  readonly caseNumber: number;
}

/** Items and documents of a case; null when the case is not theirs to see. @throws DomainError `forbidden` */
export async function getEvidencePage(db: DbOrTx, { actor, caseNumber }: PageQuery) {
  const found = await findCase(db, actor, caseNumber);
  if (!found) return null;
  const { row, subject } = found;
  if (!canOnCase(actor, 'evidence:read', subject)) throw new DomainError('forbidden', `The evidence is not open to you. ${whoCan('evidence:read')}`);
  const items = await listEvidence(db, { actor, caseNumber });
  const documents = await listAttachments(db, { actor, caseNumber, classes: readableClasses(actor, subject) });
  return {
    caseNumber,
    zone: row.zone,
    heading: evidenceHeading(items, documents, caseNumber),
    legalHold: row.legalHold,
    items: items.map((one) => itemLine(one, caseNumber, row.zone)),
    lines: items.map((one) => custodyLine(one, caseNumber)),
    documents: documents.map((one) => documentView(one, row.zone)),
    mayCollect: canOnCase(actor, 'evidence:write', subject),
    mayAddDocument: canOnCase(actor, 'attachment:add', subject),
    whoCollects: whoCan('evidence:write'),
  };
}

/** One item with its chain; null when there is none or the case is not theirs to see. @throws DomainError `forbidden` */
export async function getItemPage(db: DbOrTx, { actor, caseNumber, label }: PageQuery & { readonly label: number }) {
  const found = await findCase(db, actor, caseNumber);
  if (!found) return null;
  const { row, subject } = found;
  if (!canOnCase(actor, 'evidence:read', subject)) throw new DomainError('forbidden', `The evidence is not open to you. ${whoCan('evidence:read')}`);
  const one = (await listEvidence(db, { actor, caseNumber })).find(({ item }) => item.label === label);
  if (!one) return null;
  const documents = await listAttachments(db, { actor, caseNumber, classes: readableClasses(actor, subject) });
  return {
    caseNumber,
    caseTitle: row.title,
    zone: row.zone,
    legalHold: row.legalHold,
    item: itemView(one, caseNumber, row.zone),
    line: custodyLine(one, caseNumber),
    documents: documents.map((document) => ({ id: document.id, words: `${documentView(document, row.zone).code} ${document.title}`, protocol: document.kind === 'protocol' })),
    mayWrite: canOnCase(actor, 'evidence:write', subject),
    whoWrites: whoCan('evidence:write'),
  };
}
