/* eslint-disable @typescript-eslint/no-non-null-assertion -- every index is bounded by its loop; a fallback in the hot loops would hide a wrong one as 0 */
import type { MirrorOptic } from '#app/physics/optics/optic.ts';
import type { Vector } from '#app/physics/vector.ts';
import { fromAzimuthElevation } from '#app/physics/vector.ts';
import { cutOff, mostInteractions } from './body-path.ts';
import type { OcclusionTestOf } from './body-spec.ts';
import type { RayBundle } from './bundle.ts';
import { frameAbout, toLocal } from './frame.ts';
import { gaussPair } from './gauss.ts';
import type { BackTrace, Kernel, Launch, Samples } from './kernel.ts';
import { slopeError } from './slope-error.ts';
import type { SunDisc } from './sun-sampling.ts';
import { relativeRadiance } from './sun-sampling.ts';

/** Concave cap with its vertex at the origin, open towards +z. */
interface Cap {
  readonly spherical: boolean;
  /** Radius of curvature at the vertex. */
  readonly radius: number;
  readonly rim: number;
  readonly rimZ: number;
  readonly reflectance: number;
  readonly sigma: number;
}

/** Height of the surface over the vertex plane. */
const sag = (cap: Cap, r2: number): number =>
  cap.spherical ? cap.radius - Math.sqrt(cap.radius * cap.radius - r2) : r2 / (2 * cap.radius);

/** Distance along a ray to the inner face, from a point on its open side. */
function distanceToCap(cap: Cap, px: number, py: number, pz: number, dx: number, dy: number, dz: number): number {
  if (cap.spherical) {
    const qz = pz - cap.radius;
    const b = px * dx + py * dy + qz * dz;
    const c = px * px + py * py + qz * qz - cap.radius * cap.radius;
    return -b + Math.sqrt(Math.max(0, b * b - c));
  }
  const a = (dx * dx + dy * dy) / (2 * cap.radius);
  const b = (px * dx + py * dy) / cap.radius - dz;
  const c = (px * px + py * py) / (2 * cap.radius) - pz;
  const root = Math.sqrt(Math.max(0, b * b - 4 * a * c));
  // The stable form of the larger root: c ≤ 0 inside, so that numerator and root add up.
  return b > 0 ? (-2 * c) / (b + root) : a > 1e-12 ? (root - b) / (2 * a) : Infinity;
}

/** Distance along a ray from the face to the next meeting with it below the rim; Infinity if there is none. */
function nextMeeting(cap: Cap, px: number, py: number, pz: number, dx: number, dy: number, dz: number): number {
  let t: number;
  if (cap.spherical) t = -2 * (px * dx + py * dy + (pz - cap.radius) * dz);
  else {
    const a = (dx * dx + dy * dy) / (2 * cap.radius);
    t = a > 1e-12 ? (dz - (px * dx + py * dy) / cap.radius) / a : Infinity;
  }
  return t > 1e-9 * cap.radius && pz + t * dz < cap.rimZ ? t : Infinity;
}

const normal = new Float64Array(3);

/** Inner normal, tilted by the slope error. */
function innerNormal(cap: Cap, px: number, py: number, pz: number, g1: number, g2: number): void {
  let nx = -px / cap.radius;
  let ny = -py / cap.radius;
  let nz = cap.spherical ? (cap.radius - pz) / cap.radius : 1;
  let f = 1 / Math.sqrt(nx * nx + ny * ny + nz * nz);
  nx *= f;
  ny *= f;
  nz *= f;
  if (cap.sigma > 0) {
    // Tangents e = (nz, 0, −nx)/|…| and n × e; nz > 0 on the inner face.
    const h = cap.sigma / Math.sqrt(nz * nz + nx * nx);
    const ex = nz * h;
    const ez = -nx * h;
    const x = nx + g1 * ex + g2 * ny * ez;
    const y = ny + g2 * (nz * ex - nx * ez);
    const z = nz + g1 * ez - g2 * ny * ex;
    f = 1 / Math.sqrt(x * x + y * y + z * z);
    nx = x * f;
    ny = y * f;
    nz = z * f;
  }
  normal[0] = nx;
  normal[1] = ny;
  normal[2] = nz;
}

