import type { HeatingResult, TargetOutcome } from '#app/physics/model/heating.ts';
import type { TargetInput } from '#app/physics/model/input.ts';
import type { Band, SourceRef } from '#app/physics/model/stated.ts';
import { zeroCelsiusK } from '#app/physics/constants.ts';
import { roundSignificant } from '#app/physics/units.ts';
import { steadySurfaceK, surfaceTemperatureK, type HeatedBody, type SpotSurroundings } from './heat-balance.ts';
import { coneAbsorptance, ignitionTime } from './ignition.ts';
import { burnTime, stollSource } from './skin-burn.ts';
import type { TargetMaterial } from './target-material.ts';

/** Steady light on one point of the target. */
export interface Exposure {
  /** Flux on the 5 mm disc: low, likely, and with the cleanest air. [kW/m²] */
  readonly fluxKwm2: Band;
  /** Seconds for which the spot stays on one point: least, likely, most. */
  readonly dwellS: Band;
  readonly airC: number;
  /** Radius of the lit spot, for the sideways loss. [m] */
  readonly spotRadiusM: number;
}

const charringC = 250;
const charringSource: SourceRef = {
  text: 'V. Babrauskas, Ignition of wood: a review of the state of the art, Interflam 2001 (250 °C at the minimum flux)', verified: true,
};
const notFound: SourceRef = { text: 'no measured value found', verified: false };

/** A time must miss the dwell by more than this before it speaks against an effect. */
const clearlyTooSlow = 3;

/** Absorptances at the two ends: fresh with the lowest value, charred or darkest with the highest. */
export function absorptanceBand(material: TargetMaterial, given: number | undefined): Band | null {
  if (given !== undefined) return { low: given, mid: given, high: Math.max(given, material.absorptanceCharred?.high ?? given) };
  const fresh = material.absorptanceFresh;
  if (fresh === null) return null;
  const high = Math.max(fresh.high, material.absorptanceCharred?.high ?? fresh.high);
  return { low: fresh.low, mid: (fresh.low + fresh.high) / 2, high };
}

function bodyOf(material: TargetMaterial, target: TargetInput): HeatedBody | null {
  const { conductivityWmk, densityKgm3, heatCapacityJkgk } = material;
  if (conductivityWmk === null || densityKgm3 === null || heatCapacityJkgk === null) return null;
  const sheetM = target.thicknessM ?? material.thicknessM;
  // Thicker than 2 mm, a poor conductor no longer heats through in the time of a passing spot.
  return { conductivityWmk, densityKgm3, heatCapacityJkgk, sheetM: sheetM !== null && (sheetM <= 0.002 || conductivityWmk > 1) ? sheetM : null };
}

/** First time at which the surface reaches a temperature; null if never. [s] */
function timeToReachS(celsius: number, absorbedWm2: number, body: HeatedBody, exposure: Exposure, around: SpotSurroundings): number | null {
  const reached = (seconds: number): boolean =>
    surfaceTemperatureK(absorbedWm2, body, exposure.spotRadiusM, seconds, around) - zeroCelsiusK >= celsius;
  if (!reached(86_400)) return null;
  let low = -3;
  let high = Math.log10(86_400);
  for (let step = 0; step < 30; step++) {
    const middle = (low + high) / 2;
    if (reached(10 ** middle)) high = middle;
    else low = middle;
  }
  return 10 ** high;
}

/** Band of times from the most to the least favourable case, and the answer it gives against the dwell. */
function answerFrom(fastS: number | null, likelyS: number | null, slowS: number | null, dwell: Band): Pick<TargetOutcome, 'answer' | 'timeS'> {
  if (fastS === null) return { answer: 'not reached', timeS: null };
  const mid = likelyS ?? slowS;
  const timeS = mid === null ? null : { low: fastS, mid, high: slowS ?? Number.NaN };
  const complete = timeS !== null && Number.isFinite(timeS.high) ? roundBand(timeS) : null;
  if (likelyS !== null && likelyS <= dwell.mid) return { answer: 'reached', timeS: complete };
  if (fastS > clearlyTooSlow * dwell.high) return { answer: 'not reached', timeS: complete };
  return { answer: 'cannot tell', timeS: complete };
}

export function roundBand(band: Band, digits = 3): Band {
  return { low: roundSignificant(band.low, digits), mid: roundSignificant(band.mid, digits), high: roundSignificant(band.high, digits) };
}

function seconds(value: number): string {
  return value < 100 ? `${roundSignificant(value, 2)} s` : `${Math.round(value / 60)} min`;
}

interface Context {
  readonly material: TargetMaterial;
  readonly absorptance: Band;
  readonly body: HeatedBody;
  readonly exposure: Exposure;
  readonly around: SpotSurroundings;
}

