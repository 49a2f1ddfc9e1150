import { and, asc, count, eq, gt, min, notInArray, sql } from 'drizzle-orm';
import type { DbOrTx, Transaction } from '#db/client.server.ts';
import { cases, sites, sunReturns } from '#db/schema/all.ts';
import type { Actor } from '#app/domain/roles.ts';
import { visibleTo } from './scope.server.ts';

export type SiteRow = typeof sites.$inferSelect;
export type NewSite = Pick<SiteRow, 'code' | 'name' | 'address' | 'latitudeDeg' | 'longitudeDeg' | 'elevationM' | 'zone' | 'use' | 'jurisdiction'>;

export async function getSiteById(db: DbOrTx, organisationId: string, siteId: string): Promise<SiteRow | null> {
  const [row] = await db.select().from(sites).where(and(eq(sites.id, siteId), eq(sites.organisationId, organisationId)));
  return row ?? null;
}

export async function getSiteByCode(db: DbOrTx, organisationId: string, code: string): Promise<SiteRow | null> {
  const [row] = await db.select().from(sites).where(and(eq(sites.code, code), eq(sites.organisationId, organisationId)));
  return row ?? null;
}

/** As `getSiteByCode`, held until the transaction ends. */
export async function lockSiteByCode(tx: Transaction, organisationId: string, code: string): Promise<SiteRow | null> {
  const [row] = await tx.select().from(sites).where(and(eq(sites.code, code), eq(sites.organisationId, organisationId))).for('update');
  return row ?? null;
}

/** Sites of the organisation for a list to choose from. */
export function listSiteChoices(db: DbOrTx, organisationId: string): Promise<{ id: string; code: string; name: string }[]> {
  return db.select({ id: sites.id, code: sites.code, name: sites.name }).from(sites).where(eq(sites.organisationId, organisationId)).orderBy(asc(sites.name));
}

/** Sites with the cases that the actor may see there, and when the mark of an open one is next lit again. */
export async function listSites(db: DbOrTx, params: { actor: Actor; now: Date }) {
  const seen = db
    .select({ siteId: cases.siteId, caseCount: count().as('case_count'), openCount: sql<number>`count(*) filter (where ${cases.state} not in ('closed', 'duplicate'))`.mapWith(Number).as('open_count') })
    .from(cases)
    .where(visibleTo(params.actor))
    .groupBy(cases.siteId)
    .as('seen');
  const returning = db
    .select({ siteId: cases.siteId, nextReturnAt: min(sunReturns.bestAt).as('next_return_at') })
    .from(sunReturns)
    .innerJoin(cases, eq(cases.id, sunReturns.caseId))
    .where(and(visibleTo(params.actor), notInArray(cases.state, ['closed', 'duplicate']), gt(sunReturns.bestAt, params.now)))
    .groupBy(cases.siteId)
    .as('returning');
  return db
    .select({ code: sites.code, name: sites.name, use: sites.use, zone: sites.zone, caseCount: seen.caseCount, openCount: seen.openCount, nextReturnAt: returning.nextReturnAt })
    .from(sites)
    .leftJoin(seen, eq(seen.siteId, sites.id))
    .leftJoin(returning, eq(returning.siteId, sites.id))
    .where(eq(sites.organisationId, params.actor.organisationId))
    .orderBy(asc(sites.name));
}

/** Cases at one site, newest first, as far as the actor may see them. */
export function listCasesAtSite(db: DbOrTx, params: { actor: Actor; siteId: string; now: Date }) {
  const next = db
    .select({ caseId: sunReturns.caseId, nextReturnAt: min(sunReturns.bestAt).as('next_return_at') })
    .from(sunReturns)
    .where(gt(sunReturns.bestAt, params.now))
    .groupBy(sunReturns.caseId)
    .as('next');
  return db
    .select({ number: cases.number, title: cases.title, state: cases.state, reportedAt: cases.reportedAt, nextReturnAt: next.nextReturnAt })
    .from(cases)
    .leftJoin(next, eq(next.caseId, cases.id))
    .where(and(visibleTo(params.actor), eq(cases.siteId, params.siteId)))
    .orderBy(sql`${cases.reportedAt} desc`);
}

/** False when the code is taken within the organisation. */
export async function insertSite(tx: Transaction, organisationId: string, site: NewSite): Promise<string | null> {
  const [row] = await tx.insert(sites).values({ ...site, organisationId }).onConflictDoNothing({ target: [sites.organisationId, sites.code] }).returning({ id: sites.id });
  return row?.id ?? null;
}

export async function updateSite(tx: Transaction, siteId: string, site: Omit<NewSite, 'code'>): Promise<void> {
  await tx.update(sites).set(site).where(eq(sites.id, siteId));
}

export async function updateGuestCode(tx: Transaction, siteId: string, guestCode: string | null): Promise<void> {
  await tx.update(sites).set({ guestCode }).where(eq(sites.id, siteId));
}

export async function updateSiteSkyline(tx: Transaction, siteId: string, skyline: SiteRow['skyline']): Promise<void> {
  await tx.update(sites).set({ skyline }).where(eq(sites.id, siteId));
}
