import type { Route } from './+types/report-pdf';
import { requireActor } from '#app/auth/middleware.server.ts';
import { readCaseNumber } from '#app/domain/case-number.ts';
import { DomainError } from '#app/domain/errors.ts';
import { statusFor } from '#app/http/to-response.server.ts';
import { readReportPdf } from '#app/services/finding-reports/read-report.server.ts';

/** The printed report of a case, for whoever may read its finding. */
export async function loader({ request, context, params }: Route.LoaderArgs): Promise<Response> {
  const actor = requireActor(context, request);
  try {
    const asked = Number(new URL(request.url).searchParams.get('version'));
    const { bytes, fileName } = await readReportPdf({ actor, caseNumber: readCaseNumber(params.caseNumber), version: Number.isInteger(asked) && asked > 0 ? asked : null });
    return new Response(new Uint8Array(bytes), {
      headers: {
        'Content-Type': 'application/pdf',
        'Content-Length': String(bytes.byteLength),
        'Content-Disposition': `attachment; filename="${fileName}"`,
        'Cache-Control': 'private, no-store',
        'X-Content-Type-Options': 'nosniff',
        'Cross-Origin-Resource-Policy': 'same-origin',
      },
    });
  } catch (error) {
    if (!(error instanceof DomainError)) throw error;
    return new Response(error.message, { status: statusFor(error), headers: { 'Content-Type': 'text/plain; charset=utf-8', 'Cache-Control': 'no-store' } });
  }
}
