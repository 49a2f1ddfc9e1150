import { z } from 'zod';
import { materialRanges, opticRanges as ranges, sealedUnitRanges, type InputRange } from '#app/physics/input-ranges.ts';
import { refractiveMaterialNames } from '#app/physics/optics/optic.ts';
import { numberIn } from './ranged-number.ts';

/** Schema of every optic that the engine knows, told apart by `kind`. Lengths in metres. */

interface PoseRanges {
  readonly slopeErrorMrad: InputRange;
  readonly axisAzimuthDeg: InputRange;
  readonly axisElevationDeg: InputRange;
}
const surface = ({ slopeErrorMrad }: Pick<PoseRanges, 'slopeErrorMrad'>) => ({ slopeErrorMrad: numberIn(slopeErrorMrad).optional() });
const posed = (of: PoseRanges) => ({ ...surface(of), axisAzimuthDeg: numberIn(of.axisAzimuthDeg), axisElevationDeg: numberIn(of.axisElevationDeg) });

const materialSchema = z.union([
  z.strictObject({ name: z.enum(refractiveMaterialNames) }),
  z.strictObject({ name: z.literal('explicit'), refractiveIndex: numberIn(materialRanges.refractiveIndex), absorptionPerM: numberIn(materialRanges.absorptionPerM) }),
]);

const lens = z.strictObject({
  kind: z.literal('lens'), ...posed(ranges.lens),
  diameterM: numberIn(ranges.lens.diameterM),
  focalLengthM: numberIn(ranges.lens.focalLengthM),
  centreThicknessM: numberIn(ranges.lens.centreThicknessM).optional(),
  shape: z.enum(['plano-convex', 'biconvex']),
  faceToSun: z.enum(['curved', 'flat']),
  material: materialSchema,
});

const sphere = z.strictObject({ kind: z.literal('sphere'), ...surface(ranges.sphere), diameterM: numberIn(ranges.sphere.diameterM), material: materialSchema });

const cylinder = z.strictObject({
  kind: z.literal('cylinder'), ...posed(ranges.cylinder),
  diameterM: numberIn(ranges.cylinder.diameterM),
  lengthM: numberIn(ranges.cylinder.lengthM),
  material: materialSchema,
});

const bowl = z.strictObject({
  kind: z.literal('bowl'), ...surface(ranges.bowl),
  radiusM: numberIn(ranges.bowl.radiusM),
  liquidDepthM: numberIn(ranges.bowl.liquidDepthM),
  material: materialSchema,
});

const mirror = z.strictObject({
  kind: z.enum(['concave-mirror', 'polished-bowl', 'dish']), ...posed(ranges.dish),
  figure: z.enum(['spherical', 'parabolic']),
  diameterM: numberIn(ranges.dish.diameterM),
  radiusM: numberIn(ranges.dish.radiusM),
  reflectance: numberIn(ranges.dish.reflectance),
});

const curvedReflector = z.strictObject({
  kind: z.enum(['facade', 'curved-metal', 'trough']), ...posed(ranges.facade),
  radiusM: numberIn(ranges.facade.radiusM),
  chordM: numberIn(ranges.facade.chordM),
  lengthM: numberIn(ranges.facade.lengthM),
  generators: z.enum(['vertical', 'horizontal']),
  paneWidthM: numberIn(ranges.facade.paneWidthM).optional(),
  paneTiltMrad: numberIn(ranges.facade.paneTiltMrad).optional(),
  paneBowM: numberIn(ranges.facade.paneBowM).optional(),
  reflectance: numberIn(ranges.facade.reflectance),
});

const sealedUnit = z.strictObject({
  outerThicknessM: numberIn(sealedUnitRanges.outerThicknessM),
  innerThicknessM: numberIn(sealedUnitRanges.innerThicknessM),
  gapM: numberIn(sealedUnitRanges.gapM),
  sealPressureHpa: numberIn(sealedUnitRanges.sealPressureHpa),
  sealTemperatureC: numberIn(sealedUnitRanges.sealTemperatureC),
  cavityTemperatureC: numberIn(sealedUnitRanges.cavityTemperatureC),
});

const bowedPane = z.strictObject({
  kind: z.literal('bowed-pane'), ...posed(ranges['bowed-pane']),
  widthM: numberIn(ranges['bowed-pane'].widthM),
  heightM: numberIn(ranges['bowed-pane'].heightM),
  centreBowM: numberIn(ranges['bowed-pane'].centreBowM).optional().describe('Measured; left out: from the sealed unit'),
  sealedUnit: sealedUnit.optional(),
  reflectance: numberIn(ranges['bowed-pane'].reflectance),
  coatingSurface: z.union([z.literal(1), z.literal(2), z.literal(3), z.literal(4)]).optional(),
});

const fresnel = z.strictObject({
  kind: z.literal('fresnel'), ...posed(ranges.fresnel),
  widthM: numberIn(ranges.fresnel.widthM),
  heightM: numberIn(ranges.fresnel.heightM),
  focalLengthM: numberIn(ranges.fresnel.focalLengthM),
  transmittance: numberIn(ranges.fresnel.transmittance),
});

const pondedDome = z.strictObject({
  kind: z.literal('ponded-dome'), ...surface(ranges['ponded-dome']),
  radiusM: numberIn(ranges['ponded-dome'].radiusM),
  pondDiameterM: numberIn(ranges['ponded-dome'].pondDiameterM),
});

const telescope = z.strictObject({
  kind: z.literal('telescope'), ...posed(ranges.telescope),
  diameterM: numberIn(ranges.telescope.diameterM),
  focalLengthM: numberIn(ranges.telescope.focalLengthM),
  transmittance: numberIn(ranges.telescope.transmittance),
});

export const opticSchema = z.discriminatedUnion('kind', [
  lens, sphere, cylinder, bowl, mirror, curvedReflector, bowedPane, fresnel, pondedDome, telescope,
]);
