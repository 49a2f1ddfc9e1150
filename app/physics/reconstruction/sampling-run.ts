import type { SamplingResult } from '#app/physics/model.ts';
import type { Mark } from '#app/physics/alignment.ts';
import { lateralToleranceM, markHalfM, surveySigmaM } from '#app/physics/lit.ts';
import { extraterrestrialWm2 } from '#app/physics/sky/extraterrestrial.ts';
import { spotMotion } from '#app/physics/trail.ts';
import { samplePlan, tabulate, type BeamSpread, type Sampling, type SamplingPlan, type TrackPoint } from '#app/physics/uncertainty.ts';
import { roundSignificant } from '#app/physics/units.ts';
import { cross, dot, unit, type Vector } from '#app/physics/vector.ts';
import { roundBand } from '#app/physics/heating/outcomes.ts';
import type { DirectBeam } from '#app/physics/sky/direct-beam.ts';
import type { Setting } from './setting.ts';
import { lightReaches, markDiscM, type JudgedMinute } from './window.ts';

const defaultSamples = 4096;

/** One sigma of a measured beam by kind. Measured 3–5 %, archive 20 %: common practice. */
const beamSigma = { measured: 0.04, derived: 0.1, 'hourly-archive': 0.2 } as const;

/** One sigma of the transmittance of glass in the path. Common practice. */
const glassSigmaRel = 0.05;

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

/** Minutes around the best one in which the shifted mark could lie on the spot. */
function candidates(judged: readonly JudgedMinute[], best: JudgedMinute, mark: Mark, frame: readonly [Vector, Vector]): TrackPoint[] {
  const reachM = (best.miss?.lateralM ?? 0) + 5 * surveySigmaM(mark) + 0.05 * mark.distanceM;
  const near = judged.filter((minute) => minute.miss !== null && lightReaches(minute) && minute.miss.lateralM <= reachM);
  const days = new Map<number, JudgedMinute[]>();
  for (const minute of near) {
    const day = Math.floor(minute.sun.utcMs / 86_400_000);
    days.set(day, [...(days.get(day) ?? []), minute]);
  }
  // Every day repeats nearly the same track, so the best minute's own day stands for its neighbours.
  const own = days.get(Math.floor(best.sun.utcMs / 86_400_000)) ?? [best];
  const thinned = own.length > 240 ? own.filter((_minute, index) => index % Math.ceil(own.length / 240) === 0) : own;
  return thinned.flatMap(({ miss }) =>
    miss === null ? [] : [{ levelM: dot(miss.sideways, frame[0]), uprightM: dot(miss.sideways, frame[1]), alongM: miss.alongM }],
  );
}

/** Plan of the sampling at the best minute; null where something that it needs is unknown. */
function planFor(judged: readonly JudgedMinute[], best: JudgedMinute, light: DirectBeam, calibration: (distanceM: number) => number, setting: Setting): SamplingPlan | null {
  const { model, mark, reach } = setting;
  const { beam, miss } = best;
  const spread = beamSpread(best, light, setting);
  if (model === null || mark === null || reach === null || beam === null || miss === null || spread === null) return null;
  const frame = sightFrame(mark);
  const track = candidates(judged, best, mark, frame);
  const motion = spotMotion(model, mark, setting.site.observer, best.sun.utcMs);
  const speed = motion?.speedMPerS ?? 0;
  const unitMotion: Vector = motion === null || speed === 0 ? [0, 0, 0] : unit(motion.velocity);
  const acrossLine = beam.across === null ? null : ([dot(beam.across, frame[0]), dot(beam.across, frame[1])] as const);
  const norm = acrossLine === null ? 1 : Math.hypot(acrossLine[0], acrossLine[1]) || 1;
  const spanRel = 4 * setting.opticSigmaRel + (4 * mark.sigmaAxialM) / mark.distanceM + 0.02;
  const nearTableM = Math.max(0.02 * miss.alongM, miss.alongM * (1 - Math.min(0.9, spanRel)));
  const widestM = Math.max(8 * reach.spotRadiusM, miss.lateralM + 5 * surveySigmaM(mark));
  return {
    track,
    motionLevel: dot(unitMotion, frame[0]),
    motionUpright: dot(unitMotion, frame[1]),
    speedMPerS: speed,
    lineAcross: acrossLine === null ? null : [acrossLine[0] / norm, acrossLine[1] / norm],
    sigmaLevelM: mark.sigmaLevelM,
    sigmaUprightM: mark.sigmaUprightM,
    sigmaAxialM: mark.sigmaAxialM,
    sigmaClockS: setting.input.window.clockSigmaS,
    sigmaOpticRel: setting.opticSigmaRel,
    beam: spread,
    transmittance: light.transmittance,
    sigmaTransmittanceRel: setting.opening === undefined || setting.opening.transmittance >= 1 ? 0 : glassSigmaRel,
    receiverCosine: Math.max(0, -dot(beam.direction, mark.normal)),
    lateralToleranceM: lateralToleranceM(reach, mark, model.focusKind),
    markHalfM: markHalfM(mark, model.focusKind),
    nearM: reach.nearM,
    farM: reach.farM,
    table: tabulate(beam, nearTableM, miss.alongM * (1 + spanRel), widestM, markDiscM, calibration),
  };
}

export function sampleAt(judged: readonly JudgedMinute[], best: JudgedMinute, light: DirectBeam, calibration: (distanceM: number) => number, setting: Setting): Sampling | null {
  const plan = planFor(judged, best, light, calibration, setting);
  if (plan === null || plan.track.length === 0) return null;
  return samplePlan(plan, setting.input.samples ?? defaultSamples, setting.input.seed);
}

/** Fluxes whose probability is reported. [kW/m²] */
const probabilityThresholds = [1.5, 5, 10, 12.5, 20, 25, 50] as const;

export function samplingResult(sampling: Sampling, setting: Setting): SamplingResult {
  const mm = (band: { low: number; mid: number; high: number }) =>
    roundBand({ low: band.low * 1000, mid: band.mid * 1000, high: band.high * 1000 });
  return {
    samples: setting.input.samples ?? defaultSamples,
    alignedShare: roundSignificant(sampling.aligned, 3),
    missLateralMm: mm(sampling.lateralM),
    fluxKwm2: roundBand(sampling.fluxKwm2),
    fluxOver: probabilityThresholds.map((thresholdKwm2) => ({ thresholdKwm2, share: roundSignificant(sampling.fluxOver(thresholdKwm2), 3) })),
    convergenceKwm2: roundSignificant(sampling.convergenceKwm2, 2),
    tornado: sampling.tornado.map((bar) => ({
      input: bar.input, lowKwm2: roundSignificant(bar.lowKwm2, 3), highKwm2: roundSignificant(bar.highKwm2, 3),
    })),
  };
}
