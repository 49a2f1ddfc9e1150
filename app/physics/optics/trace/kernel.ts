import type { Vector } from '#app/physics/vector.ts';
import type { RayBundle } from './bundle.ts';
import type { Frame } from './frame.ts';
import type { OcclusionTest } from './occlusion.ts';
import { ScrambledSobol } from '#app/physics/sobol.ts';
import type { SunDisc } from './sun-sampling.ts';
import { sampleSun } from './sun-sampling.ts';
import type { TraceAssumption } from './trace-model.ts';

export const chunkSize = 2048;

/** Samples of one chunk: numbers in (0, 1) by dimension, and points of the sun. */
export interface Samples {
  count: number;
  readonly u: readonly Float64Array[];
  readonly sunX: Float64Array;
  readonly sunY: Float64Array;
  readonly sunZ: Float64Array;
  readonly sunWeight: Float64Array;
}

/** What a ray needs to know besides its samples. */
export interface Launch {
  /** Power per ray over direct irradiance, before the sun's and the surface's weights. [m²] */
  readonly rayWeight: number;
  readonly blocked: OcclusionTest | null;
}

/** Answer of a back-traced path: relative radiance times transmittance, or 0. */
export interface BackTrace {
  /** Random numbers used for one path. */
  readonly dimensions: number;
  /**
   * Concentration carried by one path, already divided by its sampling density and by the sun's solid angle.
   *
   * @param at Point of the receiver in local axes.
   * @param normal Its outward normal in local axes.
   */
  path(at: Vector, normal: Vector, u: Float64Array): number;
}

/** An optic made ready for tracing, in local axes with O at the origin. */
export interface Kernel {
  readonly frame: Frame;
  readonly focusKind: 'point' | 'line';
  /** Power that meets the optic over direct irradiance, spread evenly over the samples. [m²] */
  readonly apertureM2: number;
  /** Direction from O to the paraxial focus. */
  readonly focalAxis: Vector;
  readonly focalDistanceM: number;
  /** Normal of the natural receiver, looking towards the light. */
  readonly planeNormal: Vector;
  /** Focal length that sets the size of the sun's image. [m] */
  readonly imageFocalM: number;
  /** Nearest distance along the focal axis at which a receiver clears the optic. [m] */
  readonly clearanceM: number;
  /** Direction of the focal line in local axes, for a line focus. */
  readonly lineDirection: Vector | null;
  /** Way of the central ray after the optic, in local axes. */
  readonly chiefDirection: Vector;
  /** Samples used per ray, besides which the sun takes dimensions 2 and 3. */
  readonly dimensions: number;
  /** Rays that one sample may send out at most. */
  readonly outputsPerRay: number;
  /** Greatest share of its power that a ray may keep; bounds the radiance. */
  readonly transmittanceBound: number;
  readonly backTrace: BackTrace | null;
  readonly assumptions: readonly TraceAssumption[];
  readonly warnings: readonly string[];
  trace(samples: Samples, launch: Launch, bundle: RayBundle): void;
}

export const batchCount = 8;

function emptySamples(dimensions: number): Samples {
  const make = (): Float64Array => new Float64Array(chunkSize);
  return {
    count: 0,
    u: Array.from({ length: dimensions }, make),
    sunX: make(),
    sunY: make(),
    sunZ: make(),
    sunWeight: make(),
  };
}

/** Sends `rays` rays through the optic in equal, independently scrambled batches. */
export function fillBundle(kernel: Kernel, localSun: SunDisc, rays: number, seed: number, blocked: OcclusionTest | null, bundle: RayBundle): void {
  const perBatch = Math.ceil(rays / batchCount);
  const samples = emptySamples(kernel.dimensions);
  const launch: Launch = { rayWeight: kernel.apertureM2 / (perBatch * batchCount), blocked };
  const [, , u2, u3] = samples.u;
  if (!u2 || !u3) throw new RangeError(`dimensions = ${kernel.dimensions}; at least 4 are needed`);
  for (let batch = 0; batch < batchCount; batch++) {
    const points = new ScrambledSobol(kernel.dimensions, seed, batch);
    for (let done = 0; done < perBatch; done += chunkSize) {
      samples.count = Math.min(chunkSize, perBatch - done);
      points.fill(samples.u, samples.count);
      sampleSun(localSun, u2, u3, samples.count, samples.sunX, samples.sunY, samples.sunZ, samples.sunWeight);
      kernel.trace(samples, launch, bundle);
    }
    bundle.endBatch();
  }
}
