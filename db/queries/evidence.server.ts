import { and, asc, desc, eq, inArray, isNull, sql } from 'drizzle-orm';
import type { DbOrTx, Transaction } from '#db/client.server.ts';
import { cases, custodyRecords, evidenceExams, evidenceItems } from '#db/schema/all.ts';
import type { Actor } from '#app/domain/roles.ts';
import { listOffers } from './custody-offers.server.ts';
import type { OfferLine } from './custody-offers.server.ts';
import { listNotices } from './evidence-notices.server.ts';
import type { NoticeLine } from './evidence-notices.server.ts';
import { listPlans } from './planned-exams.server.ts';
import type { PlanRow } from './planned-exams.server.ts';
import { visibleTo } from './scope.server.ts';

export type EvidenceItemRow = typeof evidenceItems.$inferSelect;
export type CustodyRow = typeof custodyRecords.$inferSelect;
export type ExamRow = typeof evidenceExams.$inferSelect;

export interface EvidenceWhole {
  readonly item: EvidenceItemRow;
  /** First record first. */
  readonly custody: readonly CustodyRow[];
  readonly exams: readonly ExamRow[];
  readonly plans: readonly PlanRow[];
  readonly notices: readonly NoticeLine[];
  readonly offers: readonly OfferLine[];
}

/** Items of a visible case with custody, examinations, plans, notices and offers, in the order of their labels. */
export async function listEvidence(db: DbOrTx, params: { readonly actor: Actor; readonly caseNumber: number }): Promise<EvidenceWhole[]> {
  const rows = await db
    .select({ item: evidenceItems })
    .from(evidenceItems)
    .innerJoin(cases, eq(cases.id, evidenceItems.caseId))
    .where(and(visibleTo(params.actor), eq(cases.number, params.caseNumber)))
    .orderBy(asc(evidenceItems.label));
  return withChains(db, rows.map((row) => row.item));
}

/** The same for a case whose reading has been decided by the caller. */
export async function listEvidenceOfCase(db: DbOrTx, caseId: string): Promise<EvidenceWhole[]> {
  return withChains(db, await db.select().from(evidenceItems).where(eq(evidenceItems.caseId, caseId)).orderBy(asc(evidenceItems.label)));
}

async function withChains(db: DbOrTx, items: readonly EvidenceItemRow[]): Promise<EvidenceWhole[]> {
  if (items.length === 0) return [];
  const ids = items.map((item) => item.id);
  const custody = await db.select().from(custodyRecords).where(inArray(custodyRecords.itemId, ids)).orderBy(asc(custodyRecords.sequence));
  const exams = await db.select().from(evidenceExams).where(inArray(evidenceExams.itemId, ids)).orderBy(asc(evidenceExams.performedAt), asc(evidenceExams.id));
  const [plans, notices, offers] = [await listPlans(db, ids), await listNotices(db, ids), await listOffers(db, ids)];
  return items.map((item) => {
    const own = <Row extends { readonly itemId: string }>(rows: readonly Row[]) => rows.filter((row) => row.itemId === item.id);
    return { item, custody: own(custody), exams: own(exams), plans: own(plans), notices: own(notices), offers: own(offers) };
  });
}

/** Next free label of a case; the caller holds the case's row lock. */
export async function nextItemLabel(tx: Transaction, caseId: string): Promise<number> {
  const [row] = await tx.select({ last: sql<number>`coalesce(max(${evidenceItems.label}), 0)::int` }).from(evidenceItems).where(eq(evidenceItems.caseId, caseId));
  return (row?.last ?? 0) + 1;
}

export async function findItemByClientId(tx: Transaction, params: { readonly caseId: string; readonly clientId: string }): Promise<EvidenceItemRow | null> {
  const [row] = await tx.select().from(evidenceItems).where(and(eq(evidenceItems.caseId, params.caseId), eq(evidenceItems.clientId, params.clientId)));
  return row ?? null;
}

/** An item of the locked case, under a lock of its own. */
export async function lockItem(tx: Transaction, params: { readonly caseId: string; readonly label: number }): Promise<EvidenceItemRow | null> {
  const [row] = await tx.select().from(evidenceItems).where(and(eq(evidenceItems.caseId, params.caseId), eq(evidenceItems.label, params.label))).for('update');
  return row ?? null;
}

export async function insertItem(tx: Transaction, values: typeof evidenceItems.$inferInsert): Promise<string> {
  const [row] = await tx.insert(evidenceItems).values(values).returning({ id: evidenceItems.id });
  if (!row) throw new Error('The item was not written.');
  return row.id;
}

export async function updateDisposal(tx: Transaction, itemId: string, change: Pick<EvidenceItemRow, 'disposal' | 'disposalReason'>): Promise<void> {
  await tx.update(evidenceItems).set(change).where(eq(evidenceItems.id, itemId));
}

/** The record of whoever holds the item now; there is always exactly one. */
export async function openCustody(tx: Transaction, itemId: string): Promise<CustodyRow> {
  const [row] = await tx.select().from(custodyRecords).where(and(eq(custodyRecords.itemId, itemId), isNull(custodyRecords.toAt))).orderBy(desc(custodyRecords.sequence));
  if (!row) throw new Error('An item of evidence has no holder.');
  return row;
}

export async function custodyByClientId(tx: Transaction, params: { readonly itemId: string; readonly clientId: string }): Promise<CustodyRow | null> {
  const [row] = await tx.select().from(custodyRecords).where(and(eq(custodyRecords.itemId, params.itemId), eq(custodyRecords.clientId, params.clientId)));
  return row ?? null;
}

export async function insertCustody(tx: Transaction, values: typeof custodyRecords.$inferInsert): Promise<string> {
  const [row] = await tx.insert(custodyRecords).values(values).returning({ id: custodyRecords.id });
  if (!row) throw new Error('The custody record was not written.');
  return row.id;
}

export async function closeCustody(tx: Transaction, custodyId: string, toAt: Date): Promise<void> {
  await tx.update(custodyRecords).set({ toAt }).where(eq(custodyRecords.id, custodyId));
}

export async function examByClientId(tx: Transaction, params: { readonly itemId: string; readonly clientId: string }): Promise<ExamRow | null> {
  const [row] = await tx.select().from(evidenceExams).where(and(eq(evidenceExams.itemId, params.itemId), eq(evidenceExams.clientId, params.clientId)));
  return row ?? null;
}

export async function insertExam(tx: Transaction, values: typeof evidenceExams.$inferInsert): Promise<string | null> {
  const [row] = await tx.insert(evidenceExams).values(values).onConflictDoNothing({ target: evidenceExams.clientId }).returning({ id: evidenceExams.id });
  return row?.id ?? null;
}
