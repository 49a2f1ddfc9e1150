import { and, asc, eq, inArray, isNotNull, isNull, max, or, sql } from 'drizzle-orm';
import type { DbOrTx, Transaction } from '#db/client.server.ts';
import { cases, findings, hypotheses, involvements, logEntries, photos, sites } from '#db/schema/all.ts';
import type { CaseState } from '#app/domain/case-state.ts';
import { acceptedTime } from '#app/domain/photo.ts';
import type { ReportHolder, ReportSite } from '#app/domain/report.ts';
import { standingMoves } from './moves-in-log.server.ts';

const reportSite = { id: sites.id, organisationId: sites.organisationId, name: sites.name, code: sites.code, zone: sites.zone };

const ofHolder = (holder: ReportHolder) => (holder.kind === 'guest' ? eq(sites.id, holder.site.id) : eq(sites.organisationId, holder.actor.organisationId));
type SiteRow = typeof sites.$inferSelect;

/** Sites that the holder of a report may choose from: all of the person's organisation, or the one of the guest's link. */
export function listReportSites(db: DbOrTx, holder: ReportHolder): Promise<(ReportSite & Pick<SiteRow, 'latitudeDeg' | 'longitudeDeg' | 'jurisdiction'>)[]> {
  return db.select({ ...reportSite, latitudeDeg: sites.latitudeDeg, longitudeDeg: sites.longitudeDeg, jurisdiction: sites.jurisdiction }).from(sites).where(ofHolder(holder)).orderBy(asc(sites.name), asc(sites.id));
}

/** What the sun at one such site depends on; null when it is not the holder's to report for. */
export async function getReportSitePlace(db: DbOrTx, holder: ReportHolder, siteId: string): Promise<Pick<SiteRow, 'latitudeDeg' | 'longitudeDeg' | 'elevationM' | 'zone' | 'skyline'> | null> {
  const [row] = await db
    .select({ latitudeDeg: sites.latitudeDeg, longitudeDeg: sites.longitudeDeg, elevationM: sites.elevationM, zone: sites.zone, skyline: sites.skyline })
    .from(sites)
    .where(and(ofHolder(holder), eq(sites.id, siteId)));
  return row ?? null;
}

/** The site whose account-free link carries this code; null when the link is closed or never was. */
export async function getGuestSite(db: DbOrTx, guestCode: string): Promise<ReportSite | null> {
  const [site] = await db.select(reportSite).from(sites).where(and(isNotNull(sites.guestCode), eq(sites.guestCode, guestCode)));
  return site ?? null;
}

/** Makes everything that concerns one report under way wait in line: sending it, sending it twice, adding photos to it. */
export async function lockReport(tx: Transaction, clientId: string): Promise<void> {
  await tx.execute(sql`select pg_advisory_xact_lock(hashtextextended(${clientId}, 0))`);
}

export interface SentReport {
  readonly caseId: string;
  readonly caseNumber: number;
  readonly receipt: string;
  readonly state: CaseState;
  readonly organisationId: string;
  readonly siteId: string;
  readonly reporterId: string | null;
  readonly zone: string;
}

const sentReport = {
  caseId: cases.id,
  caseNumber: cases.number,
  receipt: cases.receipt,
  state: cases.state,
  organisationId: cases.organisationId,
  siteId: cases.siteId,
  reporterId: cases.reporterId,
  zone: cases.zone,
};

/** The case that a report became, whoever sent it; the caller decides by `isHeldBy`. */
export async function findSentReport(db: DbOrTx, clientId: string): Promise<SentReport | null> {
  const [row] = await db.select(sentReport).from(cases).where(eq(cases.clientId, clientId));
  return row ?? null;
}

export type NewReportedCase = Omit<typeof cases.$inferInsert, 'id' | 'number' | 'state' | 'version'>;

/** Null when the receipt is taken; the caller makes another. */
export async function insertReportedCase(tx: Transaction, values: NewReportedCase): Promise<SentReport | null> {
  const [row] = await tx.insert(cases).values({ ...values, state: 'reported' }).onConflictDoNothing({ target: cases.receipt }).returning(sentReport);
  return row ?? null;
}

export async function insertInvolvement(tx: Transaction, values: Omit<typeof involvements.$inferInsert, 'id' | 'createdAt'>): Promise<string> {
  const [row] = await tx.insert(involvements).values(values).returning({ id: involvements.id });
  if (!row) throw new Error('The person was not stored.');
  return row.id;
}

/**
 * Gives the photos of the report to its case, labelled in the order that the reporter gave, else in which they came.
 * Photos that somebody else brought stay behind. A time in a file that the reporter accepted becomes the photo's time.
 */
