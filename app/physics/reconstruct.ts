import { engineVersion, type HeatingResult, type ReconstructionInput, type ReconstructionResult } from './model.ts';
import { heatingOf } from '#app/physics/heating/outcomes.ts';
import { spannedDeg, surveySigmaM } from './lit.ts';
import { bestMoment, lightAt } from '#app/physics/reconstruction/best-moment.ts';
import { contradictionChecks } from '#app/physics/reconstruction/checks.ts';
import { focusOf, lightBand, type FocusOutcome } from '#app/physics/reconstruction/focus-result.ts';
import { sampleAt, samplingResult } from '#app/physics/reconstruction/sampling-run.ts';
import { settle, type Setting } from '#app/physics/reconstruction/setting.ts';
import { gradeOf, summarise } from '#app/physics/reconstruction/test-summaries.ts';
import { warningsOf } from '#app/physics/reconstruction/warnings.ts';
import { traceAt, tracerAssumptions } from '#app/physics/reconstruction/traced-focus.ts';
import { bestMinute, judgeWindow, minuteResults, minuteRuns, totalsOf } from '#app/physics/reconstruction/window.ts';
import { recurrenceBands, yearMinutes } from './recurrence.ts';
import { daylightOn } from '#app/physics/sun/daylight.ts';
import { spotMotion } from './trail.ts';
import { localDay, nextDay } from '#app/physics/sun/zone-days.ts';
import { inRange, parseUtc, roundTo, toIsoUtc } from './units.ts';

/** Least and greatest angular tolerance of the recurrence: the sun's radius, and what a rough survey may widen it to. [°] */
const recurrenceToleranceDeg = [0.27, 2] as const;

function daylightOf(setting: Setting): ReconstructionResult['daylight'] {
  const { zone, observer } = setting.site;
  const days: ReconstructionResult['daylight'][number][] = [];
  const lastDay = localDay(Math.max(setting.startMs, setting.endMs - 1), zone);
  for (let day = localDay(setting.startMs, zone); day <= lastDay; day = nextDay(day)) {
    const { sunriseMs, sunsetMs, polar } = daylightOn(day, zone, observer);
    const instant = (utcMs: number | null): string | null => (utcMs === null ? null : toIsoUtc(Math.round(utcMs / 1000) * 1000));
    days.push({ on: day, sunriseUtc: instant(sunriseMs), sunsetUtc: instant(sunsetMs), polar });
  }
  return days;
}

function recurrenceOf(setting: Setting): ReconstructionResult['recurrence'] {
  const { required, mark, reach, site, input } = setting;
  if (required === null || mark === null || reach === null || !required.reachable) return [];
  const spotDeg = spannedDeg(reach.spotRadiusM + mark.halfWidthM, mark.distanceM);
  const surveyDeg = spannedDeg(surveySigmaM(mark), mark.distanceM);
  const [least, most] = recurrenceToleranceDeg;
  const startMs = input.recurrenceFromUtc === undefined ? setting.endMs : parseUtc(input.recurrenceFromUtc, 'recurrenceFromUtc');
  const endMs = input.recurrenceToUtc === undefined ? startMs + yearMinutes * 60_000 : parseUtc(input.recurrenceToUtc, 'recurrenceToUtc');
  if (endMs <= startMs) throw new RangeError('recurrenceFromUtc and recurrenceToUtc disagree: the span must end after it starts.');
  inRange('length of the recurrence span', (endMs - startMs) / 86_400_000, 0, 5 * 366, 'days');
  return recurrenceBands({
    observer: site.observer, zone: site.zone, required,
    startMs: Math.ceil(startMs / 60_000) * 60_000,
    minutes: spanMinutes(startMs, input.recurrenceToUtc),
    toleranceDeg: Math.min(most, Math.hypot(least, spotDeg, surveyDeg)),
    skyline: setting.scene.skyline,
    opening: setting.opening,
  });
}

/** Length of the calendar: a year, or up to the stated end, at most five years. [min] */
function spanMinutes(startMs: number, toUtc: string | undefined): number {
  if (toUtc === undefined) return yearMinutes;
  const minutes = Math.ceil((parseUtc(toUtc, 'recurrenceToUtc') - startMs) / 60_000);
  if (minutes <= 0 || minutes > 5 * 366 * 1440) throw new RangeError('recurrenceToUtc must lie after recurrenceFromUtc, by five years at most.');
  return minutes;
}

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
  const total = setting.track.length + 4;
  const judged = judgeWindow(setting, (done) => {
    if (done % 500 === 0) onProgress(done, total);
  });
  const best = bestMinute(judged);
  const light = best === null ? null : lightAt(best, setting);
  const motion = best === null || setting.model === null || setting.mark === null ? null : spotMotion(setting.model, setting.mark, setting.site.observer, best.sun.utcMs);
  const traced = best === null || best.beam === null ? null : traceAt(best, best.beam, motion, setting);
  onProgress(total - 3, total);
  const calibration = traced?.calibration ?? (() => 1);
  const sampling = best === null || light === null ? null : sampleAt(judged, best, light, calibration, setting);
  const parts = light === null ? null : { light: lightBand(light, sampling), sampling, traced, motion };
  const focus = best === null || parts === null || best.beam === null ? null : focusOf(best, best.beam, parts, setting);
  const heating = heatingAt(focus, setting);
  onProgress(total - 2, total);
  const checks = contradictionChecks(setting, { judged, best, focus, heating, dwellAtBoundS: focus?.harmfulDwellS?.high ?? null });
  const findings = { checks, totals: totalsOf(judged), best, focus, heating, sampling };
  const tests = summarise(setting, findings);
  const recurrence = recurrenceOf(setting);
  onProgress(total, total);
  const { required } = setting;
  return {
    engineVersion,
    seed: input.seed,
    window: { startUtc: toIsoUtc(setting.startMs), endUtc: toIsoUtc(setting.endMs), minutes: judged.length },
    daylight: daylightOf(setting),
    minutes: minuteResults(judged, calibration, setting),
    runs: minuteRuns(judged),
    totals: findings.totals,
    best: best === null ? null : bestMoment(best, setting),
    focus: focus?.result ?? null,
    heating,
    recurrence,
    requiredSun: required === null ? null : {
      azimuthDeg: roundTo(required.azimuthDeg, 3),
      apparentElevationDeg: roundTo(required.apparentElevationDeg, 3),
      declinationDeg: roundTo(required.declinationDeg, 3),
      reachable: required.reachable,
    },
    checks,
    tests,
    grade: gradeOf(setting, findings, tests),
    sampling: sampling === null ? null : samplingResult(sampling, setting),
    assumptions: traced === null ? setting.assumptions : [...setting.assumptions, ...tracerAssumptions(traced)],
    warnings: warningsOf(setting, judged, best, light),
  };
}
