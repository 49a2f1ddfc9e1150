import { and, asc, countDistinct, desc, eq, inArray, max, ne, or, sql } from 'drizzle-orm';
import type { SQL } from 'drizzle-orm';
import type { DbOrTx, Transaction } from '#db/client.server.ts';
import { cases, grants, organisations, releaseOpenings, releases, users } from '#db/schema/all.ts';
import { caseRules } from '#app/domain/permissions.ts';
import type { Decisions } from '#app/domain/redaction.ts';
import type { Audience } from '#app/domain/release-policy.ts';
import type { ReleasedCase, WithheldCounts } from '#app/domain/released-case.ts';
import type { Actor, Role } from '#app/domain/roles.ts';
import type { ReleaseFile } from '#db/schema/releases.ts';
import { visibleTo } from './scope.server.ts';

export type { ReleaseFile } from '#db/schema/releases.ts';
export type ReleaseRow = typeof releases.$inferSelect;
export type ReleaseState = ReleaseRow['state'];

/** Visible cases whose releases the actor may look at: those for which they may prepare or approve one. */
function keptBy(actor: Actor): SQL {
  const keepers: readonly Role[] = [...caseRules['release:prepare'].roles, ...caseRules['release:approve'].roles];
  const held = actor.grants.filter((grant) => keepers.includes(grant.role));
  if (held.some((grant) => grant.siteId === null)) return visibleTo(actor);
  const siteIds = held.flatMap((grant) => (grant.siteId ? [grant.siteId] : []));
  return (siteIds.length > 0 ? and(visibleTo(actor), inArray(cases.siteId, siteIds)) : null) ?? sql`false`;
}

const recipient = sql<string>`(select ${organisations.name} from ${organisations} where ${organisations.id} = ${releases.recipientOrganisationId})`;
const preparedBy = sql<string>`(select ${users.displayName} from ${users} where ${users.id} = ${releases.preparedById})`;
const approvedBy = sql<string | null>`(select ${users.displayName} from ${users} where ${users.id} = ${releases.approvedById})`;
const openings = sql<number>`(select count(*)::int from ${releaseOpenings} where ${releaseOpenings.releaseId} = ${releases.id})`;

const staffLine = {
  id: releases.id,
  number: releases.number,
  audience: releases.audience,
  state: releases.state,
  changeNote: releases.changeNote,
  withheld: releases.withheld,
  releasedHash: releases.releasedHash,
  approvedAt: releases.approvedAt,
  expiresAt: releases.expiresAt,
  withdrawnAt: releases.withdrawnAt,
  withdrawnReason: releases.withdrawnReason,
  createdAt: releases.createdAt,
  caseNumber: cases.number,
  caseTitle: cases.title,
  zone: cases.zone,
  recipient,
  preparedBy,
  approvedBy,
  openings,
} as const;

/** Releases of one case for those who prepare or approve them, newest first. */
export function listCaseReleases(db: DbOrTx, params: { readonly actor: Actor; readonly caseNumber: number }) {
  return db.select(staffLine).from(releases).innerJoin(cases, eq(cases.id, releases.caseId)).where(and(keptBy(params.actor), eq(cases.number, params.caseNumber))).orderBy(desc(releases.number));
}
export type StaffReleaseLine = Awaited<ReturnType<typeof listCaseReleases>>[number];

/** Releases of all cases that the actor keeps, newest first. */
export function listKeptReleases(db: DbOrTx, actor: Actor): Promise<StaffReleaseLine[]> {
  return db.select(staffLine).from(releases).innerJoin(cases, eq(cases.id, releases.caseId)).where(keptBy(actor)).orderBy(desc(releases.createdAt), desc(releases.number)).limit(500);
}

const keptColumns = { release: releases, caseNumber: cases.number, organisationId: cases.organisationId, recipient, preparedBy, approvedBy, openings };

/** One release, whole, for those who prepare or approve releases of its case. */
export async function findKeptRelease(db: DbOrTx, params: { readonly actor: Actor; readonly caseNumber: number; readonly number: number }) {
  const [row] = await db
    .select(keptColumns)
    .from(releases)
    .innerJoin(cases, eq(cases.id, releases.caseId))
    .where(and(keptBy(params.actor), eq(cases.number, params.caseNumber), eq(releases.number, params.number)));
  return row ?? null;
}

/** The same by its id. */
export async function findKeptReleaseById(db: DbOrTx, params: { readonly actor: Actor; readonly releaseId: string }) {
  const [row] = await db.select(keptColumns).from(releases).innerJoin(cases, eq(cases.id, releases.caseId)).where(and(keptBy(params.actor), eq(releases.id, params.releaseId)));
  return row ?? null;
}

