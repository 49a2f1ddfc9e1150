import { useCallback, useEffect, useRef } from 'react';
import { TaskHeader } from '#app/components/layout/app-header.tsx';
import { MakeSafeCard } from '#app/components/layout/make-safe-card.tsx';
import { Page } from '#app/components/layout/page.tsx';
import { AppLink } from '#app/components/ui/app-link.tsx';
import { Button, ButtonLink } from '#app/components/ui/button.tsx';
import type { StoredPhoto } from './photo-strip.tsx';
import type { ReportFormState } from './report-fields.ts';
import { ReportForm } from './report-form.tsx';
import { useHydrated } from './use-hydrated.ts';
import { usePhotoUploads } from './use-photo-uploads.ts';
import { useReportDraft } from './use-report-draft.ts';
import { useReportSending } from './use-report-sending.ts';
import type { SiteChoice } from './where-question.tsx';

/** Everything the page of a report under way needs. */
export interface ReportView {
  /** Made with the first look at the page; the same report keeps it until it is sent. */
  readonly clientId: string;
  /** Names the place on the device where this holder's draft lies. */
  readonly holderKey: string;
  readonly guestCode: string | null;
  /** Without an account: one site, and a way to be reached is asked for. */
  readonly guest: boolean;
  readonly sites: readonly SiteChoice[];
  readonly emergencyNumber: string;
  readonly photos: readonly StoredPhoto[];
  readonly closeHref: string;
}

const nothingTyped: ReportFormState = { typed: {}, formErrors: [], fieldErrors: {}, repeated: {}, longWindowDays: null };

export const reportAddress = (clientId: string, guestCode: string | null) => `/report?${new URLSearchParams({ ...(guestCode ? { at: guestCode } : {}), report: clientId }).toString()}`;
const photosAddress = (clientId: string, guestCode: string | null) => `/report/${clientId}/photos${guestCode ? `?at=${encodeURIComponent(guestCode)}` : ''}`;

/** Make-safe card first, then the form. Without a script both stand on one page. */
export function ReportPage({ view, problem }: { readonly view: ReportView; readonly problem: ReportFormState | null }) {
  const { clientId, guestCode } = view;
  const hydrated = useHydrated();
  const form = useRef<HTMLFormElement>(null);
  const heading = useRef<HTMLHeadingElement>(null);
  const address = reportAddress(clientId, guestCode);
  const uploads = usePhotoUploads(photosAddress(clientId, guestCode));
  const sending = useReportSending({ form, address, photosOnTheWay: uploads.onTheWay });
  const addressOf = useCallback((id: string) => reportAddress(id, guestCode), [guestCode]);
  const draft = useReportDraft({ form, clientId, holderKey: view.holderKey, addressOf, mending: problem !== null, first: { ...(view.sites.length === 1 ? { siteId: view.sites[0]?.id ?? '' } : {}), ...problem?.typed } });
  // A form that came back to be mended is the page, with a script or without.
  const atForm = problem !== null || (hydrated && draft.begun);

  useEffect(() => {
    if (!problem) return;
    const summary = form.current?.querySelector('[role="alert"]');
    if (summary instanceof HTMLElement) summary.focus();
  }, [problem]);

  const begin = (stillThere: boolean) => {
    const choice = stillThere ? form.current?.querySelector("[name='hazardStillPresent'][value='yes']") : null;
    if (choice instanceof HTMLInputElement) choice.checked = true;
    draft.begin();
    requestAnimationFrame(() => {
      window.scrollTo(0, 0);
      heading.current?.focus();
    });
  };

  const startAnew = () => {
    if (!window.confirm('Throw away what you typed? Nothing of it has been sent.')) return;
    draft.discard();
    window.location.assign(guestCode ? `/report?at=${encodeURIComponent(guestCode)}` : '/report');
  };

  const Heading = atForm ? 'h1' : 'h2';
  return (
    <>
      <TaskHeader title="Report a mark" closeHref={view.closeHref} open={!atForm} />
      <Page withBar width="task">
        <div hidden={atForm || undefined} className="-mx-(--page-margin) pb-4">
          <MakeSafeCard telephone={view.emergencyNumber} headingLevel={atForm ? 2 : 1}>
            <GoOn view={view} hydrated={hydrated} onGo={begin} />
          </MakeSafeCard>
        </div>
        <div id="report" hidden={(hydrated && !atForm) || undefined} className="pt-4">
          <Heading ref={heading} tabIndex={-1} className="pb-3 font-serif text-title outline-none">What did you find?</Heading>
          <ReportForm
            address={address}
            clientId={clientId}
            sites={view.sites}
            guest={view.guest}
            state={problem ?? nothingTyped}
            stored={view.photos}
            formRef={form}
            draft={draft}
            sending={sending}
            uploads={uploads}
          />
          {hydrated ? <p className="pt-4 pb-8"><Button type="button" look="quiet" className="min-h-11" onClick={startAnew}>Throw this draft away and start anew</Button></p> : null}
        </div>
      </Page>
    </>
  );
}

interface GoOnProps {
  readonly view: ReportView;
  readonly hydrated: boolean;
  readonly onGo: (stillThere: boolean) => void;
}

/** One button on; what is kept, for those who came by the link of a site. */
function GoOn({ view, hydrated, onGo }: GoOnProps) {
  const site = view.guest ? view.sites[0] : undefined;
  return (
    <div className="space-y-3">
      {site ? <p><span className="block text-small text-second">This link is for</span><span className="font-serif text-title">{site.name}</span></p> : null}
      {hydrated
        ? <Button type="button" size="large" block onClick={() => onGo(false)}>It is covered, or gone. Go on</Button>
        : <ButtonLink href="#report" size="large" block>It is covered, or gone. Go on</ButtonLink>}
      <p>
        {hydrated
          ? <Button type="button" look="quiet" className="min-h-11" onClick={() => onGo(true)}>I could not reach it</Button>
          : <a href="#hazardStillPresent" className="inline-flex min-h-11 items-center">I could not reach it</a>}
      </p>
      {site ? <WhatIsKept /> : null}
    </div>
  );
}

function WhatIsKept() {
  return (
    <div className="space-y-2 border-t-[1.5px] border-ink pt-3">
      <h2 className="font-semibold">About two minutes. No account, no name needed.</h2>
      <p><b className="font-semibold">Your words, photos, time and place</b> are kept. The site team reads them.</p>
      <p><b className="font-semibold">A way to reach you</b> only if you give one. It goes 90 days after the case closes.</p>
      <p><b className="font-semibold">No faces, please.</b></p>
      <p><AppLink href="/progress">Look up a report by its receipt</AppLink></p>
    </div>
  );
}