export async function attachReportPhotos(tx: Transaction, params: { clientId: string; caseId: string; actorId: string | null; zone: string }): Promise<number> {
  const mine = params.actorId ? or(isNull(photos.uploadedById), eq(photos.uploadedById, params.actorId)) : isNull(photos.uploadedById);
  const waiting = await tx
    .select({ id: photos.id, exif: photos.exif, exifAnswer: photos.exifAnswer })
    .from(photos)
    .where(and(eq(photos.reportClientId, params.clientId), isNull(photos.caseId), mine))
    .orderBy(sql`${photos.position} asc nulls last`, asc(photos.createdAt), asc(photos.id));
  for (const [index, photo] of waiting.entries()) {
    const takenAt = acceptedTime(photo, params.zone);
    await tx.update(photos).set({ caseId: params.caseId, label: index + 1, takenAt }).where(eq(photos.id, photo.id));
  }
  return waiting.length;
}

/** What anyone with the receipt may know: states and times, the signed result, the question. No name, place or words of the account. */
export interface ReportProgress {
  readonly caseId: string;
  readonly caseNumber: number;
  readonly reporterId: string | null;
  readonly state: CaseState;
  readonly zone: string;
  readonly reportedAt: Date;
  readonly closedAt: Date | null;
  readonly closeReason: (typeof cases.$inferSelect)['closeReason'];
  readonly question: string | null;
  readonly answerDueAt: Date | null;
  readonly photoCount: number;
  /** When the newest of them came; null without photos. */
  readonly lastPhotoAt: Date | null;
  readonly result: { readonly certainty: (typeof findings.$inferSelect)['certainty']; readonly kind: (typeof hypotheses.$inferSelect)['kind'] | null } | null;
  /** First time each state was reached. */
  readonly reachedAt: Partial<Record<CaseState, Date>>;
}

export async function getReportProgress(db: DbOrTx, receipt: string): Promise<ReportProgress | null> {
  const [row] = await db
    .select({
      caseId: cases.id,
      caseNumber: cases.number,
      reporterId: cases.reporterId,
      state: cases.state,
      zone: cases.zone,
      reportedAt: cases.reportedAt,
      closedAt: cases.closedAt,
      closeReason: cases.closeReason,
      question: cases.question,
      answerDueAt: cases.answerDueAt,
    })
    .from(cases)
    .where(eq(cases.receipt, receipt));
  if (!row) return null;
  const [signed] = await db
    .select({ certainty: findings.certainty, kind: hypotheses.kind })
    .from(findings)
    .leftJoin(hypotheses, eq(hypotheses.id, findings.selectedHypothesisId))
    .where(and(eq(findings.caseId, row.caseId), eq(findings.state, 'signed')))
    .orderBy(sql`${findings.version} desc`)
    .limit(1);
  const [counted] = await db.select({ photoCount: sql<number>`count(*)::int`, lastPhotoAt: max(photos.createdAt) }).from(photos).where(eq(photos.caseId, row.caseId));
  return {
    ...row,
    question: row.state === 'returned' ? row.question : null,
    result: signed ?? null,
    photoCount: counted?.photoCount ?? 0,
    lastPhotoAt: counted?.lastPhotoAt ?? null,
    reachedAt: await firstTimeInEachState(db, row.caseId),
  };
}

/** Read from the log, where every move notes the state it led to. */
async function firstTimeInEachState(db: DbOrTx, caseId: string): Promise<Partial<Record<CaseState, Date>>> {
  const state = sql<CaseState>`${logEntries.after} ->> 'state'`;
  const rows = await db
    .select({ state, sequence: sql<number>`min(${logEntries.sequence})::int` })
    .from(logEntries)
    .where(standingMoves(caseId))
    .groupBy(state);
  if (rows.length === 0) return {};
  const times = await db
    .select({ sequence: logEntries.sequence, at: logEntries.at })
    .from(logEntries)
    .where(inArray(logEntries.sequence, rows.map((row) => row.sequence)));
  return Object.fromEntries(rows.flatMap((row) => times.filter((time) => time.sequence === row.sequence).map((time) => [row.state, time.at])));
}

/** The case behind a receipt as a photo needs it, before its bytes are looked at. */
export async function findCaseByReceipt(db: DbOrTx, receipt: string) {
  const [row] = await db.select({ clientId: cases.clientId, state: cases.state, reporterId: cases.reporterId }).from(cases).where(eq(cases.receipt, receipt));
  return row ?? null;
}

/** The case behind a receipt, locked, for an answer or a photo by whoever holds the receipt. */
export async function lockCaseByReceipt(tx: Transaction, receipt: string) {
  const [row] = await tx.select().from(cases).where(eq(cases.receipt, receipt)).for('update');
  return row ?? null;
}
