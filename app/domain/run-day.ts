import type { ReconstructionInput } from '#app/physics/model/input.ts';
import type { ReconstructionResult } from '#app/physics/model/result.ts';
import { settleSite } from '#app/physics/site.ts';
import { clearSkyAt } from '#app/physics/sky/clear-sky.ts';
import { extraterrestrialWm2 } from '#app/physics/sky/extraterrestrial.ts';
import { solarPosition } from '#app/physics/sun/solar-position.ts';
import { localDay, nextDay, startOfLocalDay } from '#app/physics/sun/zone-days.ts';

export interface SkyDirection {
  readonly azimuthDeg: number;
  readonly elevationDeg: number;
}
export interface IrradianceSample {
  readonly atUtc: string;
  readonly wm2: number;
}

const pathStepMs = 600_000;
const curvePoints = 120;
const to2 = (value: number): number => Math.round(value * 100) / 100;

const dayMs = 86_400_000;

/** Local day of the best minute; of the longest sunlit stretch, or the beginning, where there is none. */
export function bestDay(result: ReconstructionResult, zone: string): string {
  const longest = result.runs.filter((run) => run.verdict === 'sunlit').reduce<(typeof result.runs)[number] | null>((best, run) => (best && best.minutes >= run.minutes ? best : run), null);
  return localDay(Date.parse(result.best?.atUtc ?? longest?.fromUtc ?? result.window.startUtc), zone);
}

/** What an axis of irradiance holds: the window and a little more; of a window longer than a day, the daylight of one day. */
export function irradianceSpan(window: { readonly startUtc: string; readonly endUtc: string }, day: string, zone: string, light: { readonly riseUtc: string; readonly setUtc: string } | null): { readonly fromUtc: string; readonly toUtc: string } {
  const [startMs, endMs] = [Date.parse(window.startUtc), Date.parse(window.endUtc)];
  const iso = (ms: number) => new Date(ms).toISOString();
  if (endMs - startMs > dayMs) return light ? { fromUtc: iso(Date.parse(light.riseUtc)), toUtc: iso(Date.parse(light.setUtc)) } : { fromUtc: iso(startOfLocalDay(day, zone)), toUtc: iso(startOfLocalDay(nextDay(day), zone)) };
  const margin = Math.max(1_800_000, (endMs - startMs) * 0.2);
  return { fromUtc: iso(startMs - margin), toUtc: iso(endMs + margin) };
}

/** Path of the sun over one local day, every ten minutes while it is up. */
export function pathOfDay(input: ReconstructionInput, day: string): SkyDirection[] {
  const { observer } = settleSite(input);
  const endMs = startOfLocalDay(nextDay(day), input.place.zone);
  const path: SkyDirection[] = [];
  for (let utcMs = startOfLocalDay(day, input.place.zone); utcMs < endMs; utcMs += pathStepMs) {
    const sun = solarPosition(utcMs, observer);
    if (sun.apparentElevationDeg > -1) path.push({ azimuthDeg: to2(sun.azimuthDeg), elevationDeg: to2(sun.apparentElevationDeg) });
  }
  return path;
}

/** The solstices and an equinox of the year of the window, for comparison. */
export function referencePaths(input: ReconstructionInput): { label: string; points: SkyDirection[] }[] {
  const year = localDay(Date.parse(input.window.startUtc), input.place.zone).slice(0, 4);
  return [['21 Jun', '06-21'], ['20 Mar', '03-20'], ['21 Dec', '12-21']].map(([label = '', day = '']) => ({ label, points: pathOfDay(input, `${year}-${day}`) }));
}

/** Clear-sky direct irradiance before the optic through a stretch of time: the clean-air bound and the likely value. */
export function clearSkyCurve(input: ReconstructionInput, fromUtc: string, toUtc: string): { bound: IrradianceSample[]; likely: IrradianceSample[] } {
  const { observer, air } = settleSite(input);
  const [fromMs, toMs] = [Date.parse(fromUtc), Date.parse(toUtc)];
  const stepMs = Math.max(60_000, Math.ceil((toMs - fromMs) / curvePoints / 60_000) * 60_000);
  const bound: IrradianceSample[] = [];
  const likely: IrradianceSample[] = [];
  for (let utcMs = fromMs; utcMs <= toMs; utcMs += stepMs) {
    const sun = solarPosition(utcMs, observer);
    const sky = clearSkyAt(sun.apparentElevationDeg, extraterrestrialWm2(sun.distanceAu, air.solarConstantWm2), observer.elevationM, air);
    if (!sky) continue;
    const atUtc = new Date(utcMs).toISOString();
    bound.push({ atUtc, wm2: Math.round(sky.boundWm2) });
    likely.push({ atUtc, wm2: Math.round(sky.likelyWm2) });
  }
  return { bound, likely };
}
