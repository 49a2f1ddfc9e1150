import type { TracedFocusResult } from '#app/physics/model/focus.ts';
import type { Assumption } from '#app/physics/model/stated.ts';
import { slopeErrors } from '#app/physics/optics/optic-defaults.data.ts';
import type { Beam } from '#app/physics/optics/closed-form/beam.ts';
import { concentrationAlongAxis, dangerZone, type ZonePoint } from '#app/physics/optics/trace/danger-zone.ts';
import { backTracedDiscAt, discAt, hotDiscIn } from '#app/physics/optics/trace/measure.ts';
import { traceBundle, type TracedOptic } from '#app/physics/optics/trace/trace-bundle.ts';
import { measureFocus } from '#app/physics/optics/trace/trace-focus.ts';
import type { DiscName, TraceRequest, TraceResult } from '#app/physics/optics/trace/trace-model.ts';
import { newWorkspace } from '#app/physics/optics/trace/workspace.ts';
import { halfAngleRad } from '#app/physics/sun/sun-disc.ts';
import type { SpotMotion } from '#app/physics/trail.ts';
import { roundSignificant } from '#app/physics/units.ts';
import { dot, lengthOf, subtract } from '#app/physics/vector.ts';
import type { Setting } from './setting.ts';
import { markDiscM, type JudgedMinute } from './window.ts';

const defaultRays = 100_000;
const mapCells = 33;

/** Suns at which the contour is measured, evenly spaced in the logarithm; widths between are interpolated. */
const contourSuns = Array.from({ length: 33 }, (_unused, k) => 0.5 * 10 ** (k / 8));

/** Distances along the beam at which the trace is cut, over the sharpest distance. */
export const cutShares = [0.2, 0.35, 0.5, 0.6, 0.7, 0.8, 0.85, 0.9, 0.95, 1, 1.05, 1.1, 1.2, 1.35, 1.5, 1.75, 2, 2.5] as const;

/** Ray trace at the best minute. */
export interface TracedFocus {
  readonly request: TraceRequest;
  readonly traced: TracedOptic;
  readonly result: TraceResult;
  /** Hot-spot concentration of the 5 mm disc along the beam. */
  readonly along: readonly ZonePoint[];
  /** Traced over closed-form concentration on 5 mm at a distance: at the mark where light falls on it, else on the hot spot. */
  readonly calibration: (distanceM: number) => number;
  readonly concentration: (disc: DiscName, centre: 'hot spot' | 'mark') => number | null;
  /** Length of the contour along the trail above a number of suns. [m] */
  readonly contourWidthM: (suns: number) => number;
  readonly dangerZone: (suns: number) => { readonly nearM: number; readonly farM: number } | null;
  /** Change of the logarithm of the hot spot's 5 mm flux for one sigma of the class's slope error. */
  readonly lnPerSlopeSigma: number;
}

function requestFor(minute: JudgedMinute, beam: Beam, motion: SpotMotion | null, setting: Setting): TraceRequest | null {
  const { input, mark } = setting;
  if (input.optic === undefined) return null;
  const common = {
    // The same class value as the closed form's, so that both answers are about one optic.
    optic: { ...input.optic, slopeErrorMrad: input.optic.slopeErrorMrad ?? slopeErrors[input.optic.kind].slopeErrorMrad },
    circumsolarRatio: input.sky.circumsolarRatio ?? 0,
    sunDirection: minute.sun.towardsSun,
    sunHalfAngleRad: halfAngleRad(minute.sun.distanceAu),
    rays: input.rays ?? defaultRays,
    seed: input.seed,
    gridCells: mapCells,
    occluders: setting.occluders,
  };
  if (mark === null) return { ...common, receiver: { kind: 'best plane' } };
  if (dot(beam.direction, mark.normal) > -0.05) return null;
  return {
    ...common,
    receiver: { kind: 'plane', origin: mark.surveyed, normal: mark.normal },
    mark: mark.surveyed,
    thresholdsSuns: contourSuns,
    ...(motion === null || motion.speedMPerS === 0 ? {} : { trailDirection: motion.velocity }),
  };
}