function temperatureWords(verb: string, range: string, likely: number | null, fast: number | null): string {
  if (fast === null) return `The surface ${verb} at ${range}, which it does not reach even in the cleanest air and with its darkest face.`;
  const earliest = `${seconds(fast)} of steady sun on one point at the earliest`;
  return likely === null ? `The surface ${verb} at ${range}: not at the likely flux, after ${earliest}.` : `The surface ${verb} at ${range}: after ${seconds(likely)} likely, ${earliest}.`;
}

/** Softening or scorching: the surface passes a temperature. */
function temperatureOutcome(
  id: 'softening' | 'scorch', context: Context, fromC: number, toC: number, verb: string, source: SourceRef,
): TargetOutcome {
  const { absorptance, body, exposure, around } = context;
  const time = (fluxKwm2: number, alpha: number, celsius: number): number | null =>
    timeToReachS(celsius, fluxKwm2 * 1000 * alpha, body, exposure, around);
  const fast = time(exposure.fluxKwm2.high, absorptance.high, fromC);
  const likely = time(exposure.fluxKwm2.mid, absorptance.mid, (fromC + toC) / 2);
  const slow = time(exposure.fluxKwm2.low, absorptance.low, toC);
  const range = fromC === toC ? `${fromC} °C` : `${fromC}–${toC} °C`;
  return {
    id,
    ...answerFrom(fast, likely, slow, exposure.dwellS),
    sentence: temperatureWords(verb, range, likely, fast),
    basis: 'surface heat balance of a small spot, fresh and charred absorptance as the two ends',
    sampleSizeMm: null,
    source,
  };
}

/** Flaming: measured times to piloted ignition of every product on file. */
function flamingOutcome(context: Context): TargetOutcome {
  const { material, absorptance, exposure } = context;
  const critical = material.criticalFlux;
  let extrapolated = false;
  const times = (fluxKwm2: number, alpha: number): number[] => {
    const effective = (alpha / coneAbsorptance) * fluxKwm2;
    if (critical !== null && effective < critical.low) return [];
    return material.ignition.flatMap((series) => {
      const time = ignitionTime(series, effective);
      extrapolated ||= time.extrapolated;
      return time.seconds ?? [];
    });
  };
  const base = { id: 'flaming', sampleSizeMm: 100 } as const;
  const first = material.ignition[0];
  if (first === undefined) {
    return {
      ...base, answer: 'cannot tell', timeS: null,
      sentence: 'No measured time to ignition by flux was found for this material.', basis: 'none', source: notFound,
    };
  }
  const fastTimes = times(exposure.fluxKwm2.high, absorptance.high);
  const likelyTimes = times(exposure.fluxKwm2.mid, absorptance.mid);
  const slowTimes = times(exposure.fluxKwm2.low, absorptance.low);
  const fast = fastTimes.length === 0 ? null : Math.min(...fastTimes);
  const likely = likelyTimes.length === 0 ? null : likelyTimes.reduce((sum, t) => sum + t, 0) / likelyTimes.length;
  const slow = slowTimes.length === 0 ? null : Math.max(...slowTimes);
  const found = answerFrom(fast, likely, slow, exposure.dwellS);
  // Samples of 100 mm with a spark cannot show that a spot of millimetres without one will flame.
  const answer = found.answer === 'reached' ? 'cannot tell' : found.answer;
  return {
    ...base, answer, timeS: found.timeS,
    sentence:
      fast === null
        ? 'Even in the cleanest air and charred black, the flux stays under the lowest that ignited samples with a spark.'
        : `Samples of 100 mm with a spark ${likely === null ? 'do not ignite' : `ignite in ${seconds(likely)}`} at the likely flux, ${likely === null ? 'and in ' : ''}${seconds(fast)} at the highest; a small spot without a spark needs more.`,
    basis: `measured time to piloted ignition: ${material.ignition.map((series) => series.product).join('; ')}${extrapolated ? '; extrapolated beyond the measured fluxes' : ''}`,
    source: first.source,
  };
}

function smoulderOutcome(context: Context): TargetOutcome | null {
  const { material, absorptance, exposure } = context;
  const base = { id: 'smoulder', timeS: null } as const;
  const row = material.smoulder;
  if (row === null) {
    if (!material.chars) return null;
    return {
      ...base, answer: 'cannot tell', sentence: 'No measured smouldering threshold was found for this material.',
      basis: 'none', sampleSizeMm: null, source: notFound,
    };
  }
  const likely = (absorptance.mid / coneAbsorptance) * exposure.fluxKwm2.mid;
  const highest = (absorptance.high / coneAbsorptance) * exposure.fluxKwm2.high;
  const answer = highest < row.low ? 'not reached' : 'cannot tell';
  return {
    ...base, answer,
    sentence: `Samples smouldered from ${row.low}–${row.high} kW/m², the small ones last; the likely absorbed equivalent here is ${roundSignificant(likely, 2)} kW/m². Exposures there lasted longer than a passing spot.`,
    basis: 'critical flux for smouldering', sampleSizeMm: row.sampleSizeMm, source: row.source,
  };
}

