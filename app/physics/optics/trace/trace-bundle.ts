import type { Optic } from '#app/physics/optics/optic.ts';
import { lengthOf } from '#app/physics/vector.ts';
import type { OcclusionTestOf } from './body-spec.ts';
import { cylinderKernel } from './bottle-optic.ts';
import { lensKernel } from './lens-optic.ts';
import { bowlKernel, domeKernel } from './pool-optic.ts';
import { sphereKernel } from './sphere-optic.ts';
import { RayBundle } from './bundle.ts';
import { toLocal } from './frame.ts';
import { guardEnergy } from './guards.ts';
import type { Kernel } from './kernel.ts';
import { batchCount, fillBundle } from './kernel.ts';
import { mirrorKernel } from './mirror-kernel.ts';
import { occlusionTest } from './occlusion.ts';
import { curvedReflectorKernel, paneKernel } from './sheet-kernel.ts';
import type { SunDisc } from './sun-sampling.ts';
import { fresnelKernel, telescopeKernel } from './thin-kernel.ts';
import type { TraceRequest } from './trace-model.ts';

export const defaultRays = 100_000;
export const defaultLimbU = 0.45;

/** An optic with the rays that leave it; any plane can be cut through them without tracing again. */
export interface TracedOptic {
  readonly kernel: Kernel;
  readonly bundle: RayBundle;
  readonly sun: SunDisc;
  readonly rays: number;
}

const inRange = (name: string, value: number, low: number, high: number): void => {
  if (!(value >= low && value <= high)) throw new RangeError(`${name} = ${value}; allowed ${low} to ${high}`);
};

/** Sizes, shares and indices of an optic within what can exist. */
function checkOptic(optic: Optic): void {
  for (const [name, value] of Object.entries(optic)) {
    if (name === 'reflectance' || name === 'transmittance') inRange(name, Number(value), 0, 1);
    else if (name.endsWith('BowM')) inRange(name, Number(value ?? 0), -0.2, 0.2);
    else if (name.endsWith('M') && value !== undefined) inRange(name, Number(value), 1e-5, 2000);
  }
  if ('material' in optic && optic.material.name === 'explicit') {
    inRange('refractiveIndex', optic.material.refractiveIndex, 1.05, 3);
    inRange('absorptionPerM', optic.material.absorptionPerM, 0, 10000);
  }
}

function kernelFor(request: TraceRequest, sun: SunDisc, blocked: OcclusionTestOf): Kernel {
  const { optic } = request;
  switch (optic.kind) {
    case 'sphere':
      return sphereKernel(optic, request, sun, blocked);
    case 'lens':
      return lensKernel(optic, request, sun, blocked);
    case 'cylinder':
      return cylinderKernel(optic, request, sun, blocked);
    case 'bowl':
      return bowlKernel(optic, request, sun, blocked);
    case 'ponded-dome':
      return domeKernel(optic, request, sun, blocked);
    case 'concave-mirror':
    case 'polished-bowl':
    case 'dish':
      return mirrorKernel(optic, sun, blocked);
    case 'bowed-pane':
      return paneKernel(optic, request, sun, blocked);
    case 'facade':
    case 'curved-metal':
    case 'trough':
      return curvedReflectorKernel(optic, request, sun, blocked);
    case 'fresnel':
      return fresnelKernel(optic, sun, blocked);
    case 'telescope':
      return telescopeKernel(optic, sun, blocked);
  }
}

/**
 * Traces the rays of one sun position through an optic.
 *
 * @throws RangeError for input outside its range, naming field, value and range.
 * @throws PhysicsGuardError if energy is not conserved.
 */
export function traceBundle(request: TraceRequest): TracedOptic {
  const rays = request.rays ?? defaultRays;
  inRange('rays', rays, 64, 20_000_000);
  inRange('sunHalfAngleRad', request.sunHalfAngleRad, 1e-9, 0.02);
  inRange('limbU', request.limbU ?? defaultLimbU, 0, 1);
  inRange('circumsolarRatio', request.circumsolarRatio ?? 0, 0, 0.5);
  if (Math.abs(lengthOf(request.sunDirection) - 1) > 1e-6) throw new RangeError(`sunDirection has length ${lengthOf(request.sunDirection)}; a unit vector is needed`);
  checkOptic(request.optic);
  const sun: SunDisc = {
    direction: request.sunDirection,
    halfAngleRad: request.sunHalfAngleRad,
    limbU: request.limbU ?? defaultLimbU,
    circumsolarRatio: request.circumsolarRatio ?? 0,
  };
  const blockedIn: OcclusionTestOf = (frame) => occlusionTest(request.occluders ?? [], frame);
  const kernel = kernelFor(request, sun, blockedIn);
  const perBatch = Math.ceil(rays / batchCount);
  const bundle = new RayBundle(Math.ceil(perBatch * batchCount * kernel.outputsPerRay) + 16);
  fillBundle(kernel, { ...sun, direction: toLocal(kernel.frame, sun.direction) }, rays, request.seed, blockedIn(kernel.frame), bundle);
  guardEnergy(bundle.ledger.worstImbalance);
  return { kernel, bundle, sun, rays: perBatch * batchCount };
}
