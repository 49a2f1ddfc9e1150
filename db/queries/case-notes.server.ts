import { and, asc, eq } from 'drizzle-orm';
import type { DbOrTx, Transaction } from '#db/client.server.ts';
import { caseNotes, cases } from '#db/schema/all.ts';
import type { Actor } from '#app/domain/roles.ts';
import { visibleTo } from './scope.server.ts';

export interface CaseNote {
  readonly id: string;
  readonly at: Date;
  readonly authorId: string | null;
  readonly authorName: string;
  readonly body: string;
}

/** Notes added to the account, oldest first. */
export function listCaseNotes(db: DbOrTx, params: { actor: Actor; caseNumber: number }): Promise<CaseNote[]> {
  return db
    .select({ id: caseNotes.id, at: caseNotes.createdAt, authorId: caseNotes.authorId, authorName: caseNotes.authorName, body: caseNotes.body })
    .from(caseNotes)
    .innerJoin(cases, eq(cases.id, caseNotes.caseId))
    .where(and(visibleTo(params.actor), eq(cases.number, params.caseNumber)))
    .orderBy(asc(caseNotes.createdAt), asc(caseNotes.id));
}

export async function insertCaseNote(tx: Transaction, note: { caseId: string; authorId: string; authorName: string; body: string }): Promise<string> {
  const [row] = await tx.insert(caseNotes).values(note).returning({ id: caseNotes.id });
  if (!row) throw new Error('The note was not stored.');
  return row.id;
}