/** Forward trace. Every leg between two bounces is a ray of its own with limited reach, since a target can lie in it. */
function capTracer(cap: Cap): (samples: Samples, launch: Launch, bundle: RayBundle) => void {
  const gaussians = new Float64Array(2);
  return (samples, launch, bundle) => {
    const { u, sunX, sunY, sunZ, sunWeight } = samples;
    const { ledger } = bundle;
    for (let i = 0; i < samples.count; i++) {
      const r = cap.rim * Math.sqrt(u[0]![i]!);
      const x0 = r * Math.cos(2 * Math.PI * u[1]![i]!);
      const y0 = r * Math.sin(2 * Math.PI * u[1]![i]!);
      const w = launch.rayWeight * sunWeight[i]!;
      let dx = -sunX[i]!;
      let dy = -sunY[i]!;
      let dz = -sunZ[i]!;
      if (launch.blocked?.(x0, y0, cap.rimZ, -dx, -dy, -dz)) {
        ledger.blocked += w;
        continue;
      }
      if (dz >= 0) continue;
      if (cap.sigma > 0) gaussPair(u[4]![i]!, u[5]![i]!, gaussians, 0);
      let t = distanceToCap(cap, x0, y0, cap.rimZ, dx, dy, dz);
      let x = x0 + t * dx;
      let y = y0 + t * dy;
      let z = cap.rimZ + t * dz;
      let power = 1;
      let lost = 0;
      for (let bounce = 0; ; bounce++) {
        innerNormal(cap, x, y, z, bounce & 1 ? gaussians[1]! : gaussians[0]!, bounce & 1 ? -gaussians[0]! : gaussians[1]!);
        const c = -2 * (dx * normal[0]! + dy * normal[1]! + dz * normal[2]!);
        dx += c * normal[0]!;
        dy += c * normal[1]!;
        dz += c * normal[2]!;
        lost += power * (1 - cap.reflectance);
        power *= cap.reflectance;
        t = nextMeeting(cap, x, y, z, dx, dy, dz);
        bundle.pushLeg(x, y, z, dx, dy, dz, w * power, t);
        if (t === Infinity) break;
        if (bounce + 1 >= mostInteractions || power < cutOff) {
          lost += power;
          power = 0;
          break;
        }
        x += t * dx;
        y += t * dy;
        z += t * dz;
      }
      ledger.incident += w;
      ledger.transmitted += w * power;
      ledger.absorbed += w * lost;
      ledger.worstImbalance = Math.max(ledger.worstImbalance, Math.abs(1 - power - lost));
    }
  };
}

