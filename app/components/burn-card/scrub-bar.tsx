import { useEffect, useRef, useState } from 'react';
import type { RefObject } from 'react';
import { BurnCard } from './burn-card.tsx';
import { PlayButton } from './play-button.tsx';
import type { PlayedProps } from './scrub-card.tsx';
import { minuteWords, ScrubRange } from './scrub-card.tsx';
import { clockWords } from './wall-clock.ts';
import { verdictWords } from './words.ts';

/** True once an element has been scrolled out at the top; never before it was seen by the browser. */
function useScrolledPast(element: RefObject<HTMLElement | null>): boolean {
  const [past, setPast] = useState(false);
  useEffect(() => {
    const watched = element.current;
    if (!watched) return undefined;
    const observer = new IntersectionObserver(([entry]) => setPast(entry !== undefined && !entry.isIntersecting && entry.boundingClientRect.bottom < 0));
    observer.observe(watched);
    return () => observer.disconnect();
  }, [element]);
  return past;
}

export interface ScrubBarsProps extends PlayedProps {
  /** The large card; the bar at the top stands in for it once it is out of sight. */
  readonly card: RefObject<HTMLElement | null>;
}

/** The time stays at hand while the figures are read: a low card at the top of a desk, a bar with two steps at the foot of a phone. */
export function ScrubBars({ card, playing, onPlay, ...props }: ScrubBarsProps) {
  const past = useScrolledPast(card);
  const { model, minutes, atUtc, onMinute } = props;
  const index = minutes.findIndex((minute) => minute.atUtc === atUtc);
  const minute = minutes[index];
  if (!minute) return null;
  const step = (by: 1 | -1) => {
    const next = minutes[index + by];
    if (next) onMinute(next.atUtc);
  };
  return (
    <>
      {past ? (
        <div className="fixed-bar fixed inset-x-0 top-0 z-20 h-[86px] border-b-2 border-ink bg-paper px-10 pt-1 max-tablet:hidden" data-print="no">
          <div className="mx-auto grid max-w-[1600px] grid-cols-[15rem_5rem_minmax(0,1fr)] items-center gap-6">
            <p className="text-small leading-tight" aria-hidden="true">{minuteWords(minute, model.zone)}</p>
            <PlayButton playing={playing} onToggle={onPlay} />
            <div className="relative">
              <BurnCard model={{ ...model, cursorUtc: minute.atUtc }} size="M" />
              <ScrubRange {...props} className="scrub-range top-0 !h-[68px]" />
            </div>
          </div>
        </div>
      ) : null}
      <div className="fixed-bar fixed inset-x-0 bottom-0 z-20 mb-0 flex min-h-[72px] items-center justify-between gap-3 border-t-2 border-ink bg-sheet px-4 py-2 tablet:hidden" data-print="no">
        <StepButton label="One minute earlier" d="M14 4L6 12L14 20" disabled={index <= 0} onPress={() => step(-1)} />
        <p className="text-center text-small leading-tight" aria-live={playing ? 'off' : 'polite'}>
          <b className="block text-body font-semibold">{clockWords(minute.atUtc, model.zone)}, {verdictWords[minute.verdict]}</b>
          {minute.verdict === 'sunlit' ? `sun ${minute.apparentElevationDeg.toFixed(1)}° up, ${minute.azimuthDeg.toFixed(1)}° true` : minute.reasonWords}
        </p>
        <PlayButton playing={playing} onToggle={onPlay} signOnly />
        <StepButton label="One minute later" d="M10 4L18 12L10 20" disabled={index >= minutes.length - 1} onPress={() => step(1)} />
      </div>
    </>
  );
}

/** Pressed once it steps by one minute, held down it goes on. */
function StepButton({ label, d, disabled, onPress }: { readonly label: string; readonly d: string; readonly disabled: boolean; readonly onPress: () => void }) {
  const latest = useRef(onPress);
  latest.current = onPress;
  const timer = useRef<ReturnType<typeof setInterval> | null>(null);
  const stop = () => {
    if (timer.current) clearInterval(timer.current);
    timer.current = null;
  };
  useEffect(() => stop, []);
  return (
    <button
      type="button"
      aria-label={label}
      disabled={disabled}
      onClick={(event) => {
        // A press by pointer has stepped already; what arrives without one comes from the keyboard.
        if (event.detail === 0) onPress();
      }}
      onPointerDown={() => {
        onPress();
        stop();
        timer.current = setInterval(() => latest.current(), 120);
      }}
      onPointerUp={stop}
      onPointerLeave={stop}
      onPointerCancel={stop}
      className="inline-flex size-12 flex-none cursor-pointer touch-manipulation items-center justify-center border-[1.5px] border-ember text-ink disabled:border-edge disabled:text-second"
    >
      <svg width="24" height="24" aria-hidden="true"><path d={d} className="fill-none stroke-current" strokeWidth="2" /></svg>
    </button>
  );
}
