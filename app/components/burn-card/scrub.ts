import type { BurnCardModel } from './model.ts';

export interface ScrubMinute {
  readonly atUtc: string;
  readonly verdict: 'sunlit' | 'not-sunlit' | 'cannot-tell';
}

/**
 * Minute that a key leads to: arrows 1 minute, with Shift 10, Home and End the ends of the window, Page keys the next
 * change of result.
 *
 * @returns Index into `minutes`, or null where the key means nothing here.
 */
export function scrubTo(minutes: readonly ScrubMinute[], index: number, key: string, shift: boolean): number | null {
  const last = minutes.length - 1;
  const within = (wanted: number) => Math.min(last, Math.max(0, wanted));
  const step = shift ? 10 : 1;
  switch (key) {
    case 'ArrowRight':
    case 'ArrowUp':
      return within(index + step);
    case 'ArrowLeft':
    case 'ArrowDown':
      return within(index - step);
    case 'Home':
      return 0;
    case 'End':
      return last;
    case 'PageUp':
      return within(changeAfter(minutes, index));
    case 'PageDown':
      return within(changeBefore(minutes, index));
    default:
      return null;
  }
}

function changeAfter(minutes: readonly ScrubMinute[], index: number): number {
  const here = minutes[index]?.verdict;
  const found = minutes.findIndex((minute, at) => at > index && minute.verdict !== here);
  return found === -1 ? minutes.length - 1 : found;
}

function changeBefore(minutes: readonly ScrubMinute[], index: number): number {
  const here = minutes[index]?.verdict;
  return Math.max(0, minutes.findLastIndex((minute, at) => at < index && minute.verdict !== here));
}

/** Where the window begins and ends on the axis, as parts of its width; assumes no clock change inside the span. */
export function windowParts(model: BurnCardModel): { readonly from: number; readonly to: number } {
  const start = Date.parse(model.fromUtc);
  const length = Date.parse(model.toUtc) - start;
  const part = (utc: string) => (Date.parse(utc) - start) / length;
  return model.window ? { from: part(model.window.startUtc), to: part(model.window.endUtc) } : { from: 0, to: 1 };
}
