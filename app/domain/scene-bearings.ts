import type { Measured } from './scene.ts';
import type { SceneField } from './scene-fields.ts';
import { readNumber } from './scene-lines.ts';

export interface BearingFrames {
  /** Degrees to add to a magnetic bearing, east positive; null where no model covers the day. */
  readonly declinationDeg: number | null;
  /** "WMM-2025, 3 Feb 2026". */
  readonly declinationSource: string;
}

/** Norths that a bearing may have been taken from; `shadow` is an instrument that was set right by a timed shadow. */
export const norths = ['true', 'magnetic', 'grid', 'shadow'] as const;
export type North = (typeof norths)[number];
export const northLabels: Record<North, string> = { true: 'true', magnetic: 'magnetic', grid: 'grid', shadow: 'by shadow' };

export type BearingTurn =
  | { readonly ok: true; readonly valueDeg: number; readonly reading?: NonNullable<Measured['reading']>; readonly note?: string }
  | { readonly ok: false; readonly sentence: string };

type Typed = Readonly<Record<string, string>>;
const signed = (degrees: number) => `${degrees >= 0 ? '+' : '-'}${Math.abs(degrees).toFixed(1)}`;

interface Turn {
  readonly turnDeg: number;
  readonly how: string;
  readonly source: string;
}

function turnFor(north: Exclude<North, 'true'>, typed: Typed, frames: BearingFrames): Turn | string {
  if (north === 'magnetic') {
    if (frames.declinationDeg === null) return `No magnetic model covers that day (${frames.declinationSource}). Turn the bearing to true north yourself.`;
    return { turnDeg: frames.declinationDeg, how: `declination ${signed(frames.declinationDeg)}°, ${frames.declinationSource}`, source: frames.declinationSource };
  }
  const typedTurn = readNumber(typed[north === 'grid' ? 'gridConvergenceDeg' : 'shadowCorrectionDeg'] ?? '');
  if (Number.isNaN(typedTurn)) {
    return north === 'grid'
      ? 'Give the grid convergence from the margin of the map, or turn the bearing to true north yourself.'
      : 'Give the correction from the timed shadow above, or turn the bearing to true north yourself.';
  }
  if (Math.abs(typedTurn) > 180) return 'A correction lies between -180 and 180°.';
  const how = north === 'grid' ? `grid convergence ${signed(typedTurn)}°` : `correction by a timed shadow ${signed(typedTurn)}°`;
  return { turnDeg: typedTurn, how, source: north === 'grid' ? 'margin of the map' : 'timed shadow' };
}

/** A typed bearing from true north. East is added: true = magnetic + declination, true = grid + convergence. */
export function turnToTrue(field: SceneField, north: string, valueDeg: number, typed: Typed, frames: BearingFrames): BearingTurn {
  if (north === 'true') return { ok: true, valueDeg };
  const known = norths.find((one): one is Exclude<North, 'true'> => one === north && one !== 'true');
  if (!known) return { ok: false, sentence: 'Say which north this bearing was taken from.' };
  const turn = turnFor(known, typed, frames);
  if (typeof turn === 'string') return { ok: false, sentence: turn };
  const turned = Math.round(((((valueDeg + turn.turnDeg) % 360) + 360) % 360) * 100) / 100;
  const what = known === 'shadow' ? 'by the instrument' : known;
  return {
    ok: true,
    valueDeg: turned,
    reading: { north: known, valueDeg, turnDeg: turn.turnDeg, source: turn.source },
    note: `${field.label}: ${valueDeg}° ${what}, ${turn.how}, is ${turned}° true.`,
  };
}

/** "331.7° magnetic, +4.9° added, WMM-2025, 2026-02-03"; empty for a bearing taken from true north. */
export function readingWords(measure: Pick<Measured, 'reading'>): string {
  const { reading } = measure;
  return reading ? `read ${reading.valueDeg}° ${northLabels[reading.north]}, ${signed(reading.turnDeg)}° added, ${reading.source}` : '';
}
