import type { DbOrTx } from '#db/client.server.ts';
import { listAttachments } from './attachments.server.ts';
import { readCaseBeforeRedaction } from './case-before-redaction.server.ts';
import { findCase } from './case-subject.server.ts';
import { listEvidence } from './evidence.server.ts';
import { listCasePhotos } from './photos.server.ts';
import { getReconstruction } from './reconstructions.server.ts';
import { listHappenings } from './timeline-page.server.ts';
import { listAccountsOfCase } from './witness-accounts.server.ts';
import type { CaseBeforeRedaction } from '#app/domain/case-before-redaction.ts';
import type { InHouseParts, ReportFinding } from '#app/domain/in-house-report.ts';
import { reliedSource } from '#app/domain/relied-weather.ts';
import type { ReportedRun } from '#app/domain/report-source.ts';
import { runDrawing } from '#app/domain/run-drawing.ts';
import type { Actor } from '#app/domain/roles.ts';

export interface ReportQuery {
  readonly actor: Actor;
  readonly caseNumber: number;
  readonly finding: ReportFinding | null;
  readonly opinionShown: boolean;
  readonly at: Date;
}

/**
 * What the report of a visible case is put together from; null when the case is not theirs to see. Accounts of witnesses
 * come without the person, and documents of the legal class not at all. That the reader may have a report is the caller's
 * to check.
 */
export async function readReportParts(db: DbOrTx, { actor, caseNumber, finding, opinionShown, at }: ReportQuery): Promise<InHouseParts | null> {
  const found = await findCase(db, actor, caseNumber);
  const read = await readCaseBeforeRedaction(db, { actor, caseNumber });
  if (!found || !read) return null;
  const query = { actor, caseNumber };
  return {
    source: read.source,
    finding,
    opinionShown,
    run: await runOf(db, query, read.source),
    happenings: await listHappenings(db, found.row, query),
    accounts: (await listAccountsOfCase(db, found.row.id)).map(({ account }) => account),
    items: await listEvidence(db, query),
    documents: await listAttachments(db, { ...query, classes: ['ordinary', 'personal'] }),
    photos: await listCasePhotos(db, query),
    at,
  };
}

async function runOf(db: DbOrTx, query: Pick<ReportQuery, 'actor' | 'caseNumber'>, { reconstruction, weather }: CaseBeforeRedaction): Promise<ReportedRun | null> {
  if (!reconstruction) return null;
  const run = await getReconstruction(db, { ...query, number: reconstruction.number });
  if (!run?.result || !run.resultHash) return null;
  return { number: run.number, engineVersion: run.engineVersion, zoneRules: run.zoneRules, inputHash: run.inputHash, resultHash: run.resultHash, result: run.result, drawing: runDrawing(run.input, run.result), weather: weather && { ...weather, source: reliedSource(weather) } };
}
