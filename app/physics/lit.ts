import type { OpeningInput } from './model/input.ts';
import type { MinuteReason, MinuteVerdict } from './model/minutes.ts';
import { missOf, type Mark, type Miss } from './alignment.ts';
import type { Beam, FocusModel } from '#app/physics/optics/closed-form/beam.ts';
import type { Reach } from './reach.ts';
import type { Skyline } from './skyline.ts';
import type { Mask, RayShare } from './reconstruction/mask.ts';
import type { SunMinute } from './sun-track.ts';
import { halfAngleRad } from '#app/physics/sun/sun-disc.ts';
import { degree, wrap180 } from './units.ts';
import { dot } from './vector.ts';

/** Everything that stands between the sun and the mark. */
export interface Scene {
  readonly dipDeg: number;
  readonly skyline: Skyline | null;
  readonly skylineSigmaDeg: number;
  readonly opening: OpeningInput | undefined;
  /** Openings and bars ray by ray; null where none was surveyed by its corners. */
  readonly mask: Mask | null;
  readonly model: FocusModel | null;
  readonly mark: Mark | null;
  readonly reach: Reach | null;
}

/** Judgement of one minute. */
export interface Judgement {
  readonly verdict: MinuteVerdict;
  readonly reason: MinuteReason;
  readonly miss: Miss | null;
  readonly beam: Beam | null;
  /** Share of the light towards the optic that passes openings and bars; null where none were surveyed, or nothing was to pass. */
  readonly passing: number | null;
}

/** Radius of the sun's disc, and the least margin about the horizon that refraction near it demands. [°] */
const discRadiusDeg = 0.27;
const horizonMarginDeg = 0.3;

/** Without a recorded skyline a sun lower than this may stand behind anything. Common practice. [°] */
export const openSkyDeg = 5;

/** A survey value counts as excluded beyond this many sigmas. */
const sigmas = 2;

type Finding = { readonly definite: boolean; readonly reason: MinuteReason } | null;

function againstHorizon(sun: SunMinute, scene: Scene): Finding {
  const aboveDeg = sun.apparentElevationDeg + discRadiusDeg + scene.dipDeg;
  if (aboveDeg < -horizonMarginDeg) return { definite: true, reason: 'night' };
  return aboveDeg < horizonMarginDeg + discRadiusDeg ? { definite: false, reason: 'near-horizon' } : null;
}

function againstSkyline(sun: SunMinute, scene: Scene): Finding {
  if (scene.skyline === null) {
    return sun.apparentElevationDeg < openSkyDeg ? { definite: false, reason: 'skyline-unknown' } : null;
  }
  const plusMinusDeg = sigmas * scene.skylineSigmaDeg;
  const { lowDeg, highDeg } = scene.skyline.rangeDeg(sun.azimuthDeg, plusMinusDeg);
  if (sun.apparentElevationDeg < lowDeg - plusMinusDeg) return { definite: true, reason: 'below-skyline' };
  return sun.apparentElevationDeg < highDeg + plusMinusDeg ? { definite: false, reason: 'uncertainty-straddles' } : null;
}

function againstOpening(sun: SunMinute, opening: OpeningInput | undefined): Finding {
  if (opening === undefined) return null;
  const offDeg = Math.abs(wrap180(sun.azimuthDeg - opening.azimuthDeg));
  const plusMinusDeg = sigmas * opening.azimuthSigmaDeg;
  if (offDeg > opening.halfWidthDeg + plusMinusDeg) return { definite: true, reason: 'outside-opening' };
  const { lowestElevationDeg: lowest = -90, highestElevationDeg: highest = 90 } = opening;
  if (sun.apparentElevationDeg < lowest || sun.apparentElevationDeg > highest) return { definite: true, reason: 'outside-opening' };
  return offDeg > opening.halfWidthDeg - plusMinusDeg ? { definite: false, reason: 'uncertainty-straddles' } : null;
}

/** Every ray must be stopped, survey error included, before openings and bars settle a minute. */
function againstMask(share: RayShare | null): Finding {
  if (share === null) return null;
  if (share.most === 0) return { definite: true, reason: 'blocked' };
  return share.least === 0 ? { definite: false, reason: 'uncertainty-straddles' } : null;
}

/**
 * Lateral tolerance of spot and mark. [m] A point focus may have run anywhere over the mark; the mark of a line focus
 * lies along the line, so only its width counts across.
 */
