import type { Route } from './+types/run-figure';
import { db } from '#db/client.server.ts';
import { getRunExport } from '#db/queries/reconstruction-page.server.ts';
import { requireActor } from '#app/auth/middleware.server.ts';
import { readCaseNumber } from '#app/domain/case-number.ts';
import { csvText } from '#app/domain/csv.ts';
import { notFound } from '#app/domain/errors.ts';
import { figureTable, isFigureId } from '#app/domain/run-figures.ts';
import { respond } from '#app/http/to-response.server.ts';

/** Numbers of one figure of a run, as `sun-path.csv`, for those who may read the run. */
export function loader({ request, context, params }: Route.LoaderArgs): Promise<Response> {
  return respond(async () => {
    const actor = requireActor(context, request);
    const id = /^([a-z0-9-]+)\.csv$/u.exec(params.fileName)?.[1] ?? '';
    if (!isFigureId(id)) throw notFound(`The file ${params.fileName}`);
    const run = await getRunExport(db, { actor, caseNumber: readCaseNumber(params.caseNumber), number: readCaseNumber(params.number) });
    if (!run) throw notFound(`A finished run ${params.number} of case ${params.caseNumber}`);
    const { head, rows } = figureTable(id, run.input, run.result);
    return new Response(csvText(head, rows), {
      headers: {
        'Content-Type': 'text/csv; charset=utf-8',
        'Content-Disposition': `attachment; filename="case-${run.caseNumber}-run-${run.number}-${id}.csv"`,
        'Cache-Control': 'private, no-store',
        'X-Content-Type-Options': 'nosniff',
      },
    });
  });
}
