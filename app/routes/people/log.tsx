import { Form } from 'react-router';
import type { Route } from './+types/log';
import { db } from '#db/client.server.ts';
import { listOrganisationLog } from '#db/queries/organisation-log.server.ts';
import { requireActorWho } from '#app/auth/middleware.server.ts';
import { TextInput } from '#app/components/forms/text-field.tsx';
import { Page } from '#app/components/layout/page.tsx';
import { LogLines } from '#app/components/people/log-lines.tsx';
import { AppLink } from '#app/components/ui/app-link.tsx';
import { Button } from '#app/components/ui/button.tsx';
import { PageTitle } from '#app/components/ui/page-title.tsx';
import { formatDay } from '#app/domain/local-time.ts';
import { holdsRole } from '#app/domain/roles.ts';
import { respond } from '#app/http/to-response.server.ts';

const pageSize = 100;
const wholeNumber = (text: string | null) => (text && /^\d{1,9}$/u.test(text) ? Number(text) : undefined);

export function loader({ context, request }: Route.LoaderArgs) {
  return respond(async () => {
    const actor = requireActorWho(context, request, 'log:read-all');
    const params = new URL(request.url).searchParams;
    const filter = { event: params.get('event')?.slice(0, 80) ?? '', person: params.get('person')?.slice(0, 80) ?? '', caseNumber: params.get('case') ?? '' };
    // The log crosses sites, so the roles must be held for all of them; an administrator reads no case content.
    const withContent = holdsRole(actor, ['reviewer', 'privacy-lead'], null);
    const lines = await listOrganisationLog(db, {
      organisationId: actor.organisationId,
      event: filter.event || undefined,
      person: filter.person || undefined,
      caseNumber: wholeNumber(filter.caseNumber),
      before: wholeNumber(params.get('before')),
      limit: pageSize + 1,
      withContent,
    });
    const shown = lines.slice(0, pageSize);
    return {
      filter,
      withContent,
      olderThan: lines.length > pageSize ? (shown.at(-1)?.sequence ?? null) : null,
      lines: shown.map((line) => ({ ...line, at: `${formatDay(line.at, 'UTC')}, ${line.at.toISOString().slice(11, 19)}` })),
    };
  });
}

function headingOf({ filter, lines, olderThan }: Pick<Route.ComponentProps['loaderData'], 'filter' | 'lines' | 'olderThan'>): string {
  const narrowed = Object.values(filter).some((text) => text !== '');
  if (lines.length === 0) return narrowed ? 'No line fits' : 'Nothing has been done yet';
  if (narrowed) return olderThan === null ? (lines.length === 1 ? 'One line fits' : `${lines.length} lines fit`) : `The newest ${lines.length} lines that fit`;
  return `The newest line is of ${lines[0]?.at ?? ''}`;
}

export const meta: Route.MetaFunction = () => [{ title: 'Log · Scorchline' }];

export default function OrganisationLog({ loaderData }: Route.ComponentProps) {
  const { filter, lines, olderThan, withContent } = loaderData;
  const older = new URLSearchParams({ event: filter.event, person: filter.person, case: filter.caseNumber, before: String(olderThan ?? '') });
  return (
    <Page>
      <PageTitle below={`Who did what, and when: lines are only ever added. Times in UTC.${withContent ? '' : ' What was done in a case is not shown to administrators.'}`}>{headingOf(loaderData)}</PageTitle>
      <Form method="get" role="search" aria-label="Narrow the log" className="flex flex-wrap items-end gap-4 pb-5">
        <div className="w-52 max-tablet:w-full"><TextInput field={{ name: 'event', defaultValue: filter.event }} label="Event" /></div>
        <div className="w-52 max-tablet:w-full"><TextInput field={{ name: 'person', defaultValue: filter.person }} label="Person" /></div>
        <div className="w-32"><TextInput field={{ name: 'case', defaultValue: filter.caseNumber }} label="Case number" inputMode="numeric" /></div>
        <Button look="outlined">Show</Button>
      </Form>
      {lines.length > 0 ? <LogLines lines={lines} withContent={withContent} /> : null}
      {olderThan === null ? null : (
        <p className="pt-4">
          <AppLink href={`/log?${older.toString()}`} className="inline-flex min-h-(--target-height) items-center">Older lines</AppLink>
        </p>
      )}
    </Page>
  );
}
