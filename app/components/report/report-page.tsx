import { useCallback, useEffect, useRef, useState } from 'react';
import { useNavigate } from 'react-router';
import { TaskHeader } from '#app/components/layout/app-header.tsx';
import { MakeSafeCard } from '#app/components/layout/make-safe-card.tsx';
import { Page } from '#app/components/layout/page.tsx';
import { Button } from '#app/components/ui/button.tsx';
import { keptDays } from './device-store.ts';
import { deviceWord } from './device-word.ts';
import { GoOn } from './go-on.tsx';
import { keepView } from './kept-views.ts';
import { newReportAddress, receivedAddress, reportAddress } from './report-addresses.ts';
import type { ReportFormState } from './report-fields.ts';
import { ReportForm } from './report-form.tsx';
import type { ReportView } from './report-view.ts';
import { SavedScreen } from './saved-screen.tsx';
import { registerServiceWorker, sendsInBackground } from './service-worker-registration.ts';
import { TakenList } from './taken-list.tsx';
import { useHydrated } from './use-hydrated.ts';
import { lastingWords, useLastingStorage } from './use-lasting-storage.ts';
import { useReportDraft } from './use-report-draft.ts';
import { useReportPhotos } from './use-report-photos.ts';
import { useReportSending } from './use-report-sending.ts';
import { WaitingNote, WaitingReports } from './waiting-reports.tsx';

const nothingTyped: ReportFormState = { typed: {}, formErrors: [], fieldErrors: {}, repeated: {}, longWindowDays: null };
const roomless = new Map<string, Blob>();
const fileOf = (key: string) => roomless.get(key);

/** Make-safe card first, then the form, then what is saved and waits. Without a script card and form stand on one page. */
export function ReportPage({ view, problem }: { readonly view: ReportView; readonly problem: ReportFormState | null }) {
  const { clientId, guestCode, holderKey } = view;
  const hydrated = useHydrated();
  const form = useRef<HTMLFormElement>(null);
  const heading = useRef<HTMLHeadingElement>(null);
  const addressOf = useCallback((id: string) => reportAddress(id, guestCode), [guestCode]);
  const only = view.sites.length === 1 ? view.sites[0] : undefined;
  const draft = useReportDraft({ form, clientId, holderKey, guestCode, addressOf, mending: problem !== null, first: { ...(only ? { siteId: only.id } : {}), ...problem?.typed } });
  const sending = useReportSending({ clientId, holderKey, report: draft.report, fileOf });
  const photos = useReportPhotos({ clientId, stored: view.fromDevice ? null : view.photos, maxBytes: view.photoMaxBytes, roomless, keep: draft.keep, onChange: sending.tryNow });
  const lasting = useLastingStorage(draft.report !== null && (photos.photos.length > 0 || draft.report.wanted !== 'no'));
  useWayToReceipt(draft.report, guestCode);

  const mend = problem ?? (draft.report?.problem ? { ...draft.report.problem, typed: draft.report.values } : null);
  // A form that came back to be mended is the page, with a script or without.
  const atForm = mend !== null || (hydrated && draft.begun);
  const saved = draft.report !== null && draft.report.wanted !== 'no';
  const background = useArrival(view, saved);
  useEffect(() => {
    if (!mend) return;
    const summary = form.current?.querySelector('[role="alert"]');
    if (summary instanceof HTMLElement) summary.focus();
  }, [mend !== null]); // eslint-disable-line react-hooks/exhaustive-deps -- once for each time something has to be mended

  const begin = (stillThere: boolean) => {
    const choice = stillThere ? form.current?.querySelector("[name='hazardStillPresent'][value='yes']") : null;
    if (choice instanceof HTMLInputElement) choice.checked = true;
    draft.begin();
    requestAnimationFrame(() => {
      window.scrollTo(0, 0);
      heading.current?.focus();
    });
  };
  const startAnew = async () => {
    await draft.discard();
    window.location.assign(newReportAddress(guestCode));
  };

  const Heading = atForm ? 'h1' : 'h2';
  return (
    <>
      <TaskHeader title={saved ? 'Your report' : 'Report a mark'} closeHref={view.closeHref} open={!atForm} />
      <Page withBar width="task">
        {saved && draft.report ? (
          <SavedScreen report={draft.report} photos={photos.photos} siteName={view.sites.find((site) => site.id === draft.report?.values['siteId'])?.name ?? ''} savedAt={draft.savedAt ?? ''} sending={sending} lasting={lasting} background={background} />
        ) : null}
        <div hidden={saved || atForm || undefined} className="-mx-(--page-margin) pb-4 desk:pt-6">
          <MakeSafeCard telephone={view.emergencyNumber} headingLevel={atForm ? 2 : 1}>
            <GoOn view={view} hydrated={hydrated} onGo={begin} />
          </MakeSafeCard>
        </div>
        <div id="report" hidden={saved || (hydrated && !atForm) || undefined} className="pt-4">
          <Heading ref={heading} tabIndex={-1} className="pb-3 font-serif text-title outline-none">What did you find?</Heading>
          {hydrated ? <WaitingNote holderKey={holderKey} clientId={clientId} /> : null}
          <ReportForm view={view} state={mend ?? nothingTyped} formRef={form} draft={draft} sending={sending} photos={photos} />
          {hydrated && !draft.unkept ? <p className="pt-4 text-small text-second">What you type and the photos stay on this {deviceWord()} for at least {keptDays} days, until they are sent. {lastingWords[lasting]}</p> : null}
          {hydrated ? <p><Button type="button" look="quiet" className="min-h-11" onClick={() => void startAnew()}>Throw this draft away and start anew</Button></p> : null}
        </div>
        {hydrated ? <WaitingReports holderKey={holderKey} clientId={clientId} sites={view.sites} onTakeBack={sending.tryNow} /> : null}
        {hydrated && !view.guest ? <TakenList /> : null}
      </Page>
    </>
  );
}

/** Makes the next start possible without a connection. @returns whether this browser sends with the page closed. */
function useArrival(view: ReportView, saved: boolean): boolean {
  const [background, setBackground] = useState(false);
  useEffect(() => {
    registerServiceWorker();
    // Storage that is switched off keeps no page either.
    if (!view.fromDevice) keepView(view).catch(() => undefined);
  }, [view]);
  // Asked when it matters: at the first visit the worker needs a moment to take over.
  useEffect(() => void sendsInBackground().then(setBackground, () => undefined), [saved]);
  return background;
}

/** Once the team has the words, the page with the receipt is next. */
function useWayToReceipt(report: { readonly clientId: string; readonly receipt: string | null } | null, guestCode: string | null): void {
  const navigate = useNavigate();
  const receipt = report?.receipt ?? null;
  const clientId = report?.clientId ?? '';
  useEffect(() => {
    if (receipt) void navigate(receivedAddress(receipt, guestCode, clientId));
  }, [receipt, guestCode, clientId, navigate]);
}
