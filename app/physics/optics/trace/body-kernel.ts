/* eslint-disable @typescript-eslint/no-non-null-assertion -- every index is bounded by its loop; a fallback in the hot loops would hide a wrong one as 0 */
import type { Vector } from '#app/physics/vector.ts';
import type { Body } from './body-path.ts';
import { newBodyPath, traceBody } from './body-path.ts';
import type { RayBundle } from './bundle.ts';
import { enterBody, newCrossing } from './convex-body.ts';
import { gaussPair } from './gauss.ts';
import type { BackTrace, Launch, Samples } from './kernel.ts';
import { channelPicker } from './sphere-kernel.ts';
import type { Channel } from './spectral.ts';
import type { SunDisc } from './sun-sampling.ts';
import { relativeRadiance } from './sun-sampling.ts';

/** Flat stop on which rays start: a disc or rectangle spanned by e and f, taken upstream by `upstreamM`. */
export interface Stop {
  readonly shape: 'disc' | 'rectangle';
  readonly centre: Vector;
  readonly e: Vector;
  readonly f: Vector;
  /** Radius, or half extent along e. [m] */
  readonly a: number;
  /** Half extent along f. [m] */
  readonly b: number;
  readonly upstreamM: number;
}

function stopPoint(stop: Stop, u: number, v: number, out: Float64Array): void {
  let s = stop.a * (2 * u - 1);
  let t = stop.b * (2 * v - 1);
  if (stop.shape === 'disc') {
    const radius = stop.a * Math.sqrt(u);
    s = radius * Math.cos(2 * Math.PI * v);
    t = radius * Math.sin(2 * Math.PI * v);
  }
  const { centre, e, f } = stop;
  out[0] = centre[0] + s * e[0] + t * f[0];
  out[1] = centre[1] + s * e[1] + t * f[1];
  out[2] = centre[2] + s * e[2] + t * f[2];
}

/** Forward trace of a refracting body. Dimensions: stop 0–1, sun 2–3, colour 4, walls 5–8. */
export function bodyTracer(body: Body, channels: readonly Channel[], stop: Stop): (samples: Samples, launch: Launch, bundle: RayBundle) => void {
  const path = newBodyPath();
  const gaussians = new Float64Array(4);
  const start = new Float64Array(3);
  const pick = channelPicker(channels);
  return (samples, launch, bundle) => {
    const { u, sunX, sunY, sunZ, sunWeight } = samples;
    const ledger = bundle.ledger;
    for (let i = 0; i < samples.count; i++) {
      stopPoint(stop, u[0]![i]!, u[1]![i]!, start);
      const sx = sunX[i]!;
      const sy = sunY[i]!;
      const sz = sunZ[i]!;
      const w = launch.rayWeight * sunWeight[i]!;
      const x = start[0]!;
      const y = start[1]!;
      const z = start[2]!;
      if (u.length > 8) {
        gaussPair(u[5]![i]!, u[6]![i]!, gaussians, 0);
        gaussPair(u[7]![i]!, u[8]![i]!, gaussians, 2);
      }
      const up = stop.upstreamM;
      if (launch.blocked?.(x, y, z, sx, sy, sz)) {
        ledger.blocked += w;
        continue;
      }
      const channel = pick(u.length > 4 ? u[4]![i]! : 0);
      if (!traceBody(body, channel, x + up * sx, y + up * sy, z + up * sz, -sx, -sy, -sz, gaussians, path)) continue;
      let out = 0;
      for (let k = 0; k < path.exitCount; k++) {
        const e = path.exits[k]!;
        out += e.power;
        bundle.push(e.px, e.py, e.pz, e.dx, e.dy, e.dz, w * e.power);
      }
      ledger.incident += w;
      ledger.transmitted += w * out;
      ledger.reflected += w * path.reflected;
      ledger.absorbed += w * path.absorbed;
      ledger.stray += w * path.stray;
      ledger.worstImbalance = Math.max(ledger.worstImbalance, Math.abs(1 - out - path.reflected - path.absorbed - path.stray));
    }
  };
}

/** Direction to try from a point and the solid angle it stands for; written to [x, y, z, Ω]. Ω = 0 if none. */
export type Aim = (at: Vector, u: number, v: number, out: Float64Array) => void;

