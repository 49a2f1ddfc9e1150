import type { HeatingResult } from '#app/physics/model/heating.ts';
import type { Check, TestName } from '#app/physics/model/tests.ts';
import { headingDifferenceDeg } from '#app/physics/alignment.ts';
import { sunshineThresholdWm2 } from '#app/physics/constants.ts';
import { lateralToleranceM, surveySigmaM } from '#app/physics/lit.ts';
import { degree, roundSignificant, roundTo, wrap180 } from '#app/physics/units.ts';
import type { FocusOutcome } from './focus-result.ts';
import type { Setting } from './setting.ts';
import { lightReaches, type JudgedMinute } from './window.ts';

/** What the checks look at besides the setting. */
export interface Evidence {
  readonly judged: readonly JudgedMinute[];
  readonly best: JudgedMinute | null;
  readonly focus: FocusOutcome | null;
  readonly heating: HeatingResult | null;
  readonly dwellAtBoundS: number | null;
}

function check(id: string, test: TestName, passed: boolean | null, margin: number | null, unit: string, sentence: string): Check {
  return { id, test, passed, margin: margin === null || !Number.isFinite(margin) ? null : roundSignificant(margin, 3), unit, sentence };
}

/** A margin in the words of a sentence: no more digits than it knows, and never a bare zero. */
function amount(value: number, unit: string): string {
  const size = Math.abs(value);
  const text = size < 0.1 ? 'less than 0.1' : size >= 10_000 ? String(Math.round(size / 1000) * 1000) : String(roundSignificant(size, size < 10 ? 2 : 3));
  return `${text}${unit === '°' ? '' : ' '}${unit}`;
}

function minutesText(minutes: number): string {
  const whole = Math.ceil(minutes);
  return `${whole} ${whole === 1 ? 'minute' : 'minutes'}`;
}

function greatest(minutes: readonly JudgedMinute[], value: (minute: JudgedMinute) => number | null): number | null {
  let best: number | null = null;
  for (const minute of minutes) {
    const here = value(minute);
    if (here !== null && (best === null || here > best)) best = here;
  }
  return best;
}

/** Apparent elevation of the centre below which the sun is surely under the horizon. [°] */
function surelyDownDeg(setting: Setting): number {
  return -0.27 - setting.scene.dipDeg - 0.3;
}

function horizonCheck(setting: Setting, { judged }: Evidence): Check {
  const top = greatest(judged, (minute) => minute.sun.apparentElevationDeg) ?? -90;
  const margin = top - surelyDownDeg(setting);
  return check('sun-above-horizon', 'geometry', margin >= 0, margin, '°',
    margin >= 0 ? `The sun stands up to ${roundTo(top, 1)}° high in the window.` : `The sun stays at least ${amount(margin, '°')} under the horizon through the whole window, dip and refraction allowed for.`);
}

function skylineCheck(setting: Setting, { judged }: Evidence): Check {
  const { skyline, skylineSigmaDeg } = setting.scene;
  if (skyline === null) return check('clears-skyline', 'geometry', null, null, '°', 'No skyline was recorded, so it cannot be tested.');
  const up = judged.filter((minute) => minute.reason !== 'night');
  const margin = greatest(up, (minute) => minute.sun.apparentElevationDeg - skyline.rangeDeg(minute.sun.azimuthDeg, 2 * skylineSigmaDeg).lowDeg + 2 * skylineSigmaDeg);
  const passed = margin === null ? null : margin >= 0;
  return check('clears-skyline', 'geometry', passed, margin, '°',
    passed === null || margin === null
      ? 'The sun is not up in the window, so the skyline was not tested.'
      : passed
        ? `The sun clears the skyline in the window, by up to ${amount(margin, '°')}.`
        : `The sun stays at least ${amount(margin, '°')} below the skyline through the whole window, survey error included.`);
}

function openingCheck(setting: Setting, { judged }: Evidence): Check {
  const { opening } = setting;
  if (opening === undefined) return check('through-opening', 'geometry', null, null, '°', 'No window or rooflight was recorded.');
  const up = judged.filter((minute) => minute.reason !== 'night');
  const { lowestElevationDeg: lowest = -90, highestElevationDeg: highest = 90 } = opening;
  const margin = greatest(up, ({ sun }) => Math.min(
    opening.halfWidthDeg + 2 * opening.azimuthSigmaDeg - Math.abs(wrap180(sun.azimuthDeg - opening.azimuthDeg)),
    sun.apparentElevationDeg - lowest,
    highest - sun.apparentElevationDeg,
  ));
  const passed = margin === null ? null : margin >= 0;
  return check('through-opening', 'geometry', passed, margin, '°',
    passed === null || margin === null
      ? 'The sun is not up in the window, so the opening was not tested.'
      : passed
        ? 'The sun stands in front of the opening at some minute.'
        : `The sun stays at least ${amount(margin, '°')} outside what the opening lets in, through the whole window, bearing error included.`);
}

