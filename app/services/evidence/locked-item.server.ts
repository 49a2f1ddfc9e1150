import type { Transaction } from '#db/client.server.ts';
import { lockCase } from '#db/queries/case-subject.server.ts';
import type { CaseRow } from '#db/queries/case-subject.server.ts';
import { lockItem } from '#db/queries/evidence.server.ts';
import type { EvidenceItemRow } from '#db/queries/evidence.server.ts';
import { notFound } from '#app/domain/errors.ts';
import { itemCode } from '#app/domain/evidence.ts';
import type { CaseAction, CaseSubject } from '#app/domain/permissions.ts';
import type { Actor } from '#app/domain/roles.ts';
import { authorize } from '#app/services/authorize.ts';

export interface ItemCall {
  readonly actor: Actor;
  readonly caseNumber: number;
  readonly label: number;
}

export interface LockedItem {
  readonly row: CaseRow;
  readonly subject: CaseSubject;
  readonly item: EvidenceItemRow;
  /** `118-A` */
  readonly code: string;
}

/**
 * The item and its case under their locks, for somebody who may do `action`.
 *
 * @throws DomainError `not-found`, `forbidden`
 */
export async function lockedItem(tx: Transaction, { actor, caseNumber, label }: ItemCall, action: CaseAction): Promise<LockedItem> {
  const found = await lockCase(tx, actor, caseNumber);
  if (!found) throw notFound('The case');
  authorize(actor, action, found.subject);
  const item = await lockItem(tx, { caseId: found.row.id, label });
  if (!item) throw notFound('The item');
  return { ...found, item, code: itemCode(caseNumber, label) };
}
