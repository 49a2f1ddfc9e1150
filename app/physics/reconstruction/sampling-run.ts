import type { SamplingResult, TraceTableResult } from '#app/physics/model/sampling.ts';
import type { Mark, Miss } from '#app/physics/alignment.ts';
import { coneAbsorptance, ignitionTime } from '#app/physics/heating/ignition.ts';
import { absorptanceBand, roundBand } from '#app/physics/heating/outcomes.ts';
import { lateralToleranceM, markHalfM, surveySigmaM } from '#app/physics/lit.ts';
import type { Beam, FocusModel } from '#app/physics/optics/closed-form/beam.ts';
import type { Optic } from '#app/physics/optics/optic.ts';
import type { Reach } from '#app/physics/reach.ts';
import type { DirectBeam } from '#app/physics/sky/direct-beam.ts';
import { samplingSigmas } from '#app/physics/sampling-sigmas.data.ts';
import { extraterrestrialWm2 } from '#app/physics/sky/extraterrestrial.ts';
import type { SpotMotion } from '#app/physics/trail.ts';
import { samplePlan, type BeamSpread, type IgnitionPlan, type PlaceInBeam, type Sampling, type SamplingPlan, type TrackPoint } from '#app/physics/uncertainty.ts';
import { roundSignificant } from '#app/physics/units.ts';
import { cross, dot, unit, type Vector } from '#app/physics/vector.ts';
import type { Setting } from './setting.ts';
import { traceTable, type TraceTable } from './trace-table.ts';
import type { TracedFocus } from './traced-focus.ts';
import { lightReaches, markDiscM, type JudgedMinute } from './window.ts';

const defaultSamples = 4096;

/** One sigma of a measured beam by kind. Measured 3–5 %, archive 20 %: common practice. */
const beamSigma = { measured: 0.04, derived: 0.1, 'hourly-archive': 0.2 } as const;

function beamSpread(minute: JudgedMinute, light: DirectBeam, setting: Setting): BeamSpread | null {
  if (light.likelyWm2 === null) return null;
  if (light.measuredWm2 !== null && setting.series !== null) {
    return { kind: 'relative', likelyWm2: light.measuredWm2, sigma: beamSigma[setting.series.basis] };
  }
  return {
    kind: 'class',
    apparentElevationDeg: minute.sun.apparentElevationDeg,
    extraterrestrialWm2: extraterrestrialWm2(minute.sun.distanceAu, setting.site.air.solarConstantWm2),
    elevationM: setting.input.place.elevationM,
    air: setting.site.air,
  };
}

/** Level and upright unit vectors across the line of sight to the mark. */
function sightFrame(mark: Mark): readonly [Vector, Vector] {
  const level = Math.abs(mark.towards[2]) > 0.9999 ? ([1, 0, 0] as const) : unit(cross(mark.towards, [0, 0, 1]));
  return [level, unit(cross(level, mark.towards))];
}

/** Minutes of the best minute's own day in which the shifted mark could lie on the spot. */
function candidates(judged: readonly JudgedMinute[], best: JudgedMinute, mark: Mark): readonly JudgedMinute[] {
  const reachM = (best.miss?.lateralM ?? 0) + 5 * surveySigmaM(mark) + 0.05 * mark.distanceM;
  const day = (minute: JudgedMinute): number => Math.floor(minute.sun.utcMs / 86_400_000);
  // Every day repeats nearly the same track, so the best minute's own day stands for its neighbours.
  const own = judged.filter((minute) => day(minute) === day(best) && minute.miss !== null && lightReaches(minute) && minute.miss.lateralM <= reachM);
  const thinned = own.length > 240 ? own.filter((minute, index) => minute === best || index % Math.ceil(own.length / 240) === 0) : own;
  return thinned.includes(best) ? thinned : [best];
}

/** What the optic, the target and the traces of the best minute bring to the sampling. */
export interface SamplingParts {
  readonly light: DirectBeam;
  readonly traced: TracedFocus | null;
  readonly motion: SpotMotion | null;
}

