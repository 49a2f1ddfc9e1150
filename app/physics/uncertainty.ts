import type { Band } from './model/stated.ts';
import { normalQuantile, normalShare } from './normal-quantile.ts';
import { samplingSigmas } from './sampling-sigmas.data.ts';
import { ScrambledSobol } from './sobol.ts';
import { clearSkyAt, type Air } from '#app/physics/sky/clear-sky.ts';
import { angstromExponent, classSigmaLn } from '#app/physics/sky/climate-classes.data.ts';

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

/** Where a sample's mark lies in the light: place in the track, and offset from the chief ray across the line of sight. */
export interface PlaceInBeam {
  /** Index of the minute in the track, with the share of the step to the next. */
  readonly trackIndex: number;
  readonly alongM: number;
  readonly levelM: number;
  readonly uprightM: number;
  /** Focal length or radius of the sample over the nominal one. */
  readonly opticScale: number;
}

/** When the target would ignite, for samples; null where no measured time is on file. */
export interface IgnitionPlan {
  /** Seconds to ignition at a flux and an absorptance share 0…1 between the fresh and the charred end; null where never. */
  readonly secondsAt: (fluxKwm2: number, absorptanceShare: number) => number | null;
  /** Seconds above the lowest harmful flux at a beam. */
  readonly dwellS: (beamAtOpticWm2: number) => number;
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
  /** One sigma of what the optic itself passes or reflects. */
  readonly sigmaThroughputRel: number;
  /** Change of the logarithm of the flux for one sigma of the surface's slope error; 0 where that was measured. */
  readonly lnPerSlopeSigma: number;
  readonly lateralToleranceM: number;
  /** Half the mark's extent: the flux is read at the part of the mark nearest to the spot. [m] */
  readonly markHalfM: number;
  readonly nearM: number;
  readonly farM: number;
  /** Concentration on the mark's disc in the plane of the target, receiver cosine included. */
  readonly concentrationAt: (place: PlaceInBeam) => number;
  readonly ignition: IgnitionPlan | null;
}

export interface SampledState {
  readonly lateralM: number;
  readonly axialOk: boolean;
  readonly fluxKwm2: number;
  readonly beamAtOpticWm2: number;
  /** Null where no time to ignition is on file. */
  readonly ignites: boolean | null;
}

/** What each dimension of a sample varies, in order; every draw is a standard normal number. */
const inputNames = [
  'bearing of the mark', 'elevation of the mark', 'distance of the mark', 'clock', 'focal length or radius', 'aerosol or measured beam', 'water vapour',
  'glass in the path', 'transmittance or reflectance of the optic', 'surface of the optic', 'absorptance of the target', 'time to ignition',
] as const;
const dimensions = inputNames.length;

/** Nearest place of the shifted track to the mark; reused from sample to sample. */
const nearest = { lateralM: 0, levelM: 0, uprightM: 0, trackIndex: 0, alongM: 0 };

/** Finds where on the track the shifted mark lies nearest to the spot. */
function findNearest({ track, lineAcross }: SamplingPlan, shiftLevel: number, shiftUpright: number): void {
  nearest.lateralM = Number.POSITIVE_INFINITY;
  for (let k = 0; k < track.length; k++) {
    const here = track[k];
    if (here === undefined) continue;
    const next = track[k + 1] ?? here;
    const level = here.levelM + shiftLevel;
    const upright = here.uprightM + shiftUpright;
    const stepLevel = next.levelM - here.levelM;
    const stepUpright = next.uprightM - here.uprightM;
    if (lineAcross === null) nearPoint(k, here, level, upright, stepLevel, stepUpright);
    else nearLine(k, here, lineAcross, level * lineAcross[0] + upright * lineAcross[1], stepLevel * lineAcross[0] + stepUpright * lineAcross[1]);
  }
}

function nearPoint(k: number, here: TrackPoint, level: number, upright: number, stepLevel: number, stepUpright: number): void {
  const length2 = stepLevel * stepLevel + stepUpright * stepUpright;
  const share = length2 === 0 ? 0 : Math.min(1, Math.max(0, -(level * stepLevel + upright * stepUpright) / length2));
  const x = level + share * stepLevel;
  const y = upright + share * stepUpright;
  const lateralM = Math.sqrt(x * x + y * y);
  if (lateralM < nearest.lateralM) keep(k + share, here.alongM, lateralM, x, y);
}

/** Only the distance across the line counts. */
function nearLine(k: number, here: TrackPoint, across: readonly [number, number], start: number, step: number): void {
  const share = step === 0 ? 0 : Math.min(1, Math.max(0, -start / step));
  const offset = start + share * step;
  if (Math.abs(offset) < nearest.lateralM) keep(k + share, here.alongM, Math.abs(offset), offset * across[0], offset * across[1]);
}

