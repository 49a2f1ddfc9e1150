import { useState } from 'react';
import type { KeyboardEvent } from 'react';
import { BurnCard } from './burn-card.tsx';
import type { BurnCardModel } from './model.ts';
import { scrubTo, windowParts } from './scrub.ts';
import type { ScrubMinute } from './scrub.ts';
import { clockWords } from './wall-clock.ts';
import { verdictWords } from './words.ts';

export interface SunAtMinute extends ScrubMinute {
  readonly azimuthDeg: number;
  readonly apparentElevationDeg: number;
}
export interface ScrubCardProps {
  readonly model: BurnCardModel;
  readonly minutes: readonly SunAtMinute[];
  readonly label?: string;
  /** Minute to start with, such as the best moment. */
  readonly startUtc?: string | null;
  /** Told of each chosen minute, so that other drawings move in the same frame. */
  readonly onMinute?: (atUtc: string) => void;
}

/** A large card whose blue line is moved by dragging, by keys, or by typing a time. */
export function ScrubCard({ model, minutes, label, startUtc, onMinute }: ScrubCardProps) {
  const begin = Math.max(0, minutes.findIndex((minute) => minute.atUtc === startUtc));
  const [index, setIndex] = useState(begin);
  const minute = minutes[index];
  if (!minute) return <BurnCard model={model} size="L" {...(label ? { label } : {})} />;
  const choose = (wanted: number) => {
    const chosen = minutes[wanted];
    if (!chosen) return;
    setIndex(wanted);
    onMinute?.(chosen.atUtc);
  };
  const onKeyDown = (event: KeyboardEvent) => {
    const wanted = scrubTo(minutes, index, event.key, event.shiftKey);
    if (wanted === null) return;
    event.preventDefault();
    choose(wanted);
  };
  const words = `${clockWords(minute.atUtc, model.zone)}, ${verdictWords[minute.verdict]}, sun ${minute.apparentElevationDeg.toFixed(1)}° up, ${minute.azimuthDeg.toFixed(1)}°`;
  const parts = windowParts(model);
  return (
    <div>
      <div className="relative">
        <BurnCard model={{ ...model, cursorUtc: minute.atUtc }} size="L" {...(label ? { label } : {})} />
        <input
          type="range"
          min={0}
          max={minutes.length - 1}
          step={1}
          value={index}
          aria-label="Minute of the window"
          aria-valuetext={words}
          onChange={(event) => choose(Number(event.currentTarget.value))}
          onKeyDown={onKeyDown}
          className="scrub-range absolute top-10"
          style={{ left: `${parts.from * 100}%`, width: `${(parts.to - parts.from) * 100}%` }}
        />
      </div>
      <div data-print="no" className="flex flex-wrap items-center gap-x-4 gap-y-1 text-small">
        <JumpToTime minutes={minutes} zone={model.zone} index={index} choose={choose} />
        <span aria-hidden="true">{words}</span>
      </div>
    </div>
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
