import { useCallback, useEffect, useState } from 'react';
import { AppLink } from '#app/components/ui/app-link.tsx';
import { Button } from '#app/components/ui/button.tsx';
import type { KeptReport } from './device-store.ts';
import { listenForReports } from './device-store.ts';
import { deviceWord } from './device-word.ts';
import { forgetReport, listPhotos, listReports, patchReport } from './kept-reports.ts';
import { reportAddress } from './report-addresses.ts';
import type { SiteChoice } from './where-question.tsx';

interface Line {
  readonly report: KeptReport;
  readonly photos: number;
}

export interface WaitingReportsProps {
  readonly holderKey: string;
  /** The report of this page is not in the list. */
  readonly clientId: string;
  readonly sites: readonly SiteChoice[];
  /** A report was taken back, and may be to be sent. */
  readonly onTakeBack: () => void;
}

/** Other reports of the same person on this device: waiting to be sent, unfinished, or sent from here. */
export function WaitingReports({ holderKey, clientId, sites, onTakeBack }: WaitingReportsProps) {
  const lines = useOtherReports(holderKey, clientId);
  if (lines.length === 0) return null;
  const waiting = lines.filter((line) => isOpen(line) && line.report.wanted !== 'no').length;
  return (
    <section aria-labelledby={headingId} className="py-4">
      <h2 id={headingId} tabIndex={-1} className="border-b-[1.5px] border-ink pb-1 font-serif text-account outline-none">{waiting === 0 ? `From this ${deviceWord()}` : `Waiting to be sent: ${waiting}`}</h2>
      <ul>{lines.map((line) => <WaitingLine key={line.report.clientId} line={line} siteName={sites.find((site) => site.id === line.report.values['siteId'])?.name ?? ''} onTakeBack={onTakeBack} />)}</ul>
    </section>
  );
}

/** Above the form, where the list itself stands below it. */
export function WaitingNote({ holderKey, clientId }: Pick<WaitingReportsProps, 'holderKey' | 'clientId'>) {
  const open = useOtherReports(holderKey, clientId).filter(isOpen).length;
  if (open === 0) return null;
  return <p className="pb-2"><a href={`#${headingId}`} className="inline-flex min-h-11 items-center">{open === 1 ? 'Another report is' : `${open} other reports are`} kept on this {deviceWord()}</a></p>;
}

const headingId = 'waiting-reports';
const isOpen = ({ report }: Line) => report.receipt === null && report.thrownAwayAt === null;

function useOtherReports(holderKey: string, clientId: string): readonly Line[] {
  const [lines, setLines] = useState<readonly Line[]>([]);
  const reload = useCallback(async () => {
    const others = (await listReports(holderKey)).filter((report) => report.clientId !== clientId);
    setLines(await Promise.all(others.map(async (report) => ({ report, photos: (await listPhotos(report.clientId)).filter((photo) => photo.removedAt === null).length }))));
  }, [holderKey, clientId]);
  useEffect(() => {
    // Without storage there is nothing to list.
    const again = () => void reload().catch(() => undefined);
    again();
    return listenForReports(again);
  }, [reload]);
  return lines;
}

function WaitingLine({ line: { report, photos }, siteName, onTakeBack }: { readonly line: Line; readonly siteName: string; readonly onTakeBack: () => void }) {
  const saved = new Date(report.savedAt).toLocaleString('en-GB', { day: 'numeric', month: 'short', hour: '2-digit', minute: '2-digit' });
  const name = [siteName || 'Place not chosen', report.values['placeDetail']].filter(Boolean).join(', ');
  const gone = report.thrownAwayAt !== null;
  return (
    <li className="border-b border-hair py-2">
      <p className="font-semibold break-words">{name}</p>
      <p className="text-small text-second">{gone ? 'Thrown away.' : stateWords(report)} {photos === 0 ? 'No photo' : photos === 1 ? 'One photo' : `${photos} photos`}, last word {saved}.</p>
      <div className="flex flex-wrap gap-x-6">
        {gone
          ? <Button type="button" look="quiet" className="min-h-11" onClick={() => void patchReport(report.clientId, { thrownAwayAt: null }).then(onTakeBack)}>Undo<span className="sr-only">: take {name} back</span></Button>
          : report.receipt
            ? <><AppLink href={`/progress?code=${report.receipt}`} className="inline-flex min-h-11 items-center">Follow it</AppLink><Button type="button" look="quiet" className="min-h-11" onClick={() => void forgetReport(report.clientId)}>Off the list</Button></>
            : <><AppLink href={reportAddress(report.clientId, report.guestCode)} reload className="inline-flex min-h-11 items-center">Open</AppLink><Button type="button" look="quiet" className="min-h-11" onClick={() => void patchReport(report.clientId, { thrownAwayAt: Date.now() })}>Throw away<span className="sr-only"> {name}</span></Button></>}
      </div>
    </li>
  );
}

function stateWords(report: KeptReport): string {
  if (report.receipt) return `Sent, receipt ${report.receipt}.`;
  if (report.problem) return 'Not sent: something has to be mended.';
  if (report.wanted === 'no') return 'Not finished.';
  return report.held?.why === 'sign-in' ? 'Waits until you sign in.' : `Saved on this ${deviceWord()}; goes by itself.`;
}
