import { add, cross, dot, scale } from '#app/physics/vector.ts';
import type { Vector } from '#app/physics/vector.ts';
import type { BeamMinuteView, BeamView } from './run-beam.ts';
import { hullOf, seenFrom } from './scale-drawing.ts';
import type { Flat, ScaleFrame, Sight } from './scale-drawing.ts';

/** Optic, mark and beam as one sees them in plan or section, in metres. */
export interface BeamShape {
  readonly ball: { readonly centre: Flat; readonly radiusM: number } | null;
  readonly body: readonly Flat[];
  readonly lines: readonly (readonly Flat[])[];
  readonly mark: Flat | null;
  /** Direction of the target's surface in the drawing plane, and of the side that faces the light; null where the surface lies in that plane. */
  readonly surface: { readonly along: Flat; readonly outward: Flat } | null;
  readonly start: Flat;
  /** Middle of the face by which light comes in. */
  readonly entry: Flat;
}

export interface BeamAt {
  /** Outline of the stretch that holds four fifths of the light. */
  readonly envelope: readonly Flat[];
  readonly axis: readonly [Flat, Flat];
  readonly focus: Flat;
  readonly spot: Flat | null;
  /** Direction towards the sun in the drawing plane, and half the width of the light taken in. */
  readonly towardsSun: Flat;
  readonly halfApertureM: number;
  /** Angle by which the chief ray leaves the drawing plane. [°] */
  readonly leavesPlaneDeg: number;
}

export function beamShape(beam: BeamView, sight: Sight): BeamShape {
  const flat = seenFrom(sight);
  const { outline, mark, facing } = beam;
  return {
    ball: outline.ball ? { centre: flat(outline.ball.centre), radiusM: outline.ball.radiusM } : null,
    body: hullOf(outline.body.map(flat)),
    lines: outline.lines.map((line) => line.map(flat)),
    mark: mark ? flat(mark.position) : null,
    surface: facing ? surfaceOf(flat(facing.normal)) : null,
    start: flat(beam.startsAt),
    entry: flat(outline.entersAt),
  };
}

function surfaceOf([across, up]: Flat): BeamShape['surface'] {
  const size = Math.hypot(across, up);
  if (size < 0.15) return null;
  return { along: [-up / size, across / size], outward: [across / size, up / size] };
}

/** Half the width of a beam as seen across its own axis: of a line focus, its length counts with its width. */
function halfSeenM(beam: BeamView, minute: BeamMinuteView, across: Vector, widthMm: number): number {
  const half = widthMm / 2000;
  if (!minute.across || !beam.generator) return half;
  return Math.abs(dot(minute.across, across)) * half + Math.abs(dot(beam.generator, across)) * beam.lineHalfLengthM;
}

/** The beam of one minute; null where it runs straight at the reader. */
export function beamAt(beam: BeamView, minute: BeamMinuteView, sight: Sight): BeamAt | null {
  const flat = seenFrom(sight);
  const seen = flat(minute.direction);
  const size = Math.hypot(seen[0], seen[1]);
  const profile = beam.profiles[minute.profile];
  if (size < 0.1 || !profile) return null;
  // Across the chief ray, inside the drawing plane.
  const side: Flat = [-seen[1] / size, seen[0] / size];
  const across = add(scale(sight.right, side[0]), scale(sight.up, side[1]));
  const start = flat(beam.startsAt);
  const at = (distanceM: number, halfM = 0): Flat => [start[0] + seen[0] * distanceM + side[0] * halfM, start[1] + seen[1] * distanceM + side[1] * halfM];
  const edge = beam.shares.flatMap((share, index) => {
    const distanceM = share * beam.reachM;
    return distanceM < beam.outline.leavesAtM ? [] : [{ distanceM, halfM: halfSeenM(beam, minute, across, profile.widthsMm[index] ?? 0) }];
  });
  const normal = Math.abs(dot(minute.direction, cross(sight.right, sight.up)));
  const spot = minute.spotMm && beam.mark && beam.facing
    ? flat(add(beam.mark.position, add(scale(beam.facing.right, minute.spotMm.rightMm / 1000), scale(beam.facing.up, minute.spotMm.upMm / 1000))))
    : null;
  const sun = flat(minute.towardsSun);
  const sunSize = Math.max(1e-6, Math.hypot(sun[0], sun[1]));
  return {
    // Seen nearly from its end a beam has no outline to speak of.
    envelope: size < 0.3 ? [] : [...edge.map(({ distanceM, halfM }) => at(distanceM, halfM)), ...edge.toReversed().map(({ distanceM, halfM }) => at(distanceM, -halfM))],
    axis: [start, at(beam.reachM)],
    focus: at(profile.focusM),
    spot,
    towardsSun: [sun[0] / sunSize, sun[1] / sunSize],
    halfApertureM: beam.outline.halfApertureM,
    leavesPlaneDeg: (Math.asin(Math.min(1, normal)) * 180) / Math.PI,
  };
}

