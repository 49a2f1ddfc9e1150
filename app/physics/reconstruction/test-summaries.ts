import type { HeatingResult } from '#app/physics/model/heating.ts';
import type { ReconstructionResult } from '#app/physics/model/result.ts';
import type { Check, Grade, TestName, TestResult, TestSummary } from '#app/physics/model/tests.ts';
import { sunshineThresholdWm2 } from '#app/physics/constants.ts';
import { lateralToleranceM } from '#app/physics/lit.ts';
import { focusesForward } from '#app/physics/reach.ts';
import type { Sampling } from '#app/physics/uncertainty.ts';
import { roundSignificant, roundTo } from '#app/physics/units.ts';
import type { FocusOutcome } from './focus-result.ts';
import type { Setting } from './setting.ts';
import { lightReaches, type JudgedMinute } from './window.ts';

export interface Findings {
  readonly checks: readonly Check[];
  readonly totals: ReconstructionResult['totals'];
  readonly best: JudgedMinute | null;
  readonly focus: FocusOutcome | null;
  readonly heating: HeatingResult | null;
  readonly sampling: Sampling | null;
}

function failed(findings: Findings, test: TestName): Check | null {
  return findings.checks.find((check) => check.test === test && check.passed === false) ?? null;
}

function geometry(setting: Setting, findings: Findings): TestSummary {
  const { mark, reach, model } = setting;
  const { totals, best, sampling } = findings;
  const test = 'geometry';
  const miss = best?.miss ?? null;
  const margin = model === null || mark === null || reach === null || miss === null
    ? null
    : {
        value: roundSignificant(miss.lateralM * 1000, 3),
        low: roundSignificant(Math.min(sampling?.lateralM.low ?? miss.lateralM, miss.lateralM) * 1000, 3),
        high: roundSignificant(Math.max(sampling?.lateralM.high ?? miss.lateralM, miss.lateralM) * 1000, 3),
        unit: 'mm beside the mark',
        agreeFrom: 0,
        agreeTo: roundSignificant(lateralToleranceM(reach, mark, model.focusKind) * 1000, 3),
      };
  const contradiction = failed(findings, test);
  if (contradiction !== null) return { test, result: 'contradicts', sentence: contradiction.sentence, margin };
  if (totals.sunlit > 0) return { test, result: 'supports', sentence: `The focus lies on the mark in ${totals.sunlit} ${totals.sunlit === 1 ? 'minute' : 'minutes'} of the window.`, margin };
  if (totals.cannotTell === 0) return { test, result: 'contradicts', sentence: 'The mark is in focused sunlight at no minute of the window.', margin };
  if (model === null || mark === null) {
    return { test, result: 'inconclusive', sentence: `The ${model === null ? 'optic' : 'mark'} is unknown; only sun, skyline and opening were tested.`, margin };
  }
  return { test, result: 'inconclusive', sentence: `Survey error, refraction or an unknown skyline leave ${totals.cannotTell} ${totals.cannotTell === 1 ? 'minute' : 'minutes'} undecided.`, margin };
}

function weather(setting: Setting, findings: Findings): TestSummary {
  const test = 'weather';
  const shone = findings.checks.find((check) => check.id === 'sun-shone');
  const { series } = setting;
  if (series === null || shone === undefined) {
    return { test, result: 'not tested', sentence: 'No irradiance record was given; fluxes go by a clear sky.', margin: null };
  }
  const values = series.within(setting.startMs, setting.endMs).map((row) => row.dniWm2);
  const margin = values.length === 0
    ? null
    : {
        value: Math.round(values.reduce((sum, value) => sum + value, 0) / values.length),
        low: Math.round(Math.min(...values)), high: Math.round(Math.max(...values)),
        unit: 'W/m² direct', agreeFrom: sunshineThresholdWm2, agreeTo: null,
      };
  let result: TestResult = 'inconclusive';
  if (shone.passed === false) result = 'contradicts';
  else if (shone.passed === true && series.basis === 'measured') result = 'supports';
  return { test, result, sentence: shone.sentence, margin };
}

