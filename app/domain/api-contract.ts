import { z } from 'zod';
import { climateClasses } from '#app/physics/model/input.ts';
import type { ReconstructionResult } from '#app/physics/model/result.ts';
import type { Assumption } from '#app/physics/model/stated.ts';
import { settleSite } from '#app/physics/site.ts';
import { absoluteAirMass, kastenYoungAirMass } from '#app/physics/sky/air-mass.ts';
import { clearSkyAt, lowestClearSkyDeg } from '#app/physics/sky/clear-sky.ts';
import { extraterrestrialWm2 } from '#app/physics/sky/extraterrestrial.ts';
import { solarPosition } from '#app/physics/sun/solar-position.ts';
import { angularDiameterDeg } from '#app/physics/sun/sun-disc.ts';
import { roundTo } from '#app/physics/units.ts';
import { reconstructionSchema } from './reconstruction-schema.ts';
import type { InputProblem } from './reconstruction-schema.ts';
import { reconstructionResultSchema } from './reconstruction-result-schema.ts';
import { assumptionSchema } from './recurrence-request.ts';

/**
 * The programming interface in Zod: what is asked, what is answered. Names carry their unit; azimuths run clockwise
 * from true north, elevations are above the level, instants are UTC.
 */

const { sky } = reconstructionSchema.shape;
const place = {
  lat: z.number().min(-90).max(90).describe('Latitude, degrees, north positive'),
  lon: z.number().min(-180).max(180).describe('Longitude, degrees, east positive'),
  utc: z.iso.datetime({ offset: true }).describe('Instant with Z or an offset, from 1900 to 2100'),
  elevationM: z.number().min(-500).max(9000).default(0).describe('Height above the sea'),
  pressureHpa: sky.shape.pressureHpa.describe('Left out: standard atmosphere at the height'),
  temperatureC: sky.shape.temperatureC.describe('Left out: 12 °C'),
};

export const sunQuerySchema = z.strictObject(place);
export type SunQuery = z.output<typeof sunQuerySchema>;

export const clearSkyQuerySchema = z.strictObject({
  ...place,
  climateClass: z.enum(climateClasses).default('temperate-rural').describe('Median air of a class, for what is left out below'),
  ozoneCm: sky.shape.ozoneCm,
  waterCm: sky.shape.waterCm,
  aod500: sky.shape.aod500,
  aod380: sky.shape.aod380,
  solarConstantWm2: sky.shape.solarConstantWm2,
});
export type ClearSkyQuery = z.output<typeof clearSkyQuerySchema>;

export const sunAnswerSchema = z.object({
  utc: z.string(),
  azimuthDeg: z.number(),
  airlessElevationDeg: z.number().describe('Centre of the disc, without refraction'),
  apparentElevationDeg: z.number().describe('Centre of the disc, refracted'),
  refractionDeg: z.number(),
  declinationDeg: z.number().describe('Topocentric, without refraction'),
  distanceAu: z.number(),
  angularDiameterDeg: z.number(),
  equationOfTimeMin: z.number(),
  assumptions: z.array(assumptionSchema),
});
export type SunAnswer = z.infer<typeof sunAnswerSchema>;

const wm2 = z.number().nullable();
export const clearSkyAnswerSchema = z.object({
  utc: z.string(),
  apparentElevationDeg: z.number(),
  extraterrestrialWm2: z.number().describe('Outside the air, square to the sun'),
  airMass: z.number().nullable().describe('Kasten and Young 1989, scaled by pressure; null below the lowest elevation of the models'),
  dniWm2: wm2.describe('Likely direct normal irradiance under a clear sky; null below 3°, where no model holds'),
  birdDniWm2: wm2.describe('Bird and Hulstrom 1981'),
  ineichenDniWm2: wm2.describe('Ineichen and Perez 2002'),
  boundDniWm2: wm2.describe('What the cleanest air could pass: the only figure that may refute'),
  assumptions: z.array(assumptionSchema),
});
export type ClearSkyAnswer = z.infer<typeof clearSkyAnswerSchema>;

function settled({ lat, lon, elevationM, ...given }: ClearSkyQuery) {
  const { utc: _utc, ...air } = given;
  return settleSite({ place: { latitudeDeg: lat, longitudeDeg: lon, elevationM, heightAboveGroundM: 0, zone: 'UTC' }, sky: air });
}

const refractionFields = new Set(['sky.pressureHpa', 'sky.temperatureC']);
const withoutPrefix = (one: Assumption) => ({ ...one, field: one.field.replace(/^sky\./u, '') });

