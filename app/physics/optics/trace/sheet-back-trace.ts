/* eslint-disable @typescript-eslint/no-non-null-assertion -- every index is bounded by its loop; a fallback in the hot loops would hide a wrong one as 0 */
import type { Vector } from '#app/physics/vector.ts';
import { cutOff, mostInteractions } from './body-path.ts';
import { newCrossing, tiltNormal } from './convex-body.ts';
import { gaussPair } from './gauss.ts';
import type { BackTrace } from './kernel.ts';
import type { Branch } from './sheet-kernel.ts';
import type { SunDisc } from './sun-sampling.ts';
import { relativeRadiance } from './sun-sampling.ts';

const place = new Float64Array(7);
const uv = new Float64Array(2);
const gaussians = new Float64Array(2);
const tilted = newCrossing();

/**
 * Back-traced estimator of a reflecting sheet, all branches and bounces.
 *
 * Along straight generators a reflection keeps the ray's component, so for a line focus only the stretch of each
 * generator that can show the sun is tried: its middle follows from the distance, its half-width from the size of the
 * sun and the slope errors.
 */
export function sheetBackTrace(
  branches: readonly Branch[], sigma: number, line: boolean, sun: SunDisc,
  blocked: (px: number, py: number, pz: number, sx: number, sy: number, sz: number) => boolean,
): BackTrace {
  const sunSolidAngle = Math.PI * Math.sin(sun.halfAngleRad) ** 2;
  const along = sun.direction[1];
  const across2 = 1 - along * along;
  const spreadRad = sun.halfAngleRad * 1.2 + 10 * sigma + (sun.circumsolarRatio > 0 ? 0.04 : 0) + 0.03;

  const stretch = (branch: Branch, at: Vector, u: number, v: number): number => {
    const height = branch.surface.heightM;
    branch.surface.at(u, 0.5, place);
    const distance = Math.hypot(at[0] - place[0]!, at[2] - place[2]!) / Math.sqrt(across2);
    const middle = 0.5 + (at[1] + along * distance) / height;
    const half = (distance * spreadRad) / (across2 * height);
    const low = Math.max(0, middle - half);
    const high = Math.min(1, middle + half);
    if (high <= low) return 0;
    branch.surface.at(u, low + v * (high - low), place);
    return high - low;
  };

  const follow = (branch: Branch, dx: number, dy: number, dz: number): number => {
    let power = 1;
    for (let bounce = 0; bounce < mostInteractions && power > cutOff; bounce++) {
      tilted.nx = place[3]!;
      tilted.ny = place[4]!;
      tilted.nz = place[5]!;
      if (sigma > 0) tiltNormal(tilted, sigma * gaussians[0]!, sigma * gaussians[1]! * (bounce & 1 ? -1 : 1));
      const c = -(dx * tilted.nx + dy * tilted.ny + dz * tilted.nz);
      if (c <= 0) return 0;
      power *= branch.reflectance(c);
      dx += 2 * c * tilted.nx;
      dy += 2 * c * tilted.ny;
      dz += 2 * c * tilted.nz;
      if (branch.surface.next(place, dx, dy, dz, uv) === Infinity) {
        const radiance = relativeRadiance(sun, dx, dy, dz);
        return radiance === 0 || blocked(place[0]!, place[1]!, place[2]!, dx, dy, dz) ? 0 : radiance * power;
      }
      branch.surface.at(uv[0]!, uv[1]!, place);
    }
    return 0;
  };

  const onePath = (branch: Branch, at: Vector, receiver: Vector, u: Float64Array): number => {
    let share = 1;
    if (line && across2 > 1e-3) share = stretch(branch, at, u[0]!, u[1]!);
    else branch.surface.at(u[0]!, u[1]!, place);
    if (share === 0) return 0;
    let dx = place[0]! - at[0];
    let dy = place[1]! - at[1];
    let dz = place[2]! - at[2];
    const d = Math.sqrt(dx * dx + dy * dy + dz * dz);
    dx /= d;
    dy /= d;
    dz /= d;
    const cosReceiver = dx * receiver[0] + dy * receiver[1] + dz * receiver[2];
    const facing = -(dx * place[3]! + dy * place[4]! + dz * place[5]!);
    if (cosReceiver <= 0 || facing <= 0) return 0;
    if (branch.surface.next(place, -dx, -dy, -dz, uv) < d) return 0;
    const solid = (place[6]! * facing * share) / (d * d);
    return (follow(branch, dx, dy, dz) * cosReceiver * solid) / sunSolidAngle;
  };

  return {
    dimensions: 4,
    path(at, receiver, u) {
      gaussPair(u[2]!, u[3]!, gaussians, 0);
      let sum = 0;
      for (const branch of branches) sum += onePath(branch, at, receiver, u);
      return sum;
    },
  };
}
