import { href } from 'react-router';
import type { Route } from './+types/log';
import { db } from '#db/client.server.ts';
import { logLineView } from '#db/queries/case-account.server.ts';
import { findCase } from '#db/queries/case-subject.server.ts';
import { listCaseLog } from '#db/queries/log.server.ts';
import { requireActor } from '#app/auth/middleware.server.ts';
import { AppLink } from '#app/components/ui/app-link.tsx';
import { Cell, DataTable, HeadCell, Row, TableHead } from '#app/components/ui/data-table.tsx';
import { SectionHeading } from '#app/components/ui/page-title.tsx';
import { readCaseNumber } from '#app/domain/case-number.ts';
import { DomainError, notFound } from '#app/domain/errors.ts';
import { canOnCase, whoCan } from '#app/domain/permissions.ts';
import { respond } from '#app/http/to-response.server.ts';

const linesPerPage = 50;

export async function loader({ request, context, params }: Route.LoaderArgs) {
  return respond(async () => {
    const actor = requireActor(context, request);
    const caseNumber = readCaseNumber(params.caseNumber);
    const found = await findCase(db, actor, caseNumber);
    if (!found) throw notFound(`Case ${params.caseNumber}`);
    if (!canOnCase(actor, 'log:read', found.subject)) throw new DomainError('forbidden', `The log is not open to you. ${whoCan('log:read')}`);
    const before = Number(new URL(request.url).searchParams.get('before'));
    const lines = await listCaseLog(db, { actor, caseNumber, limit: linesPerPage + 1, ...(Number.isSafeInteger(before) && before > 0 ? { before } : {}) });
    const shown = lines.slice(0, linesPerPage);
    return { zone: found.row.zone, lines: shown.map((line) => logLineView(line, found.row.zone)), older: lines.length > linesPerPage ? (shown.at(-1)?.sequence ?? null) : null, caseNumber };
  });
}

export const meta: Route.MetaFunction = ({ params }) => [{ title: `Case ${params.caseNumber}, log · Scorchline` }];

export default function CaseLog({ loaderData }: Route.ComponentProps) {
  const path = `${href('/cases/:caseNumber', { caseNumber: String(loaderData.caseNumber) })}/log`;
  return (
    <section aria-labelledby="log-heading">
      <SectionHeading id="log-heading" note={`newest first, clock of ${loaderData.zone.replaceAll('_', ' ')}; lines are only ever added`}>Log</SectionHeading>
      <DataTable caption="Log of the case">
        <TableHead>
          <HeadCell>When</HeadCell>
          <HeadCell>Who</HeadCell>
          <HeadCell>What</HeadCell>
          <HeadCell>Why</HeadCell>
        </TableHead>
        <tbody>
          {loaderData.lines.map((line) => (
            <Row key={line.sequence}>
              <Cell className="whitespace-nowrap">{line.atWords}</Cell>
              <Cell>{line.actorName}</Cell>
              <Cell>{line.summary}</Cell>
              <Cell>{line.reason}</Cell>
            </Row>
          ))}
        </tbody>
      </DataTable>
      {loaderData.lines.length === 0 ? <p className="py-2 text-second">No line yet.</p> : null}
      {loaderData.older ? <p className="pt-3"><AppLink href={`${path}?before=${loaderData.older}`} className="inline-flex min-h-11 items-center">Older lines</AppLink></p> : null}
    </section>
  );
}
