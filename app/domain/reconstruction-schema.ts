import { z } from 'zod';
import { targetMaterials } from '#app/physics/heating/target-materials.data.ts';
import { inputRanges as ranges, type InputRange } from '#app/physics/input-ranges.ts';
import { climateClasses, type ReconstructionInput } from '#app/physics/model/input.ts';
import { numberIn } from './ranged-number.ts';
import { opticSchema } from './optic-schema.ts';

/**
 * The contract of a reconstruction's input: one schema for the command, the route and the form.
 *
 * Unknown keys are refused, so that a misspelt field never passes for one left out.
 */

const instant = z.iso.datetime({ offset: true });

const placeSchema = z.strictObject({
  latitudeDeg: numberIn(ranges.place.latitudeDeg),
  longitudeDeg: numberIn(ranges.place.longitudeDeg),
  elevationM: numberIn(ranges.place.elevationM),
  heightAboveGroundM: numberIn(ranges.place.heightAboveGroundM),
  zone: z.string().min(1).max(80),
});

const windowSchema = z.strictObject({
  startUtc: instant,
  endUtc: instant,
  clockSigmaS: numberIn(ranges.window.clockSigmaS),
});

const dniSeriesSchema = z.strictObject({
  basis: z.enum(['measured', 'derived', 'hourly-archive']),
  source: z.string().min(1).max(400),
  stationDistanceKm: numberIn(ranges.dniSeries.stationDistanceKm).optional(),
  values: z
    .array(z.strictObject({ startUtc: instant, endUtc: instant, dniWm2: numberIn(ranges.dniValue.dniWm2) }))
    .max(50_000),
});

const skySchema = z.strictObject({
  climateClass: z.enum(climateClasses),
  pressureHpa: numberIn(ranges.sky.pressureHpa).optional(),
  temperatureC: numberIn(ranges.sky.temperatureC).optional(),
  ozoneCm: numberIn(ranges.sky.ozoneCm).optional(),
  waterCm: numberIn(ranges.sky.waterCm).optional(),
  aod500: numberIn(ranges.sky.aod500).optional(),
  aod380: numberIn(ranges.sky.aod380).optional(),
  solarConstantWm2: numberIn(ranges.sky.solarConstantWm2).optional(),
  circumsolarRatio: numberIn(ranges.sky.circumsolarRatio).optional(),
  dniSeries: dniSeriesSchema.optional(),
});

const openingSchema = z.strictObject({
  azimuthDeg: numberIn(ranges.opening.azimuthDeg),
  azimuthSigmaDeg: numberIn(ranges.opening.azimuthSigmaDeg),
  halfWidthDeg: numberIn(ranges.opening.halfWidthDeg),
  lowestElevationDeg: numberIn(ranges.opening.lowestElevationDeg).optional(),
  highestElevationDeg: numberIn(ranges.opening.highestElevationDeg).optional(),
  transmittance: numberIn(ranges.opening.transmittance),
  transmittanceSource: z.string().max(400),
});

const occluderSchema = z.strictObject({
  kind: z.enum(['block', 'opening']).describe('A block stops the rays that meet it; an opening stops the rays that miss every opening of its plane'),
  name: z.string().max(120).optional(),
  corners: z
    .array(z.strictObject({ eastM: numberIn(ranges.corner.eastM), northM: numberIn(ranges.corner.northM), upM: numberIn(ranges.corner.upM) }))
    .min(3)
    .max(64)
    .describe('In order, in one plane within 1 mm, from the optic’s origin'),
  revealDepthM: numberIn(ranges.occluder.revealDepthM).optional().describe('Openings only: depth of the reveal outward of the outline'),
});

const skylineSchema = z.strictObject({
  points: z
    .array(z.strictObject({ azimuthDeg: numberIn(ranges.skylinePoint.azimuthDeg), elevationDeg: numberIn(ranges.skylinePoint.elevationDeg), name: z.string().max(120).optional() }))
    .max(2000),
  sigmaDeg: numberIn(ranges.skyline.sigmaDeg),
});

/** What is known of a mark however its place was measured. */
const markLooks = ({ lengthMm, widthMm, trailHeadingDeg, normalAzimuthDeg, normalElevationDeg }: MarkLookRanges) => ({
  lengthMm: numberIn(lengthMm).optional(),
  widthMm: numberIn(widthMm).optional(),
  trailHeadingDeg: numberIn(trailHeadingDeg).optional(),
  normalAzimuthDeg: numberIn(normalAzimuthDeg).optional(),
  normalElevationDeg: numberIn(normalElevationDeg).optional(),
});
type MarkLookRanges = Readonly<Record<'lengthMm' | 'widthMm' | 'trailHeadingDeg' | 'normalAzimuthDeg' | 'normalElevationDeg', InputRange>>;

const markSchema = z.strictObject({
  bearingDeg: numberIn(ranges.mark.bearingDeg),
  bearingSigmaDeg: numberIn(ranges.mark.bearingSigmaDeg),
  elevationDeg: numberIn(ranges.mark.elevationDeg),
  elevationSigmaDeg: numberIn(ranges.mark.elevationSigmaDeg),
  distanceM: numberIn(ranges.mark.distanceM),
  distanceSigmaM: numberIn(ranges.mark.distanceSigmaM),
  ...markLooks(ranges.mark),
});

const markCoordinatesSchema = z.strictObject({
  eastM: numberIn(ranges.markCoordinates.eastM),
  northM: numberIn(ranges.markCoordinates.northM),
  upM: numberIn(ranges.markCoordinates.upM),
  sigmaM: numberIn(ranges.markCoordinates.sigmaM),
  ...markLooks(ranges.markCoordinates),
});

const targetSchema = z.strictObject({
  materialId: z.enum([...targetMaterials.keys()]),
  solarAbsorptance: numberIn(ranges.target.solarAbsorptance).optional(),
  thicknessM: numberIn(ranges.target.thicknessM).optional(),
});

export const reconstructionSchema = z.strictObject({
  place: placeSchema,
  window: windowSchema,
  sky: skySchema,
  opening: openingSchema.optional(),
  occluders: z.array(occluderSchema).max(60).optional(),
  occluderSigmaM: numberIn(ranges.root.occluderSigmaM).optional().describe('One sigma of the occluders’ corners; left out: 0.01'),
  skyline: skylineSchema.optional(),
  optic: opticSchema.optional(),
  opticSigmaRel: numberIn(ranges.root.opticSigmaRel).optional(),
  mark: markSchema.optional(),
  markCoordinates: markCoordinatesSchema.optional(),
  target: targetSchema.optional(),
  recurrenceFromUtc: instant.optional(),
  recurrenceToUtc: instant.optional(),
  rays: numberIn(ranges.root.rays).optional(),
  samples: numberIn(ranges.root.samples).optional(),
  seed: numberIn(ranges.root.seed),
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
