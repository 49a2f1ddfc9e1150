import type { ReportFormState } from '#app/components/report/report-fields.ts';
import { DomainError } from '#app/domain/errors.ts';
import type { ReportHolder } from '#app/domain/report.ts';
import { readReport } from '#app/domain/report.ts';
import { statusFor } from '#app/http/to-response.server.ts';
import { zoneAt } from '#app/services/sites/zone-at.server.ts';
import { submitReport } from '#app/services/reports/submit-report.server.ts';
import { db } from '#db/client.server.ts';
import { listReportSites } from '#db/queries/reports.server.ts';

/** What has to be mended; the words themselves stay with whoever typed them. */
export type ReportProblem = Partial<Omit<ReportFormState, 'typed'>>;
export type Reception = { readonly ok: true; readonly receipt: string } | { readonly ok: false; readonly problem: ReportProblem; readonly status: number };

interface Words {
  readonly holder: ReportHolder;
  readonly clientId: string;
  readonly typed: Readonly<Record<string, string>>;
  /** Sentences about files that came with the words and were not taken. */
  readonly refused?: readonly string[];
}

/** Reads the words of a report and stores it, once; the same for a page with a script and without. */
export async function receiveReport({ holder, clientId, typed, refused = [] }: Words): Promise<Reception> {
  const site = (await listReportSites(db, holder)).find((one) => one.id === typed['siteId']) ?? null;
  const reading = readReport(typed, { site, now: new Date(), zoneAt });
  if (!reading.ok) {
    const { repeated, longWindowDays, fieldErrors } = reading;
    return { ok: false, problem: { repeated, longWindowDays, fieldErrors: { ...fieldErrors, ...photoErrors(refused, false) } }, status: 400 };
  }
  if (refused.length > 0) return { ok: false, problem: { fieldErrors: photoErrors(refused, true) }, status: 400 };
  try {
    const { receipt } = await submitReport({ holder, clientId, report: reading.report });
    return { ok: true, receipt };
  } catch (error) {
    if (!(error instanceof DomainError)) throw error;
    return { ok: false, problem: { formErrors: [error.message] }, status: statusFor(error) };
  }
}

export function photoErrors(refused: readonly string[], restIsFine: boolean): Record<string, string[]> {
  if (refused.length === 0) return {};
  return { photos: [...refused, restIsFine ? 'Everything else is fine: press Send again to send without it, or choose another file.' : 'Everything else is still here.'] };
}
