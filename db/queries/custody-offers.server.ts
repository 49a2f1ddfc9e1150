import { and, asc, eq, inArray, isNull, sql } from 'drizzle-orm';
import type { DbOrTx, Transaction } from '#db/client.server.ts';
import { custodyOffers, users } from '#db/schema/all.ts';
import type { OfferAnswer } from '#app/domain/custody-offer.ts';
import { caseRules } from '#app/domain/permissions.ts';
import { listRoleHolders } from './case-people.server.ts';
import type { Person } from './case-people.server.ts';
import type { CaseRow } from './case-subject.server.ts';

export type OfferRow = typeof custodyOffers.$inferSelect;
export interface OfferLine extends OfferRow {
  readonly receiver: string;
  readonly offeredBy: string;
  /** The account that made it has been switched off. */
  readonly makerLeft: boolean;
}

const nameOf = (column: typeof custodyOffers.receiverId | typeof custodyOffers.offeredById) => sql<string>`(select ${users.displayName} from ${users} where ${users.id} = ${column})`;
const makerLeft = sql<boolean>`(select ${users.disabled} from ${users} where ${users.id} = ${custodyOffers.offeredById})`;

/** Offers of these items, oldest first, answered ones too. That the case may be read is the caller's to check. */
export async function listOffers(db: DbOrTx, itemIds: readonly string[]): Promise<OfferLine[]> {
  const rows = await db
    .select({ offer: custodyOffers, receiver: nameOf(custodyOffers.receiverId), offeredBy: nameOf(custodyOffers.offeredById), makerLeft })
    .from(custodyOffers)
    .where(inArray(custodyOffers.itemId, [...itemIds]))
    .orderBy(asc(custodyOffers.createdAt), asc(custodyOffers.id));
  return rows.map(({ offer, ...names }) => ({ ...offer, ...names }));
}

/** People who may read the evidence of the case, and so may be offered an item of it. */
export function listReceivers(db: DbOrTx, row: Pick<CaseRow, 'organisationId' | 'siteId'>): Promise<Person[]> {
  return listRoleHolders(db, { organisationId: row.organisationId, siteId: row.siteId, roles: caseRules['evidence:read'].roles });
}

/** The offer of this item that waits; the caller holds the item's row lock. */
export async function openOffer(tx: Transaction, itemId: string): Promise<OfferRow | null> {
  const [row] = await tx.select().from(custodyOffers).where(and(eq(custodyOffers.itemId, itemId), isNull(custodyOffers.answer)));
  return row ?? null;
}

export async function offerOfItem(tx: Transaction, params: { readonly itemId: string; readonly offerId: string }): Promise<OfferLine | null> {
  return (await listOffers(tx, [params.itemId])).find((offer) => offer.id === params.offerId) ?? null;
}

/** Null when the same form has made it before. */
export async function insertOffer(tx: Transaction, values: typeof custodyOffers.$inferInsert): Promise<string | null> {
  const [row] = await tx.insert(custodyOffers).values(values).onConflictDoNothing({ target: custodyOffers.clientId }).returning({ id: custodyOffers.id });
  return row?.id ?? null;
}

export async function offerByClientId(tx: Transaction, params: { readonly itemId: string; readonly clientId: string }): Promise<OfferRow | null> {
  const [row] = await tx.select().from(custodyOffers).where(and(eq(custodyOffers.itemId, params.itemId), eq(custodyOffers.clientId, params.clientId)));
  return row ?? null;
}

export async function answerOffer(tx: Transaction, offerId: string, change: { readonly answer: OfferAnswer; readonly answerReason: string; readonly answeredAt: Date }): Promise<void> {
  await tx.update(custodyOffers).set(change).where(eq(custodyOffers.id, offerId));
}
