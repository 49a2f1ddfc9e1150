import { href } from 'react-router';
import type { Route } from './+types/report';
import { requireActor } from '#app/auth/middleware.server.ts';
import { ReportView } from '#app/components/report-document/report-view.tsx';
import { AppLink } from '#app/components/ui/app-link.tsx';
import { ButtonLink } from '#app/components/ui/button.tsx';
import { readCaseNumber } from '#app/domain/case-number.ts';
import { respond } from '#app/http/to-response.server.ts';
import { readReport } from '#app/services/finding-reports/read-report.server.ts';

export function loader({ request, context, params }: Route.LoaderArgs) {
  return respond(async () => {
    const actor = requireActor(context, request);
    const asked = Number(new URL(request.url).searchParams.get('version'));
    return readReport({ actor, caseNumber: readCaseNumber(params.caseNumber), version: Number.isInteger(asked) && asked > 0 ? asked : null });
  });
}

export const meta: Route.MetaFunction = ({ params }) => [{ title: `Case ${params.caseNumber}, report · Scorchline` }];

export default function Report({ loaderData: report, params }: Route.ComponentProps) {
  const file = `${href('/cases/:caseNumber/report.pdf', params)}${report.version === null ? '' : `?version=${report.version}`}`;
  return (
    <div>
      <div className="flex flex-wrap items-center justify-between gap-x-8 gap-y-3 pb-5" data-print="no">
        <div className="max-w-[64ch]">
          <p className="font-serif text-account leading-6">{report.signed ? `The report of version ${report.version ?? ''}, kept as it was when signed` : 'A draft, put together just now from what is on record'}</p>
          {report.documentHash ? <p className="text-small text-second">SHA-256 of the report: <code className="font-mono text-axis break-all">{report.documentHash}</code></p> : <p className="text-small text-second">It changes with the case until a reviewer signs.</p>}
          {report.signedVersions.length > 0 ? <p className="flex flex-wrap gap-x-4 text-small">Signed versions: {report.signedVersions.map((version) => <AppLink key={version} href={`?version=${version}`} className="inline-flex min-h-6 items-center">{version}</AppLink>)}</p> : null}
        </div>
        <ButtonLink href={file} look="outlined" download>Take it away as PDF</ButtonLink>
      </div>
      <ReportView report={report.document} />
    </div>
  );
}
