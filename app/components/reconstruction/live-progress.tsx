import { useEffect } from 'react';
import { useRevalidator } from 'react-router';

const askAgainMs = 1_000;
const askAgainS = 3;

export interface LiveProgressProps {
  readonly pending: boolean;
}

/** While a run is under way the page asks again: by itself with a script, by reloading without one. */
export function LiveProgress({ pending }: LiveProgressProps) {
  const { revalidate } = useRevalidator();
  useEffect(() => {
    if (!pending) return undefined;
    let timer: ReturnType<typeof setTimeout> | undefined;
    let left = false;
    // The next question waits for the answer to the last, or a slow answer would never arrive.
    const askAgain = async () => {
      await revalidate();
      if (!left) timer = setTimeout(() => void askAgain(), askAgainMs);
    };
    timer = setTimeout(() => void askAgain(), askAgainMs);
    return () => {
      left = true;
      clearTimeout(timer);
    };
  }, [pending, revalidate]);
  if (!pending) return null;
  return (
    <noscript>
      <meta httpEquiv="refresh" content={String(askAgainS)} />
    </noscript>
  );
}

export interface ProgressLineProps {
  readonly state: 'queued' | 'running';
  readonly done: number;
  readonly total: number;
}

/** "Testing minute 92 of 136", with a plain bar. */
export function ProgressLine({ state, done, total }: ProgressLineProps) {
  const part = total > 0 ? Math.min(1, done / total) : 0;
  const words = state === 'queued' ? 'Waiting for the worker' : total === 0 ? 'Starting' : `Testing step ${done} of ${total}`;
  return (
    <div role="status" className="max-w-[40rem]">
      <p>{words}</p>
      <svg width="100%" height="14" aria-hidden="true">
        <rect x="0.5" y="2.5" width="99.8%" height="9" className="fill-pale stroke-pale-edge" />
        <rect x="0" y="2" width={`${part * 100}%`} height="10" className="fill-card" />
      </svg>
    </div>
  );
}
