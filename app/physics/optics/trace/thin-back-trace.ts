import type { FresnelOptic, TelescopeOptic } from '#app/physics/optics/optic.ts';
import { tiltNormal, newCrossing } from './convex-body.ts';
import { gaussPair } from './gauss.ts';
import type { BackTrace } from './kernel.ts';
import { channelPicker } from './sphere-kernel.ts';
import type { Channel } from './spectral.ts';
import type { SunDisc } from './sun-sampling.ts';
import { relativeRadiance } from './sun-sampling.ts';

type Blocked = (px: number, py: number, pz: number, sx: number, sy: number, sz: number) => boolean;

const solidAngleOf = (sun: SunDisc): number => Math.PI * Math.sin(sun.halfAngleRad) ** 2;

/**
 * Back-traced estimator of a thin ideal objective: a point of the target and a point of the lens belong to one direction
 * of the sun. Such a lens keeps tangents, not solid angles, so that the radiance changes by the fourth power of the
 * cosines.
 */
export function objectiveBackTrace(optic: TelescopeOptic, sun: SunDisc, blocked: Blocked): BackTrace {
  const half = optic.diameterM / 2;
  const f = optic.focalLengthM;
  const area = Math.PI * half * half;
  return {
    dimensions: 2,
    path(at, normal, [u = 0, v = 0]) {
      const r = half * Math.sqrt(u);
      const x = r * Math.cos(2 * Math.PI * v);
      const y = r * Math.sin(2 * Math.PI * v);
      const height = -at[2];
      if (height <= 0) return 0;
      const d = Math.hypot(x - at[0], y - at[1], height);
      const cosReceiver = ((x - at[0]) * normal[0] + (y - at[1]) * normal[1] + height * normal[2]) / d;
      if (cosReceiver <= 0) return 0;
      // Where the ray meets the focal plane; its direction from the middle of the lens is that of the sun.
      const fx = x + ((at[0] - x) * f) / height;
      const fy = y + ((at[1] - y) * f) / height;
      const s = Math.hypot(fx, fy, f);
      const radiance = relativeRadiance(sun, -fx / s, -fy / s, f / s);
      if (radiance === 0 || blocked(x, y, 0, -fx / s, -fy / s, f / s)) return 0;
      const cosBelow = height / d;
      const gain = (f / s / cosBelow) ** 4;
      return (radiance * gain * optic.transmittance * cosReceiver * area * cosBelow) / (d * d * solidAngleOf(sun));
    },
  };
}

const facet = newCrossing();
const gaussians = new Float64Array(2);

/** Facet of the groove at a place of the sheet: outward normal, looking down, of slope tan γ = sin θ/(n − cos θ), tan θ = r/f. */
function facetAt(x: number, y: number, f: number, design: number, sigma: number): void {
  const r = Math.hypot(x, y);
  const theta = Math.atan2(r, f);
  const slope = Math.sin(theta) / (design - Math.cos(theta));
  const inverse = 1 / Math.hypot(1, slope);
  const across = r > 0 ? (slope * inverse) / r : 0;
  facet.nx = across * x;
  facet.ny = across * y;
  facet.nz = -inverse;
  if (sigma > 0) tiltNormal(facet, sigma * (gaussians[0] ?? 0), sigma * (gaussians[1] ?? 0));
}

/**
 * Back-traced estimator of a grooved sheet: from the target up through the facet into the sheet and out of its flat top.
 *
 * All light that enters a piece of the top is taken to leave through that piece's facet, as in the forward trace, so the
 * radiance follows the areas: cosine inside over cosine on the facet's axis, on either side of it.
 *
 * @param design Index for which the grooves were cut.
 */
export function sheetLensBackTrace(optic: FresnelOptic, channels: readonly Channel[], design: number, sigma: number, sun: SunDisc, blocked: Blocked): BackTrace {
  const pick = channelPicker(channels);
  const area = optic.widthM * optic.heightM;
  const f = optic.focalLengthM;
  return {
    dimensions: 5,
    path(at, normal, [u = 0, v = 0, colour = 0, g1 = 0.5, g2 = 0.5]) {
      const x = optic.widthM * (u - 0.5);
      const y = optic.heightM * (v - 0.5);
      const height = -at[2];
      if (height <= 0) return 0;
      const d = Math.hypot(x - at[0], y - at[1], height);
      const ux = (x - at[0]) / d;
      const uy = (y - at[1]) / d;
      const uz = height / d;
      const cosReceiver = ux * normal[0] + uy * normal[1] + uz * normal[2];
      if (cosReceiver <= 0) return 0;
      if (sigma > 0) gaussPair(g1, g2, gaussians, 0);
      facetAt(x, y, f, design, sigma);
      const n = pick(colour).refractiveIndex;
      const outside = -(ux * facet.nx + uy * facet.ny + uz * facet.nz);
      if (outside <= 0) return 0;
      const inside = Math.sqrt(1 - (1 - outside * outside) / (n * n));
      const k = outside / n - inside;
      const ix = ux / n + k * facet.nx;
      const iy = uy / n + k * facet.ny;
      const iz = uz / n + k * facet.nz;
      const out2 = 1 - n * n * (ix * ix + iy * iy);
      if (iz <= 0 || out2 <= 0) return 0;
      const sz = Math.sqrt(out2);
      const radiance = relativeRadiance(sun, n * ix, n * iy, sz);
      if (radiance === 0 || blocked(x, y, 0, n * ix, n * iy, sz)) return 0;
      const gain = (iz * outside) / (uz * inside);
      return (radiance * gain * optic.transmittance * cosReceiver * area * uz) / (d * d * solidAngleOf(sun));
    },
  };
}
