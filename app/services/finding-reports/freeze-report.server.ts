import type { Transaction } from '#db/client.server.ts';
import { insertFindingReport } from '#db/queries/finding-reports.server.ts';
import { readReportParts } from '#db/queries/report-parts.server.ts';
import { buildReport } from '#app/domain/build-report.ts';
import { notFound } from '#app/domain/errors.ts';
import { inHouseReport } from '#app/domain/in-house-report.ts';
import type { ReportFinding } from '#app/domain/in-house-report.ts';
import type { Actor } from '#app/domain/roles.ts';
import { hashOf } from '#app/storage/sha256.server.ts';

/** Puts the report of a signed finding together and keeps it whole, in the transaction that signs or first asks for it. */
export async function freezeReport(tx: Transaction, { actor, caseNumber, findingId, finding, at }: { readonly actor: Actor; readonly caseNumber: number; readonly findingId: string; readonly finding: ReportFinding; readonly at: Date }): Promise<void> {
  const parts = await readReportParts(tx, { actor, caseNumber, finding, opinionShown: true, at });
  if (!parts) throw notFound('The case');
  const document = buildReport(inHouseReport(parts));
  await insertFindingReport(tx, { findingId, document, documentHash: hashOf(document) });
}