/** Points that a drawing must hold: the optic, the mark, and room for the light that comes in. */
export function extentOf(shape: BeamShape, beam: BeamView, reference: BeamAt | null): Flat[] {
  const ball = shape.ball;
  const optic: Flat[] = [...(ball ? [[ball.centre[0] - ball.radiusM, ball.centre[1] - ball.radiusM] satisfies Flat, [ball.centre[0] + ball.radiusM, ball.centre[1] + ball.radiusM] satisfies Flat] : []), ...shape.body, ...shape.lines.flat(), shape.start];
  const inM = Math.max(0.3 * beam.reachM, 1.3 * beam.outline.leavesAtM);
  const incoming: Flat[] = reference ? [[shape.start[0] + reference.towardsSun[0] * inM, shape.start[1] + reference.towardsSun[1] * inM]] : [];
  // Light beyond the mark is cut by the frame; a little of it shows that it goes on.
  const onward: Flat[] = reference ? [[shape.start[0] + 0.92 * (reference.axis[1][0] - shape.start[0]), shape.start[1] + 0.92 * (reference.axis[1][1] - shape.start[1])]] : [];
  return [...optic, ...(shape.mark ? [shape.mark] : []), ...onward, ...incoming];
}

const rayShares = [-1, -0.5, 0, 0.5, 1] as const;

/** Light that comes in: five parallel rays, each from the face that it meets to so far out towards the sun. [m] */
export function incomingRays(shape: BeamShape, at: BeamAt, farM: number): (readonly [Flat, Flat])[] {
  const [sunX, sunY] = at.towardsSun;
  return rayShares.map((share) => {
    const off = share * at.halfApertureM * 0.96;
    const stopM = shape.ball ? Math.sqrt(Math.max(0, shape.ball.radiusM ** 2 - off ** 2)) : 0;
    const from: Flat = [shape.entry[0] - sunY * off + sunX * stopM, shape.entry[1] + sunX * off + sunY * stopM];
    return [from, [from[0] + sunX * farM, from[1] + sunY * farM]];
  });
}

/** The surface that was hit, in the units of a drawing, y pointing down. */
export interface TargetFace {
  readonly face: readonly [Flat, Flat];
  /** The same edge behind the face: between the two lies the material. */
  readonly back: readonly [Flat, Flat];
  /** The mark on it; its length in space lies along the face as drawn. */
  readonly mark: readonly [Flat, Flat];
}

/** Drawn a little way to both sides of the mark; null where its surface is not seen from the side. */
export function targetFace({ mark, surface }: BeamShape, markLengthMm: number | null, frame: ScaleFrame, size: { readonly leastHalf: number; readonly thick: number }): TargetFace | null {
  if (!mark || !surface) return null;
  const middle: Flat = [frame.x(mark[0]), frame.y(mark[1])];
  const markHalf = markHalfDrawn(markLengthMm, frame);
  const half = Math.max(size.leastHalf, markHalf + 20);
  const along = (length: number): Flat => [middle[0] + surface.along[0] * length, middle[1] - surface.along[1] * length];
  const behind = ([x, y]: Flat): Flat => [x - surface.outward[0] * size.thick, y + surface.outward[1] * size.thick];
  const face = [along(-half), along(half)] as const;
  return { face, back: [behind(face[0]), behind(face[1])], mark: [along(-markHalf), along(markHalf)] };
}

/** Half the length of the mark in a drawing, never too small to be seen. */
export const markHalfDrawn = (lengthMm: number | null, frame: ScaleFrame): number => Math.max(3, ((lengthMm ?? 0) / 2000) * frame.pxPerM);
