import type { Optic } from '#app/physics/optics/optic.ts';
import type { Vector } from '#app/physics/vector.ts';

/**
 * Contract of the ray tracer. Vectors are [east, north, up]; points are relative to the optic's origin O:
 * sphere and bowl centre, rear nodal point of a lens, mirror vertex, centre of a pane or façade in its edge plane,
 * middle of a bottle's axis, lowest point of a ponded dome, centre of a Fresnel sheet or telescope objective.
 */

/** Flat polygon in the sun's way. `block` stops rays inside it, `opening` stops rays that miss every opening. */
export interface Occluder {
  readonly kind: 'block' | 'opening';
  /** Corners in order, in one plane. [m] */
  readonly corners: readonly Vector[];
}

export type Receiver =
  | { readonly kind: 'plane'; readonly origin: Vector; readonly normal: Vector }
  /** For each disc the plane, normal to the focal axis, in which its concentration is greatest. */
  | { readonly kind: 'best plane' };

export interface TraceRequest {
  readonly optic: Optic;
  /** Unit vector to the sun's centre, apparent. */
  readonly sunDirection: Vector;
  /** Half of the sun's angular diameter. [rad] */
  readonly sunHalfAngleRad: number;
  /** Linear limb-darkening coefficient; 0.45 when left out (beam-weighted, 0.40–0.50). */
  readonly limbU?: number;
  /** Share of the direct irradiance that comes from outside the disc; 0 when left out. 0…0.5 */
  readonly circumsolarRatio?: number;
  readonly receiver: Receiver;
  readonly mark?: Vector;
  /** Rays in the bundle; 100 000 when left out. */
  readonly rays?: number;
  readonly seed: number;
  readonly occluders?: readonly Occluder[];
  /** Thresholds for the contour, in suns. */
  readonly thresholdsSuns?: readonly number[];
  /** Direction in which the spot travels; the contour is cut along its projection on the receiver. */
  readonly trailDirection?: Vector;
  /** Cells along one side of the flux grid; 0 leaves it out. Default 48. */
  readonly gridCells?: number;
  /** Lens only: where O lies. Default `rear-nodal`. */
  readonly lensOrigin?: 'rear-nodal' | 'first-vertex';
  /** Follow light reflected inside a refracting body until it leaves. Default `first`. */
  readonly branches?: 'first' | 'all';
  /** Coated and bare glass reflects more at grazing incidence. Default `glass` for panes and façades of panes. */
  readonly angularReflectance?: 'constant' | 'glass';
}

export type DiscName = 'sun-image' | '1 mm' | '5 mm';
export const discNames = ['sun-image', '1 mm', '5 mm'] as const satisfies readonly DiscName[];

export interface TraceDisc {
  readonly disc: DiscName;
  readonly diameterM: number;
  readonly centre: 'hot spot' | 'mark';
  /** Power through the disc over disc area times the direct irradiance at the optic. [suns] */
  readonly concentration: number;
  readonly stdError: number;
  readonly estimator: 'forward' | 'back-traced';
  /** Centre of the disc. [m] */
  readonly positionM: Vector;
  /** Distance of the hot spot from the mark's foot in the plane; null without a mark. */
  readonly offsetFromMarkM: number | null;
  /** Distance of the disc's plane from O along the focal axis. [m] */
  readonly planeDistanceM: number;
}

export interface BestPlane {
  readonly disc: DiscName;
  readonly diameterM: number;
  /** From O along the focal axis. [m] */
  readonly distanceM: number;
  readonly concentration: number;
}

export interface FluxGrid {
  readonly cells: number;
  /** Side of the square grid. [m] */
  readonly sizeM: number;
  readonly centreM: Vector;
  /** Directions of the grid's columns and rows in the receiver plane. */
  readonly columnDirection: Vector;
  readonly rowDirection: Vector;
  /** Suns, row by row. */
  readonly concentration: readonly number[];
}

export interface ContourWidth {
  readonly thresholdSuns: number;
  /** Length along the trail's direction on which the local flux is at least the threshold. [m] */
  readonly widthM: number;
}

export interface TraceAssumption {
  readonly field: string;
  readonly value: string;
  readonly source: string;
  readonly verified: boolean;
}

export interface TraceResult {
  readonly rays: number;
  readonly batches: number;
  readonly focusKind: 'point' | 'line';
  /** Paraxial distance of the focus from O along the focal axis. [m] */
  readonly focalDistanceM: number;
  readonly focalAxis: Vector;
  /** Power that meets the optic over the direct irradiance. [m²] */
  readonly apertureM2: number;
  /** Shares of the power that meets the optic; with `blockedFraction` left out they sum to 1. */
  readonly transmittedFraction: number;
  readonly reflectedFraction: number;
  readonly absorbedFraction: number;
  readonly strayFraction: number;
  /** Share of the power stopped by occluders before the optic. */
  readonly blockedFraction: number;
  /** Greatest |1 − (T + R + A)| over the rays. */
  readonly worstImbalance: number;
  readonly receiver: { readonly origin: Vector; readonly normal: Vector };
  readonly discs: readonly TraceDisc[];
  readonly bestPlanes: readonly BestPlane[];
  readonly hotSpotM: Vector;
  /** Radii round the hot spot that hold 50 % and 80 % of the power reaching the plane. [m] */
  readonly r50M: number;
  readonly r80M: number;
  readonly fluxGrid: FluxGrid | null;
  readonly contourWidths: readonly ContourWidth[];
  /** Second answer by tracing back from the mark, or from the hot spot without a mark; null where not made. */
  readonly backTraced: { readonly centre: 'mark' | 'hot spot'; readonly diameterM: number; readonly concentration: number; readonly stdError: number } | null;
  readonly assumptions: readonly TraceAssumption[];
  readonly warnings: readonly string[];
}
