import { useEffect, useRef, useState } from 'react';
import { playFrom, playedTo } from './playback.ts';

export interface Playback {
  readonly playing: boolean;
  /** Starts, or stops where the line stands. */
  readonly toggle: () => void;
  readonly pause: () => void;
}

/**
 * Moves the line through the window by itself: one run from where it stands to the end. It stops when the page is hidden,
 * and jumps rather than glides for readers who asked for less movement.
 */
export function usePlayback(count: number, index: number, onIndex: (index: number) => void): Playback {
  const [playing, setPlaying] = useState(false);
  const latest = useRef({ index, onIndex });
  latest.current = { index, onIndex };
  useEffect(() => {
    if (!playing) return undefined;
    const reducedMotion = matchMedia('(prefers-reduced-motion: reduce)').matches;
    const fromIndex = playFrom(latest.current.index, count);
    const startedMs = performance.now();
    let frame = 0;
    const draw = () => {
      const next = playedTo({ fromIndex, elapsedMs: performance.now() - startedMs, count, reducedMotion });
      if (next !== latest.current.index) latest.current.onIndex(next);
      if (next >= count - 1) setPlaying(false);
      else frame = requestAnimationFrame(draw);
    };
    const whenHidden = () => {
      if (!document.hidden) return;
      cancelAnimationFrame(frame);
      setPlaying(false);
    };
    document.addEventListener('visibilitychange', whenHidden);
    frame = requestAnimationFrame(draw);
    return () => {
      cancelAnimationFrame(frame);
      document.removeEventListener('visibilitychange', whenHidden);
    };
  }, [playing, count]);
  return { playing, toggle: () => setPlaying(!playing), pause: () => setPlaying(false) };
}