/** Contour width by interpolation in the logarithm of the threshold. */
function widthReader(result: TraceResult): (suns: number) => number {
  const rows = [...result.contourWidths].sort((a, b) => a.thresholdSuns - b.thresholdSuns);
  return (suns) => {
    const above = rows.findIndex((row) => row.thresholdSuns >= suns);
    const high = rows[above === -1 ? rows.length - 1 : above];
    const low = rows[above <= 0 ? 0 : above - 1];
    if (high === undefined || low === undefined || above === -1) return 0;
    if (high === low) return high.widthM;
    const share = Math.log(suns / low.thresholdSuns) / Math.log(high.thresholdSuns / low.thresholdSuns);
    return low.widthM + share * (high.widthM - low.widthM);
  };
}

/** The closed forms miss by less than this; a greater ratio means a plane in which one of the two sees no light. */
const greatestCalibration = 4;

/** Ratio kept between the limits that a plausible comparison allows. */
function heldRatio(traced: number, closed: number): number {
  return Math.min(greatestCalibration, Math.max(1 / greatestCalibration, traced / closed));
}

/** Traced over closed-form concentration on the disc centred on the mark; null where the closed form sees no light. */
function ratioAtMark(minute: JudgedMinute, beam: Beam, result: TraceResult, setting: Setting): number | null {
  const { mark } = setting;
  const { miss } = minute;
  const traced = result.discs.find((row) => row.disc === '5 mm' && row.centre === 'mark');
  if (mark === null || miss === null || traced === undefined || traced.concentration <= 3 * traced.stdError) return null;
  const closed = -dot(beam.direction, mark.normal) * beam.concentration(miss.alongM, miss.offsetM, markDiscM);
  return closed > 0 ? heldRatio(traced.concentration, closed) : null;
}

function calibrationReader(along: readonly ZonePoint[], beam: Beam): (distanceM: number) => number {
  const ratios = along.flatMap(({ distanceM, concentration }) => {
    const closed = beam.concentration(distanceM, 0, markDiscM);
    if (closed <= 0 || concentration <= 0) return [];
    return [{ distanceM, ratio: heldRatio(concentration, closed) }];
  });
  return (distanceM) => {
    const after = ratios.findIndex((row) => row.distanceM >= distanceM);
    const high = ratios[after === -1 ? ratios.length - 1 : after];
    const low = ratios[after <= 0 ? 0 : after - 1];
    if (high === undefined || low === undefined) return 1;
    if (high === low || after === -1) return high.ratio;
    const share = (distanceM - low.distanceM) / (high.distanceM - low.distanceM);
    return low.ratio + share * (high.ratio - low.ratio);
  };
}

/**
 * Traces the optic at the best minute; null where the target turns its back or the optic is unknown.
 *
 * @throws PhysicsGuardError if energy or radiance is not kept: such a run is worthless.
 */
export function traceAt(minute: JudgedMinute, beam: Beam, motion: SpotMotion | null, setting: Setting): TracedFocus | null {
  const request = requestFor(minute, beam, motion, setting);
  if (request === null || setting.model === null) return null;
  const traced = traceBundle(request);
  const workspace = newWorkspace(traced.bundle.capacity);
  const result = measureFocus(request, traced, workspace);
  const shift = lengthOf(setting.model.startsAt) === 0 ? 0 : dot(subtract([0, 0, 0], setting.model.startsAt), beam.direction);
  const along = concentrationAlongAxis(traced, markDiscM, cutShares.map((share) => share * beam.focusM - shift), workspace).map((point) => ({
    ...point, distanceM: point.distanceM + shift,
  }));
  const alongBeam = calibrationReader(along, beam);
  const atMark = ratioAtMark(minute, beam, result, setting);
  const anchorM = minute.miss?.alongM ?? beam.focusM;
  return {
    request, traced, result, along,
    calibration: atMark === null ? alongBeam : (distanceM) => (atMark * alongBeam(distanceM)) / alongBeam(anchorM),
    concentration: (disc, centre) => result.discs.find((row) => row.disc === disc && row.centre === centre)?.concentration ?? null,
    contourWidthM: widthReader(result),
    dangerZone: (suns) => dangerZone(along, suns),
    lnPerSlopeSigma: setting.input.optic?.slopeErrorMrad === undefined ? lnPerSlopeSigma(request, result) : 0,
  };
}

