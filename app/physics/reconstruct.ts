import { engineVersion } from './model/engine-version.ts';
import type { HeatingResult } from './model/heating.ts';
import type { ReconstructionInput } from './model/input.ts';
import type { ReconstructionResult } from './model/result.ts';
import { heatingOf } from '#app/physics/heating/outcomes.ts';
import { bestMoment, lightAt } from '#app/physics/reconstruction/best-moment.ts';
import { daylightOf, recurrenceOf } from '#app/physics/reconstruction/calendar.ts';
import { contradictionChecks } from '#app/physics/reconstruction/checks.ts';
import { focusOf, lightBand, type FocusOutcome } from '#app/physics/reconstruction/focus-result.ts';
import { lightOnMark, sunsOnMark } from '#app/physics/reconstruction/light-on-mark.ts';
import { sampleAt, samplingResult, type SampledRun } from '#app/physics/reconstruction/sampling-run.ts';
import { settle, type Setting } from '#app/physics/reconstruction/setting.ts';
import { gradeOf, summarise } from '#app/physics/reconstruction/test-summaries.ts';
import { traceAt, tracerAssumptions, type TracedFocus } from '#app/physics/reconstruction/traced-focus.ts';
import { warningsOf } from '#app/physics/reconstruction/warnings.ts';
import { bestMinute, judgeWindow, minuteResults, minuteRuns, totalsOf, type JudgedMinute } from '#app/physics/reconstruction/window.ts';
import type { DirectBeam } from '#app/physics/sky/direct-beam.ts';
import { spotMotion } from './trail.ts';
import { roundTo, toIsoUtc } from './units.ts';

function heatingAt(focus: FocusOutcome | null, setting: Setting): HeatingResult | null {
  const { input, material, site } = setting;
  if (focus === null || material === null || input.target === undefined || focus.harmfulDwellS === null) return null;
  return heatingOf(input.target.materialId, material, input.target, {
    // Only the most favourable end counts on direct sun beside the focus.
    fluxKwm2: { ...focus.hotSpotKwm2, high: focus.hotSpotKwm2.high + focus.besideKwm2 },
    dwellS: focus.harmfulDwellS,
    airC: site.air.temperatureC,
    // Fluxes are means over 5 mm, so a finer core is not followed.
    spotRadiusM: Math.max(0.0025, focus.spotRadiusM),
  });
}

/** What the best minute gave: light, trace, samples, focus and heating. */
interface AtBest {
  readonly light: DirectBeam | null;
  readonly traced: TracedFocus | null;
  readonly sampled: SampledRun | null;
  readonly focus: FocusOutcome | null;
  readonly heating: HeatingResult | null;
}

function examineBest(best: JudgedMinute | null, judged: readonly JudgedMinute[], setting: Setting): AtBest {
  if (best === null) return { light: null, traced: null, sampled: null, focus: null, heating: null };
  const { model, mark, site } = setting;
  const { beam } = best;
  const light = lightAt(best, setting);
  const motion = model === null || mark === null ? null : spotMotion(model, mark, site.observer, best.sun.utcMs);
  const traced = beam === null ? null : traceAt(best, beam, motion, setting);
  const sampled = sampleAt(judged, best, { light, traced, motion }, setting);
  const sampling = sampled?.sampling ?? null;
  const focus = beam === null ? null : focusOf(best, beam, { light: lightBand(light, sampling), sampling, traced, motion }, setting);
  return { light, traced, sampled, focus, heating: heatingAt(focus, setting) };
}

function requiredSunOf({ required }: Setting): ReconstructionResult['requiredSun'] {
  if (required === null) return null;
  return {
    azimuthDeg: roundTo(required.azimuthDeg, 3),
    apparentElevationDeg: roundTo(required.apparentElevationDeg, 3),
    declinationDeg: roundTo(required.declinationDeg, 3),
    reachable: required.reachable,
  };
}

/** Steps after the minutes, for the progress: best minute, light on the mark, findings, recurrence. */
const stepsAfterMinutes = 4;

/**
 * Reconstructs one incident: sun, sky, skyline and opening, focus, target, uncertainty, findings and recurrence.
 *
 * Pure and deterministic: equal input gives equal output, byte for byte when written as JSON.
 *
 * @param onProgress Called now and then with the share done, for runs of over a second.
 * @throws RangeError for input out of range, with field, value and allowed interval, or naming two fields that disagree.
 */
export function reconstruct(input: ReconstructionInput, onProgress: (done: number, total: number) => void = () => undefined): ReconstructionResult {
  const setting = settle(input);
  const minutes = setting.track.length;
  const total = minutes + stepsAfterMinutes;
  const judged = judgeWindow(setting, (done) => {
    if (done % 500 === 0) onProgress(done, total);
  });
  const best = bestMinute(judged);
  const { light, traced, sampled, focus, heating } = examineBest(best, judged, setting);
  onProgress(minutes + 1, total);
  const suns = sunsOnMark(judged, best, traced?.calibration ?? (() => 1), setting);
  onProgress(minutes + 2, total);
  const checks = contradictionChecks(setting, { judged, best, focus, heating, dwellAtBoundS: focus?.harmfulDwellS?.high ?? null });
  const findings = { checks, totals: totalsOf(judged), best, focus, heating, sampling: sampled?.sampling ?? null };
  const tests = summarise(setting, findings);
  onProgress(minutes + 3, total);
  const recurrence = recurrenceOf(setting);
  onProgress(total, total);
  return {
    engineVersion,
    seed: input.seed,
    window: { startUtc: toIsoUtc(setting.startMs), endUtc: toIsoUtc(setting.endMs), minutes: judged.length },
    daylight: daylightOf(setting),
    minutes: minuteResults(judged, suns, setting),
    runs: minuteRuns(judged),
    totals: findings.totals,
    light: lightOnMark(judged, suns, setting),
    best: best === null ? null : bestMoment(best, setting),
    focus: focus?.result ?? null,
    heating,
    recurrence,
    requiredSun: requiredSunOf(setting),
    checks,
    tests,
    grade: gradeOf(setting, findings, tests),
    sampling: sampled === null ? null : samplingResult(sampled, setting),
    assumptions: traced === null ? setting.assumptions : [...setting.assumptions, ...tracerAssumptions(traced)],
    warnings: warningsOf(setting, judged, best, light),
  };
}
