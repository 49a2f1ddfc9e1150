import { useId, useState } from 'react';
import { Button } from '#app/components/ui/button.tsx';
import { clockWords } from '#app/domain/photo-view.ts';
import type { KeptPhoto } from './device-store.ts';
import { noSendOnEnter } from './no-send-on-enter.ts';

export interface PhotoClockProps {
  readonly photo: KeptPhoto;
  readonly count: number;
  readonly onSay: (clockErrorS: number) => void;
  readonly onSayForAll: (clockErrorS: number) => void;
}

const whole = (text: string): number => {
  const value = Number.parseInt(text, 10);
  return Number.isFinite(value) && value >= 0 ? value : 0;
};

/** How wrong the camera's clock was, in minutes and seconds, fast or slow. */
export function PhotoClock({ photo, count, onSay, onSayForAll }: PhotoClockProps) {
  const id = useId();
  const { clockErrorS } = photo.details;
  const [typed, setTyped] = useState({ minutes: clockErrorS === 0 ? '' : String(Math.floor(Math.abs(clockErrorS) / 60)), seconds: clockErrorS === 0 ? '' : String(Math.abs(clockErrorS) % 60), slow: clockErrorS < 0 });
  const change = (patch: Partial<typeof typed>) => {
    const next = { ...typed, ...patch };
    setTyped(next);
    // At most a year: more cannot be the error of a clock.
    const seconds = Math.min(whole(next.minutes) * 60 + whole(next.seconds), 366 * 86_400);
    onSay(next.slow && seconds > 0 ? -seconds : seconds);
  };
  return (
    <details className="border-t border-hair" open={clockErrorS !== 0 || undefined}>
      <summary className="flex min-h-11 items-center underline decoration-ember decoration-2 underline-offset-4">The camera's clock was wrong</summary>
      <div className="space-y-2 pb-2">
        <div className="flex flex-wrap items-end gap-2.5">
          <label className="w-24"><span className="block pb-1 font-semibold">Minutes</span><input className="field-box" inputMode="numeric" onKeyDown={noSendOnEnter} value={typed.minutes} onChange={(event) => change({ minutes: event.currentTarget.value })} /></label>
          <label className="w-24"><span className="block pb-1 font-semibold">Seconds</span><input className="field-box" inputMode="numeric" onKeyDown={noSendOnEnter} value={typed.seconds} onChange={(event) => change({ seconds: event.currentTarget.value })} /></label>
          <label className="min-w-28 flex-1" htmlFor={`${id}-side`}>
            <span className="block pb-1 font-semibold">The clock is</span>
            <select id={`${id}-side`} className="field-box" value={typed.slow ? 'slow' : 'fast'} onChange={(event) => change({ slow: event.currentTarget.value === 'slow' })}>
              <option value="fast">fast</option>
              <option value="slow">slow</option>
            </select>
          </label>
        </div>
        <p className="text-axis text-second" role="status">{clockErrorS === 0 ? 'Hold it beside a clock you trust. Nothing is changed in the photo itself.' : `Kept as ${clockWords(clockErrorS)}. The photo itself stays as it is.`}</p>
        {count > 1 && clockErrorS !== 0 ? <Button type="button" look="quiet" className="min-h-11" onClick={() => onSayForAll(clockErrorS)}>The same for all photos of this report</Button> : null}
      </div>
    </details>
  );
}
