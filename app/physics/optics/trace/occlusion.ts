/* eslint-disable @typescript-eslint/no-non-null-assertion -- every index is bounded by its loop; a fallback in the hot loops would hide a wrong one as 0 */
import type { Vector } from '#app/physics/vector.ts';
import { cross, dot, subtract } from '#app/physics/vector.ts';
import type { Frame } from './frame.ts';
import { frameAbout, toLocal, unitOf } from './frame.ts';
import type { Occluder } from './trace-model.ts';

/** True when the straight way from a point to the sun is blocked. Local axes. */
export type OcclusionTest = (px: number, py: number, pz: number, sx: number, sy: number, sz: number) => boolean;

interface FlatPolygon {
  readonly opening: boolean;
  readonly normal: Vector;
  readonly offset: number;
  readonly ex: Vector;
  readonly ey: Vector;
  readonly xs: Float64Array;
  readonly ys: Float64Array;
}

function flatten(occluder: Occluder, frame: Frame): FlatPolygon {
  const corners = occluder.corners.map((c) => toLocal(frame, c));
  const [a, b, c] = corners;
  if (!a || !b || !c) throw new RangeError(`occluder has ${corners.length} corners; at least 3 are needed`);
  const normal = unitOf(cross(subtract(b, a), subtract(c, a)), 'normal of an occluder');
  const offset = dot(normal, a);
  for (const corner of corners) {
    if (Math.abs(dot(normal, corner) - offset) > 1e-3) throw new RangeError('the corners of an occluder must lie in one plane within 1 mm');
  }
  const { x: ex, y: ey } = frameAbout(normal);
  return {
    opening: occluder.kind === 'opening',
    normal,
    offset,
    ex,
    ey,
    xs: Float64Array.from(corners, (p) => dot(p, ex)),
    ys: Float64Array.from(corners, (p) => dot(p, ey)),
  };
}

/** Even-odd rule. */
function inside(polygon: FlatPolygon, x: number, y: number): boolean {
  const { xs, ys } = polygon;
  let odd = false;
  for (let i = 0, j = xs.length - 1; i < xs.length; j = i++) {
    const yi = ys[i]!;
    const yj = ys[j]!;
    if (yi > y !== yj > y && x < ((xs[j]! - xs[i]!) * (y - yi)) / (yj - yi) + xs[i]!) odd = !odd;
  }
  return odd;
}

/**
 * Test against every polygon. Openings in the same plane share it: a ray must pass one of them; a second plane with
 * openings must be passed as well.
 */
export function occlusionTest(occluders: readonly Occluder[], frame: Frame): OcclusionTest | null {
  if (occluders.length === 0) return null;
  const flat = occluders.map((o) => flatten(o, frame));
  const blocks = flat.filter((p) => !p.opening);
  const walls: FlatPolygon[][] = [];
  for (const p of flat.filter((q) => q.opening)) {
    const wall = walls.find(([q]) => q && Math.abs(dot(q.normal, p.normal)) > 0.999999 && Math.abs(q.offset - dot(q.normal, p.normal) * p.offset) < 1e-3);
    if (wall) wall.push(p);
    else walls.push([p]);
  }
  const passes = (p: FlatPolygon, px: number, py: number, pz: number, sx: number, sy: number, sz: number): boolean => {
    const along = p.normal[0] * sx + p.normal[1] * sy + p.normal[2] * sz;
    const t = (p.offset - p.normal[0] * px - p.normal[1] * py - p.normal[2] * pz) / along;
    if (!(t > 1e-9 && Number.isFinite(t))) return false;
    const x = px + t * sx;
    const y = py + t * sy;
    const z = pz + t * sz;
    return inside(p, x * p.ex[0] + y * p.ex[1] + z * p.ex[2], x * p.ey[0] + y * p.ey[1] + z * p.ey[2]);
  };
  return (px, py, pz, sx, sy, sz) => {
    for (const p of blocks) if (passes(p, px, py, pz, sx, sy, sz)) return true;
    for (const wall of walls) if (!wall.some((p) => passes(p, px, py, pz, sx, sy, sz))) return true;
    return false;
  };
}
