import { and, eq, sql } from 'drizzle-orm';
import type { DbOrTx, Transaction } from '#db/client.server.ts';
import { cases, correctiveActions, findings } from '#db/schema/all.ts';
import type { CaseSubject, Relation } from '#app/domain/permissions.ts';
import type { Actor } from '#app/domain/roles.ts';
import { visibleTo } from './scope.server.ts';

export type CaseRow = typeof cases.$inferSelect;

/** What permissions need to know of a case, with the actor's relations to it. */
export async function caseSubject(db: DbOrTx, actor: Actor, row: Pick<CaseRow, 'id' | 'organisationId' | 'siteId' | 'state' | 'reporterId'>): Promise<CaseSubject> {
  const relations: Relation[] = [];
  if (row.reporterId === actor.userId) relations.push('reporter-of-case');
  const [own] = await db
    .select({
      owner: sql<boolean>`coalesce(bool_or(${correctiveActions.ownerId} = ${actor.userId}), false)`,
      verifier: sql<boolean>`coalesce(bool_or(${correctiveActions.verifierId} = ${actor.userId}), false)`,
    })
    .from(correctiveActions)
    .where(eq(correctiveActions.caseId, row.id));
  if (own?.owner) relations.push('owner-of-action');
  if (own?.verifier) relations.push('verifier-of-action');
  const [latest] = await db
    .select({ authorId: findings.authorId })
    .from(findings)
    .where(eq(findings.caseId, row.id))
    .orderBy(sql`${findings.version} desc`)
    .limit(1);
  if (latest?.authorId === actor.userId) relations.push('author-of-finding');
  return { organisationId: row.organisationId, siteId: row.siteId, state: row.state, relations };
}

/** The case under a row lock, if the actor may see it; null otherwise. Relations on one action are narrowed by the caller. */
export async function lockCase(tx: Transaction, actor: Actor, caseNumber: number): Promise<{ row: CaseRow; subject: CaseSubject } | null> {
  const [row] = await tx
    .select()
    .from(cases)
    .where(and(visibleTo(actor), eq(cases.number, caseNumber)))
    .for('update');
  if (!row) return null;
  return { row, subject: await caseSubject(tx, actor, row) };
}

/** The case, if the actor may see it. For loaders. */
export async function findCase(db: DbOrTx, actor: Actor, caseNumber: number): Promise<{ row: CaseRow; subject: CaseSubject } | null> {
  const [row] = await db.select().from(cases).where(and(visibleTo(actor), eq(cases.number, caseNumber)));
  if (!row) return null;
  return { row, subject: await caseSubject(db, actor, row) };
}
