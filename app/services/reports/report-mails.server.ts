import type { Transaction } from '#db/client.server.ts';
import { listRoleHolders } from '#db/queries/case-people.server.ts';
import { insertMail } from '#db/queries/outbox.server.ts';
import type { SentReport } from '#db/queries/reports.server.ts';
import type { Report, ReportHolder } from '#app/domain/report.ts';
import type { Role } from '#app/domain/roles.ts';
import { reportAlertMail } from '#app/mail/templates/report-alert.ts';
import { reportReceivedMail } from '#app/mail/templates/report-received.ts';

/**
 * Mail that follows from a report, in its transaction: the receipt to the reporter, and an alert when the hazard is still
 * there or somebody was hurt. The reporter is not alerted to their own report.
 */
export async function mailReport(tx: Transaction, sent: SentReport, { holder, report }: { holder: ReportHolder; report: Report }): Promise<void> {
  const reporterAddress = holder.kind === 'person' ? holder.actor.email : (report.contact?.email ?? null);
  if (reporterAddress) {
    await insertMail(tx, { dedupeKey: `report-received:${sent.caseId}`, toAddress: reporterAddress, caseId: sent.caseId, ...reportReceivedMail(sent) });
  }
  const roles = rolesToAlert(report);
  if (roles.length === 0) return;
  const people = await listRoleHolders(tx, { organisationId: sent.organisationId, siteId: sent.siteId, roles });
  for (const person of people) {
    if (person.userId === sent.reporterId) continue;
    await insertMail(tx, { dedupeKey: `report-alert:${sent.caseId}:${person.userId}`, toAddress: person.email, caseId: sent.caseId, ...reportAlertMail(sent) });
  }
}

function rolesToAlert(report: Pick<Report, 'anyoneHurt' | 'hazardStillPresent'>): readonly Role[] {
  if (report.anyoneHurt === 'yes') return ['investigator', 'manager', 'privacy-lead'];
  return report.hazardStillPresent === 'yes' ? ['investigator', 'manager'] : [];
}
