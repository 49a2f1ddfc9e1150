import { markFromCoordinates, readMark } from '#app/physics/alignment.ts';
import type { Mark } from '#app/physics/alignment.ts';
import type { ReconstructionInput } from '#app/physics/model/input.ts';
import type { Beam, FocusModel } from '#app/physics/optics/closed-form/beam.ts';
import { focusModelOf } from '#app/physics/optics/closed-form/focus-model.ts';
import { readyOptic } from '#app/physics/reconstruction/pane-bow.ts';
import { settleSite } from '#app/physics/site.ts';
import { solarPosition } from '#app/physics/sun/solar-position.ts';
import { halfAngleRad } from '#app/physics/sun/sun-disc.ts';
import { add, azimuthOf, cross, dot, fromAzimuthElevation, lengthOf, scale, subtract, unit } from '#app/physics/vector.ts';
import type { Vector } from '#app/physics/vector.ts';
import { opticOutline } from './optic-outline.ts';
import type { OpticOutline } from './optic-outline.ts';

/** The beam at one minute, as drawn: closed form of the engine, for the same optic and the same sun as the run. */
export interface BeamMinuteView {
  readonly atUtc: string;
  /** Unit direction of the sun, and of the chief ray beyond the optic; [east, north, up]. */
  readonly towardsSun: Vector;
  readonly direction: Vector;
  /** Index into `profiles`. */
  readonly profile: number;
  /** Unit vector across the line of a line focus. */
  readonly across: Vector | null;
  /** Where the chief ray meets the plane of the target, from the mark's middle, right and up as one faces it. [mm] */
  readonly spotMm: { readonly rightMm: number; readonly upMm: number } | null;
}

/** The target's plane as one stands before it. */
export interface FacingView {
  readonly normal: Vector;
  readonly right: Vector;
  readonly up: Vector;
  /** "east", "up": what right and up are, in words. */
  readonly rightWords: string;
  readonly upWords: string;
  /** False where the surface was not recorded and is taken to face the optic. */
  readonly recorded: boolean;
}

/** Shape of the beam along its chief ray; it changes slowly, so some minutes share one. */
export interface BeamProfile {
  /** Sharpest distance along the chief ray from its start. [m] */
  readonly focusM: number;
  /** Width that holds four fifths of the light, at `shares` of `reachM` along the chief ray. [mm] */
  readonly widthsMm: readonly number[];
}

export interface BeamView {
  readonly focusKind: 'point' | 'line';
  readonly reflects: boolean;
  readonly outline: OpticOutline;
  /** Start of the chief ray. [m] */
  readonly startsAt: Vector;
  /** Direction of the generators of a line optic and half its length. */
  readonly generator: Vector | null;
  readonly lineHalfLengthM: number;
  /** Its place as surveyed, with one sigma sideways and upright as seen from the optic. */
  readonly mark: { readonly position: Vector; readonly lengthMm: number | null; readonly widthMm: number | null; readonly headingDeg: number | null; readonly sigmaRightMm: number; readonly sigmaUpMm: number } | null;
  readonly facing: FacingView | null;
  /** Level direction along which the section is cut, and its bearing. */
  readonly sectionAlong: Vector;
  readonly sectionBearingDeg: number;
  readonly shares: readonly number[];
  readonly reachM: number;
  readonly profiles: readonly BeamProfile[];
  readonly minutes: readonly BeamMinuteView[];
}

/** Lengths along the chief ray, over its drawn reach, at which its width is given. */
const shares = [0.04, 0.15, 0.3, 0.45, 0.6, 0.7, 0.78, 0.86, 1] as const;
/** The drawn beam goes on beyond focus and mark by this much. */
const beyond = 1.3;

const rounded = (value: number, digits: number): number => Number(value.toPrecision(digits));
const roundedVector = ([east, north, up]: Vector): Vector => [Number(east.toFixed(5)), Number(north.toFixed(5)), Number(up.toFixed(5))];

const points = ['north', 'north-east', 'east', 'south-east', 'south', 'south-west', 'west', 'north-west'] as const;
/** Nearest of eight points, for a direction that is level; up and down for the others. */
function directionWords(direction: Vector): string {
  if (Math.abs(direction[2]) > 0.8) return direction[2] > 0 ? 'up' : 'down';
  return points[Math.round(azimuthOf(direction) / 45) % 8] ?? 'north';
}

/** Right and up in a plane as one looks at its outer face; on a level surface up is north. */
export function facingOf(normal: Vector, recorded: boolean): FacingView {
  const flat = subtract([0, 0, 1], scale(normal, normal[2]));
  const up = lengthOf(flat) < 0.05 ? unit(subtract([0, 1, 0], scale(normal, normal[1]))) : unit(flat);
  const right = cross(up, normal);
  return { normal: roundedVector(normal), right: roundedVector(right), up: roundedVector(up), rightWords: directionWords(right), upWords: directionWords(up), recorded };
}