/** Times to ignition for samples: the mean of the products on file, from the fresh to the charred end of the absorptance. */
function ignitionPlan(setting: Setting, { traced, motion }: SamplingParts): IgnitionPlan | null {
  const { material, input, reach } = setting;
  const absorptance = material === null ? null : absorptanceBand(material, input.target?.solarAbsorptance);
  if (material === null || absorptance === null || material.ignition.length === 0 || reach === null || traced === null || motion === null || motion.speedMPerS === 0) return null;
  const critical = material.criticalFlux?.low ?? 0;
  return {
    secondsAt: (fluxKwm2, share) => {
      const effective = ((absorptance.low + share * (absorptance.high - absorptance.low)) / coneAbsorptance) * fluxKwm2;
      if (effective < critical) return null;
      const times = material.ignition.map((series) => ignitionTime(series, effective).seconds).filter((seconds) => seconds !== null);
      return times.length === 0 ? null : times.reduce((sum, seconds) => sum + seconds, 0) / times.length;
    },
    dwellS: (beamWm2) => (beamWm2 <= 0 ? 0 : traced.contourWidthM((reach.thresholdKwm2 * 1000) / beamWm2) / motion.speedMPerS),
  };
}

/** Relative distances between which the samples lie: four sigmas of the optic and of the survey. */
function relativeSpan(mark: Mark, opticSigmaRel: number): readonly [near: number, far: number] {
  const span = 4 * opticSigmaRel + (4 * mark.sigmaAxialM) / mark.distanceM + 0.02;
  return [Math.max(0.02, 1 - Math.min(0.9, span)), 1 + span];
}

/** Everything known that a plan is made of. */
interface Known {
  readonly model: FocusModel;
  readonly mark: Mark;
  readonly reach: Reach;
  readonly optic: Optic;
  readonly beam: Beam;
  readonly miss: Miss;
  readonly best: JudgedMinute;
  readonly minutes: readonly JudgedMinute[];
  readonly level: Vector;
  readonly upright: Vector;
}

function tableFor({ model, mark, reach, beam, miss, best, minutes, level, upright }: Known, traced: TracedFocus, opticSigmaRel: number): TraceTable | null {
  const [nearRel, farRel] = relativeSpan(mark, opticSigmaRel);
  return traceTable({
    request: traced.request, nominal: traced.traced, optic: traced.request.optic, startsAt: model.startsAt, markNormal: mark.normal, level, upright,
    track: minutes, bestIndex: minutes.indexOf(best), best: beam, alongM: miss.alongM, nearRel, farRel,
    widestM: Math.max(8 * reach.spotRadiusM, miss.lateralM + 5 * surveySigmaM(mark)), sigmaOpticRel: opticSigmaRel,
  });
}

/** Unit across the line of a line focus, in the frame of the line of sight. */
function acrossLine({ beam, level, upright }: Known): readonly [number, number] | null {
  if (beam.across === null) return null;
  const [x, y] = [dot(beam.across, level), dot(beam.across, upright)];
  const norm = Math.hypot(x, y) || 1;
  return [x / norm, y / norm];
}

