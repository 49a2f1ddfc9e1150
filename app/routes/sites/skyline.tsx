import { href, redirect } from 'react-router';
import type { Route } from './+types/skyline';
import { db } from '#db/client.server.ts';
import { getSiteByCode } from '#db/queries/sites.server.ts';
import { requireActorWho } from '#app/auth/middleware.server.ts';
import { Page } from '#app/components/layout/page.tsx';
import { SkylineEditor } from '#app/components/scene/skyline-editor.tsx';
import { AppLink } from '#app/components/ui/app-link.tsx';
import { PageTitle } from '#app/components/ui/page-title.tsx';
import { notFound } from '#app/domain/errors.ts';
import { localDay } from '#app/domain/local-time.ts';
import { holdsRole } from '#app/domain/roles.ts';
import { skylineRows } from '#app/domain/skyline-form.ts';
import { sunLine, turningDays } from '#app/domain/sun-lines.ts';
import { problemFromError, typedValues } from '#app/http/form-result.server.ts';
import { respond } from '#app/http/to-response.server.ts';
import { saveSiteSkyline, siteSkylineRoles, skylineBase } from '#app/services/scenes/save-skyline.server.ts';

export function loader({ request, context, params }: Route.LoaderArgs) {
  return respond(async () => {
    const actor = requireActorWho(context, request, 'site:read');
    const site = await getSiteByCode(db, actor.organisationId, params.siteCode);
    if (!site) throw notFound('The site');
    const day = localDay(new Date(), site.zone);
    return {
      code: site.code,
      name: site.name,
      count: site.skyline?.points.length ?? 0,
      base: skylineBase(site.skyline),
      rows: skylineRows(site.skyline),
      paths: [sunLine(day, site, 'today'), ...turningDays(day.slice(0, 4)).map(([on, label]) => sunLine(on, site, label))],
      mayEdit: holdsRole(actor, siteSkylineRoles, site.id),
    };
  });
}

export function action({ request, context, params }: Route.ActionArgs) {
  return respond(async () => {
    const actor = requireActorWho(context, request, 'site:read');
    const form = await request.formData();
    const typed = typedValues(form);
    try {
      await saveSiteSkyline({ actor, siteCode: params.siteCode, base: typed['base'] ?? '', note: typed['note'] ?? '', typed });
    } catch (error) {
      return problemFromError('save-skyline', form, error);
    }
    return redirect(href('/sites/:siteCode/skyline', { siteCode: params.siteCode }), 303);
  });
}

export const meta: Route.MetaFunction = ({ loaderData }) => [{ title: `Skyline of ${loaderData?.name ?? 'a site'} · Scorchline` }];

export default function SiteSkyline({ loaderData: data, actionData: problem }: Route.ComponentProps) {
  const finding = data.count === 0 ? `No skyline is measured at ${data.name}` : `${data.count} points of skyline at ${data.name}`;
  return (
    <Page>
      <PageTitle below="Used by every case here that has no skyline of its own." aside={<AppLink href={href('/sites/:siteCode', { siteCode: data.code })} className="inline-flex min-h-(--target-height) items-center">Back to the site</AppLink>}>{finding}</PageTitle>
      <SkylineEditor key={data.base} rows={data.rows} paths={data.paths} photos={[]} base={{ name: 'base', value: data.base }} saveLabel="Save the skyline of the site" mayEdit={data.mayEdit} whoEdits="Open to an investigator, the site manager or an administrator." problem={problem} />
    </Page>
  );
}