function keep(trackIndex: number, alongM: number, lateralM: number, levelM: number, uprightM: number): void {
  nearest.trackIndex = trackIndex;
  nearest.alongM = alongM;
  nearest.lateralM = lateralM;
  nearest.levelM = levelM;
  nearest.uprightM = uprightM;
}

/** One state of the plan for one standard normal draw per input. */
export function stateFor(plan: SamplingPlan, draw: (index: number) => number): SampledState {
  const slip = draw(3) * plan.sigmaClockS * plan.speedMPerS;
  findNearest(plan, draw(0) * plan.sigmaLevelM + slip * plan.motionLevel, draw(1) * plan.sigmaUprightM + slip * plan.motionUpright);
  const { lateralM, trackIndex } = nearest;
  const alongM = nearest.alongM + draw(2) * plan.sigmaAxialM;
  const opticScale = Math.exp(draw(4) * plan.sigmaOpticRel);
  // The mark has an extent: its nearest part counts.
  const kept = lateralM === 0 ? 0 : Math.max(0, lateralM - plan.markHalfM) / lateralM;
  const suns = plan.concentrationAt({ trackIndex, alongM, levelM: nearest.levelM * kept, uprightM: nearest.uprightM * kept, opticScale });
  const beamAtOpticWm2 =
    sampledBeamWm2(plan.beam, draw(5), draw(6)) * Math.min(1, plan.transmittance * (1 + plan.sigmaTransmittanceRel * draw(7)));
  const fluxKwm2 = (suns * Math.max(0, 1 + plan.sigmaThroughputRel * draw(8)) * Math.exp(plan.lnPerSlopeSigma * draw(9)) * beamAtOpticWm2) / 1000;
  const effectiveM = alongM / opticScale;
  return {
    lateralM,
    axialOk: effectiveM >= plan.nearM && effectiveM <= plan.farM,
    fluxKwm2,
    beamAtOpticWm2,
    ignites: plan.ignition === null ? null : ignites(plan.ignition, fluxKwm2, beamAtOpticWm2, normalShare(draw(10)), draw(11)),
  };
}

function ignites(ignition: IgnitionPlan, fluxKwm2: number, beamAtOpticWm2: number, absorptanceShare: number, slowness: number): boolean {
  const seconds = ignition.secondsAt(fluxKwm2, absorptanceShare);
  return seconds !== null && seconds * Math.max(0.1, 1 + samplingSigmas.ignitionTime.sigmaRel * slowness) <= ignition.dwellS(beamAtOpticWm2);
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
  readonly ignited: number | null;
  readonly fluxOver: (thresholdKwm2: number) => number;
  /** Median flux of the first half of the sample. [kW/m²] */
  readonly halfMedianKwm2: number;
  readonly tornado: readonly TornadoBar[];
}

/** One input at a time; those that do not touch the flux are left out. */
function tornadoOf(plan: SamplingPlan): readonly TornadoBar[] {
  const nominal = stateFor(plan, () => 0).fluxKwm2;
  const bars = inputNames.map((input, d) => {
    const minus = stateFor(plan, (index) => (index === d ? -1 : 0)).fluxKwm2;
    const plus = stateFor(plan, (index) => (index === d ? 1 : 0)).fluxKwm2;
    return { input, lowKwm2: Math.min(minus, plus, nominal), highKwm2: Math.max(minus, plus, nominal) };
  });
  return bars.filter((bar) => bar.highKwm2 > bar.lowKwm2).sort((a, b) => b.highKwm2 - b.lowKwm2 - (a.highKwm2 - a.lowKwm2));
}

/** Runs the plan over scrambled Sobol points. @param count A power of two keeps the points balanced. */
export function samplePlan(plan: SamplingPlan, count: number, seed: number): Sampling {
  const points = Array.from({ length: dimensions }, () => new Float64Array(count));
  new ScrambledSobol(dimensions, seed, 0).fill(points, count);
  const lateral = new Float64Array(count);
  const flux = new Float64Array(count);
  const beamAtOptic = new Float64Array(count);
  let aligned = 0;
  let ignited = 0;
  for (let i = 0; i < count; i++) {
    const state = stateFor(plan, (d) => normalQuantile(points[d]?.[i] ?? 0.5));
    lateral[i] = state.lateralM;
    flux[i] = state.fluxKwm2;
    beamAtOptic[i] = state.beamAtOpticWm2;
    if (state.axialOk && state.lateralM <= plan.lateralToleranceM) aligned++;
    if (state.ignites === true) ignited++;
  }
  return {
    lateralM: percentiles(lateral),
    fluxKwm2: percentiles(flux),
    beamAtOpticWm2: percentiles(beamAtOptic),
    aligned: aligned / count,
    ignited: plan.ignition === null ? null : ignited / count,
    fluxOver: (thresholdKwm2) => flux.reduce((sum, value) => sum + (value > thresholdKwm2 ? 1 : 0), 0) / count,
    halfMedianKwm2: percentiles(flux.subarray(0, count >> 1)).mid,
    tornado: tornadoOf(plan),
  };
}