function planOf(known: Known, parts: SamplingParts, spread: BeamSpread, concentrationAt: SamplingPlan['concentrationAt'], setting: Setting): SamplingPlan {
  const { model, mark, reach, optic, minutes, level, upright } = known;
  const { light, traced, motion } = parts;
  const speed = motion?.speedMPerS ?? 0;
  const unitMotion: Vector = motion === null || speed === 0 ? [0, 0, 0] : unit(motion.velocity);
  return {
    track: minutes.flatMap(({ miss }): TrackPoint[] => (miss === null ? [] : [{ levelM: dot(miss.sideways, level), uprightM: dot(miss.sideways, upright), alongM: miss.alongM }])),
    motionLevel: dot(unitMotion, level),
    motionUpright: dot(unitMotion, upright),
    speedMPerS: speed,
    lineAcross: acrossLine(known),
    sigmaLevelM: mark.sigmaLevelM,
    sigmaUprightM: mark.sigmaUprightM,
    sigmaAxialM: mark.sigmaAxialM,
    sigmaClockS: setting.input.window.clockSigmaS,
    sigmaOpticRel: setting.opticSigmaRel,
    beam: spread,
    transmittance: light.transmittance,
    sigmaTransmittanceRel: setting.opening === undefined || setting.opening.transmittance >= 1 ? 0 : samplingSigmas.glass.sigmaRel,
    sigmaThroughputRel: 'reflectance' in optic || 'transmittance' in optic ? samplingSigmas.throughput.sigmaRel : 0,
    lnPerSlopeSigma: traced?.lnPerSlopeSigma ?? 0,
    lateralToleranceM: lateralToleranceM(reach, mark, model.focusKind),
    markHalfM: markHalfM(mark, model.focusKind),
    nearM: reach.nearM,
    farM: reach.farM,
    concentrationAt,
    ignition: ignitionPlan(setting, parts),
  };
}

/** The sampling with the table that it reads. */
export interface SampledRun {
  readonly sampling: Sampling;
  readonly table: TraceTableResult | null;
}

/** Samples the inputs' uncertainties about the best minute; null where something that this needs is unknown. */
export function sampleAt(judged: readonly JudgedMinute[], best: JudgedMinute, parts: SamplingParts, setting: Setting): SampledRun | null {
  const { model, mark, reach, input } = setting;
  const { optic } = input;
  const { beam, miss } = best;
  const spread = beamSpread(best, parts.light, setting);
  if (model === null || mark === null || reach === null || beam === null || miss === null || spread === null || optic === undefined) return null;
  const [level, upright] = sightFrame(mark);
  const known: Known = { model, mark, reach, optic, beam, miss, best, minutes: candidates(judged, best, mark), level, upright };
  const table = parts.traced === null ? null : tableFor(known, parts.traced, setting.opticSigmaRel);
  const cosine = Math.max(0, -dot(beam.direction, mark.normal));
  const closedForm = (place: PlaceInBeam): number => cosine * beam.concentration(place.alongM / place.opticScale, Math.hypot(place.levelM, place.uprightM), markDiscM);
  const plan = planOf(known, parts, spread, table?.concentrationAt ?? closedForm, setting);
  return { sampling: samplePlan(plan, input.samples ?? defaultSamples, input.seed), table: table?.summary ?? null };
}

/** Fluxes whose probability is reported. [kW/m²] */
const probabilityThresholds = [1.5, 5, 10, 12.5, 20, 25, 50] as const;

export function samplingResult({ sampling, table }: SampledRun, setting: Setting): SamplingResult {
  const mm = (band: { low: number; mid: number; high: number }) =>
    roundBand({ low: band.low * 1000, mid: band.mid * 1000, high: band.high * 1000 });
  return {
    samples: setting.input.samples ?? defaultSamples,
    alignedShare: roundSignificant(sampling.aligned, 3),
    missLateralMm: mm(sampling.lateralM),
    fluxKwm2: roundBand(sampling.fluxKwm2),
    fluxOver: probabilityThresholds.map((thresholdKwm2) => ({ thresholdKwm2, share: roundSignificant(sampling.fluxOver(thresholdKwm2), 3) })),
    ignitedWithinDwellShare: sampling.ignited === null ? null : roundSignificant(sampling.ignited, 3),
    convergenceKwm2: roundSignificant(Math.abs(sampling.fluxKwm2.mid - sampling.halfMedianKwm2), 2),
    halfSampleMedianKwm2: roundSignificant(sampling.halfMedianKwm2, 3),
    table,
    tornado: sampling.tornado.map((bar) => ({
      input: bar.input, lowKwm2: roundSignificant(bar.lowKwm2, 3), highKwm2: roundSignificant(bar.highKwm2, 3),
    })),
  };
}
