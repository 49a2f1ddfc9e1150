import type { MinuteResult, MinuteRun } from '#app/physics/model/minutes.ts';
import type { ReconstructionResult } from '#app/physics/model/result.ts';
import { judgeMinute, surveySigmaM, type Judgement } from '#app/physics/lit.ts';
import { directBeamAt } from '#app/physics/sky/direct-beam.ts';
import { minuteMs, type SunMinute } from '#app/physics/sun-track.ts';
import { roundSignificant, roundTo, toIsoUtc } from '#app/physics/units.ts';
import type { Setting } from './setting.ts';

export interface JudgedMinute extends Judgement {
  readonly sun: SunMinute;
}

export function judgeWindow(setting: Setting, onMinute: (done: number) => void): readonly JudgedMinute[] {
  return setting.track.map((sun, index) => {
    onMinute(index);
    return { sun, ...judgeMinute(sun, setting.scene) };
  });
}

/** Disc on which the flux at the mark is quoted minute by minute. [m] */
export const markDiscM = 0.005;

/** Whether a beam passes the mark so near that its light there can be stated minute by minute. */
export function nearTheSpot({ miss }: JudgedMinute, { mark, reach }: Setting): boolean {
  if (miss === null || mark === null || reach === null) return false;
  return miss.lateralM <= 6 * reach.spotRadiusM + 3 * surveySigmaM(mark) + mark.halfLengthM;
}

/** Likely flux at the mark for a concentration there; null where the beam passes so far off that the closed forms say nothing. */
function fluxAtMarkKwm2(minute: JudgedMinute, suns: number, setting: Setting): number | null {
  const { beam, sun } = minute;
  if (beam === null || !nearTheSpot(minute, setting)) return null;
  const light = directBeamAt(
    sun.utcMs, sun.azimuthDeg, sun.apparentElevationDeg, sun.distanceAu, setting.input.place.elevationM, setting.site.air, setting.series, setting.opening,
  );
  return light.likelyWm2 === null ? null : (suns * light.likelyWm2 * light.transmittance) / 1000;
}

/**
 * Minutes for the result. Night is left to the runs, which keep it whole: of four days half would be empty rows.
 *
 * @param suns Concentration on the mark at every minute.
 */
export function minuteResults(judged: readonly JudgedMinute[], suns: Float64Array, setting: Setting): readonly MinuteResult[] {
  return judged.flatMap((minute, index): MinuteResult[] => {
    if (minute.reason === 'night') return [];
    const flux = lightReaches(minute) ? fluxAtMarkKwm2(minute, suns[index] ?? 0, setting) : null;
    return [{
      atUtc: toIsoUtc(minute.sun.utcMs),
      azimuthDeg: roundTo(minute.sun.azimuthDeg, 2),
      apparentElevationDeg: roundTo(minute.sun.apparentElevationDeg, 2),
      verdict: minute.verdict,
      reason: minute.reason,
      missLateralMm: minute.miss === null ? null : roundSignificant(minute.miss.lateralM * 1000, 3),
      missAxialMm: minute.miss === null ? null : roundSignificant(minute.miss.axialM * 1000, 3),
      fluxKwm2: flux === null ? null : roundSignificant(flux, 3),
    }];
  });
}

/** Consecutive minutes with one verdict and reason. */
export function minuteRuns(judged: readonly JudgedMinute[]): readonly MinuteRun[] {
  const runs: { fromMs: number; count: number; verdict: MinuteRun['verdict']; reason: MinuteRun['reason'] }[] = [];
  for (const { sun, verdict, reason } of judged) {
    const last = runs.at(-1);
    if (last !== undefined && last.verdict === verdict && last.reason === reason) last.count++;
    else runs.push({ fromMs: sun.utcMs, count: 1, verdict, reason });
  }
  return runs.map(({ fromMs, count, verdict, reason }) => ({
    fromUtc: toIsoUtc(fromMs), toUtc: toIsoUtc(fromMs + count * minuteMs), minutes: count, verdict, reason,
  }));
}

export function totalsOf(judged: readonly JudgedMinute[]): ReconstructionResult['totals'] {
  const count = (verdict: JudgedMinute['verdict']): number => judged.reduce((sum, minute) => sum + (minute.verdict === verdict ? 1 : 0), 0);
  return { sunlit: count('sunlit'), notSunlit: count('not-sunlit'), cannotTell: count('cannot-tell') };
}

/** Minutes that no obstacle between sun and optic rules out, whether or not the beam meets the mark. */
export function lightReaches(minute: JudgedMinute): boolean {
  return minute.verdict !== 'not-sunlit' || minute.reason === 'beam-misses';
}

/**
 * Most telling minute: that of the least lateral miss among those in which light reaches the optic; without a mark the
 * one with the highest sun; null if the sun never rises in the window.
 */
export function bestMinute(judged: readonly JudgedMinute[]): JudgedMinute | null {
  const up = judged.filter((minute) => minute.reason !== 'night');
  const reached = up.filter(lightReaches);
  const pool = reached.length > 0 ? reached : up;
  const rank = (minute: JudgedMinute): number => minute.miss?.lateralM ?? 1e6 - minute.sun.apparentElevationDeg;
  return pool.reduce<JudgedMinute | null>((best, minute) => (best === null || rank(minute) < rank(best) ? minute : best), null);
}
