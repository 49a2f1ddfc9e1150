import type { Beam } from '#app/physics/optics/closed-form/beam.ts';
import type { Band } from './model.ts';
import { normalQuantile, sobolPoints } from './random.ts';
import { clearSkyAt, type Air } from '#app/physics/sky/clear-sky.ts';
import { angstromExponent, classSigmaLn } from '#app/physics/sky/climate-classes.data.ts';

/** Concentration on a 5 mm disc against distance along and across the chief ray, computed once and read by samples. */
export interface ConcentrationTable {
  readonly read: (distanceM: number, offsetM: number) => number;
}

const alongSteps = 28;
const acrossSteps = 28;

/**
 * Table over [nearM, farM] and [0, widestM]; offsets are spaced by squares, so that the core is fine.
 *
 * @param calibration Traced over closed-form concentration at a distance: the trace gives the height, the closed form
 *   the shape across.
 */
export function tabulate(
  beam: Beam, nearM: number, farM: number, widestM: number, discM: number, calibration: (distanceM: number) => number,
): ConcentrationTable {
  const cells = new Float64Array((alongSteps + 1) * (acrossSteps + 1));
  for (let i = 0; i <= alongSteps; i++) {
    const z = nearM + ((farM - nearM) * i) / alongSteps;
    const scale = calibration(z);
    for (let j = 0; j <= acrossSteps; j++) {
      const offset = widestM * (j / acrossSteps) ** 2;
      // A skew line is not the same on its two sides; the sample does not know which side it is on.
      const value = beam.across === null
        ? beam.concentration(z, offset, discM)
        : (beam.concentration(z, offset, discM) + beam.concentration(z, -offset, discM)) / 2;
      cells[i * (acrossSteps + 1) + j] = value * scale;
    }
  }
  const read = (distanceM: number, offsetM: number): number => {
    const x = Math.min(alongSteps - 1e-9, Math.max(0, ((distanceM - nearM) / (farM - nearM)) * alongSteps));
    const y = Math.sqrt(Math.abs(offsetM) / widestM) * acrossSteps;
    if (y >= acrossSteps) return 0;
    const i = Math.floor(x);
    const j = Math.floor(y);
    const at = (p: number, q: number): number => cells[p * (acrossSteps + 1) + q] ?? 0;
    const fx = x - i;
    const fy = y - j;
    return (1 - fx) * ((1 - fy) * at(i, j) + fy * at(i, j + 1)) + fx * ((1 - fy) * at(i + 1, j) + fy * at(i + 1, j + 1));
  };
  return { read };
}

/** P5, P50 and P95 of a set of numbers. */
export function percentiles(values: Float64Array): Band {
  const sorted = values.slice().sort();
  const at = (share: number): number => sorted[Math.min(sorted.length - 1, Math.max(0, Math.round(share * (sorted.length - 1))))] ?? 0;
  return { low: at(0.05), mid: at(0.5), high: at(0.95) };
}

/** How uncertain the direct beam is. */
export type BeamSpread =
  | { readonly kind: 'relative'; readonly likelyWm2: number; readonly sigma: number }
  | { readonly kind: 'class'; readonly apparentElevationDeg: number; readonly extraterrestrialWm2: number; readonly elevationM: number; readonly air: Air };

/** Direct beam for one draw of two standard normal numbers. [W/m²] */
export function sampledBeamWm2(spread: BeamSpread, first: number, second: number): number {
  if (spread.kind === 'relative') return Math.max(0, spread.likelyWm2 * (1 + spread.sigma * first));
  const aod500 = spread.air.aod500 * Math.exp(classSigmaLn * first);
  const air = {
    ...spread.air,
    aod500,
    aod380: aod500 * (500 / 380) ** angstromExponent,
    waterCm: spread.air.waterCm * Math.exp(classSigmaLn * second),
  };
  return clearSkyAt(spread.apparentElevationDeg, spread.extraterrestrialWm2, spread.elevationM, air)?.likelyWm2 ?? 0;
}

/** Place of the mark relative to the chief ray at one candidate minute, in a frame across the line of sight. */
export interface TrackPoint {
  readonly levelM: number;
  readonly uprightM: number;
  readonly alongM: number;
}

/** Everything that one sample varies. */
export interface SamplingPlan {
  readonly track: readonly TrackPoint[];
  /** Unit of the motion of the spot in the same frame, and its speed. */
  readonly motionLevel: number;
  readonly motionUpright: number;
  readonly speedMPerS: number;
  /** For a line focus the unit direction across the line in the same frame; null for a point. */
  readonly lineAcross: readonly [number, number] | null;
  readonly sigmaLevelM: number;
  readonly sigmaUprightM: number;
  readonly sigmaAxialM: number;
  readonly sigmaClockS: number;
  readonly sigmaOpticRel: number;
  readonly beam: BeamSpread;
  readonly transmittance: number;
  readonly sigmaTransmittanceRel: number;
  readonly receiverCosine: number;
  readonly lateralToleranceM: number;
  /** Half the mark's extent: the flux is read at the part of the mark nearest to the spot. [m] */
  readonly markHalfM: number;
  readonly nearM: number;
  readonly farM: number;
  readonly table: ConcentrationTable;
}

export interface SampledState {
  readonly lateralM: number;
  readonly axialOk: boolean;
  readonly fluxKwm2: number;
  readonly beamAtOpticWm2: number;
}

const dimensions = 8;

