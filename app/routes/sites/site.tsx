import { Form, href, redirect } from 'react-router';
import type { Route } from './+types/site';
import { db } from '#db/client.server.ts';
import { listSitePlans } from '#db/queries/site-plans.server.ts';
import { getSiteByCode, listCasesAtSite } from '#db/queries/sites.server.ts';
import { listPeopleOfSite } from '#db/queries/users.server.ts';
import { requireActorWho } from '#app/auth/middleware.server.ts';
import { ErrorSummary } from '#app/components/forms/error-summary.tsx';
import { Columns, Page } from '#app/components/layout/page.tsx';
import { SiteCases } from '#app/components/sites/site-cases.tsx';
import { SiteFields, siteFieldLabels } from '#app/components/sites/site-fields.tsx';
import { SitePeople } from '#app/components/sites/site-people.tsx';
import { SiteSide } from '#app/components/sites/site-side.tsx';
import { Button } from '#app/components/ui/button.tsx';
import { PageTitle, SectionHeading } from '#app/components/ui/page-title.tsx';
import { notFound } from '#app/domain/errors.ts';
import { formatDay, formatDayClock } from '#app/domain/local-time.ts';
import { canInOrganisation, caseRules } from '#app/domain/permissions.ts';
import { holdsRole } from '#app/domain/roles.ts';
import type { Actor, Role } from '#app/domain/roles.ts';
import { siteFormSchema, siteUseLabels } from '#app/domain/site-form.ts';
import { fieldErrorsOf } from '#app/http/field-errors.ts';
import { formProblem, problemFromError } from '#app/http/form-result.server.ts';
import { respond } from '#app/http/to-response.server.ts';
import { labelCode } from '#app/services/evidence/label-code.server.ts';
import { changeSite, setGuestLink } from '#app/services/sites/save-site.server.ts';

export function loader({ context, request, params }: Route.LoaderArgs) {
  return respond(async () => {
    const actor = requireActorWho(context, request, 'site:read');
    const site = await getSiteByCode(db, actor.organisationId, params.siteCode);
    if (!site) throw notFound('The site');
    const rows = await listCasesAtSite(db, { actor, siteId: site.id, now: new Date() });
    const mayManage = holdsRole(actor, ['administrator', 'manager'], site.id);
    const people = mayManage ? await listPeopleOfSite(db, { organisationId: actor.organisationId, siteId: site.id }) : [];
    const plans = await listSitePlans(db, site.id);
    return {
      ...placeFor(actor, site),
      code: site.code,
      name: site.name,
      elevationM: site.elevationM,
      zone: site.zone,
      use: site.use,
      jurisdiction: site.jurisdiction,
      skylinePoints: site.skyline?.points.length ?? 0,
      mayManage,
      sees: holdsRole(actor, caseReaders, site.id) ? ('all' as const) : canInOrganisation(actor, 'register:read') ? ('own' as const) : ('none' as const),
      guest: mayManage && site.guestCode ? { code: site.guestCode, ...guestLink(site.guestCode) } : null,
      plans: { placed: plans.filter((plan) => plan.points.length > 0).length, waiting: plans.filter((plan) => plan.points.length === 0).length },
      people: people.map((person) => ({ role: person.role, name: person.displayName, onlyHere: person.siteId !== null })),
      cases: rows.map((row) => ({
        number: row.number,
        title: row.title,
        state: row.state,
        reported: formatDay(row.reportedAt, site.zone),
        nextReturnMs: row.nextReturnAt ? new Date(row.nextReturnAt).getTime() : null,
        nextReturn: row.nextReturnAt ? formatDayClock(new Date(row.nextReturnAt), site.zone) : null,
      })),
    };
  });
}

function guestLink(guestCode: string) {
  const { url, size, path } = labelCode(`/report?at=${encodeURIComponent(guestCode)}`);
  return { link: url, qr: { size, path } };
}

const caseReaders: readonly Role[] = caseRules['case:read'].roles;

/** The exact place is for those who work on cases there or look after the site; others get two decimals, some 1 km. */
function placeFor(actor: Actor, site: { readonly id: string; readonly address: string; readonly latitudeDeg: number; readonly longitudeDeg: number }) {
  const isExact = holdsRole(actor, [...caseReaders, 'administrator'], site.id);
  const shown = (deg: number) => (isExact ? deg : Math.round(deg * 100) / 100);
  return { isExact, address: isExact ? site.address : '', latitudeDeg: shown(site.latitudeDeg), longitudeDeg: shown(site.longitudeDeg) };
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

const nothingHere = {
  all: 'No mark has been recorded at this site.',
  own: 'No mark of yours has been recorded at this site.',
  none: 'What was found here is not shown to administrators.',
} as const;

/** Heading of the page: how much is open here, as far as the reader sees cases at all. */
function finding({ sees, name, cases }: Route.ComponentProps['loaderData']): string {
  const open = cases.filter((row) => row.state !== 'closed' && row.state !== 'duplicate').length;
  if (sees === 'none') return name;
  const whose = sees === 'own' ? ' of yours' : '';
  if (open === 0) return `Nothing${whose} is open at ${name}`;
  return open === 1 ? `One case${whose} is open at ${name}` : `${open} cases${whose} are open at ${name}`;
}

export default function Site({ loaderData, actionData }: Route.ComponentProps) {
  const site = loaderData;
  return (
    <Page>
      <PageTitle below={`${siteUseLabels[site.use]}, ${site.zone}`}>{finding(site)}</PageTitle>
      <Columns sideLabel="About the site" side={<SiteSide site={site} />}>
        <SectionHeading note={site.sees === 'own' ? 'yours, newest first' : 'newest first'}>Cases here</SectionHeading>
        {site.cases.length === 0 ? <p className="py-4 font-serif text-account">{nothingHere[site.sees]}</p> : <SiteCases cases={site.cases} />}
        {site.mayManage ? <SitePeople people={site.people} /> : null}
        {site.mayManage ? <ChangeSite site={site} problem={actionData ?? null} /> : null}
      </Columns>
    </Page>
  );
}

type Problem = Exclude<Route.ComponentProps['actionData'], undefined>;

function ChangeSite({ site, problem }: { readonly site: Route.ComponentProps['loaderData']; readonly problem: Problem | null }) {
  const stored: Record<string, string> = {
    name: site.name, address: site.address, latitudeDeg: String(site.latitudeDeg), longitudeDeg: String(site.longitudeDeg), elevationM: String(site.elevationM), zone: site.zone, use: site.use, jurisdiction: site.jurisdiction,
  };
  const field = (name: string) => ({ name, id: `site-${name}`, defaultValue: problem?.typed[name] ?? stored[name] ?? '', errors: problem?.fieldErrors[name] ?? [] });
  return (
    <details className="pt-10" open={problem !== null}>
      <summary className="min-h-11 content-center font-semibold tablet:min-h-6">Change the facts of this site</summary>
      <Form method="post" className="max-w-[720px] space-y-5 pt-4" noValidate>
        <ErrorSummary errors={problem?.formErrors ?? []} fields={siteFieldLabels.filter(({ name }) => name !== 'code').map(({ name, label }) => ({ field: field(name), label }))} />
        <input type="hidden" name="intent" value="change-site" />
        <SiteFields field={field} withCode={false} />
        <Button look="outlined">Save the site</Button>
      </Form>
    </details>
  );
}
