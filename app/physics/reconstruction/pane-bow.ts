import type { Assumption } from '#app/physics/model/stated.ts';
import type { Optic, OpticInput, PaneInput, SealedUnitInput } from '#app/physics/optics/optic.ts';
import { checkRanges, sealedUnitRanges } from '#app/physics/input-ranges.ts';
import { sealedUnitBow } from '#app/physics/optics/trace/plate.ts';
import { zeroCelsiusK } from '#app/physics/constants.ts';
import { roundSignificant } from '#app/physics/units.ts';

/** Stiffness of soda-lime glass. Stated values, unverified. */
const youngPa = 7e10;
const poisson = 0.22;

/** An optic that can be reckoned with, and what had to be assumed for that. */
export interface ReadyOptic {
  readonly optic: Optic;
  readonly assumptions: readonly Assumption[];
}

function bowOfUnit({ widthM, heightM }: PaneInput, unit: SealedUnitInput, pressureHpa: number): number {
  checkRanges('optic.sealedUnit', unit, sealedUnitRanges);
  const { outerDeflectionM } = sealedUnitBow({
    shortSideM: Math.min(widthM, heightM),
    longSideM: Math.max(widthM, heightM),
    outerThicknessM: unit.outerThicknessM,
    innerThicknessM: unit.innerThicknessM,
    gapM: unit.gapM,
    youngPa,
    poisson,
    sealPressurePa: unit.sealPressureHpa * 100,
    sealTemperatureK: unit.sealTemperatureC + zeroCelsiusK,
    pressurePa: pressureHpa * 100,
    temperatureK: unit.cavityTemperatureC + zeroCelsiusK,
  });
  return -outerDeflectionM;
}

/**
 * The optic with its bow settled: measured, or from the cavity of its unit at the pressure of the place.
 *
 * @throws RangeError for a pane with neither, or a unit outside what is built.
 */
export function readyOptic(given: OpticInput, pressureHpa: number): ReadyOptic {
  if (given.kind !== 'bowed-pane') return { optic: given, assumptions: [] };
  const { sealedUnit, centreBowM, ...pane } = given;
  if (centreBowM !== undefined) {
    const unused: Assumption = { field: 'optic.sealedUnit', value: 'not used', source: { text: 'the bow was measured, which goes before theory', verified: true } };
    return { optic: { ...pane, centreBowM }, assumptions: sealedUnit === undefined ? [] : [unused] };
  }
  if (sealedUnit === undefined) throw new RangeError('optic.centreBowM and optic.sealedUnit are both left out: give the measured bow, or the unit that it follows from.');
  const bowM = bowOfUnit(given, sealedUnit, pressureHpa);
  const limit = Math.abs(bowM) > sealedUnit.outerThicknessM ? '; beyond the thickness of the pane, where the theory overstates it' : '';
  return {
    optic: { ...pane, centreBowM: bowM },
    assumptions: [{
      field: 'optic.centreBowM',
      value: `${roundSignificant(bowM * 1000, 3)} mm`,
      source: { text: `plate and cavity model, glass of ${youngPa / 1e9} GPa and Poisson’s ratio ${poisson}${limit}`, verified: false },
    }],
  };
}
