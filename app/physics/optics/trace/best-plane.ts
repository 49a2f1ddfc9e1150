/* eslint-disable @typescript-eslint/no-non-null-assertion -- every index is bounded by its loop; a fallback in the hot loops would hide a wrong one as 0 */
import type { Vector } from '#app/physics/vector.ts';
import { dot, scale } from '#app/physics/vector.ts';
import type { LocalPlane, PlaneHits } from './bundle.ts';
import { cutPlane, raysWithin } from './bundle.ts';
import { addScaled } from './frame.ts';
import type { LineHint, SpotFinder } from './hot-spot.ts';
import type { TracedOptic } from './trace-bundle.ts';

/** Plane across the natural normal at a distance from O along the focal axis. */
export function naturalPlane(traced: TracedOptic, distanceM: number): LocalPlane {
  return { origin: scale(traced.kernel.focalAxis, distanceM), normal: traced.kernel.planeNormal };
}

/** Where the central ray meets a plane; the plane's origin if it runs along it. */
function chiefPoint(traced: TracedOptic, plane: LocalPlane): Vector {
  const c = traced.kernel.chiefDirection;
  const along = dot(c, plane.normal);
  if (Math.abs(along) < 1e-6) return plane.origin;
  return scale(c, dot(plane.origin, plane.normal) / along);
}

/** For a line focus: its direction in the plane and the place along it at which values are quoted. */
export function lineHint(traced: TracedOptic, plane: LocalPlane, hits: PlaneHits, at: Vector | null): LineHint | null {
  const { lineDirection } = traced.kernel;
  if (!lineDirection) return null;
  const ux = dot(lineDirection, hits.columnDirection);
  const uy = dot(lineDirection, hits.rowDirection);
  const size = Math.hypot(ux, uy);
  if (size < 1e-3) return null;
  const point = addScaled(at ?? chiefPoint(traced, plane), plane.origin, -1);
  const x = dot(point, hits.columnDirection);
  const y = dot(point, hits.rowDirection);
  const place = (x * ux + y * uy) / size;
  return { ux: ux / size, uy: uy / size, at: place, half: stretchAlong(hits, ux / size, uy / size, place) };
}

/** A sixth of the lit length, so that the ends of the line stay out. */
function stretchAlong(hits: PlaneHits, ux: number, uy: number, at: number): number {
  let sum = 0;
  let weight = 0;
  for (let i = 0; i < hits.count; i += 7) {
    sum += hits.weight[i]! * Math.abs(hits.x[i]! * ux + hits.y[i]! * uy - at);
    weight += hits.weight[i]!;
  }
  return weight > 0 ? sum / weight / 1.5 : 1;
}

export interface PlaneScan {
  readonly distanceM: number;
  readonly concentration: number;
}

/** Rays of each batch in the first, coarse look along the axis. */
const firstLook = 500;

/** Rays that a hot spot should rest on in a quick look. */
const fewestInScan = 60;

/** Hot spots of several radii in planes at given distances, from the first rays of every batch. */
export function scanPlanes(traced: TracedOptic, distances: readonly number[], radii: readonly number[], perBatch: number, finder: SpotFinder, hits: PlaneHits): PlaneScan[][] {
  const scans: PlaneScan[][] = radii.map(() => []);
  const share = sharePerBatch(traced, perBatch);
  for (const distanceM of distances) {
    const plane = naturalPlane(traced, distanceM);
    cutPlane(traced.bundle, plane, hits, perBatch);
    const line = lineHint(traced, plane, hits, null);
    radii.forEach((radius, k) => {
      const spot = finder.find(hits, radius, line, 1, 'quick');
      scans[k]?.push({ distanceM, concentration: (spot?.concentration ?? 0) * share });
    });
  }
  return scans;
}

/** Radius at which a quick look in a plane has rays enough, so that all planes can be compared with the same disc. */
function scanRadius(traced: TracedOptic, distanceM: number, radius: number, perBatch: number, finder: SpotFinder, hits: PlaneHits): number {
  const plane = naturalPlane(traced, distanceM);
  cutPlane(traced.bundle, plane, hits, perBatch);
  return finder.find(hits, radius, lineHint(traced, plane, hits, null), fewestInScan, 'quick')?.radius ?? radius;
}

/** All rays over those looked at. */
function sharePerBatch({ bundle }: TracedOptic, perBatch: number): number {
  const looked = raysWithin(bundle, perBatch);
  return looked > 0 ? bundle.count / looked : 1;
}

const bestOf = (scan: readonly PlaneScan[]): number =>
  scan.reduce((best, s, i) => (s.concentration > (scan[best]?.concentration ?? -1) ? i : best), 0);

/** Vertex of the parabola through a scan's values, held inside it. */
function vertex(scan: readonly PlaneScan[]): number {
  const low = scan[0]?.distanceM ?? 0;
  const high = scan[scan.length - 1]?.distanceM ?? low;
  const middle = (low + high) / 2;
  const half = (high - low) / 2;
  let s2 = 0;
  let s4 = 0;
  let y0 = 0;
  let y1 = 0;
  let y2 = 0;
  for (const { distanceM, concentration } of scan) {
    const x = (distanceM - middle) / half;
    s2 += x * x;
    s4 += x ** 4;
    y0 += concentration;
    y1 += x * concentration;
    y2 += x * x * concentration;
  }
  const n = scan.length;
  const curvature = (n * y2 - s2 * y0) / (n * s4 - s2 * s2);
  const at = curvature < 0 ? -(y1 / s2) / (2 * curvature) : 0;
  return middle + half * Math.max(-1, Math.min(1, at));
}

/** Distance of the plane in which a disc of each radius takes most power. */
export function bestDistances(traced: TracedOptic, radii: readonly number[], finder: SpotFinder, hits: PlaneHits): number[] {
  const { focalDistanceM: f, clearanceM } = traced.kernel;
  const low = Math.max(clearanceM, 0.3 * f);
  const high = Math.max(1.6 * f, 1.2 * clearanceM);
  const steps = 18;
  const ratio = (high / low) ** (1 / steps);
  const coarse = Array.from({ length: steps + 1 }, (_, i) => low * ratio ** i);
  const wide = radii.map((radius) => scanRadius(traced, Math.max(clearanceM, 0.97 * f), radius, firstLook, finder, hits));
  const scans = scanPlanes(traced, coarse, wide, firstLook, finder, hits);
  return radii.map((radius, k) => {
    const scan = scans[k] ?? [];
    let centre = scan[bestOf(scan)]?.distanceM ?? f;
    // Finer round the best plane until the values hardly differ; a parabola then keeps noise from choosing the plane.
    let width = ratio - 1;
    for (let round = 0; round < 5; round++) {
      width /= 2.5;
      const around = Array.from({ length: 5 }, (_, i) => Math.max(clearanceM, centre * (1 + width * (i - 2))));
      const perBatch = round === 0 ? 800 : 1600;
      const [fine = []] = scanPlanes(traced, around, [scanRadius(traced, centre, radius, perBatch, finder, hits)], perBatch, finder, hits);
      const best = bestOf(fine);
      const flat = Math.min(...fine.map((s) => s.concentration)) > 0.93 * (fine[best]?.concentration ?? 0);
      const atEnd = best === 0 || best === 4;
      centre = flat && !atEnd ? vertex(fine) : (fine[best]?.distanceM ?? centre);
      if (flat) break;
    }
    return centre;
  });
}
