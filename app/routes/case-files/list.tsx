import type { Route } from './+types/list';
import { db } from '#db/client.server.ts';
import { listReleasedTo } from '#db/queries/case-files.server.ts';
import { listKeptReleases } from '#db/queries/releases.server.ts';
import { requireActor } from '#app/auth/middleware.server.ts';
import { Page } from '#app/components/layout/page.tsx';
import { KeptReleases, ReaderReleases } from '#app/components/releases/release-tables.tsx';
import { EmptyState } from '#app/components/ui/notice.tsx';
import { PageTitle, SectionHeading } from '#app/components/ui/page-title.tsx';
import { canInOrganisation, caseRules } from '#app/domain/permissions.ts';
import { keptRelease, readerRelease } from '#app/domain/release-view.ts';
import { holdsRoleAnywhere } from '#app/domain/roles.ts';
import { respond } from '#app/http/to-response.server.ts';

export function loader({ request, context }: Route.LoaderArgs) {
  return respond(async () => {
    const actor = requireActor(context, request);
    const now = new Date();
    const reads = canInOrganisation(actor, 'release:read-own');
    const keeps = holdsRoleAnywhere(actor, [...caseRules['release:prepare'].roles, ...caseRules['release:approve'].roles]);
    return {
      reader: reads ? (await listReleasedTo(db, actor)).map(readerRelease) : null,
      kept: keeps ? (await listKeptReleases(db, actor)).map((release) => keptRelease(release, now)) : null,
    };
  });
}

export const meta: Route.MetaFunction = () => [{ title: 'Case files · Scorchline' }];

const inWords = (count: number): string => ['No', 'One', 'Two', 'Three', 'Four', 'Five', 'Six', 'Seven', 'Eight', 'Nine'][count] ?? String(count);

function heading(readers: readonly unknown[] | null, kept: readonly { readonly status: string }[] | null): string {
  if (readers) return readers.length === 0 ? 'No case file is open to you' : readers.length === 1 ? 'One case file is open to you' : `${inWords(readers.length)} case files are open to you`;
  const waiting = (kept ?? []).filter((release) => release.status.startsWith('Waits')).length;
  if (waiting > 0) return `${waiting === 1 ? 'One release waits' : `${inWords(waiting)} releases wait`} for a second person`;
  return (kept ?? []).length === 0 ? 'Nothing has left the house' : 'No release waits for a second person';
}

export default function CaseFiles({ loaderData }: Route.ComponentProps) {
  const { reader, kept } = loaderData;
  return (
    <Page>
      <PageTitle below="Frozen, numbered copies of a case with names, contacts and the exact place removed. Each opening is logged.">{heading(reader, kept)}</PageTitle>
      {reader && reader.length > 0 ? <ReaderReleases releases={reader} /> : null}
      {reader && reader.length === 0 ? <EmptyState title="A case file appears here when the site team releases one to your organisation.">You get a message by mail when that happens. A file closes on its day, and a newer one takes its place.</EmptyState> : null}
      {kept ? (
        <section aria-labelledby="kept-heading" className={reader ? 'pt-8' : ''}>
          {reader ? <SectionHeading id="kept-heading">Released by your organisation</SectionHeading> : <h2 id="kept-heading" className="sr-only">Releases</h2>}
          {kept.length > 0 ? <KeptReleases releases={kept} withCase /> : <EmptyState title="Releases are prepared on the case.">Open a case and its part “Releases”: one person prepares, another approves.</EmptyState>}
        </section>
      ) : null}
    </Page>
  );
}