/** Position of the sun. @throws RangeError outside 1900 to 2100. */
export function sunAnswer(query: SunQuery): SunAnswer {
  const site = settled({ ...query, climateClass: 'temperate-rural' });
  const sun = solarPosition(instantOf(query.utc), site.observer);
  return {
    utc: new Date(query.utc).toISOString(),
    azimuthDeg: roundTo(sun.azimuthDeg, 4),
    airlessElevationDeg: roundTo(sun.airlessElevationDeg, 4),
    apparentElevationDeg: roundTo(sun.apparentElevationDeg, 4),
    refractionDeg: roundTo(sun.refractionDeg, 4),
    declinationDeg: roundTo(sun.declinationDeg, 4),
    distanceAu: roundTo(sun.distanceAu, 6),
    angularDiameterDeg: roundTo(angularDiameterDeg(sun.distanceAu), 5),
    equationOfTimeMin: roundTo(sun.equationOfTimeMin, 3),
    assumptions: site.assumptions.filter((one) => refractionFields.has(one.field)).map(withoutPrefix),
  };
}

/** Direct irradiance under a clear sky. @throws RangeError outside 1900 to 2100. */
export function clearSkyAnswer(query: ClearSkyQuery): ClearSkyAnswer {
  const site = settled(query);
  const sun = solarPosition(instantOf(query.utc), site.observer);
  const extraterrestrial = extraterrestrialWm2(sun.distanceAu, site.air.solarConstantWm2);
  const clear = clearSkyAt(sun.apparentElevationDeg, extraterrestrial, query.elevationM, site.air);
  const tenth = (value: number | undefined): number | null => (value === undefined ? null : roundTo(value, 1));
  const relative = sun.apparentElevationDeg < lowestClearSkyDeg ? null : kastenYoungAirMass(90 - sun.apparentElevationDeg);
  return {
    utc: new Date(query.utc).toISOString(),
    apparentElevationDeg: roundTo(sun.apparentElevationDeg, 4),
    extraterrestrialWm2: roundTo(extraterrestrial, 1),
    airMass: relative === null ? null : roundTo(absoluteAirMass(relative, site.air.pressureHpa * 100), 4),
    dniWm2: tenth(clear?.likelyWm2),
    birdDniWm2: tenth(clear?.birdWm2),
    ineichenDniWm2: tenth(clear?.ineichenWm2),
    boundDniWm2: tenth(clear?.boundWm2),
    assumptions: site.assumptions.map(withoutPrefix),
  };
}

function instantOf(utc: string): number {
  const year = new Date(utc).getUTCFullYear();
  if (year < 1900 || year > 2100) throw new RangeError(`utc lies in the year ${year}; it must lie in 1900…2100.`);
  return Date.parse(utc);
}

/** Answer to a long run: where its result will be. */
export const queuedAnswerSchema = z.object({ id: z.uuid(), href: z.string().describe('Address of the run, as in `Location`') });

export const computationAnswerSchema = z.object({
  id: z.uuid(),
  state: z.enum(['queued', 'running', 'done', 'failed']),
  engineVersion: z.string(),
  requestedUtc: z.string(),
  finishedUtc: z.string().nullable(),
  progress: z.object({ done: z.int(), total: z.int() }).describe('Steps; total is 0 until the run begins'),
  failure: z.string().nullable().describe('What to mend, where the run failed'),
  result: reconstructionResultSchema.nullable(),
});
export type ComputationAnswer = Omit<z.infer<typeof computationAnswerSchema>, 'result'> & { readonly result: ReconstructionResult | null };

/** Query fields as a body would have them: what reads as a number becomes one; a field given twice is an array, and refused. */
export function fromQuery(params: URLSearchParams): Record<string, string | number | readonly string[]> {
  const values: Record<string, string | number | readonly string[]> = {};
  for (const key of new Set(params.keys())) {
    const given = params.getAll(key);
    const [text = ''] = given;
    values[key] = given.length > 1 ? given : /^[+-]?(?:\d+\.?\d*|\.\d+)(?:e[+-]?\d+)?$/iu.test(text) ? Number(text) : text;
  }
  return values;
}

/** Problems of a refused request, by dotted field. */
export const problemsOf = (error: z.ZodError): InputProblem[] => error.issues.flatMap((issue) =>
  issue.code === 'unrecognized_keys'
    ? issue.keys.map((key) => ({ field: [...issue.path, key].join('.'), message: 'There is no such field. Check its spelling; names carry their unit.' }))
    : [{ field: issue.path.join('.') || 'input', message: issue.message }],
);

export const problemSchema = z.object({
  type: z.string(),
  title: z.string(),
  status: z.int(),
  detail: z.string(),
  errors: z.array(z.object({ field: z.string(), message: z.string() })).optional(),
});
export type Problem = z.infer<typeof problemSchema>;
