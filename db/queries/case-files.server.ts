import { and, desc, eq, ne, sql } from 'drizzle-orm';
import type { DbOrTx, Transaction } from '#db/client.server.ts';
import { cases, organisations, releaseOpenings, releases } from '#db/schema/all.ts';
import type { RedactedText } from '#app/domain/released-case.ts';
import type { Actor } from '#app/domain/roles.ts';
import { releasedTo } from './scope.server.ts';

/**
 * What a reader of another organisation gets: columns of `releases` only. Nothing here joins the case, so nothing of it
 * that was not released can slip in.
 */
const readerLine = {
  id: releases.id,
  number: releases.number,
  changeNote: releases.changeNote,
  approvedAt: releases.approvedAt,
  expiresAt: releases.expiresAt,
  withheld: releases.withheld,
  caseNumber: sql<number>`(${releases.released} ->> 'caseNumber')::int`,
  title: sql<RedactedText>`${releases.released} -> 'title'`,
  siteName: sql<string | null>`${releases.released} ->> 'siteName'`,
  zone: sql<string>`${releases.released} ->> 'zone'`,
} as const;

/** Releases addressed to the actor's organisation that are open now, newest first. */
export function listReleasedTo(db: DbOrTx, actor: Actor) {
  return db.select(readerLine).from(releases).where(releasedTo(actor)).orderBy(desc(releases.approvedAt), desc(releases.number));
}
export type ReaderReleaseLine = Awaited<ReturnType<typeof listReleasedTo>>[number];

/** One open release addressed to the actor's organisation, whole. */
export async function findReleasedTo(db: DbOrTx, params: { readonly actor: Actor; readonly releaseId: string }) {
  const [row] = await db
    .select({
      id: releases.id,
      caseId: releases.caseId,
      number: releases.number,
      audience: releases.audience,
      changeNote: releases.changeNote,
      released: releases.released,
      releasedHash: releases.releasedHash,
      withheld: releases.withheld,
      files: releases.files,
      approvedAt: releases.approvedAt,
      expiresAt: releases.expiresAt,
    })
    .from(releases)
    .where(and(releasedTo(params.actor), eq(releases.id, params.releaseId)));
  return row ?? null;
}
export type ReleaseForReader = NonNullable<Awaited<ReturnType<typeof findReleasedTo>>>;

/** Why a release addressed to the actor's organisation is not open any more; null when it never was. */
export async function findEndedRelease(db: DbOrTx, params: { readonly actor: Actor; readonly releaseId: string }) {
  if (!params.actor.grants.some((grant) => grant.role === 'insurer')) return null;
  const [row] = await db
    .select({ number: releases.number, state: releases.state, expiresAt: releases.expiresAt, zone: readerLine.zone, approvedAt: releases.approvedAt })
    .from(releases)
    .where(and(eq(releases.recipientOrganisationId, params.actor.organisationId), eq(releases.id, params.releaseId), ne(releases.state, 'prepared'), sql`${releases.approvedAt} is not null`));
  return row ?? null;
}

/** Open releases of the same case to the same readers, newest first, with what changed from one to the next. */
export function listSiblings(db: DbOrTx, params: { readonly actor: Actor; readonly caseId: string }) {
  return db
    .select({ id: releases.id, number: releases.number, approvedAt: releases.approvedAt, changeNote: releases.changeNote })
    .from(releases)
    .where(and(releasedTo(params.actor), eq(releases.caseId, params.caseId)))
    .orderBy(desc(releases.number));
}

export async function insertOpening(tx: Transaction, params: { readonly releaseId: string; readonly userId: string }): Promise<void> {
  await tx.insert(releaseOpenings).values(params);
}

/** Whose log an opening belongs into; never shown to the reader. */
export async function organisationOfCase(tx: Transaction, caseId: string): Promise<string> {
  const [row] = await tx.select({ organisationId: cases.organisationId }).from(cases).where(eq(cases.id, caseId));
  if (!row) throw new Error('The case of the release is missing.');
  return row.organisationId;
}

export async function organisationName(db: DbOrTx, organisationId: string): Promise<string> {
  const [row] = await db.select({ name: organisations.name }).from(organisations).where(eq(organisations.id, organisationId));
  return row?.name ?? '';
}