/** Made only where openings or bars were surveyed by their corners. */
function frameChecks(setting: Setting, { judged }: Evidence): Check[] {
  const { mask } = setting.scene;
  if (mask === null) return [];
  const tried = judged.filter((minute) => minute.reason === 'blocked' || (lightReaches(minute) && (minute.beam !== null || setting.model === null)));
  const stopped = tried.filter((minute) => minute.reason === 'blocked').length;
  const passed = tried.length === 0 ? null : stopped < tried.length;
  const sentence = passed === null
    ? 'No minute was left in which openings and bars could be tested.'
    : passed
      ? `Openings and bars let some of the light through in ${tried.length - stopped} of ${tried.length} minutes.`
      : `Openings and bars stop every ray in all ${tried.length} minutes in which the sun could otherwise reach the optic.`;
  return [check('clears-frame', 'geometry', passed, passed === null ? null : tried.length - stopped, 'min', sentence)];
}

function sideCheck(setting: Setting, { judged }: Evidence): Check {
  const { model } = setting;
  if (model === null) return check('working-side', 'geometry', null, null, '°', 'The optic is unknown.');
  const lit = judged.some((minute) => minute.beam !== null);
  return check('working-side', 'geometry', lit, null, '°',
    lit ? 'The sun meets the working face of the optic in the window.' : 'The sun never meets the working face of the optic in the window.');
}

function declinationCheck(setting: Setting): Check {
  const { required, mark, model } = setting;
  if (model === null || mark === null || model.moves) {
    return check('required-declination', 'geometry', null, null, '°', model?.moves === true ? 'The optic was free to move.' : 'Needs the optic and the mark.');
  }
  if (required === null) return check('required-declination', 'geometry', false, null, '°', 'No direction of the sun sends the focus to the mark: the optic throws no light to that side.');
  const survey = (2 * surveySigmaM(mark)) / mark.distanceM / degree;
  const margin = 23.44 + 0.32 + survey - Math.abs(required.declinationDeg);
  return check('required-declination', 'geometry', required.reachable, margin, '°',
    required.reachable
      ? `The mark asks for a sun at declination ${roundTo(required.declinationDeg, 2)}°, which the year offers.`
      : `The mark asks for a sun at declination ${roundTo(required.declinationDeg, 2)}°, ${amount(margin, '°')} beyond any day of the year, survey error included.`);
}

function missChecks(setting: Setting, { best }: Evidence): Check[] {
  const { mark, model, reach } = setting;
  const miss = best?.miss ?? null;
  if (model === null || mark === null || reach === null || miss === null || best === null || !lightReaches(best)) {
    return [check('focus-beside-mark', 'geometry', null, null, 'mm', 'Needs the optic, the mark and light on the optic.')];
  }
  const lateral = (lateralToleranceM(reach, mark, model.focusKind) + 2 * surveySigmaM(mark) - miss.lateralM) * 1000;
  const near = miss.alongM - reach.nearM;
  const far = reach.farM - miss.alongM;
  const axial = (Math.min(near, far) + 2 * mark.sigmaAxialM) * 1000;
  return [
    check('focus-beside-mark', 'geometry', lateral >= 0, lateral, 'mm',
      `At its closest the focus passes ${amount(miss.lateralM * 1000, 'mm')} beside the mark${lateral < 0 ? `, ${amount(lateral, 'mm')} more than spot, mark and survey error allow` : ''}.`),
    check('mark-within-depth', 'geometry', axial >= 0, axial, 'mm',
      `The mark lies ${amount(miss.axialM * 1000, 'mm')} ${miss.axialM >= 0 ? 'beyond' : 'short of'} the sharpest distance${axial < 0 ? `, ${amount(axial, 'mm')} outside the stretch in which the light is strong enough, survey error included` : ''}.`),
  ];
}

function fluxCheck(setting: Setting, { focus, best }: Evidence): Check {
  const { reach } = setting;
  if (focus === null || reach === null || best === null || !lightReaches(best)) return check('flux-in-clean-air', 'energy', null, null, 'kW/m²', 'Needs the optic, the mark and light on the optic.');
  if (best.sun.apparentElevationDeg < 3) return check('flux-in-clean-air', 'energy', null, null, 'kW/m²', 'Below 3° no clear-sky figure holds, so flux cannot refute.');
  const highest = focus.hotSpotKwm2.high + focus.besideKwm2;
  const margin = highest - reach.thresholdKwm2;
  return check('flux-in-clean-air', 'energy', margin >= 0, margin, 'kW/m²',
    `In the cleanest air the hot spot gives ${roundSignificant(highest, 2)} kW/m² on 5 mm${focus.besideKwm2 > 0 ? ', direct sun on the target included' : ''}; the target needs ${roundSignificant(reach.thresholdKwm2, 2)} at least${margin < 0 ? `, ${amount(margin, 'kW/m²')} more` : ''}.`);
}

