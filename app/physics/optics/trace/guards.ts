/** Broken physics is a broken program: these stop the run. */
export class PhysicsGuardError extends Error {
  override readonly name = 'PhysicsGuardError';
}

/**
 * Greatest concentration that any disc can have in air: radiance is not raised by any optic. A limb-darkened sun is
 * brighter than its mean at the centre.
 *
 * @see R. Winston, J. C. Miñano and P. Benítez, Nonimaging Optics, 2005, ch. 2
 */
export function radianceBound(transmittance: number, sunHalfAngleRad: number, limbU: number, refractiveIndex = 1): number {
  return (transmittance * refractiveIndex * refractiveIndex) / (Math.sin(sunHalfAngleRad) ** 2 * (1 - limbU / 3));
}

/** @throws PhysicsGuardError if a concentration lies above the bound by more than its own noise. */
export function guardRadiance(concentration: number, stdError: number, bound: number): void {
  if (!(concentration >= 0)) throw new PhysicsGuardError(`concentration ${concentration} is not a positive number`);
  if (concentration - 5 * stdError > bound * 1.001) {
    throw new PhysicsGuardError(`concentration ${concentration.toPrecision(5)} ± ${stdError.toPrecision(2)} exceeds the radiance bound ${bound.toPrecision(5)}`);
  }
}

/** @throws PhysicsGuardError if the shares of a ray's power did not add up to 1 within 1e-12. */
export function guardEnergy(worstImbalance: number): void {
  if (!(worstImbalance <= 1e-12)) throw new PhysicsGuardError(`a ray's energy is off by ${worstImbalance}`);
}
