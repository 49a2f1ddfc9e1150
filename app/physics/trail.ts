import type { Mark } from './alignment.ts';
import type { FocusModel } from '#app/physics/optics/closed-form/beam.ts';
import { halfAngleRad } from '#app/physics/sun/sun-disc.ts';
import { solarPosition, type Observer } from '#app/physics/sun/solar-position.ts';
import { azimuthOf, dot, lengthOf, scale, subtract, type Vector } from './vector.ts';

/** Motion of the spot over the target. */
export interface SpotMotion {
  /** Displacement over the target's surface. [m/s] */
  readonly velocity: Vector;
  readonly speedMPerS: number;
  /** Bearing of the motion; for motion straight up or down, of its level part. [°] 0…360 */
  readonly headingDeg: number;
  /** Speed across the line of a line focus; equal to the speed for a point focus. [m/s] */
  readonly acrossMPerS: number;
}

const stepMs = 30_000;

/** Where the chief ray meets the target's plane through the mark; null where it runs along the plane. */
function onTarget(model: FocusModel, mark: Mark, observer: Observer, utcMs: number): Vector | null {
  const sun = solarPosition(utcMs, observer);
  const beam = model.beamFor(sun.towardsSun, halfAngleRad(sun.distanceAu));
  if (beam === null) return null;
  const facing = dot(beam.direction, mark.normal);
  if (facing > -0.02) return null;
  return scale(beam.direction, dot(mark.position, mark.normal) / facing);
}

/**
 * Speed and heading of the spot over the target at an instant, from two positions a minute apart.
 *
 * The heading is computed, never assumed: past the polar circles at lower culmination the spot runs the other way.
 */
export function spotMotion(model: FocusModel, mark: Mark, observer: Observer, utcMs: number): SpotMotion | null {
  const before = onTarget(model, mark, observer, utcMs - stepMs);
  const after = onTarget(model, mark, observer, utcMs + stepMs);
  if (before === null || after === null) return null;
  const velocity = scale(subtract(after, before), 1000 / (2 * stepMs));
  const speedMPerS = lengthOf(velocity);
  let acrossMPerS = speedMPerS;
  if (model.generator !== null) {
    const sun = solarPosition(utcMs, observer);
    const across = model.beamFor(sun.towardsSun, halfAngleRad(sun.distanceAu))?.across ?? null;
    if (across !== null) acrossMPerS = Math.abs(dot(velocity, across));
  }
  return { velocity, speedMPerS, headingDeg: azimuthOf(velocity), acrossMPerS };
}

/**
 * Sunlit minutes that a found trail needs at least. [min]
 *
 * @param spotM Width of the scorching contour along the trail. [m]
 * @returns Null for a line focus: the length of its mark is the length of the line, not of a path.
 */
export function trailMinutesAtLeast(model: FocusModel, trailM: number, spotM: number, speedMPerS: number): number | null {
  if (model.focusKind === 'line' || trailM <= 0 || speedMPerS <= 0) return null;
  return Math.max(0, trailM - spotM) / speedMPerS / 60;
}
