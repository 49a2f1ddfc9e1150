/** Paraxial closed forms that place a focus for the tracer and serve it as oracles. Lengths in one unit. */

const inRange = (name: string, value: number, low: number, high: number): void => {
  if (!(value >= low && value <= high)) throw new RangeError(`${name} = ${value}; allowed ${low} to ${high}`);
};

/**
 * Focal length of a thick lens in air.
 *
 * @param r1 Radius of the first surface, positive if convex to the light; Infinity for a flat one.
 * @param r2 Radius of the second, negative if convex outward.
 * @see E. Hecht, Optics, §6.1 (lensmaker's equation)
 */
export function lensmakerFocalLength(n: number, r1: number, r2: number, thickness: number): number {
  return 1 / ((n - 1) * (1 / r1 - 1 / r2 + ((n - 1) * thickness) / (n * r1 * r2)));
}

/** Distance from the last vertex to the rear focus of a thick lens. */
export function backFocalLength(n: number, r1: number, r2: number, thickness: number): number {
  return lensmakerFocalLength(n, r1, r2, thickness) * (1 - ((n - 1) * thickness) / (n * r1));
}

/** Focal length of a full sphere, measured from its centre. */
export function ballFocalLength(n: number, diameter: number): number {
  inRange('refractiveIndex', n, 1.0001, 4);
  return (n * diameter) / (4 * (n - 1));
}

/**
 * Index that a round bar seems to have for light at an angle to its normal plane.
 *
 * @param skew Angle between the light and the plane across the bar. [rad]
 * @see Bravais' law of skew refraction
 */
export function skewIndex(n: number, skew: number): number {
  const s = Math.sin(skew);
  return Math.sqrt(n * n - s * s) / Math.cos(skew);
}

/** Tangential and sagittal focal lengths of a spherical mirror (Coddington). */
export function coddingtonMirror(radius: number, incidence: number): { readonly tangential: number; readonly sagittal: number } {
  const c = Math.cos(incidence);
  return { tangential: (radius / 2) * c, sagittal: radius / (2 * c) };
}

/** Radius of curvature of a lens of known focal length. */
export function lensRadius(shape: 'plano-convex' | 'biconvex', n: number, focalLength: number, thickness: number): number {
  const k = n - 1;
  if (shape === 'plano-convex') return focalLength * k;
  // f = R² n / (k (2 n R − k t)): the larger root is the lens.
  const b = 2 * k * focalLength;
  const c = (k * k * thickness * focalLength) / n;
  return (b + Math.sqrt(b * b - 4 * c)) / 2;
}
