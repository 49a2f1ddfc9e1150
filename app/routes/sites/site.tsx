import { Form, href, redirect } from 'react-router';
import type { Route } from './+types/site';
import { db } from '#db/client.server.ts';
import { getSiteByCode, listCasesAtSite } from '#db/queries/sites.server.ts';
import { requireActorWho } from '#app/auth/middleware.server.ts';
import { ErrorSummary } from '#app/components/forms/error-summary.tsx';
import { Columns, Page } from '#app/components/layout/page.tsx';
import { SiteFields, siteFieldLabels } from '#app/components/sites/site-fields.tsx';
import { AppLink } from '#app/components/ui/app-link.tsx';
import { Button } from '#app/components/ui/button.tsx';
import { Cell, DataTable, HeadCell, Row, TableHead } from '#app/components/ui/data-table.tsx';
import { FactList } from '#app/components/ui/fact-list.tsx';
import { PageTitle, SectionHeading } from '#app/components/ui/page-title.tsx';
import { StateMark } from '#app/components/ui/state-mark.tsx';
import { notFound } from '#app/domain/errors.ts';
import { formatDay, formatDayClock } from '#app/domain/local-time.ts';
import { holdsRole } from '#app/domain/roles.ts';
import { siteFormSchema, siteUseLabels } from '#app/domain/site-form.ts';
import { env } from '#app/env.server.ts';
import { fieldErrorsOf } from '#app/http/field-errors.ts';
import { formProblem, problemFromError } from '#app/http/form-result.server.ts';
import { respond } from '#app/http/to-response.server.ts';
import { changeSite, setGuestLink } from '#app/services/sites/save-site.server.ts';

export function loader({ context, request, params }: Route.LoaderArgs) {
  return respond(async () => {
    const actor = requireActorWho(context, request, 'site:read');
    const site = await getSiteByCode(db, actor.organisationId, params.siteCode);
    if (!site) throw notFound('The site');
    const rows = await listCasesAtSite(db, { actor, siteId: site.id, now: new Date() });
    const mayManage = holdsRole(actor, ['administrator', 'manager'], site.id);
    return {
      code: site.code,
      name: site.name,
      address: site.address,
      latitudeDeg: site.latitudeDeg,
      longitudeDeg: site.longitudeDeg,
      elevationM: site.elevationM,
      zone: site.zone,
      use: site.use,
      jurisdiction: site.jurisdiction,
      skylinePoints: site.skyline?.points.length ?? 0,
      mayManage,
      guestLink: mayManage && site.guestCode ? `${env.PUBLIC_URL}/report?at=${encodeURIComponent(site.guestCode)}` : null,
      cases: rows.map((row) => ({
        number: row.number,
        title: row.title,
        state: row.state,
        reported: formatDay(row.reportedAt, site.zone),
        nextReturn: row.nextReturnAt ? formatDayClock(new Date(row.nextReturnAt), site.zone) : null,
      })),
    };
  });
}

export function action({ context, request, params }: Route.ActionArgs) {
  return respond(async () => {
    const actor = requireActorWho(context, request, 'site:manage');
    const form = await request.formData();
    const parsed = siteFormSchema.safeParse(Object.fromEntries(form));
    const intent = String(form.get('intent'));
    if (!parsed.success) return formProblem(intent, form, { fieldErrors: fieldErrorsOf(parsed.error) });
    try {
      if (parsed.data.intent === 'change-site') {
        const { intent: _, ...facts } = parsed.data;
        await changeSite(actor, params.siteCode, facts);
      } else if (parsed.data.intent !== 'add-site') {
        await setGuestLink(actor, params.siteCode, parsed.data.intent === 'open-guest-link');
      }
      return redirect(href('/sites/:siteCode', { siteCode: params.siteCode }));
    } catch (error) {
      return problemFromError(intent, form, error);
    }
  });
}

export const meta: Route.MetaFunction = ({ loaderData }) => [{ title: `${loaderData?.name ?? 'Site'} · Scorchline` }];

