import { href } from 'react-router';
import type { Route } from './+types/door-card';
import { requireActorWho } from '#app/auth/middleware.server.ts';
import { AppLink } from '#app/components/ui/app-link.tsx';
import { DoorCard } from '#app/components/sites/door-card.tsx';
import { Page } from '#app/components/layout/page.tsx';
import { DomainError, notFound } from '#app/domain/errors.ts';
import { holdsRole } from '#app/domain/roles.ts';
import { env } from '#app/env.server.ts';
import { respond } from '#app/http/to-response.server.ts';
import { labelCode } from '#app/services/evidence/label-code.server.ts';
import { db } from '#db/client.server.ts';
import { getSiteByCode } from '#db/queries/sites.server.ts';

export function loader({ context, request, params }: Route.LoaderArgs) {
  return respond(async () => {
    const actor = requireActorWho(context, request, 'site:manage');
    const site = await getSiteByCode(db, actor.organisationId, params.siteCode);
    if (!site) throw notFound('The site');
    if (!holdsRole(actor, ['administrator', 'manager'], site.id)) throw new DomainError('forbidden', 'The card is printed by the site manager or an administrator.');
    if (!site.guestCode) throw new DomainError('invalid-state', 'The report link of this site is closed. Open it on the page of the site first.');
    const qr = labelCode(`/report?at=${encodeURIComponent(site.guestCode)}`);
    return { code: site.code, name: site.name, guestCode: site.guestCode, link: qr.url, host: new URL(env.PUBLIC_URL).host, emergencyNumber: env.EMERGENCY_NUMBER, qr };
  });
}

export const meta: Route.MetaFunction = ({ loaderData }) => [{ title: `Card for the door, ${loaderData?.name ?? 'site'} · Scorchline` }];

export default function DoorCardPage({ loaderData: card }: Route.ComponentProps) {
  return (
    <Page>
      <p data-print="no" className="flex flex-wrap items-center gap-x-6 py-3">
        <AppLink href={href('/sites/:siteCode', { siteCode: card.code })} className="inline-flex min-h-11 items-center">{card.name}</AppLink>
        <span className="text-second">Print this page and hang it where people come in. Print it anew when the link is closed and opened again.</span>
      </p>
      <DoorCard card={card} />
    </Page>
  );
}
