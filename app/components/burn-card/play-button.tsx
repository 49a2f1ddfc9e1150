export interface PlayButtonProps {
  readonly playing: boolean;
  readonly onToggle: () => void;
  /** Beside the steps of a phone there is room for the sign alone. */
  readonly signOnly?: boolean;
}

const signs = { play: 'M8 5L19 12L8 19Z', pause: 'M7 5H10.5V19H7ZM13.5 5H17V19H13.5Z' } as const;

/** Runs through the window, or stops. A plain button: the space bar and Enter press it. */
export function PlayButton({ playing, onToggle, signOnly = false }: PlayButtonProps) {
  const word = playing ? 'Pause' : 'Play';
  const sign = <svg width="20" height="20" viewBox="0 0 24 24" aria-hidden="true" className="flex-none fill-current"><path d={playing ? signs.pause : signs.play} /></svg>;
  if (signOnly) {
    return <button type="button" aria-label={`${word} the window`} onClick={onToggle} className="inline-flex size-12 flex-none cursor-pointer touch-manipulation items-center justify-center border-[1.5px] border-ember text-ink">{sign}</button>;
  }
  return (
    <button type="button" onClick={onToggle} className="inline-flex min-h-8 w-20 cursor-pointer items-center gap-1 text-small text-ink">
      {sign}
      <span className="underline decoration-ember decoration-2 underline-offset-4">{word}<span className="sr-only"> the window</span></span>
    </button>
  );
}
