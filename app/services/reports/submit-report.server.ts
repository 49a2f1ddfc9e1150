import { randomBytes } from 'node:crypto';
import { inTransaction } from '#db/client.server.ts';
import type { Transaction } from '#db/client.server.ts';
import { insertInjury } from '#db/queries/injuries.server.ts';
import { insertLogEntry } from '#db/queries/log.server.ts';
import type { NewReportedCase, SentReport } from '#db/queries/reports.server.ts';
import { attachReportPhotos, findSentReport, insertInvolvement, insertReportedCase, lockReport } from '#db/queries/reports.server.ts';
import { insertScene } from '#db/queries/scenes.server.ts';
import { DomainError } from '#app/domain/errors.ts';
import { canInOrganisation } from '#app/domain/permissions.ts';
import type { PersonRelation } from '#app/domain/person-relation.ts';
import { personRelationLabels } from '#app/domain/person-relation.ts';
import type { Report, ReportHolder } from '#app/domain/report.ts';
import { receiptFrom, titleOfReport } from '#app/domain/report-receipt.ts';
import { enqueue } from '#app/jobs/queue.server.ts';
import { sendMailJob } from '#app/jobs/definitions/send-mail.ts';
import { holderId, isHeldBy, notYourReport } from './report-holder.server.ts';
import { mailReport } from './report-mails.server.ts';

export interface Submission {
  readonly holder: ReportHolder;
  /** Made on the device; the same id gives the same case, however often it is sent. */
  readonly clientId: string;
  readonly report: Report;
}

export interface Receipt {
  readonly receipt: string;
  readonly caseNumber: number;
  /** True when this was a repetition and nothing was written. */
  readonly repeated: boolean;
}

/**
 * Stores a report as a case, once. Case, first scene, people, photos, log and mail stand or fall together.
 *
 * Two sendings of one report wait for each other on a lock of their client id, so the second finds the first's case.
 *
 * @throws DomainError `forbidden` when the site is not the holder's to report for, or the client id belongs to somebody
 *   else's report.
 */
export async function submitReport(submission: Submission): Promise<Receipt> {
  refuseForeignSite(submission);
  return inTransaction(async (tx) => {
    await lockReport(tx, submission.clientId);
    const earlier = await findSentReport(tx, submission.clientId);
    if (earlier) {
      if (!isHeldBy(earlier, submission.holder)) throw notYourReport();
      return { receipt: earlier.receipt, caseNumber: earlier.caseNumber, repeated: true };
    }
    const sent = await insertWithReceipt(tx, caseValues(submission));
    await insertScene(tx, { caseId: sent.caseId, version: 1, scene: submission.report.scene, note: 'As reported', authorId: holderId(submission.holder) });
    await insertPeople(tx, sent, submission);
    const photoCount = await attachReportPhotos(tx, { clientId: submission.clientId, caseId: sent.caseId, actorId: holderId(submission.holder), zone: sent.zone });
    await insertLogEntry(tx, receivedLine(sent, submission.holder, photoCount));
    await mailReport(tx, sent, submission);
    await enqueue(tx, sendMailJob, {});
    return { receipt: sent.receipt, caseNumber: sent.caseNumber, repeated: false };
  });
}

function refuseForeignSite({ holder, report }: Submission): void {
  const own = holder.kind === 'person' ? report.site.organisationId === holder.actor.organisationId && canInOrganisation(holder.actor, 'report:create') : report.site.id === holder.site.id;
  if (!own) throw new DomainError('forbidden', 'This site is not one you can report for. Choose another, or use the link at the place.');
}

function caseValues({ holder, clientId, report }: Submission): Omit<NewReportedCase, 'receipt'> {
  const names = [report.contact?.name ?? '', holder.kind === 'person' ? holder.actor.displayName : ''];
  return {
    clientId,
    organisationId: report.site.organisationId,
    siteId: report.site.id,
    zone: report.site.zone,
    title: titleOfReport(report, names),
    narrative: report.narrative,
    placeDetail: report.placeDetail,
    ...(report.position ?? {}),
    ...report.times,
    sighting: report.sighting,
    anyoneHurt: report.anyoneHurt,
    hazardStillPresent: report.hazardStillPresent,
    interimControl: report.interimControl,
    foundByMeans: report.foundByMeans,
    weatherSeen: report.weatherSeen,
    reporterId: holderId(holder),
    guestReport: holder.kind === 'guest',
  };
}

/** Forty random bits rarely meet a receipt that exists; then the next are drawn. */
async function insertWithReceipt(tx: Transaction, values: Omit<NewReportedCase, 'receipt'>): Promise<SentReport> {
  for (let tries = 0; tries < 5; tries += 1) {
    const sent = await insertReportedCase(tx, { ...values, receipt: receiptFrom(randomBytes(8)) });
    if (sent) return sent;
  }
  throw new Error('Five receipts in a row were taken; the generator of random numbers is broken.');
}

async function insertPeople(tx: Transaction, sent: SentReport, { holder, report }: Submission): Promise<void> {
  const { caseId } = sent;
  if (report.contact) await insertInvolvement(tx, { caseId, role: 'reporter', ...report.contact });
  if (report.witness) await insertInvolvement(tx, { caseId, role: 'witness', relation: relationWords(report.witness.relation) });
  if (!report.hurt) return;
  const { ageBand, relation, injury } = report.hurt;
  const involvementId = await insertInvolvement(tx, { caseId, role: 'injured', ageBand, relation: relationWords(relation) });
  if (!injury) return;
  const injuryId = await insertInjury(tx, caseId, { ...injury, involvementId });
  await insertLogEntry(tx, { ...lineOf(sent, holder), event: 'case.injury-added', subject: 'injuries', subjectId: injuryId, summary: 'Health fields added.' });
}

const relationWords = (relation: PersonRelation | null) => (relation ? personRelationLabels[relation].toLowerCase() : null);

const lineOf = (sent: SentReport, holder: ReportHolder) => ({
  actorId: holderId(holder),
  actorName: holder.kind === 'person' ? holder.actor.displayName : 'Guest by site link',
  organisationId: sent.organisationId,
  caseId: sent.caseId,
});

function receivedLine(sent: SentReport, holder: ReportHolder, photoCount: number) {
  const photos = photoCount === 1 ? 'one photo' : `${photoCount} photos`;
  return {
    ...lineOf(sent, holder),
    event: 'case.reported',
    subject: 'cases',
    subjectId: sent.caseId,
    summary: `Report received with ${photos}, receipt ${sent.receipt}.`,
    after: { state: sent.state, photoCount },
  };
}
