import { useEffect, useRef } from 'react';
import { FixedBar, TwoPartBar } from '#app/components/layout/page.tsx';
import { AppLink } from '#app/components/ui/app-link.tsx';
import { Button } from '#app/components/ui/button.tsx';
import { FactList } from '#app/components/ui/fact-list.tsx';
import { photoViewLabels, sightingLabels, sightings } from '#app/domain/incident.ts';
import { foundAnswerLabels, foundAnswers } from '#app/domain/report-fields.ts';
import type { KeptPhoto, KeptReport } from './device-store.ts';
import { keptDays } from './device-store.ts';
import { deviceWord } from './device-word.ts';
import { newReportAddress, reportAddress } from './report-addresses.ts';
import { sizeWords } from './size-words.ts';
import type { Lasting } from './use-lasting-storage.ts';
import { lastingWords } from './use-lasting-storage.ts';
import type { ReportSending } from './use-report-sending.ts';

export interface SavedScreenProps {
  readonly report: KeptReport;
  readonly photos: readonly KeptPhoto[];
  readonly siteName: string;
  readonly savedAt: string;
  readonly sending: ReportSending;
  readonly lasting: Lasting;
  /** The browser sends with the page closed. */
  readonly background: boolean;
}

/** After Send, until the team has the words: what is on this phone, what is with the team, and that it goes by itself. */
export function SavedScreen({ report, photos, siteName, savedAt, sending, lasting, background }: SavedScreenProps) {
  const heading = useRef<HTMLHeadingElement>(null);
  useEffect(() => heading.current?.focus(), []);
  const here = photos.filter((photo) => photo.removedAt === null && photo.state !== 'refused');
  const waiting = here.filter((photo) => photo.state === 'waiting').length;
  const { title, words, bar } = said({ report, waiting, background });
  return (
    <>
      <h1 ref={heading} tabIndex={-1} className="pt-4 font-serif text-title outline-none">{title}</h1>
      <p className="pt-1 pb-4" role="status">{words}</p>
      {report.held?.why === 'sign-in' ? <p className="pb-4"><AppLink href={`/sign-in?next=${encodeURIComponent(reportAddress(report.clientId, report.guestCode))}`} reload className="inline-flex min-h-11 items-center">Sign in and send it</AppLink></p> : null}
      <div className="space-y-3">
        <TwoPartBar label="Words" detail={`saved ${savedAt}`} sentPart={0} />
        {here.map((photo, index) => <PhotoBar key={photo.key} photo={photo} number={index + 1} part={sending.progress[photo.key] ?? 0} />)}
        <p aria-hidden="true" className="flex justify-around text-axis text-second"><span>on this {deviceWord()}</span><span>with the team</span></p>
      </div>
      <div className="mt-4 border-t-[1.5px] border-ink"><FactList facts={factsOf(report, siteName)} /></div>
      <p className="py-4"><b className="font-semibold">Keep it on this {deviceWord()} for now.</b> {lastingWords[lasting]} A report that waits here stays until it is sent; an unfinished one at least {keptDays} days.</p>
      <div className="flex flex-wrap gap-x-6">
        <Button type="button" look="quiet" className="min-h-11" onClick={() => void sending.hold()}>Add to this report</Button>
        <AppLink href={newReportAddress(report.guestCode)} reload className="inline-flex min-h-11 items-center">Report another mark</AppLink>
      </div>
      <FixedBar
        title={`Saved here, ${savedAt}`}
        detail={bar}
        onPhone
        action={<Button type="button" look="outlined" onClick={() => void (waiting > 0 ? sending.send() : sending.tryNow())}>{waiting > 0 && report.wanted === 'with-photos' ? 'Send without them' : 'Try now'}</Button>}
      />
    </>
  );
}

function said({ report, waiting, background }: { readonly report: KeptReport; readonly waiting: number; readonly background: boolean }): { title: string; words: string; bar: string } {
  const closing = background ? 'You can close this page and come down.' : 'Keep this page, or open it again when there is signal.';
  if (report.held?.why === 'sign-in') return { title: `Saved on this ${deviceWord()}. Not sent yet.`, words: report.held.sentence, bar: 'Waits until you sign in' };
  if (report.held) return { title: `Saved on this ${deviceWord()}. Not sent yet.`, words: `It goes by itself when signal returns, once only. ${closing}`, bar: 'No signal, tries again by itself' };
  const first = waiting > 0 && report.wanted === 'with-photos';
  return { title: 'Sending your report', words: first ? `${waiting === 1 ? 'One photo goes' : `${waiting} photos go`} first, then the words.` : 'The words are on their way.', bar: 'On its way' };
}

function PhotoBar({ photo, number, part }: { readonly photo: KeptPhoto; readonly number: number; readonly part: number }) {
  const view = photo.details.view ? `, ${photoViewLabels[photo.details.view].toLowerCase()}` : '';
  const detail = photo.state === 'stored' ? 'with the team' : part > 0 && part < 1 ? `on its way, ${Math.round(part * 100)} %` : `saved, ${sizeWords(photo.bytes)}`;
  return <TwoPartBar label={`Photo ${number}${view}`} detail={detail} sentPart={photo.state === 'stored' ? 1 : part} />;
}

/** As typed, on the clock of the place. */
function foundWords({ foundWhen, foundNowAt, foundLocal = '', foundFromLocal = '', foundToLocal = '' }: KeptReport['values']): string {
  const clock = (local: string) => local.replace('T', ', ');
  // "Just now" was when it was pressed, by the clock of this device.
  if (foundWhen === 'just-now' && foundNowAt) return new Date(foundNowAt).toLocaleString('en-GB', { day: 'numeric', month: 'short', hour: '2-digit', minute: '2-digit' });
  if (foundWhen === 'at') return clock(foundLocal);
  if (foundWhen === 'range') return `${clock(foundFromLocal)} to ${clock(foundToLocal)}`;
  const answer = foundAnswers.find((value) => value === foundWhen);
  return answer ? foundAnswerLabels[answer] : 'not said';
}

/** The four answers, as they were given. */
function factsOf({ values }: KeptReport, siteName: string) {
  const sighting = sightings.find((value) => value === values['sighting']);
  const spot = values['placeDetail'] ? `${siteName}, ${values['placeDetail']}` : siteName;
  return [
    { term: 'Place', value: spot || 'not said' },
    { term: 'Found', value: foundWords(values) },
    { term: 'You see', value: sighting ? sightingLabels[sighting] : 'not said' },
    { term: 'Anyone hurt', value: values['anyoneHurt'] === 'yes' ? 'yes' : values['anyoneHurt'] === 'no' ? 'no' : "don't know" },
  ];
}
