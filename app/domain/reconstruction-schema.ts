import { z } from 'zod';
import { targetMaterials } from '#app/physics/heating/target-materials.data.ts';
import { climateClasses, type ReconstructionInput } from '#app/physics/model.ts';
import { opticSchema } from './optic-schema.ts';

/**
 * The contract of a reconstruction's input: one schema for the command, the route and the form.
 *
 * Unknown keys are refused, so that a misspelt field never passes for one left out.
 */

const instant = z.iso.datetime({ offset: true });
const azimuth = z.number().min(0).max(360);
const elevation = z.number().min(-90).max(90);
const sigmaDeg = z.number().min(0).max(90);

const placeSchema = z.strictObject({
  latitudeDeg: z.number().min(-90).max(90),
  longitudeDeg: z.number().min(-180).max(180),
  elevationM: z.number().min(-500).max(9000),
  heightAboveGroundM: z.number().min(0).max(1000),
  zone: z.string().min(1).max(80),
});

const windowSchema = z.strictObject({
  startUtc: instant,
  endUtc: instant,
  clockSigmaS: z.number().min(0).max(86_400),
});

const dniSeriesSchema = z.strictObject({
  basis: z.enum(['measured', 'derived', 'hourly-archive']),
  source: z.string().min(1).max(400),
  stationDistanceKm: z.number().min(0).max(20_000).optional(),
  values: z
    .array(z.strictObject({ startUtc: instant, endUtc: instant, dniWm2: z.number().min(0).max(1500) }))
    .max(50_000),
});

const skySchema = z.strictObject({
  climateClass: z.enum(climateClasses),
  pressureHpa: z.number().min(300).max(1100).optional(),
  temperatureC: z.number().min(-90).max(60).optional(),
  ozoneCm: z.number().min(0).max(1).optional(),
  waterCm: z.number().min(0).max(10).optional(),
  aod500: z.number().min(0).max(5).optional(),
  aod380: z.number().min(0).max(5).optional(),
  solarConstantWm2: z.number().min(1300).max(1400).optional(),
  circumsolarRatio: z.number().min(0).max(0.5).optional(),
  dniSeries: dniSeriesSchema.optional(),
});

const openingSchema = z.strictObject({
  azimuthDeg: azimuth,
  azimuthSigmaDeg: sigmaDeg,
  halfWidthDeg: z.number().min(0).max(90),
  lowestElevationDeg: elevation.optional(),
  highestElevationDeg: elevation.optional(),
  transmittance: z.number().min(0).max(1),
  transmittanceSource: z.string().max(400),
});

const skylineSchema = z.strictObject({
  points: z
    .array(z.strictObject({ azimuthDeg: azimuth, elevationDeg: z.number().min(-30).max(90), name: z.string().max(120).optional() }))
    .max(2000),
  sigmaDeg,
});

const markSchema = z.strictObject({
  bearingDeg: azimuth,
  bearingSigmaDeg: sigmaDeg,
  elevationDeg: elevation,
  elevationSigmaDeg: sigmaDeg,
  distanceM: z.number().min(0.001).max(1000),
  distanceSigmaM: z.number().min(0).max(1000),
  lengthMm: z.number().min(0).max(1_000_000).optional(),
  widthMm: z.number().min(0).max(1_000_000).optional(),
  trailHeadingDeg: azimuth.optional(),
  normalAzimuthDeg: azimuth.optional(),
  normalElevationDeg: elevation.optional(),
});

const markCoordinatesSchema = z.strictObject({
  eastM: z.number().min(-1000).max(1000),
  northM: z.number().min(-1000).max(1000),
  upM: z.number().min(-1000).max(1000),
  sigmaM: z.number().min(0).max(1000),
  lengthMm: z.number().min(0).max(1_000_000).optional(),
  widthMm: z.number().min(0).max(1_000_000).optional(),
  trailHeadingDeg: azimuth.optional(),
  normalAzimuthDeg: azimuth.optional(),
  normalElevationDeg: elevation.optional(),
});

const targetSchema = z.strictObject({
  materialId: z.enum([...targetMaterials.keys()]),
  solarAbsorptance: z.number().min(0).max(1).optional(),
  thicknessM: z.number().min(0.00001).max(10).optional(),
});

export const reconstructionSchema = z.strictObject({
  place: placeSchema,
  window: windowSchema,
  sky: skySchema,
  opening: openingSchema.optional(),
  skyline: skylineSchema.optional(),
  optic: opticSchema.optional(),
  opticSigmaRel: z.number().min(0).max(1).optional(),
  mark: markSchema.optional(),
  markCoordinates: markCoordinatesSchema.optional(),
  target: targetSchema.optional(),
  recurrenceFromUtc: instant.optional(),
  recurrenceToUtc: instant.optional(),
  rays: z.int().min(1000).max(5_000_000).optional(),
  samples: z.int().min(64).max(65_536).optional(),
  seed: z.int().min(0).max(4_294_967_295),
});

/** What is wrong with an input: the field in dotted form and what to do about it. */
export interface InputProblem {
  readonly field: string;
  readonly message: string;
}

/** Input that passed the schema, or every problem found in it. */
export type ParsedInput =
  | { readonly ok: true; readonly input: ReconstructionInput }
  | { readonly ok: false; readonly problems: readonly InputProblem[] };

export function parseReconstructionInput(value: unknown): ParsedInput {
  const parsed = reconstructionSchema.safeParse(value);
  if (parsed.success) return { ok: true, input: parsed.data };
  return {
    ok: false,
    problems: parsed.error.issues.map((issue) => ({ field: issue.path.join('.') || 'input', message: issue.message })),
  };
}
