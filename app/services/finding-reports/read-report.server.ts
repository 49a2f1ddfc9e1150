import { db, inTransaction } from '#db/client.server.ts';
import { findCase } from '#db/queries/case-subject.server.ts';
import { getFindingReport, recordReportFile } from '#db/queries/finding-reports.server.ts';
import type { FindingReportRow } from '#db/queries/finding-reports.server.ts';
import { listFindings } from '#db/queries/findings.server.ts';
import type { FindingView } from '#db/queries/findings.server.ts';
import { isConclusionHidden } from '#db/queries/hidden-conclusion.server.ts';
import { readReportParts } from '#db/queries/report-parts.server.ts';
import { buildReport } from '#app/domain/build-report.ts';
import { DomainError, notFound } from '#app/domain/errors.ts';
import { inHouseReport } from '#app/domain/in-house-report.ts';
import { canOnCase, whoCan } from '#app/domain/permissions.ts';
import type { ReportDocument } from '#app/domain/report-document.ts';
import { withAuthorship } from '#app/domain/review-rights.ts';
import type { Actor } from '#app/domain/roles.ts';
import { logLine } from '#app/services/log-line.server.ts';
import { getObject, putObject } from '#app/storage/objects.server.ts';
import { sha256Hex } from '#app/storage/sha256.server.ts';
import { freezeReport } from './freeze-report.server.ts';
import { renderPdf } from './render-pdf.server.ts';

export interface ReportRequest {
  readonly actor: Actor;
  readonly caseNumber: number;
  /** Null takes the newest that the reader may see. */
  readonly version: number | null;
}

export interface ReportView {
  readonly document: ReportDocument;
  readonly version: number | null;
  readonly signed: boolean;
  /** SHA-256 of the frozen document; null for one that is put together now. */
  readonly documentHash: string | null;
  /** Signed versions, newest first. */
  readonly signedVersions: readonly number[];
}

interface Chosen {
  readonly finding: FindingView | null;
  readonly opinionShown: boolean;
  readonly signedVersions: readonly number[];
  readonly caseId: string;
  readonly organisationId: string;
}

/** Which version this reader gets, and whether its opinion is theirs to read yet. @throws DomainError `forbidden` */
async function choose({ actor, caseNumber, version }: ReportRequest): Promise<Chosen> {
  const found = await findCase(db, actor, caseNumber);
  if (!found) throw notFound('The case');
  const all = await listFindings(db, { actor, caseNumber });
  const subject = withAuthorship(found.subject, all, actor.userId);
  if (!canOnCase(actor, 'finding:read-signed', subject)) throw new DomainError('forbidden', `The report is not open to you. ${whoCan('finding:read-signed')}`);
  const readable = canOnCase(actor, 'finding:read-draft', subject) ? all : all.filter((one) => one.state === 'signed');
  const finding = version === null ? (readable[0] ?? null) : (readable.find((one) => one.version === version) ?? null);
  if (version !== null && !finding) throw notFound('This version of the finding');
  const [latest = null] = all;
  const opinionShown = !(await isConclusionHidden(db, { actor, caseNumber }));
  // A reviewer who has not asked for the opinion is shown no version of it, earlier ones included.
  return { finding: opinionShown ? finding : latest, opinionShown, signedVersions: readable.filter((one) => one.state === 'signed').map((one) => one.version), caseId: found.row.id, organisationId: found.row.organisationId };
}

/** The report for the screen: the frozen one of a signed version, else one put together now and marked a draft. */
export async function readReport(request: ReportRequest): Promise<ReportView> {
  const { finding, opinionShown, signedVersions } = await choose(request);
  if (finding?.state === 'signed') {
    const frozen = await frozenReport(request, finding);
    return { document: frozen.document, version: finding.version, signed: true, documentHash: frozen.documentHash, signedVersions };
  }
  const parts = await readReportParts(db, { actor: request.actor, caseNumber: request.caseNumber, finding: finding && { ...finding, signedAt: null, frozenHash: null }, opinionShown, at: new Date() });
  if (!parts) throw notFound('The case');
  return { document: buildReport(inHouseReport(parts)), version: finding?.version ?? null, signed: false, documentHash: null, signedVersions };
}

/** Versions signed before reports were kept get theirs when somebody first asks for it. */
async function frozenReport({ actor, caseNumber }: ReportRequest, finding: FindingView): Promise<FindingReportRow> {
  const known = await getFindingReport(db, { actor, caseNumber, version: finding.version });
  if (known) return known;
  await inTransaction((tx) => freezeReport(tx, { actor, caseNumber, findingId: finding.id, finding, at: finding.signedAt ?? new Date() }));
  const made = await getFindingReport(db, { actor, caseNumber, version: finding.version });
  if (!made) throw notFound('The report');
  return made;
}

/**
 * The printed report. That of a signed version is made once and the same bytes are handed out from then on, hashed again
 * each time; a draft is made anew and says that it is one.
 *
 * @throws DomainError `conflict` when the stored file is no longer the one that was made.
 */
export async function readReportPdf(request: ReportRequest): Promise<{ bytes: Uint8Array; fileName: string }> {
  const { finding, caseId, organisationId } = await choose(request);
  const { actor, caseNumber } = request;
  const fileName = `case-${caseNumber}-report${finding ? `-version-${finding.version}` : ''}${finding?.state === 'signed' ? '' : '-draft'}.pdf`;
  const bytes = finding?.state === 'signed' ? await keptPdf(await frozenReport(request, finding), finding.id) : await renderPdf((await readReport(request)).document);
  await inTransaction((tx) =>
    logLine(tx, actor, { id: caseId, organisationId }, { event: 'report.downloaded', subject: 'findings', subjectId: finding?.id ?? caseId, summary: finding ? `Report of finding version ${finding.version} downloaded${finding.state === 'signed' ? '' : ', as a draft'}.` : 'Report without a finding downloaded.', after: { sha256: sha256Hex(bytes) } }),
  );
  return { bytes, fileName };
}

async function keptPdf(report: FindingReportRow, findingId: string): Promise<Uint8Array> {
  if (report.pdfKey && report.pdfSha256) {
    const bytes = await getObject(report.pdfKey);
    if (!bytes || sha256Hex(bytes) !== report.pdfSha256) throw new DomainError('conflict', 'The stored report is no longer the file that was made: its hash differs, or it is missing. It is not handed out. Tell an administrator.');
    return bytes;
  }
  const bytes = await renderPdf(report.document);
  const pdfSha256 = sha256Hex(bytes);
  const pdfKey = `finding-reports/${findingId}/${pdfSha256}.pdf`;
  await putObject(pdfKey, bytes, 'application/pdf');
  await inTransaction((tx) => recordReportFile(tx, report.id, { pdfKey, pdfSha256, pdfBytes: bytes.byteLength }));
  return bytes;
}