/** Back-traced estimator, all bounces. */
function capBackTrace(cap: Cap, sun: SunDisc, blocked: (px: number, py: number, pz: number, sx: number, sy: number, sz: number) => boolean): BackTrace {
  const sunSolidAngle = Math.PI * Math.sin(sun.halfAngleRad) ** 2;
  const gaussians = new Float64Array(2);
  return {
    dimensions: 4,
    path(at: Vector, receiver: Vector, u) {
      // Equal areas of a sphere lie between equal heights; on a paraboloid the rim's disc serves.
      const r = cap.spherical ? Math.sqrt(u[0]! * cap.rimZ * (2 * cap.radius - u[0]! * cap.rimZ)) : cap.rim * Math.sqrt(u[0]!);
      let x = r * Math.cos(2 * Math.PI * u[1]!);
      let y = r * Math.sin(2 * Math.PI * u[1]!);
      let z = cap.spherical ? u[0]! * cap.rimZ : sag(cap, r * r);
      gaussPair(u[2]!, u[3]!, gaussians, 0);
      let dx = x - at[0];
      let dy = y - at[1];
      let dz = z - at[2];
      const d = Math.sqrt(dx * dx + dy * dy + dz * dz);
      dx /= d;
      dy /= d;
      dz /= d;
      const cosReceiver = dx * receiver[0] + dy * receiver[1] + dz * receiver[2];
      if (cosReceiver <= 0) return 0;
      innerNormal({ ...cap, sigma: 0 }, x, y, z, 0, 0);
      const facing = -(dx * normal[0]! + dy * normal[1]! + dz * normal[2]!);
      if (facing <= 0 || nextMeeting(cap, x, y, z, -dx, -dy, -dz) < d) return 0;
      const area = cap.spherical ? 2 * Math.PI * cap.radius * cap.rimZ : (Math.PI * cap.rim * cap.rim) / normal[2]!;
      const solid = (area * facing) / (d * d);
      let power = 1;
      for (let bounce = 0; bounce < mostInteractions && power > cutOff; bounce++) {
        innerNormal(cap, x, y, z, bounce & 1 ? gaussians[1]! : gaussians[0]!, bounce & 1 ? -gaussians[0]! : gaussians[1]!);
        const c = -2 * (dx * normal[0]! + dy * normal[1]! + dz * normal[2]!);
        dx += c * normal[0]!;
        dy += c * normal[1]!;
        dz += c * normal[2]!;
        power *= cap.reflectance;
        const t = nextMeeting(cap, x, y, z, dx, dy, dz);
        if (t === Infinity) break;
        x += t * dx;
        y += t * dy;
        z += t * dz;
      }
      const radiance = relativeRadiance(sun, dx, dy, dz);
      if (radiance === 0) return 0;
      const rise = (cap.rimZ - z) / dz;
      if ((x + rise * dx) ** 2 + (y + rise * dy) ** 2 > cap.rim * cap.rim || blocked(x, y, z, dx, dy, dz)) return 0;
      return (radiance * power * cosReceiver * solid) / sunSolidAngle;
    },
  };
}

/** Concave mirror, dish or polished bowl; power is that of the rim's disc seen along the sun. */
export function mirrorKernel(optic: MirrorOptic, sun: SunDisc, blockedIn: OcclusionTestOf): Kernel {
  const rim = optic.diameterM / 2;
  const spherical = optic.figure === 'spherical';
  if (spherical && !(rim <= optic.radiusM)) {
    throw new RangeError(`diameterM = ${optic.diameterM} and radiusM = ${optic.radiusM} disagree: a spherical mirror is at most 2 × radiusM wide`);
  }
  const slope = slopeError(optic);
  const shape = { spherical, radius: optic.radiusM, rim, rimZ: 0, reflectance: optic.reflectance, sigma: slope.sigmaRad };
  const cap: Cap = { ...shape, rimZ: sag(shape, rim * rim) };
  const frame = frameAbout(fromAzimuthElevation(optic.axisAzimuthDeg, optic.axisElevationDeg));
  const towards = toLocal(frame, sun.direction);
  const blocked = blockedIn(frame);
  const focal = optic.radiusM / 2;
  return {
    frame,
    focusKind: 'point',
    apertureM2: Math.PI * rim * rim * Math.max(0, towards[2]),
    focalAxis: [0, 0, 1],
    focalDistanceM: focal,
    planeNormal: [0, 0, -1],
    imageFocalM: focal,
    clearanceM: 0.02 * focal,
    lineDirection: null,
    chiefDirection: [-towards[0], -towards[1], towards[2]],
    dimensions: slope.sigmaRad > 0 ? 6 : 4,
    outputsPerRay: rim > 0.7 * optic.radiusM ? 3 : 1.5,
    transmittanceBound: optic.reflectance,
    backTrace: capBackTrace(cap, { ...sun, direction: towards }, (...at) => blocked?.(...at) ?? false),
    assumptions: slope.assumptions,
    warnings: towards[2] <= 0 ? ['The sun stands behind the mirror.'] : [],
    trace: capTracer(cap),
  };
}