export default function Site({ loaderData, actionData }: Route.ComponentProps) {
  const site = loaderData;
  const open = site.cases.filter((row) => row.state !== 'closed' && row.state !== 'duplicate').length;
  const stored: Record<string, string> = {
    name: site.name, address: site.address, latitudeDeg: String(site.latitudeDeg), longitudeDeg: String(site.longitudeDeg), elevationM: String(site.elevationM), zone: site.zone, use: site.use, jurisdiction: site.jurisdiction,
  };
  const field = (name: string) => ({ name, id: `site-${name}`, defaultValue: actionData?.typed[name] ?? stored[name] ?? '', errors: actionData?.fieldErrors[name] ?? [] });
  const side = (
    <>
      <SectionHeading>The place</SectionHeading>
      <FactList
        facts={[
          { term: 'Code', value: site.code },
          { term: 'Use', value: siteUseLabels[site.use] },
          { term: 'Address', value: site.address || 'not recorded' },
          { term: 'Position', value: `${site.latitudeDeg.toFixed(2)}°, ${site.longitudeDeg.toFixed(2)}°`, note: 'north and east positive' },
          { term: 'Height above sea level', value: `${site.elevationM} m` },
          { term: 'Time zone', value: site.zone },
          { term: 'Skyline', value: site.skylinePoints > 0 ? `${site.skylinePoints} points` : 'not measured' },
        ]}
      />
      {site.mayManage ? (
        <section aria-labelledby="guest-heading" className="pt-8">
          <SectionHeading id="guest-heading">Report link without an account</SectionHeading>
          {site.guestLink ? <p className="pt-3 font-mono text-axis break-all">{site.guestLink}</p> : <p className="pt-3">Closed. Opened, anyone with the link can report a mark here, and see nothing else.</p>}
          <Form method="post" className="pt-3">
            <input type="hidden" name="intent" value={site.guestLink ? 'close-guest-link' : 'open-guest-link'} />
            <Button look="outlined">{site.guestLink ? 'Close the link' : 'Open a link'}</Button>
          </Form>
        </section>
      ) : null}
    </>
  );
  return (
    <Page>
      <PageTitle below={siteUseLabels[site.use]}>{open === 0 ? `Nothing is open at ${site.name}` : open === 1 ? `One case is open at ${site.name}` : `${open} cases are open at ${site.name}`}</PageTitle>
      <Columns side={side} sideLabel="About the site">
        <DataTable caption="Cases at this site, newest first">
          <TableHead>
            <HeadCell>No.</HeadCell>
            <HeadCell>Mark</HeadCell>
            <HeadCell>State</HeadCell>
            <HeadCell>Reported</HeadCell>
            <HeadCell>Sun returns</HeadCell>
          </TableHead>
          <tbody>
            {site.cases.map((row) => (
              <Row key={row.number}>
                <Cell>{row.number}</Cell>
                <Cell heading>
                  <AppLink href={href('/cases/:caseNumber', { caseNumber: String(row.number) })}>{row.title}</AppLink>
                </Cell>
                <Cell>
                  <StateMark state={row.state} />
                </Cell>
                <Cell>{row.reported}</Cell>
                <Cell>{row.nextReturn ?? 'no return on file'}</Cell>
              </Row>
            ))}
          </tbody>
        </DataTable>
        {site.cases.length === 0 ? <p className="py-4 font-serif text-account">No marks recorded at this site that you may see.</p> : null}
        {site.mayManage ? (
          <details className="pt-8" open={actionData !== undefined}>
            <summary className="cursor-pointer font-semibold">Change the facts of this site</summary>
            <Form method="post" className="space-y-5 pt-4" noValidate>
              <ErrorSummary errors={actionData?.formErrors ?? []} fields={siteFieldLabels.filter(({ name }) => name !== 'code').map(({ name, label }) => ({ field: field(name), label }))} />
              <input type="hidden" name="intent" value="change-site" />
              <SiteFields field={field} withCode={false} />
              <Button look="outlined">Save the site</Button>
            </Form>
          </details>
        ) : null}
      </Columns>
    </Page>
  );
}
