import { Form, href, redirect } from 'react-router';
import type { Route } from './+types/list';
import { db } from '#db/client.server.ts';
import { listSites } from '#db/queries/sites.server.ts';
import { requireActorWho } from '#app/auth/middleware.server.ts';
import { ErrorSummary } from '#app/components/forms/error-summary.tsx';
import { Page } from '#app/components/layout/page.tsx';
import { SiteFields, siteFieldLabels } from '#app/components/sites/site-fields.tsx';
import { AppLink } from '#app/components/ui/app-link.tsx';
import { Button } from '#app/components/ui/button.tsx';
import { Cell, DataTable, HeadCell, Row, TableHead } from '#app/components/ui/data-table.tsx';
import { PageTitle, SectionHeading } from '#app/components/ui/page-title.tsx';
import { formatDayClock } from '#app/domain/local-time.ts';
import { holdsRole } from '#app/domain/roles.ts';
import { siteFormSchema, siteUseLabels } from '#app/domain/site-form.ts';
import { fieldErrorsOf } from '#app/http/field-errors.ts';
import { formProblem, problemFromError } from '#app/http/form-result.server.ts';
import { respond } from '#app/http/to-response.server.ts';
import { addSite } from '#app/services/sites/save-site.server.ts';

export function loader({ context, request }: Route.LoaderArgs) {
  return respond(async () => {
    const actor = requireActorWho(context, request, 'site:read');
    const rows = await listSites(db, { actor, now: new Date() });
    return {
      mayAdd: holdsRole(actor, ['administrator', 'manager'], null),
      sites: rows.map((row) => ({
        code: row.code,
        name: row.name,
        use: siteUseLabels[row.use],
        zone: row.zone,
        cases: row.caseCount ?? 0,
        open: row.openCount ?? 0,
        nextReturn: row.nextReturnAt ? formatDayClock(new Date(row.nextReturnAt), row.zone) : null,
        nextReturnMs: row.nextReturnAt ? new Date(row.nextReturnAt).getTime() : null,
      })),
    };
  });
}

export function action({ context, request }: Route.ActionArgs) {
  return respond(async () => {
    const actor = requireActorWho(context, request, 'site:manage');
    const form = await request.formData();
    const parsed = siteFormSchema.safeParse(Object.fromEntries(form));
    if (!parsed.success) return formProblem('add-site', form, { fieldErrors: fieldErrorsOf(parsed.error) });
    if (parsed.data.intent !== 'add-site') return formProblem('add-site', form, { formErrors: ['Use the form below to add a site.'] });
    const { intent: _, ...site } = parsed.data;
    try {
      await addSite(actor, site);
      return redirect(href('/sites/:siteCode', { siteCode: site.code }));
    } catch (error) {
      return problemFromError('add-site', form, error);
    }
  });
}

export const meta: Route.MetaFunction = () => [{ title: 'Sites · Scorchline' }];

export default function Sites({ loaderData, actionData }: Route.ComponentProps) {
  const { sites, mayAdd } = loaderData;
  const soonest = sites.filter((site) => site.nextReturnMs !== null).sort((a, b) => (a.nextReturnMs ?? 0) - (b.nextReturnMs ?? 0))[0];
  const field = (name: string) => ({ name, id: `site-${name}`, defaultValue: actionData?.typed[name] ?? (name === 'use' ? 'office' : name === 'jurisdiction' ? 'GB' : name === 'elevationM' ? '0' : ''), errors: actionData?.fieldErrors[name] ?? [] });
  return (
    <Page>
      <PageTitle below={soonest ? `The sun comes back first at ${soonest.name}: ${soonest.nextReturn}.` : 'No mark is expected to be lit again on file.'}>
        {sites.length === 1 ? 'One site' : `${sites.length} sites`}
      </PageTitle>
      <DataTable caption="Sites, by name">
        <TableHead>
          <HeadCell>Site</HeadCell>
          <HeadCell>Use</HeadCell>
          <HeadCell numeric>Cases you may see</HeadCell>
          <HeadCell numeric>Open</HeadCell>
          <HeadCell>Sun returns next, local time</HeadCell>
        </TableHead>
        <tbody>
          {sites.map((site) => (
            <Row key={site.code}>
              <Cell heading note={site.zone}>
                <AppLink href={href('/sites/:siteCode', { siteCode: site.code })}>{site.name}</AppLink>
              </Cell>
              <Cell>{site.use}</Cell>
              <Cell numeric>{site.cases}</Cell>
              <Cell numeric>{site.open}</Cell>
              <Cell>{site.nextReturn ?? 'no return on file'}</Cell>
            </Row>
          ))}
        </tbody>
      </DataTable>
      {mayAdd ? (
        <section aria-labelledby="add-heading" className="max-w-[720px] pt-10">
          <SectionHeading id="add-heading">Add a site</SectionHeading>
          <Form method="post" className="space-y-5 pt-3" noValidate>
            <ErrorSummary errors={actionData?.formErrors ?? []} fields={siteFieldLabels.map(({ name, label }) => ({ field: field(name), label }))} />
            <input type="hidden" name="intent" value="add-site" />
            <SiteFields field={field} withCode />
            <Button look="outlined">Add the site</Button>
          </Form>
        </section>
      ) : null}
    </Page>
  );
}
