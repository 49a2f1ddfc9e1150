import { and, asc, eq, inArray, isNull, sql } from 'drizzle-orm';
import type { DbOrTx, Transaction } from '#db/client.server.ts';
import { sitePlans, sites } from '#db/schema/all.ts';
import type { KnownPoint } from '#app/domain/site-plan.ts';

export type SitePlanRow = typeof sitePlans.$inferSelect;

/** Drawings of a site that are in use, by name. */
export function listSitePlans(db: DbOrTx, siteId: string): Promise<SitePlanRow[]> {
  return db.select().from(sitePlans).where(and(eq(sitePlans.siteId, siteId), isNull(sitePlans.removedAt))).orderBy(asc(sitePlans.name), asc(sitePlans.id));
}

/** Drawings that lie on the map, of several sites at once. */
export function listPlacedPlans(db: DbOrTx, siteIds: readonly string[]): Promise<SitePlanRow[]> {
  if (siteIds.length === 0) return Promise.resolve([]);
  return db
    .select()
    .from(sitePlans)
    .where(and(inArray(sitePlans.siteId, [...siteIds]), isNull(sitePlans.removedAt), sql`jsonb_array_length(${sitePlans.points}) >= 2`))
    .orderBy(asc(sitePlans.name), asc(sitePlans.id));
}

/** A drawing of a site of the organisation, in use or not. */
export async function findSitePlan(db: DbOrTx, params: { planId: string; organisationId: string }): Promise<SitePlanRow | null> {
  const [row] = await db
    .select({ plan: sitePlans })
    .from(sitePlans)
    .innerJoin(sites, eq(sites.id, sitePlans.siteId))
    .where(and(eq(sitePlans.id, params.planId), eq(sites.organisationId, params.organisationId)));
  return row?.plan ?? null;
}

export async function insertSitePlan(tx: Transaction, values: Pick<SitePlanRow, 'siteId' | 'name' | 'originalKey' | 'sha256' | 'pictureKey' | 'widthPx' | 'heightPx' | 'createdById'>): Promise<string> {
  const [row] = await tx.insert(sitePlans).values(values).returning({ id: sitePlans.id });
  if (!row) throw new Error('The drawing was not stored.');
  return row.id;
}

/** The drawing of this site, held until the transaction ends. */
export async function lockSitePlan(tx: Transaction, params: { siteId: string; planId: string }): Promise<SitePlanRow | null> {
  const [row] = await tx.select().from(sitePlans).where(and(eq(sitePlans.id, params.planId), eq(sitePlans.siteId, params.siteId), isNull(sitePlans.removedAt))).for('update');
  return row ?? null;
}

export async function updateSitePlan(tx: Transaction, planId: string, change: { readonly points?: readonly KnownPoint[]; readonly removedAt?: Date }): Promise<void> {
  await tx.update(sitePlans).set(change).where(eq(sitePlans.id, planId));
}
