/* eslint-disable @typescript-eslint/no-non-null-assertion -- every index is bounded by its loop; a fallback in the hot loops would hide a wrong one as 0 */
import type { CurvedReflectorOptic } from '#app/physics/optics/optic.ts';
import { gaussPair } from './gauss.ts';
import { PlateShape } from './plate.ts';
import { wordSource } from '#app/physics/sobol.ts';

/**
 * Reflecting sheet that is met from a parametrised surface: u runs along local x, v along local y; O is the origin
 * and local z looks outward. `at` writes point (0–2), unit normal (3–5) and area per unit of u·v (6).
 */
export interface SheetSurface {
  at(u: number, v: number, out: Float64Array): void;
  /** Distance at which light leaving the point meets the sheet again, with the place (u, v) in out; else Infinity. */
  next(point: Float64Array, dx: number, dy: number, dz: number, out: Float64Array): number;
  /** Extent of v. [m] */
  readonly heightM: number;
}

/** Rectangular pane bowed to a depth at its centre, behind its edge plane if positive. */
export function bowedPane(widthM: number, heightM: number, bowM: number): SheetSurface {
  const shape = new PlateShape(widthM, heightM);
  const plate = new Float64Array(3);
  return {
    heightM,
    at(u, v, out) {
      const x = widthM * (u - 0.5);
      const y = heightM * (v - 0.5);
      shape.at(x, y, plate);
      const gx = bowM * plate[1]!;
      const gy = bowM * plate[2]!;
      const f = 1 / Math.sqrt(1 + gx * gx + gy * gy);
      out[0] = x;
      out[1] = y;
      out[2] = -bowM * plate[0]!;
      out[3] = gx * f;
      out[4] = gy * f;
      out[5] = f;
      out[6] = (widthM * heightM) / f;
    },
    next: () => Infinity,
  };
}

/** Smooth concave cylinder with generators along y; the chord's middle faces +z and its mid-line passes through O. */
export function smoothArc(optic: CurvedReflectorOptic): SheetSurface {
  const { radiusM: R, chordM, lengthM } = optic;
  const half = Math.asin(chordM / (2 * R));
  return {
    heightM: lengthM,
    at(u, v, out) {
      const phi = half * (2 * u - 1);
      const s = Math.sin(phi);
      const c = Math.cos(phi);
      out[0] = R * s;
      out[1] = lengthM * (v - 0.5);
      out[2] = R * (1 - c);
      out[3] = -s;
      out[4] = 0;
      out[5] = c;
      out[6] = 2 * half * R * lengthM;
    },
    next: (p, dx, dy, dz, out) => nextOnArc(R, half, lengthM, p, dx, dy, dz, out),
  };
}

/** Next meeting of a ray with the arc on which it starts. */
function nextOnArc(R: number, half: number, lengthM: number, p: Float64Array, dx: number, dy: number, dz: number, out: Float64Array): number {
  const a = dx * dx + dz * dz;
  if (a < 1e-12) return Infinity;
  const x = p[0]!;
  const z = p[2]! - R;
  const b = x * dx + z * dz;
  const c = x * x + z * z - R * R;
  const t = (-b + Math.sqrt(Math.max(0, b * b - a * c))) / a;
  if (t < 1e-3 * R) return Infinity;
  const u = 0.5 + Math.atan2(x + t * dx, -(z + t * dz)) / (2 * half);
  const v = 0.5 + (p[1]! + t * dy) / lengthM;
  if (u < 0 || u >= 1 || v < 0 || v >= 1) return Infinity;
  out[0] = u;
  out[1] = v;
  return t;
}

/**
 * Arc built of flat or slightly bowed panes whose edges lie on it, each set out with a tilt of its own.
 *
 * @param paneHeightM Height of one pane; storeys above each other get tilts of their own.
 */
export function panedArc(optic: CurvedReflectorOptic, paneWidthM: number, paneHeightM: number, bowM: number, tiltSigmaRad: number, seed: number): SheetSurface {
  const { radiusM: R, chordM, lengthM } = optic;
  const half = Math.asin(chordM / (2 * R));
  const columns = Math.max(1, Math.round((2 * half * R) / paneWidthM));
  const rows = Math.max(1, Math.round(lengthM / paneHeightM));
  const step = (2 * half) / columns;
  const width = 2 * R * Math.sin(step / 2);
  const height = lengthM / rows;
  const deep = R * Math.cos(step / 2);
  const tilts = new Float64Array(columns * rows * 2);
  const word = wordSource(seed ^ 0x5bd1e995);
  for (let i = 0; i < tilts.length; i += 2) gaussPair((word() + 0.5) / 4294967296, (word() + 0.5) / 4294967296, tilts, i);
  const shape = bowM !== 0 ? new PlateShape(width, height) : null;
  const plate = new Float64Array(3);
  return {
    heightM: lengthM,
    at(u, v, out) {
      const column = Math.min(columns - 1, Math.floor(u * columns));
      const row = Math.min(rows - 1, Math.floor(v * rows));
      const x = width * (u * columns - column - 0.5);
      const y = height * (v * rows - row - 0.5);
      const phi = -half + step * (column + 0.5);
      const s = Math.sin(phi);
      const c = Math.cos(phi);
      const k = 2 * (column * rows + row);
      let gx = tiltSigmaRad * tilts[k]!;
      let gy = tiltSigmaRad * tilts[k + 1]!;
      let w = gx * x + gy * y;
      gx = -gx;
      gy = -gy;
      if (shape) {
        shape.at(x, y, plate);
        w -= bowM * plate[0]!;
        gx += bowM * plate[1]!;
        gy += bowM * plate[2]!;
      }
      const f = 1 / Math.sqrt(1 + gx * gx + gy * gy);
      // Pane axes: along the chord (c, 0, s), outward (−s, 0, c).
      out[0] = deep * s + x * c - w * s;
      out[1] = lengthM * (v - 0.5);
      out[2] = R - deep * c + x * s + w * c;
      out[3] = (gx * c - s) * f;
      out[4] = gy * f;
      out[5] = (gx * s + c) * f;
      out[6] = (columns * width * lengthM) / f;
    },
    next: (p, dx, dy, dz, out) => nextOnArc(R, half, lengthM, p, dx, dy, dz, out),
  };
}