function energy(setting: Setting, findings: Findings): TestSummary {
  const test = 'energy';
  const { focus, heating, sampling } = findings;
  const { reach, material } = setting;
  if (focus === null || reach === null) return { test, result: 'not tested', sentence: 'Needs the optic, the mark and light on the optic.', margin: null };
  const flux = focus.hotSpotKwm2;
  const margin = {
    value: roundSignificant(flux.mid, 3),
    low: roundSignificant(Math.min(flux.low, sampling?.fluxKwm2.low ?? flux.low), 3),
    high: roundSignificant(flux.high, 3),
    unit: 'kW/m² on 5 mm', agreeFrom: roundSignificant(reach.thresholdKwm2, 3), agreeTo: null,
  };
  const contradiction = failed(findings, test);
  if (contradiction !== null) return { test, result: 'contradicts', sentence: contradiction.sentence, margin };
  if (findings.best === null || !lightReaches(findings.best)) {
    return { test, result: 'inconclusive', sentence: 'Light does not reach the optic in this window; the figures hold for an unobstructed sun.', margin };
  }
  const reached = heating?.outcomes.find((outcome) => outcome.answer === 'reached');
  if (reached !== undefined) return { test, result: 'supports', sentence: reached.sentence, margin };
  return { test, result: material === null ? 'not tested' : 'inconclusive', sentence: undecidedWords(heating), margin };
}

/** Why the energy test stays open: the material, what is not on file, or an effect that the likely case does not reach. */
function undecidedWords(heating: HeatingResult | null): string {
  if (heating === null) return 'The target material is unknown.';
  const [first] = heating.outcomes;
  if (first !== undefined && heating.outcomes.every((outcome) => outcome.timeS === null && outcome.answer === 'cannot tell')) return first.sentence;
  return 'In the likely case no effect is reached within the time that the spot rests on one point; in the most favourable case one may be.';
}

function markTest(setting: Setting, findings: Findings): TestSummary {
  const test = 'mark';
  const own = findings.checks.filter((check) => check.test === test);
  const contradiction = failed(findings, test);
  const needed = findings.focus?.result.trailMinutesAtLeast ?? null;
  const available = findings.totals.sunlit + findings.totals.cannotTell;
  const margin = needed === null || setting.mark === null || setting.mark.halfLengthM === 0
    ? null
    : { value: roundTo(needed, 1), low: roundTo(needed, 1), high: roundTo(needed, 1), unit: 'min of sun', agreeFrom: 0, agreeTo: available };
  if (contradiction !== null) return { test, result: 'contradicts', sentence: contradiction.sentence, margin };
  const passed = own.filter((check) => check.passed === true);
  const first = passed[0];
  if (first !== undefined) return { test, result: 'supports', sentence: first.sentence, margin };
  const line = own.find((check) => check.id === 'trail-time' && check.passed === null);
  if (line !== undefined) return { test, result: 'inconclusive', sentence: line.sentence, margin };
  return { test, result: 'not tested', sentence: 'Neither length nor direction of a trail was recorded.', margin };
}

export function summarise(setting: Setting, findings: Findings): readonly TestSummary[] {
  return [geometry(setting, findings), weather(setting, findings), energy(setting, findings), markTest(setting, findings)];
}

/** Grade words only: the engine states no cause. */
export function gradeOf(setting: Setting, findings: Findings, tests: readonly TestSummary[]): Grade {
  const refuted = findings.checks.filter((check) => check.passed === false).map((check) => check.sentence);
  const contradicted = tests.filter((summary) => summary.result === 'contradicts').map((summary) => summary.sentence);
  const against = [...new Set([...refuted, ...contradicted])];
  if (against.length > 0) return { word: 'inconsistent because', because: against };
  const missing: string[] = [];
  if (setting.model === null) missing.push('The optic is unknown.');
  if (setting.mark === null) missing.push('The place of the mark is unknown.');
  if (setting.model !== null && setting.reach === null && setting.mark !== null) {
    missing.push(focusesForward(setting.model) ? 'No sun of the window meets the working face of the optic.' : 'As described the optic spreads sunlight instead of focusing it; measure its curve again.');
  }
  if (missing.length > 0) return { word: 'cannot tell because', because: missing };
  const open = tests.filter((summary) => summary.result !== 'supports').map((summary) => `${summary.test}: ${summary.sentence}`);
  return open.length === 0 ? { word: 'consistent', because: [] } : { word: 'not refuted', because: open };
}
