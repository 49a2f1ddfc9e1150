import type { Mark } from './alignment.ts';
import type { Beam, FocusModel } from '#app/physics/optics/closed-form/beam.ts';

/** How far from the focus a mark may lie and still be reached. */
export interface Reach {
  /** Half-width of the spot at the mark's distance, where the flux falls to half of its middle. [m] */
  readonly spotRadiusM: number;
  /** Nearest and farthest distance along the chief ray with a flux above the threshold. [m] */
  readonly nearM: number;
  readonly farM: number;
  /** True where nowhere along the ray the threshold is reached; near and far then hold a quarter of the greatest flux. */
  readonly belowThreshold: boolean;
  readonly thresholdKwm2: number;
}

const half = 0.5;
const quarter = 0.25;

/** Distance across the chief ray at which the flux falls to a level. [m] @param level Concentration, below that in the middle. */
export function contourHalfWidthM(beam: Beam, distanceM: number, level: number, discM: number): number {
  if (beam.concentration(distanceM, 0, discM) < level) return 0;
  let inside = 0;
  let outside = discM;
  for (let step = 0; step < 24 && beam.concentration(distanceM, outside, discM) >= level; step++) {
    inside = outside;
    outside *= 1.6;
  }
  for (let step = 0; step < 18; step++) {
    const middle = (inside + outside) / 2;
    if (beam.concentration(distanceM, middle, discM) >= level) inside = middle;
    else outside = middle;
  }
  return (inside + outside) / 2;
}

/** Small disc on which contours are followed: a quarter of the sun's image. [m] */
export function contourDiscM(distanceM: number): number {
  return Math.max(1e-4, distanceM * 0.0093 * 0.25);
}

/** Stretch of the chief ray round the focus on which a 5 mm disc receives at least a level; null where none does. */
export function zoneAlong(beam: Beam, level: number, discM: number): { readonly nearM: number; readonly farM: number } | null {
  const peak = beam.concentration(beam.focusM, 0, discM);
  // The wide disc is fullest a little before the sharpest plane, so start from the best of a short scan.
  let bestM = beam.focusM;
  let best = peak;
  for (let share = 0.7; share < 1.2; share += 0.02) {
    const value = beam.concentration(beam.focusM * share, 0, discM);
    if (value > best) {
      best = value;
      bestM = beam.focusM * share;
    }
  }
  if (best < level) return null;
  const edge = (towards: number, limitM: number): number => {
    let inside = bestM;
    let outside = limitM;
    if (beam.concentration(limitM, 0, discM) >= level) return limitM;
    for (let step = 0; step < 200; step++) {
      const probe = inside + towards * bestM * 0.02;
      if ((limitM - probe) * towards <= 0) break;
      if (beam.concentration(probe, 0, discM) < level) {
        outside = probe;
        break;
      }
      inside = probe;
    }
    for (let step = 0; step < 20; step++) {
      const middle = (inside + outside) / 2;
      if (beam.concentration(middle, 0, discM) >= level) inside = middle;
      else outside = middle;
    }
    return (inside + outside) / 2;
  };
  return { nearM: edge(-1, bestM * 0.02), farM: edge(1, bestM * 4) };
}

/**
 * Reach of a beam about a mark.
 *
 * @param dniWm2 Direct irradiance that reaches the optic at most. [W/m²]
 * @param thresholdKwm2 Lowest flux that can harm the target. [kW/m²]
 */
export function reachOf(beam: Beam, mark: Mark, dniWm2: number, thresholdKwm2: number): Reach {
  const discM = 0.005;
  const level = (thresholdKwm2 * 1000) / Math.max(dniWm2, 1);
  const harmful = zoneAlong(beam, level, discM);
  // A weak optic is judged by its flux, not by its depth: there a quarter of the greatest flux bounds the reach.
  const zone = harmful ?? zoneAlong(beam, quarter * beam.concentration(beam.focusM, 0, discM), discM);
  const distanceM = mark.distanceM;
  const small = contourDiscM(distanceM);
  const middle = beam.concentration(distanceM, 0, small);
  return {
    spotRadiusM: middle > 0 ? contourHalfWidthM(beam, distanceM, half * middle, small) : small,
    nearM: zone?.nearM ?? beam.focusM,
    farM: zone?.farM ?? beam.focusM,
    belowThreshold: harmful === null,
    thresholdKwm2,
  };
}

/** Whether a model can be tested against a mark at all. */
export function focusesForward(model: FocusModel): boolean {
  return model.focalLengthM > 0;
}
