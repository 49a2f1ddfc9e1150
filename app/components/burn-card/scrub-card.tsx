import { useEffect, useRef, useState } from 'react';
import type { KeyboardEvent } from 'react';
import { BurnCard } from './burn-card.tsx';
import type { BurnCardModel } from './model.ts';
import { PlayButton } from './play-button.tsx';
import { scrubTo, windowParts } from './scrub.ts';
import type { ScrubMinute } from './scrub.ts';
import { clockWords } from './wall-clock.ts';
import { verdictWords } from './words.ts';

export interface SunAtMinute extends ScrubMinute {
  readonly azimuthDeg: number;
  readonly apparentElevationDeg: number;
  readonly reasonWords: string;
}
export interface ScrubProps {
  readonly model: BurnCardModel;
  readonly minutes: readonly SunAtMinute[];
  /** Minute under the blue line. */
  readonly atUtc: string;
  /** Told of each chosen minute, so that other drawings move in the same frame. */
  readonly onMinute: (atUtc: string) => void;
}
/** The line may also go through the window by itself. */
export interface PlayedProps extends ScrubProps {
  readonly playing: boolean;
  readonly onPlay: () => void;
}
export interface ScrubCardProps extends PlayedProps {
  readonly label?: string;
}

const indexOf = (minutes: readonly SunAtMinute[], atUtc: string): number => Math.max(0, minutes.findIndex((minute) => minute.atUtc === atUtc));

/** "10:12, can't tell, the ±3° of the skyline straddles; sun 12.1° up, 146.2°". */
export function minuteWords(minute: SunAtMinute, zone: string): string {
  const why = minute.verdict === 'sunlit' ? '' : `, ${minute.reasonWords}`;
  return `${clockWords(minute.atUtc, zone)}, ${verdictWords[minute.verdict]}${why}; sun ${minute.apparentElevationDeg.toFixed(1)}° up, ${minute.azimuthDeg.toFixed(1)}°`;
}

/** A large card whose blue line is moved by dragging, by keys, by typing a time, or goes by itself. */
export function ScrubCard({ label, playing, onPlay, ...props }: ScrubCardProps) {
  const { model, minutes, atUtc, onMinute } = props;
  const index = indexOf(minutes, atUtc);
  const minute = minutes[index];
  if (!minute) return <BurnCard model={model} size="L" {...(label ? { label } : {})} />;
  return (
    <div>
      <div className="relative">
        <BurnCard model={{ ...model, cursorUtc: minute.atUtc }} size="L" {...(label ? { label } : {})} />
        <ScrubRange {...props} className="scrub-range top-10" />
      </div>
      <div data-print="no" className="flex flex-wrap items-center gap-x-4 gap-y-1 text-small">
        <JumpToTime minutes={minutes} zone={model.zone} index={index} choose={(wanted) => onMinute(minutes[wanted]?.atUtc ?? atUtc)} />
        <span className="max-tablet:hidden"><PlayButton playing={playing} onToggle={onPlay} /></span>
        <span aria-hidden="true">{minuteWords(minute, model.zone)}</span>
      </div>
      <StoppedAt playing={playing} words={minuteWords(minute, model.zone)} />
    </div>
  );
}

/** Where the line came to rest after it went by itself, read out once; moved by hand, the slider says its own value. */
function StoppedAt({ playing, words }: { readonly playing: boolean; readonly words: string }) {
  const wasPlaying = useRef(false);
  const [stoppedAt, setStoppedAt] = useState('');
  useEffect(() => {
    if (playing) setStoppedAt('');
    else if (wasPlaying.current) setStoppedAt(words);
    wasPlaying.current = playing;
    // Only starting and stopping speak; the words of the minutes between do not.
    // eslint-disable-next-line react-hooks/exhaustive-deps
  }, [playing]);
  return <p role="status" className="sr-only">{stoppedAt}</p>;
}

/** The slider that lies over a card, from end to end of the window. */
export function ScrubRange({ model, minutes, atUtc, onMinute, className }: ScrubProps & { readonly className: string }) {
  const index = indexOf(minutes, atUtc);
  const minute = minutes[index];
  const parts = windowParts(model);
  const choose = (wanted: number) => {
    const chosen = minutes[wanted];
    if (chosen) onMinute(chosen.atUtc);
  };
  const onKeyDown = (event: KeyboardEvent) => {
    const wanted = scrubTo(minutes, index, event.key, event.shiftKey);
    if (wanted === null) return;
    event.preventDefault();
    choose(wanted);
  };
  return (
    <input
      type="range"
      min={0}
      max={minutes.length - 1}
      step={1}
      value={index}
      aria-label="Minute of the window"
      aria-valuetext={minute ? minuteWords(minute, model.zone) : ''}
      onChange={(event) => choose(Number(event.currentTarget.value))}
      onKeyDown={onKeyDown}
      className={`absolute ${className}`}
      style={{ left: `${parts.from * 100}%`, width: `${(parts.to - parts.from) * 100}%` }}
    />
  );
}

function JumpToTime({ minutes, zone, index, choose }: { readonly minutes: readonly SunAtMinute[]; readonly zone: string; readonly index: number; readonly choose: (index: number) => void }) {
  const here = minutes[index];
  return (
    <label className="flex items-center gap-2">
      <span className="text-second">Go to</span>
      <input
        type="time"
        className="field-box !min-h-8 !w-auto !py-0.5"
        value={here ? clockWords(here.atUtc, zone) : ''}
        onChange={(event) => {
          const wanted = minutes.findIndex((minute) => clockWords(minute.atUtc, zone) === event.currentTarget.value);
          if (wanted >= 0) choose(wanted);
        }}
      />
    </label>
  );
}