/** One state of the plan for eight standard normal draws: level, upright, axial, clock, optic, aerosol, water, glass. */
export function stateFor(plan: SamplingPlan, draw: (index: number) => number): SampledState {
  const slip = draw(3) * plan.sigmaClockS * plan.speedMPerS;
  const shiftLevel = draw(0) * plan.sigmaLevelM + slip * plan.motionLevel;
  const shiftUpright = draw(1) * plan.sigmaUprightM + slip * plan.motionUpright;
  const shiftAxial = draw(2) * plan.sigmaAxialM;
  const opticScale = Math.exp(draw(4) * plan.sigmaOpticRel);
  let lateralM = Number.POSITIVE_INFINITY;
  let alongM = plan.track[0]?.alongM ?? 0;
  for (let k = 0; k < plan.track.length; k++) {
    const here = plan.track[k];
    if (here === undefined) continue;
    const distance = lateralAt(here, plan.track[k + 1], shiftLevel, shiftUpright, plan.lineAcross);
    if (distance < lateralM) {
      lateralM = distance;
      alongM = here.alongM;
    }
  }
  const effectiveM = (alongM + shiftAxial) / opticScale;
  const beamAtOpticWm2 =
    sampledBeamWm2(plan.beam, draw(5), draw(6)) * Math.min(1, plan.transmittance * (1 + plan.sigmaTransmittanceRel * draw(7)));
  return {
    lateralM,
    axialOk: effectiveM >= plan.nearM && effectiveM <= plan.farM,
    fluxKwm2: (plan.table.read(effectiveM, Math.max(0, lateralM - plan.markHalfM)) * plan.receiverCosine * beamAtOpticWm2) / 1000,
    beamAtOpticWm2,
  };
}

/** Least distance of the shifted mark from the spot between one minute and the next. [m] */
function lateralAt(
  a: TrackPoint, b: TrackPoint | undefined, shiftLevel: number, shiftUpright: number, across: readonly [number, number] | null,
): number {
  const level = a.levelM + shiftLevel;
  const upright = a.uprightM + shiftUpright;
  const stepLevel = b === undefined ? 0 : b.levelM - a.levelM;
  const stepUpright = b === undefined ? 0 : b.uprightM - a.uprightM;
  if (across !== null) {
    const start = level * across[0] + upright * across[1];
    const end = start + stepLevel * across[0] + stepUpright * across[1];
    return start * end <= 0 ? 0 : Math.min(Math.abs(start), Math.abs(end));
  }
  const length2 = stepLevel * stepLevel + stepUpright * stepUpright;
  const share = length2 === 0 ? 0 : Math.min(1, Math.max(0, -(level * stepLevel + upright * stepUpright) / length2));
  return Math.hypot(level + share * stepLevel, upright + share * stepUpright);
}

/** Effect of one input alone, at minus and plus one sigma, on the flux at the mark. */
export interface TornadoBar {
  readonly input: string;
  readonly lowKwm2: number;
  readonly highKwm2: number;
}

export interface Sampling {
  readonly lateralM: Band;
  readonly fluxKwm2: Band;
  readonly beamAtOpticWm2: Band;
  readonly aligned: number;
  readonly fluxOver: (thresholdKwm2: number) => number;
  /** Half the difference of the two halves of the sample: how far the median flux still moves. [kW/m²] */
  readonly convergenceKwm2: number;
  readonly tornado: readonly TornadoBar[];
}

const inputNames = [
  'bearing of the mark', 'elevation of the mark', 'distance of the mark', 'clock', 'focal length or radius', 'aerosol or measured beam', 'water vapour', 'glass in the path',
] as const;

/** Runs the plan over scrambled Sobol points. @param count A power of two keeps the points balanced. */
export function samplePlan(plan: SamplingPlan, count: number, seed: number): Sampling {
  const points = sobolPoints(dimensions, count, seed);
  const lateral = new Float64Array(count);
  const flux = new Float64Array(count);
  const beamAtOptic = new Float64Array(count);
  let aligned = 0;
  for (let i = 0; i < count; i++) {
    const state = stateFor(plan, (d) => normalQuantile(points[d * count + i] ?? 0.5));
    lateral[i] = state.lateralM;
    flux[i] = state.fluxKwm2;
    beamAtOptic[i] = state.beamAtOpticWm2;
    if (state.axialOk && state.lateralM <= plan.lateralToleranceM) aligned++;
  }
  const middle = count >> 1;
  const nominal = stateFor(plan, () => 0).fluxKwm2;
  const tornado = inputNames.map((input, d) => {
    const minus = stateFor(plan, (index) => (index === d ? -1 : 0)).fluxKwm2;
    const plus = stateFor(plan, (index) => (index === d ? 1 : 0)).fluxKwm2;
    return { input, lowKwm2: Math.min(minus, plus, nominal), highKwm2: Math.max(minus, plus, nominal) };
  });
  tornado.sort((a, b) => b.highKwm2 - b.lowKwm2 - (a.highKwm2 - a.lowKwm2));
  return {
    lateralM: percentiles(lateral),
    fluxKwm2: percentiles(flux),
    beamAtOpticWm2: percentiles(beamAtOptic),
    aligned: aligned / count,
    fluxOver: (thresholdKwm2) => flux.reduce((sum, value) => sum + (value > thresholdKwm2 ? 1 : 0), 0) / count,
    convergenceKwm2: Math.abs(percentiles(flux.subarray(0, middle)).mid - percentiles(flux.subarray(middle)).mid) / 2,
    tornado,
  };
}
