import { and, eq, isNull, sql } from 'drizzle-orm';
import type { DbOrTx, Transaction } from '#db/client.server.ts';
import { cases, findingReports, findings } from '#db/schema/all.ts';
import type { Actor } from '#app/domain/roles.ts';
import { visibleTo } from './scope.server.ts';

export type FindingReportRow = typeof findingReports.$inferSelect;

/** The frozen report of a signed version of a visible case. */
export async function getFindingReport(db: DbOrTx, params: { readonly actor: Actor; readonly caseNumber: number; readonly version: number }): Promise<FindingReportRow | null> {
  const [row] = await db
    .select({ report: findingReports })
    .from(findingReports)
    .innerJoin(findings, eq(findings.id, findingReports.findingId))
    .innerJoin(cases, eq(cases.id, findings.caseId))
    .where(and(visibleTo(params.actor), eq(cases.number, params.caseNumber), eq(findings.version, params.version), eq(findings.state, 'signed')));
  return row?.report ?? null;
}

/** Null when the finding has its report already. */
export async function insertFindingReport(tx: Transaction, values: Pick<typeof findingReports.$inferInsert, 'findingId' | 'document' | 'documentHash'>): Promise<string | null> {
  const [row] = await tx.insert(findingReports).values(values).onConflictDoNothing({ target: findingReports.findingId }).returning({ id: findingReports.id });
  return row?.id ?? null;
}

/** Keeps which file was made from the report; the first one made stays. */
export async function recordReportFile(tx: Transaction, reportId: string, file: { readonly pdfKey: string; readonly pdfSha256: string; readonly pdfBytes: number }): Promise<void> {
  await tx.update(findingReports).set({ ...file, pdfMadeAt: sql`now()` }).where(and(eq(findingReports.id, reportId), isNull(findingReports.pdfKey)));
}