/** Rays of the side traces: of a rougher surface, and of single minutes. */
const sideRays = 16_384;
const minuteRays = 4096;
/** A minute whose light is known no better than this, relative, is left to the closed form. */
const worstMinuteError = 0.2;

/** By how much a rougher surface changes the hot spot; the class's range is taken as two sigmas either way. */
function lnPerSlopeSigma(request: TraceRequest, result: TraceResult): number {
  const { slopeErrorMrad, rangeMrad: [low, high] } = slopeErrors[request.optic.kind];
  const hot = result.discs.find((row) => row.disc === '5 mm' && row.centre === 'hot spot');
  if (slopeErrorMrad <= 0 || low <= 0 || hot === undefined || hot.concentration <= 0) return 0;
  const rougher: TraceRequest = { ...request, optic: { ...request.optic, slopeErrorMrad: slopeErrorMrad * (high / low) ** 0.25 }, rays: Math.min(sideRays, request.rays ?? sideRays) };
  const { concentration } = hotDiscIn(traceBundle(rougher), result.receiver, markDiscM);
  return concentration > 0 ? Math.log(concentration / hot.concentration) : 0;
}

/**
 * Concentration on the mark's disc at one minute, traced with the openings and bars of that minute; null where the
 * target turns its back, or too few rays fall on the mark.
 */
export function tracedSunsOnMark(minute: JudgedMinute, setting: Setting): number | null {
  const request = minute.beam === null ? null : requestFor(minute, minute.beam, null, setting);
  if (request === null || request.receiver.kind === 'best plane') return null;
  const traced = traceBundle({ ...request, rays: Math.min(minuteRays, request.rays ?? minuteRays) });
  const { origin, normal } = request.receiver;
  const forward = discAt(traced, request.receiver, origin, markDiscM);
  const back = forward.stdError < 0.05 * forward.concentration ? null : backTracedDiscAt(traced, { origin, normal }, origin, markDiscM, minuteRays / 2, request.seed);
  const better = back !== null && back.stdError < forward.stdError ? back : forward;
  return better.stdError <= worstMinuteError * better.concentration ? better.concentration : null;
}

/** The trace's own figures for the result. @param closedForm Concentration of the closed form on the 5 mm hot spot. */
export function tracedResult({ result }: TracedFocus, closedForm: number): TracedFocusResult {
  const hot = result.discs.find((row) => row.disc === '5 mm' && row.centre === 'hot spot');
  const back = result.backTraced;
  const forward = back === null ? undefined : result.discs.find((row) => row.disc === '5 mm' && row.centre === back.centre);
  const grid = result.fluxGrid;
  return {
    rays: result.rays,
    blockedFraction: roundSignificant(result.blockedFraction, 3),
    transmittedFraction: roundSignificant(result.transmittedFraction, 3),
    r50Mm: roundSignificant(result.r50M * 1000, 3),
    r80Mm: roundSignificant(result.r80M * 1000, 3),
    hotSpotOffsetMm: hot === undefined || hot.offsetFromMarkM === null ? null : roundSignificant(hot.offsetFromMarkM * 1000, 3),
    stdError: roundSignificant(hot?.stdError ?? 0, 2),
    closedForm: roundSignificant(closedForm, 3),
    backTraced: back === null || forward === undefined ? null : {
      centre: back.centre,
      concentration: roundSignificant(back.concentration, 3),
      stdError: roundSignificant(back.stdError, 2),
      forward: roundSignificant(forward.concentration, 3),
      agrees: Math.abs(back.concentration - forward.concentration) <= 3 * Math.hypot(back.stdError, forward.stdError) + 0.02 * forward.concentration,
    },
    bestPlanes: result.bestPlanes.map((plane) => ({
      disc: plane.disc, distanceM: roundSignificant(plane.distanceM, 4), concentration: roundSignificant(plane.concentration, 3),
    })),
    map: grid === null ? null : { cells: grid.cells, sizeMm: roundSignificant(grid.sizeM * 1000, 3), suns: grid.concentration.map((value) => roundSignificant(value, 3)) },
  };
}

/** Assumptions that the tracer made for itself, in the form of the result. */
export function tracerAssumptions({ result }: TracedFocus): readonly Assumption[] {
  return result.assumptions.map(({ field, value, source, verified }) => ({ field: `trace.${field}`, value, source: { text: source, verified } }));
}
