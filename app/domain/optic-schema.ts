import { z } from 'zod';
import { refractiveMaterialNames } from '#app/physics/optics/optic.ts';

/** Schema of every optic that the engine knows, told apart by `kind`. Lengths in metres. */

const small = z.number().min(0.001).max(10);
const pose = {
  axisAzimuthDeg: z.number().min(0).max(360),
  axisElevationDeg: z.number().min(-90).max(90),
};
const common = { slopeErrorMrad: z.number().min(0).max(100).optional() };
const share = z.number().min(0).max(1);

const materialSchema = z.union([
  z.strictObject({ name: z.enum(refractiveMaterialNames) }),
  z.strictObject({ name: z.literal('explicit'), refractiveIndex: z.number().min(1.01).max(3), absorptionPerM: z.number().min(0).max(10_000) }),
]);

const lens = z.strictObject({
  kind: z.literal('lens'), ...common, ...pose,
  diameterM: small,
  focalLengthM: z.number().min(0.005).max(100),
  centreThicknessM: z.number().min(0.0005).max(1).optional(),
  shape: z.enum(['plano-convex', 'biconvex']),
  faceToSun: z.enum(['curved', 'flat']),
  material: materialSchema,
});

const sphere = z.strictObject({ kind: z.literal('sphere'), ...common, diameterM: small, material: materialSchema });

const cylinder = z.strictObject({
  kind: z.literal('cylinder'), ...common, ...pose, diameterM: small, lengthM: z.number().min(0.001).max(100), material: materialSchema,
});

const bowl = z.strictObject({
  kind: z.literal('bowl'), ...common, radiusM: small, liquidDepthM: z.number().min(0.001).max(20), material: materialSchema,
});

const mirror = z.strictObject({
  kind: z.enum(['concave-mirror', 'polished-bowl', 'dish']), ...common, ...pose,
  figure: z.enum(['spherical', 'parabolic']),
  diameterM: z.number().min(0.005).max(30),
  radiusM: z.number().min(0.005).max(500),
  reflectance: share,
});

const curvedReflector = z.strictObject({
  kind: z.enum(['facade', 'curved-metal', 'trough']), ...common, ...pose,
  radiusM: z.number().min(0.01).max(2000),
  chordM: z.number().min(0.01).max(500),
  lengthM: z.number().min(0.01).max(500),
  generators: z.enum(['vertical', 'horizontal']),
  paneWidthM: z.number().min(0.01).max(20).optional(),
  reflectance: share,
});

const bowedPane = z.strictObject({
  kind: z.literal('bowed-pane'), ...common, ...pose,
  widthM: z.number().min(0.05).max(20),
  heightM: z.number().min(0.05).max(20),
  centreBowM: z.number().min(-0.2).max(0.2),
  reflectance: share,
  coatingSurface: z.union([z.literal(1), z.literal(2), z.literal(3), z.literal(4)]).optional(),
});

const fresnel = z.strictObject({
  kind: z.literal('fresnel'), ...common, ...pose,
  widthM: z.number().min(0.01).max(10), heightM: z.number().min(0.01).max(10), focalLengthM: z.number().min(0.01).max(20), transmittance: share,
});

const pondedDome = z.strictObject({
  kind: z.literal('ponded-dome'), ...common, radiusM: z.number().min(0.01).max(50), pondDiameterM: z.number().min(0.01).max(50),
});

const telescope = z.strictObject({
  kind: z.literal('telescope'), ...common, ...pose, diameterM: small, focalLengthM: z.number().min(0.01).max(100), transmittance: share,
});

export const opticSchema = z.discriminatedUnion('kind', [
  lens, sphere, cylinder, bowl, mirror, curvedReflector, bowedPane, fresnel, pondedDome, telescope,
]);
