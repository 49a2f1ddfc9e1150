import { z } from 'zod';
import { minuteReasons } from '#app/physics/model/minutes.ts';
import type { ReconstructionResult } from '#app/physics/model/result.ts';
import { assumptionSchema, recurrenceBandSchema, requiredSunSchema } from './recurrence-request.ts';

/** The contract of a reconstruction's result; `satisfies` holds it to the engine's own types. */

const band = z.object({ low: z.number(), mid: z.number(), high: z.number() });
const source = z.object({ text: z.string(), verified: z.boolean() });
const verdict = z.enum(['sunlit', 'not-sunlit', 'cannot-tell']);
const reason = z.enum(minuteReasons);
const test = z.enum(['geometry', 'weather', 'energy', 'mark']);
const number = z.number().nullable();

const minute = z.object({
  atUtc: z.string(), azimuthDeg: z.number(), apparentElevationDeg: z.number(), verdict, reason,
  missLateralMm: number, missAxialMm: number, fluxKwm2: number,
});
const run = z.object({ fromUtc: z.string(), toUtc: z.string(), minutes: z.int(), verdict, reason });
const daylight = z.object({ on: z.string(), sunriseUtc: z.string().nullable(), sunsetUtc: z.string().nullable(), polar: z.enum(['day', 'night']).nullable() });

const best = z.object({
  atUtc: z.string(),
  sun: z.object({
    azimuthDeg: z.number(), airlessElevationDeg: z.number(), apparentElevationDeg: z.number(), declinationDeg: z.number(), distanceAu: z.number(),
    angularDiameterDeg: z.number(), equationOfTimeMin: z.number(),
  }),
  dni: z.object({
    likelyWm2: number, secondModelWm2: number, boundWm2: number, measuredWm2: number, atOpticLikelyWm2: number, atOpticBoundWm2: number, basis: z.string(),
  }),
  missLateralMm: number, missAxialMm: number, toleranceLateralMm: number, toleranceAxialMm: number,
});

const centre = z.enum(['hot spot', 'mark']);
const traced = z.object({
  rays: z.int(), blockedFraction: z.number().optional(), transmittedFraction: z.number(), r50Mm: z.number(), r80Mm: z.number(), hotSpotOffsetMm: number, stdError: z.number(), closedForm: z.number(),
  backTraced: z.object({ centre, concentration: z.number(), stdError: z.number(), forward: z.number(), agrees: z.boolean() }).nullable(),
  bestPlanes: z.array(z.object({ disc: z.string(), distanceM: z.number(), concentration: z.number() })),
  map: z.object({ cells: z.int(), sizeMm: z.number(), suns: z.array(z.number()) }).nullable(),
});
const focus = z.object({
  method: z.enum(['closed-form', 'ray-trace']),
  focusKind: z.enum(['point', 'line']),
  focalLengthM: z.number(),
  spotDiameterMm: band,
  discs: z.array(z.object({ disc: z.enum(['sun-image', '1 mm', '5 mm']), diameterMm: z.number(), centre, concentration: band, fluxKwm2: band })),
  plane: z.string(),
  spotAtDistance: z.array(z.object({ distanceM: z.number(), diameterMm: z.number(), fluxKwm2: z.number() })),
  dangerZone: z.object({ thresholdKwm2: z.number(), nearM: z.number(), farM: z.number(), widthMm: z.number().optional() }).nullable(),
  trailSpeedMmPerH: number, trailHeadingDeg: number, trailMinutesAtLeast: number,
  dwellS: z.array(z.object({ thresholdKwm2: z.number(), seconds: band })),
  traced: traced.nullable().optional(),
});

const heating = z.object({
  materialId: z.string(),
  surfaceTemperatureC: z.array(z.object({ timeS: z.number(), celsius: band })),
  outcomes: z.array(z.object({
    id: z.enum(['softening', 'scorch', 'smoulder', 'flaming', 'skin-burn']),
    answer: z.enum(['reached', 'not reached', 'cannot tell']),
    timeS: band.nullable(), sentence: z.string(), basis: z.string(), sampleSizeMm: number, source,
  })),
});

const margin = z.object({ value: z.number(), low: z.number(), high: z.number(), unit: z.string(), agreeFrom: number, agreeTo: number });
const sampling = z.object({
  samples: z.int(), alignedShare: z.number(), missLateralMm: band, fluxKwm2: band,
  fluxOver: z.array(z.object({ thresholdKwm2: z.number(), share: z.number() })),
  ignitedWithinDwellShare: number.optional(),
  convergenceKwm2: z.number(),
  halfSampleMedianKwm2: z.number().optional(),
  table: z
    .object({ traces: z.int(), raysEach: z.int(), axes: z.array(z.object({ axis: z.string(), unit: z.string(), nodes: z.array(z.number()) })) })
    .nullable()
    .optional(),
  tornado: z.array(z.object({ input: z.string(), lowKwm2: z.number(), highKwm2: z.number() })),
});

const interval = z.object({ fromUtc: z.string(), toUtc: z.string(), minutes: z.int(), greatestSuns: z.number() });

export const reconstructionResultSchema = z.object({
  engineVersion: z.string(),
  seed: z.int(),
  window: z.object({ startUtc: z.string(), endUtc: z.string(), minutes: z.int() }),
  daylight: z.array(daylight),
  minutes: z.array(minute),
  runs: z.array(run),
  totals: z.object({ sunlit: z.int(), notSunlit: z.int(), cannotTell: z.int() }),
  light: z.object({ lit: z.array(interval), focused: z.array(interval), litFromSuns: z.number(), focusedFromSuns: z.number() }).nullable().optional(),
  best: best.nullable(),
  focus: focus.nullable(),
  heating: heating.nullable(),
  recurrence: z.array(recurrenceBandSchema),
  requiredSun: requiredSunSchema.nullable(),
  checks: z.array(z.object({ id: z.string(), test, passed: z.boolean().nullable(), margin: number, unit: z.string(), sentence: z.string() })),
  tests: z.array(z.object({ test, result: z.enum(['supports', 'contradicts', 'inconclusive', 'not tested']), sentence: z.string(), margin: margin.nullable() })),
  grade: z.object({ word: z.enum(['consistent', 'not refuted', 'inconsistent because', 'cannot tell because']), because: z.array(z.string()) }),
  sampling: sampling.nullable().optional(),
  assumptions: z.array(assumptionSchema),
  warnings: z.array(z.string()),
}) satisfies z.ZodType<ReconstructionResult>;
