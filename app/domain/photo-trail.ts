import { dot, fromAzimuthElevation } from '#app/physics/vector.ts';
import { mapped } from './homography.ts';
import type { Homography, PlanePoint } from './homography.ts';
import { planeOf } from './photo-measure.ts';
import type { PhotoClicks } from './photo-measure.ts';
import type { BeamView, FacingView } from './run-beam.ts';

/** A photo of the case on which the plane of the mark is known. */
export interface ScaledPhoto {
  readonly photoId: string;
  /** "118-3" */
  readonly label: string;
  readonly altText: string;
  readonly clicks: PhotoClicks;
}

/** The way of the spot in the pixels of the view copy. */
export interface PhotoTrail {
  readonly spots: readonly { readonly atUtc: string; readonly at: PlanePoint }[];
  readonly mark: readonly [PlanePoint, PlanePoint];
  /** How the photo was laid against the compass. */
  readonly basis: string;
}

/** The other way round: from millimetres in the plane to pixels. */
function inverse([a, b, c, d, e, f, g, h, i]: Homography): Homography | null {
  const cofactors = [e * i - f * h, c * h - b * i, b * f - c * e, f * g - d * i, a * i - c * g, c * d - a * f, d * h - e * g, b * g - a * h, a * e - b * d];
  const last = cofactors[8] ?? 0;
  if (Math.abs(last) < 1e-12) return null;
  const [p = 0, q = 0, r = 0, s = 0, t = 0, u = 0, v = 0, w = 0] = cofactors.map((value) => value / last);
  return [p, q, r, s, t, u, v, w, 1];
}

/** Direction of the plane's x axis, the clicked edge, as one faces the target: anticlockwise from right. [rad] */
function edgeTurn({ scale, edgeBearingDeg }: PhotoClicks, facing: FacingView): { readonly turn: number; readonly basis: string } {
  if (edgeBearingDeg !== null) {
    const level = fromAzimuthElevation(edgeBearingDeg, 0);
    const [right, up] = [dot(level, facing.right), dot(level, facing.up)];
    if (Math.hypot(right, up) > 0.2) return { turn: Math.atan2(up, right), basis: `the edge that was clicked runs towards ${edgeBearingDeg}° true` };
  }
  if (scale.kind === 'rectangle') return { turn: 0, basis: 'the edge from corner 1 to corner 2 is taken as level' };
  return { turn: Math.atan2(-(scale.to.y - scale.from.y), scale.to.x - scale.from.x), basis: 'the photo is taken as held upright' };
}

/**
 * Puts the predicted way of the spot on a photo whose plane is known: the middle of the measured mark in the photo is the
 * mark of the run.
 *
 * @returns null where the clicks give no plane, or the run has no mark.
 */
export function photoTrail(beam: BeamView, clicks: PhotoClicks): PhotoTrail | null {
  const plane = planeOf(clicks.scale);
  const toPhoto = plane ? inverse(plane) : null;
  if (!plane || !toPhoto || !beam.facing) return null;
  const ends = clicks.lengthEnds.map((end) => mapped(plane, end));
  const [first, last] = ends;
  if (!first || !last) return null;
  const middle = { x: (first.x + last.x) / 2, y: (first.y + last.y) / 2 };
  const { turn, basis } = edgeTurn(clicks, beam.facing);
  const [cos, sin] = [Math.cos(turn), Math.sin(turn)];
  const spots = beam.minutes.flatMap(({ atUtc, spotMm }) => {
    if (!spotMm) return [];
    // In the plane x runs along the edge and y down from it, as in the photo.
    const at = mapped(toPhoto, { x: middle.x + spotMm.rightMm * cos + spotMm.upMm * sin, y: middle.y + spotMm.rightMm * sin - spotMm.upMm * cos });
    return at ? [{ atUtc, at }] : [];
  });
  return { spots, mark: clicks.lengthEnds, basis };
}
