import { useEffect, useState } from 'react';
import { TaskHeader } from '#app/components/layout/app-header.tsx';
import { MakeSafeCard } from '#app/components/layout/make-safe-card.tsx';
import { Page } from '#app/components/layout/page.tsx';
import { AppLink } from '#app/components/ui/app-link.tsx';
import { listGuestPlaces, viewFromDevice } from './kept-views.ts';
import { newReportAddress, reportAddress } from './report-addresses.ts';
import { ReportPage } from './report-page.tsx';
import type { ReportView } from './report-view.ts';
import { TakenList } from './taken-list.tsx';

type Found = { readonly view: ReportView } | { readonly places: readonly { guestCode: string; name: string }[] };

/** Start without a connection: the page holds nobody's data, and the device fills it with what it knows of the place. */
export function ReportFromDevice({ shell }: { readonly shell: ReportView }) {
  const [found, setFound] = useState<Found | null>(null);
  useEffect(() => {
    const look = async () => {
      const view = await viewFromDevice(new URL(window.location.href));
      if (!view) return setFound({ places: await listGuestPlaces().catch(() => []) });
      // A reload goes on with the same report.
      window.history.replaceState(window.history.state, '', reportAddress(view.clientId, view.guestCode));
      setFound({ view });
    };
    void look();
  }, []);
  if (found && 'view' in found) return <ReportPage key={found.view.clientId} view={found.view} problem={null} />;
  return (
    <>
      <TaskHeader title="Report a mark" closeHref="/" />
      <Page width="task">
        <div className="-mx-(--page-margin) pb-4">
          <MakeSafeCard telephone={shell.emergencyNumber} headingLevel={1}>
            {found ? <Unknown places={found.places} /> : <p role="status">Looking for what is kept on this device.</p>}
          </MakeSafeCard>
        </div>
        {found ? <TakenList /> : null}
      </Page>
    </>
  );
}

function Unknown({ places }: { readonly places: readonly { guestCode: string; name: string }[] }) {
  return (
    <div className="space-y-2 border-t-[1.5px] border-ink pt-3" role="status">
      <h2 className="font-serif text-account">No signal, and this device does not know the place yet</h2>
      <p>The form opens without signal once it was opened here with signal: by the link at the place, or signed in.</p>
      {places.length > 0 ? <p>Places that this device knows:</p> : <p>Note the place, the time and what you see, take photos, and open this page again when there is signal.</p>}
      <ul>{places.map(({ guestCode, name }) => <li key={guestCode}><AppLink href={newReportAddress(guestCode)} reload className="inline-flex min-h-11 items-center">{name}</AppLink></li>)}</ul>
    </div>
  );
}
