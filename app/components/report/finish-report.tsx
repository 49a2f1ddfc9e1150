import { useEffect, useState } from 'react';
import { Button } from '#app/components/ui/button.tsx';
import type { KeptPhoto } from './device-store.ts';
import { listenForReports } from './device-store.ts';
import { deviceWord } from './device-word.ts';
import { forgetReport, listPhotos } from './kept-reports.ts';
import { postFromPage } from './post-report.ts';
import { deliverAlone } from './report-sender.ts';

const retryMs = 10_000;

/**
 * The team has the words of this report. Photos that are still on the device follow, and then nothing of it stays here,
 * except a file that was refused, until the person has read why.
 */
export function FinishReport({ clientId }: { readonly clientId: string }) {
  const [left, setLeft] = useState<readonly KeptPhoto[]>([]);
  useEffect(() => {
    const address = new URL(window.location.href);
    address.searchParams.delete('report');
    window.history.replaceState(window.history.state, '', address);
    let gone = false;
    let timer = 0;
    const look = async () => {
      const open = (await listPhotos(clientId)).filter((photo) => photo.removedAt === null && photo.state !== 'stored');
      if (!gone) setLeft(open);
      return open;
    };
    const finish = async () => {
      window.clearTimeout(timer);
      const done = (await deliverAlone(clientId, { post: postFromPage })) === 'done';
      if (done && (await look()).length === 0) return forgetReport(clientId);
      if (!done && !gone) timer = window.setTimeout(attempt, retryMs);
    };
    // Without storage nothing was kept, and nothing has to go.
    const attempt = () => void finish().catch(() => undefined);
    attempt();
    const listening = listenForReports((changed) => {
      if (changed === clientId) void look().catch(() => undefined);
    });
    window.addEventListener('online', attempt);
    return () => {
      gone = true;
      listening();
      window.clearTimeout(timer);
      window.removeEventListener('online', attempt);
    };
  }, [clientId]);
  const waiting = left.filter((photo) => photo.state === 'waiting').length;
  const refused = left.filter((photo) => photo.state === 'refused');
  if (left.length === 0) return null;
  return (
    <div role="status" className="mb-4 space-y-2 border-l-6 border-ink py-1 pl-3">
      {waiting > 0 ? <p className="font-semibold">{waiting === 1 ? 'One photo is' : `${waiting} photos are`} still on this {deviceWord()}. {waiting === 1 ? 'It follows' : 'They follow'} by {waiting === 1 ? 'itself' : 'themselves'}: leave this page open, or open the report page later.</p> : null}
      {refused.map((photo) => <p key={photo.key} className="font-semibold">{photo.sentence}</p>)}
      {waiting === 0 ? <Button type="button" look="quiet" className="min-h-11" onClick={() => void forgetReport(clientId).then(() => setLeft([]))}>Understood</Button> : null}
    </div>
  );
}