function skinOutcome(exposure: Exposure): TargetOutcome {
  const fast = burnTime(exposure.fluxKwm2.high);
  const likely = burnTime(exposure.fluxKwm2.mid);
  const slow = burnTime(exposure.fluxKwm2.low);
  return {
    id: 'skin-burn',
    ...answerFrom(fast.lowS, likely.midS, slow.highS, exposure.dwellS),
    sentence: `Bare skin held in the spot: second-degree burn after ${seconds(likely.midS)} likely, ${seconds(fast.lowS)} to ${seconds(slow.highS)} over the published relations; spots under 10 mm are borne longer.`,
    basis: 'Stoll table between two other published relations, wide beams',
    sampleSizeMm: null,
    source: stollSource,
  };
}

const sampleTimesS = [1, 3, 10, 30, 100, 300, 1000] as const;

/** Response of the target to the exposure. */
export function heatingOf(materialId: string, material: TargetMaterial, target: TargetInput, exposure: Exposure): HeatingResult {
  if (material.burnsSkin) return { materialId, surfaceTemperatureC: [], outcomes: [skinOutcome(exposure)] };
  const absorptance = absorptanceBand(material, target.solarAbsorptance);
  const body = bodyOf(material, target);
  const around: SpotSurroundings = { airK: exposure.airC + zeroCelsiusK, convectionWm2k: 10, emittance: 0.9 };
  const blank = (id: TargetOutcome['id'], sentence: string): TargetOutcome => ({
    id, answer: 'cannot tell', timeS: null, sentence, basis: 'none', sampleSizeMm: null, source: notFound,
  });
  if (absorptance === null || body === null || (material.absorbsInDepth && target.solarAbsorptance === undefined)) {
    const why = material.absorbsInDepth
      ? 'The material takes light in depth, so the surface formulas do not hold; give a measured absorptance if it is pigmented.'
      : 'Conductivity, density, heat capacity or absorptance of the material was not found.';
    const ids: TargetOutcome['id'][] = material.softeningC === null ? ['scorch', 'flaming'] : ['softening', 'flaming'];
    return { materialId, surfaceTemperatureC: [], outcomes: ids.map((id) => blank(id, why)) };
  }
  const context: Context = { material, absorptance, body, exposure, around };
  const celsius = (fluxKwm2: number, alpha: number, time: number): number =>
    surfaceTemperatureK(fluxKwm2 * 1000 * alpha, body, exposure.spotRadiusM, time, around) - zeroCelsiusK;
  const surfaceTemperatureC = sampleTimesS.map((timeS) => ({
    timeS,
    celsius: roundBand({
      low: celsius(exposure.fluxKwm2.low, absorptance.low, timeS),
      mid: celsius(exposure.fluxKwm2.mid, absorptance.mid, timeS),
      high: celsius(exposure.fluxKwm2.high, absorptance.high, timeS),
    }, 4),
  }));
  const outcomes: TargetOutcome[] = [];
  const soft = material.softeningC;
  if (soft !== null) outcomes.push(temperatureOutcome('softening', context, soft.low, soft.high, 'softens', soft.source));
  if (material.chars) outcomes.push(temperatureOutcome('scorch', context, charringC, charringC, 'begins to char', charringSource));
  const smoulder = smoulderOutcome(context);
  if (smoulder !== null) outcomes.push(smoulder);
  outcomes.push(flamingOutcome(context));
  return { materialId, surfaceTemperatureC, outcomes };
}

/**
 * Lowest flux that can harm a target. [kW/m²]
 *
 * For a sheet that softens, the flux that holds the darkest such surface at the softening point; else the lowest flux
 * that ignited it with a pilot, and 10 kW/m² where nothing is known.
 */
export function lowestHarmfulFluxKwm2(material: TargetMaterial | null, airC: number): number {
  const fallback = 10;
  if (material === null) return fallback;
  if (material.burnsSkin) return 4.5;
  if (material.softeningC !== null) {
    const alpha = absorptanceBand(material, undefined)?.high ?? 1;
    return softeningFluxKwm2(material.softeningC.low, airC, alpha);
  }
  return material.criticalFlux === null ? fallback : Math.min(material.criticalFlux.low, fallback);
}

function softeningFluxKwm2(celsius: number, airC: number, alpha: number): number {
  const around: SpotSurroundings = { airK: airC + zeroCelsiusK, convectionWm2k: 5, emittance: 0.9 };
  let low = 0;
  let high = 100_000;
  for (let step = 0; step < 60; step++) {
    const middle = (low + high) / 2;
    if (steadySurfaceK(alpha * middle, around) - zeroCelsiusK < celsius) low = middle;
    else high = middle;
  }
  return high / 1000;
}
