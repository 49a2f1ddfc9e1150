import { data, href, redirect } from 'react-router';
import type { Route } from './+types/case-file';
import { db } from '#db/client.server.ts';
import { listSiblings, organisationName } from '#db/queries/case-files.server.ts';
import { findKeptReleaseById } from '#db/queries/releases.server.ts';
import { requireActor } from '#app/auth/middleware.server.ts';
import { Page } from '#app/components/layout/page.tsx';
import { Contents } from '#app/components/releases/contents.tsx';
import { ReleasedDocument } from '#app/components/releases/released-document.tsx';
import { WithheldCounts } from '#app/components/releases/withheld-counts.tsx';
import { AppLink } from '#app/components/ui/app-link.tsx';
import { ButtonLink } from '#app/components/ui/button.tsx';
import { isUuid } from '#app/domain/case-file-address.ts';
import { notFound } from '#app/domain/errors.ts';
import { formatDay, formatDayClock } from '#app/domain/local-time.ts';
import { releaseDocument } from '#app/domain/release-document.ts';
import { releaseFrame, shortHash } from '#app/domain/release-view.ts';
import type { Actor } from '#app/domain/roles.ts';
import { respond } from '#app/http/to-response.server.ts';
import { openCaseFile } from '#app/services/releases/open-case-file.server.ts';

export function loader({ request, context, params }: Route.LoaderArgs) {
  return respond(async () => {
    const actor = requireActor(context, request);
    if (!isUuid(params.releaseId)) throw notFound('The release');
    const kept = await findKeptReleaseById(db, { actor, releaseId: params.releaseId });
    // Those who keep a release read it on the case, with its checks beside it; that is no opening.
    if (kept) throw redirect(href('/cases/:caseNumber/releases/:number', { caseNumber: String(kept.caseNumber), number: String(kept.release.number) }));
    // A copy that a browser keeps would outlive the day on which the release ends.
    return data(await readerView(actor, params.releaseId), { headers: { 'Cache-Control': 'private, no-store' } });
  });
}

export const headers: Route.HeadersFunction = ({ loaderHeaders }) => loaderHeaders;

async function readerView(actor: Actor, releaseId: string) {
  const release = await openCaseFile({ actor, releaseId });
  const { zone } = release.released;
  const recipient = await organisationName(db, actor.organisationId);
  const siblings = await listSiblings(db, { actor, caseId: release.caseId });
  return {
    id: release.id,
    zone,
    opened: `Release ${release.number} · ${recipient} · opened ${formatDayClock(new Date(), zone)}`,
    frame: releaseFrame({ ...release, frozenAt: release.approvedAt ?? release.expiresAt }, recipient, zone),
    document: releaseDocument(release.released),
    siblings: siblings.map((one) => ({ id: one.id, number: one.number, released: one.approvedAt ? formatDay(one.approvedAt, zone) : '', changeNote: one.changeNote })),
  };
}

export const meta: Route.MetaFunction = ({ loaderData }) => [{ title: loaderData ? `Case ${loaderData.document.caseNumber}, release ${loaderData.frame.number} · Scorchline` : 'Case file · Scorchline' }];

export default function CaseFile({ loaderData }: Route.ComponentProps) {
  const { frame, document, zone, opened } = loaderData;
  const fileHref = (fileName: string) => href('/case-files/:releaseId/files/:fileName', { releaseId: loaderData.id, fileName });
  return (
    <Page>
      <p className="flex flex-wrap justify-between gap-x-8 gap-y-1 border-b border-hair py-3 text-small text-second">
        <span>Reading room, release opened for <b className="font-semibold text-ink">{frame.recipient}</b></span>
        <span>Ends {frame.endsWords}. Each opening is logged.</span>
      </p>
      <div className="pt-5 desk:grid desk:grid-cols-[11.5rem_minmax(0,1fr)_16.5rem] desk:items-start desk:gap-x-9">
        <div className="max-desk:hidden desk:sticky desk:top-5">
          <Contents title="This release" />
          <Siblings siblings={loaderData.siblings} current={frame.number} />
        </div>
        <div className="min-w-0 max-tablet:-mx-(--page-margin)">
          <ReleasedDocument view={document} frame={frame} zone={zone} fileHref={fileHref} watermark={opened} level={1} />
        </div>
        <aside aria-label="About this release" className="space-y-6 max-desk:pt-8 desk:sticky desk:top-5">
          <Withheld frame={frame} />
          <TakeAway frame={frame} fileHref={fileHref} />
          <div className="desk:hidden"><Siblings siblings={loaderData.siblings} current={frame.number} /></div>
        </aside>
      </div>
    </Page>
  );
}

type Frame = Route.ComponentProps['loaderData']['frame'];
const headingLook = 'border-b-[1.5px] border-ink pb-1 text-small font-semibold';

function Withheld({ frame }: { readonly frame: Frame }) {
  return (
    <section aria-labelledby="withheld-heading">
      <h2 id="withheld-heading" className={headingLook}>Withheld from this release</h2>
      <WithheldCounts lines={frame.withheld} />
      <p className="pt-2 text-axis text-second">Removed from the bytes, not covered. A second person approved it. Blocks are equally wide within a class, whatever stood there.</p>
    </section>
  );
}

function TakeAway({ frame, fileHref }: { readonly frame: Frame; readonly fileHref: (name: string) => string }) {
  const has = (name: string) => frame.manifest.some((file) => file.name === name);
  return (
    <section aria-labelledby="take-away-heading" data-print="no" className="space-y-2">
      <h2 id="take-away-heading" className={headingLook}>Take away</h2>
      {has('data.json') ? <ButtonLink href={fileHref('data.json')} download block>Data, JSON</ButtonLink> : null}
      {has('report.pdf') ? <ButtonLink href={fileHref('report.pdf')} download look="outlined" block>Report, PDF</ButtonLink> : null}
      {has('runs.csv') ? <ButtonLink href={fileHref('runs.csv')} download look="outlined" block>Minutes of sun, CSV</ButtonLink> : null}
      {has('measurements.csv') ? <ButtonLink href={fileHref('measurements.csv')} download look="outlined" block>Measurements, CSV</ButtonLink> : null}
      {has('weather.csv') ? <ButtonLink href={fileHref('weather.csv')} download look="outlined" block>Weather, CSV</ButtonLink> : null}
      <p className="text-axis text-second">On paper: print this page. Release <span className="font-mono">{shortHash(frame.releasedHash)}</span></p>
    </section>
  );
}

function Siblings({ siblings, current }: { readonly siblings: Route.ComponentProps['loaderData']['siblings']; readonly current: number }) {
  if (siblings.length === 0) return null;
  return (
    <nav aria-label="Releases of this case" data-print="no" className="pt-6">
      <p className={headingLook}>Releases</p>
      <ul>
        {siblings.map((one) => (
          <li key={one.id} className="flex gap-3 border-b border-hair py-1.5">
            <span className="font-serif">{one.number}</span>
            <span>
              {one.number === current ? <span aria-current="page" className="font-semibold">{one.released}, this one</span> : <AppLink href={href('/case-files/:releaseId', { releaseId: one.id })} className="inline-flex min-h-(--target-height) items-center">{one.released}</AppLink>}
              <span className="block text-axis text-second">{one.changeNote}</span>
            </span>
          </li>
        ))}
      </ul>
    </nav>
  );
}