export function lateralToleranceM(reach: Reach, mark: Mark, focusKind: FocusModel['focusKind']): number {
  return reach.spotRadiusM + markHalfM(mark, focusKind);
}

/** Half the extent of the mark across the spot's reach. [m] */
export function markHalfM(mark: Mark, focusKind: FocusModel['focusKind']): number {
  return focusKind === 'line' ? mark.halfWidthM : Math.max(mark.halfLengthM, mark.halfWidthM);
}

/** One sigma of the survey across the line of sight. [m] */
export function surveySigmaM(mark: Mark): number {
  return Math.max(mark.sigmaLevelM, mark.sigmaUprightM);
}

/** Sigma of the mark's place along the direction of its miss. [m] */
function sigmaAlongMiss(miss: Miss, mark: Mark): number {
  const [east, north, up] = miss.sideways;
  const total = Math.hypot(east, north, up);
  if (total === 0) return surveySigmaM(mark);
  const upright = Math.abs(up) / total;
  return Math.hypot(mark.sigmaUprightM * upright, mark.sigmaLevelM * Math.sqrt(Math.max(0, 1 - upright * upright)));
}

function againstMark(miss: Miss, beam: Beam, mark: Mark, reach: Reach, focusKind: FocusModel['focusKind']): Finding {
  if (dot(beam.direction, mark.normal) >= 0) return { definite: true, reason: 'wrong-side' };
  const sigmaM = sigmaAlongMiss(miss, mark);
  const beyondM = miss.lateralM - lateralToleranceM(reach, mark, focusKind);
  const shortM = Math.max(reach.nearM - miss.alongM, miss.alongM - reach.farM);
  if (beyondM > sigmas * sigmaM || shortM > sigmas * mark.sigmaAxialM) return { definite: true, reason: 'beam-misses' };
  return beyondM > 0 || shortM > 0 ? { definite: false, reason: 'uncertainty-straddles' } : null;
}

/** Findings about optic and mark, in the order in which the light meets them. */
function againstOptic(sun: SunMinute, scene: Scene): { readonly finding: Finding; readonly miss: Miss | null; readonly beam: Beam | null } {
  if (scene.model === null) return { finding: { definite: false, reason: 'optic-unknown' }, miss: null, beam: null };
  const beam = scene.model.beamFor(sun.towardsSun, halfAngleRad(sun.distanceAu));
  if (beam === null) return { finding: { definite: true, reason: 'wrong-side' }, miss: null, beam: null };
  if (scene.mark === null || scene.reach === null) return { finding: { definite: false, reason: 'mark-unknown' }, miss: null, beam };
  const miss = missOf(beam, scene.model, scene.mark);
  return { finding: againstMark(miss, beam, scene.mark, scene.reach, scene.model.focusKind), miss, beam };
}

/**
 * Whether the mark is in focused sunlight at one minute.
 *
 * A single definite obstacle settles it; only without one does a doubt make it "cannot tell". An unknown optic or mark
 * therefore never hides that it was night.
 */
export function judgeMinute(sun: SunMinute, scene: Scene): Judgement {
  const horizon = againstHorizon(sun, scene);
  if (horizon?.definite === true) return { verdict: 'not-sunlit', reason: horizon.reason, miss: null, beam: null, passing: null };
  const { finding: optic, miss, beam } = againstOptic(sun, scene);
  const before = [againstSkyline(sun, scene), againstOpening(sun, scene.opening)];
  const open = before.every((finding) => finding?.definite !== true) && (beam !== null || scene.model === null);
  const share = open ? scene.mask?.(sun.towardsSun, halfAngleRad(sun.distanceAu)) ?? null : null;
  const passing = share?.nominal ?? null;
  const findings = [...before, againstMask(share), optic, horizon];
  const refusal = findings.find((finding) => finding?.definite === true);
  if (refusal !== undefined && refusal !== null) return { verdict: 'not-sunlit', reason: refusal.reason, miss, beam, passing };
  const doubt = [horizon, ...findings].find((finding) => finding !== null);
  if (doubt !== undefined && doubt !== null) return { verdict: 'cannot-tell', reason: doubt.reason, miss, beam, passing };
  return { verdict: 'sunlit', reason: 'sun-on-mark', miss, beam, passing };
}

/** Angle that a length spans at a distance. [°] */
export function spannedDeg(lengthM: number, distanceM: number): number {
  return Math.atan2(lengthM, distanceM) / degree;
}
