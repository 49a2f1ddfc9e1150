import { Outlet, href, useLocation } from 'react-router';
import type { Route } from './+types/case';
import { db } from '#db/client.server.ts';
import { getCaseHeader } from '#db/queries/case-header.server.ts';
import { requireActor } from '#app/auth/middleware.server.ts';
import { CaseHead } from '#app/components/cases/case-head.tsx';
import { UndoBar } from '#app/components/cases/undo-bar.tsx';
import { Page } from '#app/components/layout/page.tsx';
import { readCaseNumber } from '#app/domain/case-number.ts';
import type { CaseHeaderView } from '#app/domain/case-view.ts';
import { notFound } from '#app/domain/errors.ts';
import { respond } from '#app/http/to-response.server.ts';

export type { CaseHeaderView } from '#app/domain/case-view.ts';

export async function loader({ request, context, params }: Route.LoaderArgs): Promise<CaseHeaderView> {
  return respond(async () => {
    const actor = requireActor(context, request);
    const header = await getCaseHeader(db, { actor, caseNumber: readCaseNumber(params.caseNumber), now: new Date() });
    if (!header) throw notFound(`Case ${params.caseNumber}`);
    return header;
  });
}

export const meta: Route.MetaFunction = ({ loaderData }) => [{ title: loaderData ? `${loaderData.number} ${loaderData.title} · Scorchline` : 'Case · Scorchline' }];

/** Head of the case around whichever tab is open; a tab brings sections with h2 headings and no page of its own. */
export default function Case({ loaderData }: Route.ComponentProps) {
  const { pathname } = useLocation();
  return (
    <Page>
      {loaderData.undo ? <UndoBar key={loaderData.undo.sequence} offer={loaderData.undo} casePath={href('/cases/:caseNumber', { caseNumber: String(loaderData.number) })} /> : null}
      <CaseHead head={loaderData} path={pathname} />
      <div className="pt-4">
        <Outlet />
      </div>
    </Page>
  );
}
