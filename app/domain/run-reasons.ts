import type { ReconstructionInput } from '#app/physics/model/input.ts';
import type { MinuteReason } from '#app/physics/model/minutes.ts';
import type { Skyline } from '#app/physics/skyline.ts';
import { readSkyline } from '#app/physics/skyline.ts';
import { reasonAt } from './run-words.ts';

export interface ReasonedMinute {
  readonly reason: MinuteReason;
  readonly azimuthDeg: number;
  readonly apparentElevationDeg: number;
}

/** The engine counts a value as excluded beyond this many sigmas; see `physics/lit.ts`. */
const sigmas = 2;
const apartDeg = (aDeg: number, bDeg: number): number => Math.abs(((aDeg - bDeg + 540) % 360) - 180);

function straddlesSkyline(minute: ReasonedMinute, input: ReconstructionInput, skyline: Skyline | null): boolean {
  if (!skyline || !input.skyline) return false;
  const plusMinusDeg = sigmas * input.skyline.sigmaDeg;
  return minute.apparentElevationDeg < skyline.rangeDeg(minute.azimuthDeg, plusMinusDeg).highDeg + plusMinusDeg;
}

function straddlesOpening(minute: ReasonedMinute, { opening }: ReconstructionInput): boolean {
  if (!opening) return false;
  return apartDeg(minute.azimuthDeg, opening.azimuthDeg) > opening.halfWidthDeg - sigmas * opening.azimuthSigmaDeg;
}

/**
 * Why a minute has its result, in words that name the value to look at: the building that stands in front, or whose ±
 * leaves the answer open.
 *
 * @returns A reader for the minutes of one run.
 */
export function reasonReader(input: ReconstructionInput): (minute: ReasonedMinute) => string {
  const skyline = input.skyline ? readSkyline(input.skyline) : null;
  return (minute) => {
    if (minute.reason !== 'uncertainty-straddles') return reasonAt(minute.reason, minute.azimuthDeg, input.skyline);
    if (straddlesSkyline(minute, input, skyline)) return `the ±${input.skyline?.sigmaDeg}° of the skyline straddles`;
    if (straddlesOpening(minute, input)) return `the ±${input.opening?.azimuthSigmaDeg}° of the opening straddles`;
    return 'the ± of the mark’s survey straddles';
  };
}