/** Organisations that a release of this organisation can be addressed to, with how many of their people can read it. */
export function listRecipientOrganisations(db: DbOrTx, params: { readonly organisationId: string; readonly audience: Audience }) {
  return db
    .select({ id: organisations.id, name: organisations.name, readers: countDistinct(grants.userId) })
    .from(organisations)
    .leftJoin(users, and(eq(users.organisationId, organisations.id), eq(users.disabled, false)))
    .leftJoin(grants, and(eq(grants.userId, users.id), eq(grants.role, 'insurer')))
    .where(and(ne(organisations.id, params.organisationId), params.audience === 'insurer' ? eq(organisations.kind, 'insurer') : undefined))
    .groupBy(organisations.id, organisations.name)
    .orderBy(asc(organisations.name));
}

/** People of the recipient who can open its releases. */
export function listReaders(db: DbOrTx, organisationId: string): Promise<{ userId: string; email: string }[]> {
  return db
    .selectDistinct({ userId: users.id, email: users.email })
    .from(users)
    .innerJoin(grants, eq(grants.userId, users.id))
    .where(and(eq(users.organisationId, organisationId), eq(users.disabled, false), eq(grants.role, 'insurer')))
    .orderBy(asc(users.email));
}

export interface NewRelease {
  readonly id: string;
  readonly caseId: string;
  readonly audience: Audience;
  readonly recipientOrganisationId: string;
  readonly changeNote: string;
  readonly released: ReleasedCase;
  readonly withheld: WithheldCounts;
  readonly files: readonly ReleaseFile[];
  readonly releasedHash: string;
  readonly decisions: Decisions;
  readonly preparedById: string;
  readonly expiresAt: Date;
}

/** Stores a prepared release under the next number of its case; the caller holds the lock on the case. */
export async function insertRelease(tx: Transaction, values: NewRelease): Promise<number> {
  const [last] = await tx.select({ number: max(releases.number) }).from(releases).where(eq(releases.caseId, values.caseId));
  const number = (last?.number ?? 0) + 1;
  await tx.insert(releases).values({ ...values, number });
  return number;
}

/** A release of the locked case, under a lock of its own. */
export async function lockRelease(tx: Transaction, params: { readonly caseId: string; readonly number: number }): Promise<ReleaseRow | null> {
  const [row] = await tx.select().from(releases).where(and(eq(releases.caseId, params.caseId), eq(releases.number, params.number))).for('update');
  return row ?? null;
}

export async function markReleased(tx: Transaction, params: { readonly releaseId: string; readonly approvedById: string }): Promise<void> {
  await tx.update(releases).set({ state: 'released', approvedById: params.approvedById, approvedAt: sql`now()` }).where(eq(releases.id, params.releaseId));
}

export async function markWithdrawn(tx: Transaction, params: { readonly releaseId: string; readonly reason: string }): Promise<void> {
  await tx.update(releases).set({ state: 'withdrawn', withdrawnAt: sql`now()`, withdrawnReason: params.reason }).where(eq(releases.id, params.releaseId));
}

export interface OpeningLine {
  readonly at: Date;
  readonly reader: string;
}

/** Who opened a release, newest first; for those who keep it. */
export function listOpenings(db: DbOrTx, params: { readonly actor: Actor; readonly releaseId: string }): Promise<OpeningLine[]> {
  return db
    .select({ at: releaseOpenings.createdAt, reader: users.displayName })
    .from(releaseOpenings)
    .innerJoin(users, eq(users.id, releaseOpenings.userId))
    .innerJoin(releases, eq(releases.id, releaseOpenings.releaseId))
    .innerJoin(cases, eq(cases.id, releases.caseId))
    .where(and(keptBy(params.actor), eq(releases.id, params.releaseId)))
    .orderBy(desc(releaseOpenings.createdAt))
    .limit(100);
}

/** Decisions of the newest release for the same reader, to begin the next one with. */
export async function latestDecisions(db: DbOrTx, params: { readonly caseId: string; readonly audience: Audience }): Promise<Decisions> {
  const [row] = await db
    .select({ decisions: releases.decisions })
    .from(releases)
    .where(and(eq(releases.caseId, params.caseId), eq(releases.audience, params.audience), or(eq(releases.state, 'released'), eq(releases.state, 'prepared'))))
    .orderBy(desc(releases.number))
    .limit(1);
  return row?.decisions ?? {};
}
