import { useEffect, useState } from 'react';
import { Button } from '#app/components/ui/button.tsx';
import { Notice } from '#app/components/ui/notice.tsx';
import { canTakeAlong, leaveBehind, takeAlong, takenAt } from './taken-along.ts';

interface TakeAlongProps {
  /** Path of this page. */
  readonly address: string;
  /** When the server made what is shown, ISO 8601: the same as that of the copy when the copy is shown. */
  readonly madeAt: string;
}

type Standing = { readonly at: string | null; readonly failed: boolean };

const clock = (iso: string) => new Date(iso).toLocaleString('en-GB', { day: 'numeric', month: 'short', hour: '2-digit', minute: '2-digit' });

/** Keeps this page on the device for a roof without a signal; says so when what is shown is that copy. */
export function TakeAlong({ address, madeAt }: TakeAlongProps) {
  const [standing, setStanding] = useState<Standing | null>(null);
  useEffect(() => {
    if (!canTakeAlong()) return;
    takenAt(address).then(
      (at) => setStanding({ at, failed: false }),
      () => undefined, // Storage is switched off: the page stays as it is.
    );
  }, [address]);
  if (standing === null) return <div data-made-at={madeAt} hidden />;
  const take = () =>
    takeAlong(address)
      .then(() => takenAt(address))
      .then(
        (at) => setStanding({ at, failed: false }),
        () => setStanding({ at: standing.at, failed: true }),
      );
  const leave = () => leaveBehind(address).then(() => setStanding({ at: null, failed: false }));
  return (
    <div data-made-at={madeAt} data-print="no" className="pb-4">
      {standing.at === madeAt ? (
        <Notice title={`The copy on this device, of ${clock(standing.at)}`} role="note">
          What was saved since then is not in it. What you type is kept here; save it when there is a signal.
        </Notice>
      ) : (
        <div className="flex flex-wrap items-center gap-x-4 gap-y-2">
          <Button type="button" look="outlined" onClick={() => void take()}>{standing.at === null ? 'Take this page along' : 'Take it along anew'}</Button>
          {standing.at === null ? null : <Button type="button" look="quiet" className="min-h-11" onClick={() => void leave()}>Remove the copy</Button>}
          <p role="status" className="max-w-[52ch] text-small text-second">
            {standing.failed ? 'It could not be kept on this device. Check the free space and the connection, then try again.' : standing.at === null ? 'It then opens on this device without a signal, with what is on record now.' : `On this device since ${clock(standing.at)}: opens without a signal. It goes when you sign out.`}
          </p>
        </div>
      )}
    </div>
  );
}
