/* eslint-disable @typescript-eslint/no-non-null-assertion -- every index is bounded by its loop; a fallback in the hot loops would hide a wrong one as 0 */
import type { Vector } from '#app/physics/vector.ts';
import { frameAbout } from './frame.ts';
import { turnCosines, turnSines, turnSteps } from './turn-table.ts';

/** The sun as a source: half-angle, limb law and the share of the beam that the aureole carries. */
export interface SunDisc {
  readonly direction: Vector;
  readonly halfAngleRad: number;
  readonly limbU: number;
  readonly circumsolarRatio: number;
}

/** Buie's disc edge and outer limit of the aureole. [mrad] */
const aureoleEdgesMrad = [4.65, 43.6] as const;

/**
 * Circumsolar parameter χ that makes the profile's own ratio equal the asked one.
 *
 * @see D. Buie, A. G. Monger and C. J. Dey, Sol. Energy 74, 113–122, 2003; polynomial correction as in public codes
 */
export function buieChi(circumsolarRatio: number): number {
  const c = circumsolarRatio;
  return c <= 0.1
    ? -2245 * c ** 4 + 520.7 * c ** 3 - 39.39 * c ** 2 + 1.891 * c + 0.008
    : 1.973 * c ** 4 - 2.481 * c ** 3 + 0.607 * c ** 2 + 1.151 * c - 0.02;
}

/** Slope γ of the aureole's power law. */
export function buieGamma(chi: number): number {
  return 2.2 * Math.log(0.52 * chi) * chi ** 0.43 - 0.1;
}

/**
 * Fills unit vectors to points of the sun and their weights, whose mean is 1.
 *
 * The length of the vectors is mended by the first terms of 1/√(1 + x): x stays below 2e-3 even on the aureole.
 */
export function sampleSun(
  sun: SunDisc,
  u: Float64Array,
  v: Float64Array,
  count: number,
  outX: Float64Array,
  outY: Float64Array,
  outZ: Float64Array,
  weight: Float64Array,
): void {
  const [sx, sy, sz] = sun.direction;
  const frame = frameAbout(sun.direction);
  const [ex, ey, ez] = frame.x;
  const [fx, fy, fz] = frame.y;
  const tan = Math.tan(sun.halfAngleRad);
  const csr = sun.circumsolarRatio;
  const limb = sun.limbU;
  const meanInverse = 1 / (1 - limb / 3);
  const [inner, outer] = aureoleEdgesMrad;
  const power = csr > 0 ? buieGamma(buieChi(csr)) + 2 : 0;
  const span = csr > 0 ? (outer / inner) ** power - 1 : 0;
  for (let i = 0; i < count; i++) {
    const xi = u[i]!;
    let radius: number;
    if (xi < csr) {
      radius = tan * (1 + (xi / csr) * span) ** (1 / power);
      weight[i] = 1;
    } else {
      const q2 = csr > 0 ? (xi - csr) / (1 - csr) : xi;
      radius = tan * Math.sqrt(q2);
      weight[i] = (1 - limb + limb * Math.sqrt(1 - q2)) * meanInverse;
    }
    const turn = v[i]! * turnSteps;
    const k = turn | 0;
    const part = turn - k;
    const c = turnCosines[k]!;
    const s = turnSines[k]!;
    const a = radius * (c + (turnCosines[k + 1]! - c) * part);
    const b = radius * (s + (turnSines[k + 1]! - s) * part);
    const x = a * a + b * b;
    const inverse = 1 - x * (0.5 - x * (0.375 - x * (0.3125 - x * 0.2734375)));
    outX[i] = (sx + a * ex + b * fx) * inverse;
    outY[i] = (sy + a * ey + b * fy) * inverse;
    outZ[i] = (sz + a * ez + b * fz) * inverse;
  }
}

/** Radiance in a direction over the disc's mean radiance; 0 off the disc and, with it, off the aureole. */
export function relativeRadiance(sun: SunDisc, x: number, y: number, z: number): number {
  const [sx, sy, sz] = sun.direction;
  const cx = y * sz - z * sy;
  const cy = z * sx - x * sz;
  const cz = x * sy - y * sx;
  const sin2 = cx * cx + cy * cy + cz * cz;
  if (x * sx + y * sy + z * sz <= 0) return 0;
  const edge = Math.sin(sun.halfAngleRad);
  const q2 = sin2 / (edge * edge);
  if (q2 < 1) return ((1 - sun.circumsolarRatio) * (1 - sun.limbU + sun.limbU * Math.sqrt(1 - q2))) / (1 - sun.limbU / 3);
  if (sun.circumsolarRatio <= 0) return 0;
  return aureoleRadiance(sun, Math.sqrt(q2));
}

function aureoleRadiance(sun: SunDisc, q: number): number {
  const outer = aureoleEdgesMrad[1] / aureoleEdgesMrad[0];
  if (q > outer) return 0;
  const gamma = buieGamma(buieChi(sun.circumsolarRatio));
  // Share csr spread over the ring with density q^γ, relative to the disc's solid angle π.
  const norm = (outer ** (gamma + 2) - 1) / (gamma + 2);
  return (sun.circumsolarRatio * q ** gamma) / (2 * norm);
}