function dwellCheck({ best, heating, dwellAtBoundS }: Evidence): Check {
  if (best === null || !lightReaches(best) || heating === null || dwellAtBoundS === null || heating.outcomes.length === 0) {
    return check('dwell-long-enough', 'energy', null, null, 's', 'Needs the target material and the motion of the spot.');
  }
  const refused = heating.outcomes.every((outcome) => outcome.answer === 'not reached');
  const unknown = heating.outcomes.some((outcome) => outcome.timeS === null);
  const fastest = heating.outcomes.reduce((least, outcome) => Math.min(least, outcome.timeS?.low ?? Number.POSITIVE_INFINITY), Number.POSITIVE_INFINITY);
  const margin = Number.isFinite(fastest) ? 3 * dwellAtBoundS - fastest : null;
  const passed = refused ? false : unknown && margin === null ? null : true;
  const rests = `the spot rests on one point for ${amount(dwellAtBoundS, 's')} at most`;
  const sentence = passed === null
    ? 'No time to an effect is on file for this target, so the time on one point cannot be tested.'
    : passed
      ? 'The spot rests long enough for at least one effect on file.'
      : margin === null
        ? `Even in the cleanest air and charred black, no effect on file is reached at this flux; ${rests}.`
        : `Even in the cleanest air and charred black, the fastest effect on file takes ${amount(fastest, 's')}; ${rests}.`;
  return check('dwell-long-enough', 'energy', passed, margin, 's', sentence);
}

function overcastCheck(setting: Setting, { judged }: Evidence): Check {
  const { series } = setting;
  if (series === null) return check('sun-shone', 'weather', null, null, 'W/m²', 'No measured or archived irradiance covers the window.');
  const lit = judged.filter((minute) => minute.verdict !== 'not-sunlit' || minute.reason === 'beam-misses');
  const relevant = lit.length > 0 ? lit : judged.filter((minute) => minute.reason !== 'night');
  const values = relevant.map((minute) => series.at(minute.sun.utcMs));
  const known = values.filter((value) => value !== null);
  if (known.length === 0) return check('sun-shone', 'weather', null, null, 'W/m²', 'The irradiance record does not cover the minutes in question.');
  const highest = Math.max(...known);
  // An hour's mean can hide a clear gap of minutes; it refutes only if the hour was dark throughout.
  const threshold = series.basis === 'measured' ? sunshineThresholdWm2 : 10;
  const dark = highest < threshold;
  const covered = known.length === values.length;
  return check('sun-shone', 'weather', dark ? (covered ? false : null) : highest >= sunshineThresholdWm2 ? true : null, highest - threshold, 'W/m²',
    dark ? `Direct irradiance stayed at or below ${Math.round(highest)} W/m² through the whole window; ${series.basis === 'measured' ? 'sunshine begins at' : 'an hourly mean refutes only under'} ${threshold} W/m².` : `Direct irradiance reached ${Math.round(highest)} W/m² in the window.`);
}

function trailChecks(setting: Setting, { best, focus, judged }: Evidence): Check[] {
  const { mark, model } = setting;
  if (mark === null || model === null || focus === null || best === null || !lightReaches(best)) return [check('trail-heading', 'mark', null, null, '°', 'Needs the optic, the mark and light on the optic.')];
  const list: Check[] = [];
  const computed = focus.result.trailHeadingDeg;
  if (mark.trailHeadingDeg === null || computed === null) {
    list.push(check('trail-heading', 'mark', null, null, '°', 'No direction of the trail was recorded.'));
  } else {
    const off = Math.abs(headingDifferenceDeg(mark.trailHeadingDeg, computed));
    list.push(check('trail-heading', 'mark', off <= 90 ? true : off > 135 ? false : null, 135 - off, '°',
      `The trail runs towards ${roundTo(mark.trailHeadingDeg, 0)}°, the computed motion towards ${roundTo(computed, 0)}°${off > 135 ? `: ${amount(off, '°')} apart` : ''}.`));
  }
  const needed = focus.result.trailMinutesAtLeast;
  if (model.focusKind === 'line') {
    list.push(check('trail-time', 'mark', null, null, 'min', 'A line focus makes a long mark at once: its length carries no time.'));
  } else if (needed === 0 && mark.halfLengthM > 0) {
    list.push(check('trail-time', 'mark', null, null, 'min', 'The mark is no longer than the spot is wide: its length carries no time.'));
  } else if (needed !== null && mark.halfLengthM > 0) {
    const available = judged.filter((minute) => minute.verdict !== 'not-sunlit').length;
    list.push(check('trail-time', 'mark', available >= needed, available - needed, 'min',
      `The trail needs at least ${minutesText(needed)} of sun; the window offers ${available} that ${available === 1 ? 'is' : 'are'} not ruled out${available < needed ? `, ${minutesText(needed - available)} too few` : ''}.`));
  }
  return list;
}

/** Every way in which the hypothesis could be contradicted, each with its margin. */
export function contradictionChecks(setting: Setting, evidence: Evidence): readonly Check[] {
  return [
    horizonCheck(setting, evidence), skylineCheck(setting, evidence), openingCheck(setting, evidence), ...frameChecks(setting, evidence), sideCheck(setting, evidence),
    declinationCheck(setting), ...missChecks(setting, evidence), overcastCheck(setting, evidence), fluxCheck(setting, evidence),
    dwellCheck(evidence), ...trailChecks(setting, evidence),
  ];
}