/** Where the chief ray meets the target's plane, from the mark; null where it runs away from or along it. */
function spotOn(beam: Beam, mark: Mark): Vector | null {
  const facing = dot(beam.direction, mark.normal);
  if (facing > -0.02) return null;
  const reachM = dot(mark.position, mark.normal) / facing;
  return reachM <= 0 ? null : subtract(scale(beam.direction, reachM), mark.position);
}

/** Farther than this from the mark, over its distance, the spot is off every drawing. */
const farthestSpot = 20;

/** Widths take most of the time, so a long window has them at this many minutes; those between take the last. */
const mostProfiles = 60;

const profileOf = (beam: Beam, reachM: number): BeamProfile => ({ focusM: rounded(beam.focusM, 4), widthsMm: shares.map((share) => rounded(beam.spotDiameterM(share * reachM) * 1000, 3)) });

interface LitMinute {
  readonly atUtc: string;
  readonly towardsSun: Vector;
  readonly beam: Beam;
}

function beamMinute({ atUtc, towardsSun, beam }: LitMinute, profile: number, mark: Mark | null, facing: FacingView | null): BeamMinuteView {
  const spot = mark ? spotOn(beam, mark) : null;
  const near = spot && mark && lengthOf(spot) < farthestSpot * mark.distanceM ? spot : null;
  return {
    atUtc,
    towardsSun: roundedVector(towardsSun),
    direction: roundedVector(beam.direction),
    profile,
    across: beam.across ? roundedVector(beam.across) : null,
    spotMm: near && facing ? { rightMm: rounded(dot(near, facing.right) * 1000, 4), upMm: rounded(dot(near, facing.up) * 1000, 4) } : null,
  };
}

function surveyedMark(input: ReconstructionInput, model: FocusModel): Mark | null {
  const given = input.mark ?? (input.markCoordinates ? markFromCoordinates(input.markCoordinates) : null);
  return given ? readMark(given, model.startsAt) : null;
}

/** Farthest that is drawn along the chief ray: the mark, or the focus of the first beam where it was not measured. */
function reachOf(mark: Mark | null, model: FocusModel): number {
  if (!mark) return beyond * model.focalLengthM;
  return beyond * Math.max(mark.distanceM, Math.min(model.focalLengthM, 1.5 * mark.distanceM));
}

/**
 * What plan, section and trail are drawn from: optic, mark, and the beam at each minute at which light meets the
 * working face. Null without an optic.
 *
 * @param minutes Instants of the window, ISO 8601 in UTC.
 */
export function beamView(input: ReconstructionInput, minutes: readonly string[]): BeamView | null {
  if (!input.optic) return null;
  const { optic } = readyOptic(input.optic, settleSite(input).air.pressureHpa);
  const model = focusModelOf(optic);
  if (!(model.focalLengthM > 0)) return null;
  const { observer } = settleSite(input);
  const mark = surveyedMark(input, model);
  const { normalAzimuthDeg, normalElevationDeg } = input.mark ?? input.markCoordinates ?? {};
  const facing = mark ? facingOf(mark.normal, normalAzimuthDeg !== undefined || normalElevationDeg !== undefined) : null;
  const reachM = reachOf(mark, model);
  const lit = minutes.flatMap((atUtc): LitMinute[] => {
    const sun = solarPosition(Date.parse(atUtc), observer);
    if (sun.apparentElevationDeg < -0.5) return [];
    const towardsSun = fromAzimuthElevation(sun.azimuthDeg, sun.apparentElevationDeg);
    const beam = model.beamFor(towardsSun, halfAngleRad(sun.distanceAu));
    return beam ? [{ atUtc, towardsSun, beam }] : [];
  });
  const stride = Math.max(1, Math.ceil(lit.length / mostProfiles));
  const profiles = lit.filter((_one, index) => index % stride === 0).map((one) => profileOf(one.beam, reachM));
  const drawn = lit.map((one, index) => beamMinute(one, Math.floor(index / stride), mark, facing));
  const across = mark?.surveyed ?? drawn[Math.floor(drawn.length / 2)]?.direction ?? [0, 1, 0];
  const bearingDeg = azimuthOf(Math.hypot(across[0], across[1]) < 1e-6 ? (drawn[Math.floor(drawn.length / 2)]?.direction ?? [0, 1, 0]) : across);
  const given = input.mark ?? input.markCoordinates;
  return {
    focusKind: model.focusKind,
    reflects: model.reflects,
    outline: opticOutline(optic),
    startsAt: model.startsAt,
    generator: model.generator ? roundedVector(model.generator) : null,
    lineHalfLengthM: model.lineHalfLengthM,
    mark: mark ? { position: add(mark.position, model.startsAt), lengthMm: given?.lengthMm ?? null, widthMm: given?.widthMm ?? null, headingDeg: given?.trailHeadingDeg ?? null, sigmaRightMm: rounded(mark.sigmaLevelM * 1000, 3), sigmaUpMm: rounded(mark.sigmaUprightM * 1000, 3) } : null,
    facing,
    sectionAlong: fromAzimuthElevation(bearingDeg, 0),
    sectionBearingDeg: bearingDeg,
    shares,
    reachM,
    profiles,
    minutes: drawn,
  };
}
