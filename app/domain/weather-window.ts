import type { SceneTimes } from './reconstruction-input.ts';
import { reconstructionWindow } from './reconstruction-input.ts';

/** The window that weather is wanted for: that of a run; null while no time is known. */
export function weatherWindow(times: SceneTimes): { readonly from: Date; readonly to: Date } | null {
  const window = reconstructionWindow(times, 'UTC');
  return window ? { from: new Date(window.startUtc), to: new Date(window.endUtc) } : null;
}
