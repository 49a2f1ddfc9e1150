import { Form, href, redirect } from 'react-router';
import type { Route } from './+types/list';
import { db } from '#db/client.server.ts';
import { listSites } from '#db/queries/sites.server.ts';
import { requireActorWho } from '#app/auth/middleware.server.ts';
import { ErrorSummary } from '#app/components/forms/error-summary.tsx';
import { Page } from '#app/components/layout/page.tsx';
import { SiteList } from '#app/components/sites/site-list.tsx';
import { SiteFields, siteFieldLabels } from '#app/components/sites/site-fields.tsx';
import { Button } from '#app/components/ui/button.tsx';
import { PageTitle, SectionHeading } from '#app/components/ui/page-title.tsx';
import { formatDayClock } from '#app/domain/local-time.ts';
import { canInOrganisation } from '#app/domain/permissions.ts';
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
      seesCases: canInOrganisation(actor, 'register:read'),
      sites: rows
        .map((row) => ({
          code: row.code,
          name: row.name,
          use: siteUseLabels[row.use],
          zone: row.zone,
          cases: row.caseCount ?? 0,
          open: row.openCount ?? 0,
          nextReturn: row.nextReturnAt ? formatDayClock(new Date(row.nextReturnAt), row.zone) : null,
          nextReturnMs: row.nextReturnAt ? new Date(row.nextReturnAt).getTime() : Infinity,
        }))
        .sort((a, b) => a.nextReturnMs - b.nextReturnMs || a.name.localeCompare(b.name, 'en'))
        .map(({ nextReturnMs: _, ...site }) => site),
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
  const { sites, mayAdd, seesCases } = loaderData;
  const soonest = sites.find((site) => site.nextReturn !== null);
  const count = sites.length === 1 ? 'One site' : `${sites.length} sites`;
  const open = sites.reduce((sum, site) => sum + site.open, 0);
  const openWords = open === 0 ? 'no open case that you may see' : open === 1 ? 'one open case that you may see' : `${open} open cases that you may see`;
  const field = (name: string) => ({ name, id: `site-${name}`, defaultValue: actionData?.typed[name] ?? '', errors: actionData?.fieldErrors[name] ?? [] });
  return (
    <Page>
      <PageTitle below={seesCases ? `${count}, ${openWords}. Soonest return of the sun to an open one first.` : 'By name. What was found there is not shown to administrators.'}>
        {soonest ? `The sun comes back first at ${soonest.name}: ${soonest.nextReturn}` : count}
      </PageTitle>
      <SiteList sites={sites} seesCases={seesCases} />
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
