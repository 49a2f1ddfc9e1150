import { and, asc, eq, sql } from 'drizzle-orm';
import type { DbOrTx, Transaction } from '#db/client.server.ts';
import { cases, involvements, users, witnessAccounts } from '#db/schema/all.ts';
import type { Actor } from '#app/domain/roles.ts';
import { visibleTo } from './scope.server.ts';

export type WitnessAccountRow = typeof witnessAccounts.$inferSelect;
export type InvolvementRow = typeof involvements.$inferSelect;

export interface WitnessAccountLine {
  readonly account: WitnessAccountRow;
  readonly person: InvolvementRow;
  readonly takenBy: string;
}

const takenBy = sql<string>`(select ${users.displayName} from ${users} where ${users.id} = ${witnessAccounts.takenById})`;

/** Accounts of a visible case with the person of each, in the order of taking. Whether they may be read is the caller's to check. */
export function listWitnessAccounts(db: DbOrTx, params: { readonly actor: Actor; readonly caseNumber: number }): Promise<WitnessAccountLine[]> {
  return db
    .select({ account: witnessAccounts, person: involvements, takenBy })
    .from(witnessAccounts)
    .innerJoin(involvements, eq(involvements.id, witnessAccounts.involvementId))
    .innerJoin(cases, eq(cases.id, witnessAccounts.caseId))
    .where(and(visibleTo(params.actor), eq(cases.number, params.caseNumber)))
    .orderBy(asc(witnessAccounts.label));
}

/** The same without the person, for a case whose reading has been decided by the caller. */
export function listAccountsOfCase(db: DbOrTx, caseId: string) {
  return db.select({ account: witnessAccounts, takenBy }).from(witnessAccounts).where(eq(witnessAccounts.caseId, caseId)).orderBy(asc(witnessAccounts.label));
}

/** People of the case who may give an account: all but the injured person as such. */
export function listPossibleWitnesses(db: DbOrTx, caseId: string): Promise<InvolvementRow[]> {
  return db.select().from(involvements).where(eq(involvements.caseId, caseId)).orderBy(asc(involvements.createdAt), asc(involvements.id));
}

export async function findAccountByClientId(tx: Transaction, params: { readonly caseId: string; readonly clientId: string }): Promise<WitnessAccountRow | null> {
  const [row] = await tx.select().from(witnessAccounts).where(and(eq(witnessAccounts.caseId, params.caseId), eq(witnessAccounts.clientId, params.clientId)));
  return row ?? null;
}

export async function getAccountOfCase(tx: Transaction, params: { readonly caseId: string; readonly accountId: string }): Promise<WitnessAccountRow | null> {
  const [row] = await tx.select().from(witnessAccounts).where(and(eq(witnessAccounts.caseId, params.caseId), eq(witnessAccounts.id, params.accountId)));
  return row ?? null;
}

export async function nextAccountLabel(tx: Transaction, caseId: string): Promise<number> {
  const [row] = await tx.select({ last: sql<number>`coalesce(max(${witnessAccounts.label}), 0)::int` }).from(witnessAccounts).where(eq(witnessAccounts.caseId, caseId));
  return (row?.last ?? 0) + 1;
}

export async function insertInvolvement(tx: Transaction, values: typeof involvements.$inferInsert): Promise<string> {
  const [row] = await tx.insert(involvements).values(values).returning({ id: involvements.id });
  if (!row) throw new Error('The person was not written.');
  return row.id;
}

export async function insertAccount(tx: Transaction, values: typeof witnessAccounts.$inferInsert): Promise<string> {
  const [row] = await tx.insert(witnessAccounts).values(values).returning({ id: witnessAccounts.id });
  if (!row) throw new Error('The account was not written.');
  return row.id;
}

export async function updateSignedCopy(tx: Transaction, accountId: string, signedAttachmentId: string): Promise<void> {
  await tx.update(witnessAccounts).set({ signedAttachmentId }).where(eq(witnessAccounts.id, accountId));
}