/** Directions evenly over the cone that a ball fills. */
export function aimAtBall(centre: Vector, radius: number): Aim {
  return (at, u, v, out) => {
    const x = centre[0] - at[0];
    const y = centre[1] - at[1];
    const z = centre[2] - at[2];
    const d2 = x * x + y * y + z * z;
    if (d2 <= radius * radius) {
      out[3] = 0;
      return;
    }
    const height = 1 - Math.sqrt(1 - (radius * radius) / d2);
    const c = 1 - u * height;
    const s = Math.sqrt(1 - c * c);
    spread(x / Math.sqrt(d2), y / Math.sqrt(d2), z / Math.sqrt(d2), c, s * Math.cos(2 * Math.PI * v), s * Math.sin(2 * Math.PI * v), out);
    out[3] = 2 * Math.PI * height;
  };
}

/** Directions to points spread evenly on a disc in a plane of constant local z. */
export function aimAtDisc(z: number, radius: number): Aim {
  return (at, u, v, out) => {
    const r = radius * Math.sqrt(u);
    const x = r * Math.cos(2 * Math.PI * v) - at[0];
    const y = r * Math.sin(2 * Math.PI * v) - at[1];
    const h = z - at[2];
    const d = Math.sqrt(x * x + y * y + h * h);
    out[0] = x / d;
    out[1] = y / d;
    out[2] = h / d;
    out[3] = (Math.PI * radius * radius * Math.abs(h)) / (d * d * d);
  };
}

/**
 * Directions to a bar along local y that can carry the sun: refraction in a bar keeps the component along it, so only
 * a narrow range of that component is tried.
 */
export function aimAtBar(radius: number, alongSun: number, halfWidth: number): Aim {
  return (at, u, v, out) => {
    const d = Math.sqrt(at[0] * at[0] + at[2] * at[2]);
    if (d < radius * (1 - 1e-9)) {
      out[3] = 0;
      return;
    }
    const half = Math.asin(Math.min(1, radius / d));
    const turn = half * (2 * u - 1);
    const along = alongSun + halfWidth * (2 * v - 1);
    const across = Math.sqrt(Math.max(0, 1 - along * along));
    const x = -at[0] / d;
    const z = -at[2] / d;
    const c = Math.cos(turn);
    const s = Math.sin(turn);
    out[0] = across * (x * c - z * s);
    out[1] = along;
    out[2] = across * (z * c + x * s);
    out[3] = 4 * half * halfWidth;
  };
}

function spread(x: number, y: number, z: number, c: number, a: number, b: number, out: Float64Array): void {
  const side = Math.abs(z) < 0.9;
  let ex = side ? -y : 0;
  let ey = side ? x : -z;
  let ez = side ? 0 : y;
  const f = 1 / Math.sqrt(ex * ex + ey * ey + ez * ez);
  ex *= f;
  ey *= f;
  ez *= f;
  out[0] = c * x + a * ex + b * (y * ez - z * ey);
  out[1] = c * y + a * ey + b * (z * ex - x * ez);
  out[2] = c * z + a * ez + b * (x * ey - y * ex);
}

/**
 * Back-traced estimator of a refracting body: the way from the receiver is the first pass reversed.
 *
 * @param admits Whether light along a path that leaves the body at p towards s came through the optic's stop.
 */
export function bodyBackTrace(
  body: Body, channels: readonly Channel[], sun: SunDisc, aim: Aim,
  admits: (px: number, py: number, pz: number, sx: number, sy: number, sz: number) => boolean,
): BackTrace {
  const single = { ...body, allBranches: false };
  const path = newBodyPath();
  const gaussians = new Float64Array(4);
  const to = new Float64Array(4);
  const first = newCrossing();
  const pick = channelPicker(channels);
  const sunSolidAngle = Math.PI * Math.sin(sun.halfAngleRad) ** 2;
  return {
    dimensions: 7,
    path(at, normal, u) {
      aim(at, u[0]!, u[1]!, to);
      const [x = 0, y = 0, z = 0, solid = 0] = to;
      const cos = x * normal[0] + y * normal[1] + z * normal[2];
      if (solid === 0 || cos <= 0) return 0;
      if (!enterBody(single.sets, at[0], at[1], at[2], x, y, z, first) || first.distance < -1e-9) return 0;
      gaussPair(u[3]!, u[4]!, gaussians, 0);
      gaussPair(u[5]!, u[6]!, gaussians, 2);
      traceBody(single, pick(u[2]!), at[0], at[1], at[2], x, y, z, gaussians, path);
      const exit = path.exits[0];
      if (path.exitCount === 0 || !exit) return 0;
      const radiance = relativeRadiance(sun, exit.dx, exit.dy, exit.dz);
      if (radiance === 0 || !admits(exit.px, exit.py, exit.pz, exit.dx, exit.dy, exit.dz)) return 0;
      return (radiance * exit.power * cos * solid) / sunSolidAngle;
    },
  };
}
