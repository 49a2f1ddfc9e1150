import { z } from 'zod';
import { minuteReasons } from '#app/physics/model/minutes.ts';

/**
 * What of a reconstruction's result may leave the house. A key that is not named here is dropped on the way out, so a
 * field that the engine gains later stays inside until somebody adds it.
 */
const text = z.string();
const number = z.number();
const maybe = number.nullable();
const band = z.object({ low: number, mid: number, high: number });
const verdict = z.enum(['sunlit', 'not-sunlit', 'cannot-tell']);
const reason = z.enum(minuteReasons);
const testName = z.enum(['geometry', 'weather', 'energy', 'mark']);
const source = z.object({ text, verified: z.boolean() });

const best = z.object({
  atUtc: text,
  sun: z.object({ azimuthDeg: number, airlessElevationDeg: number, apparentElevationDeg: number, declinationDeg: number, distanceAu: number, angularDiameterDeg: number, equationOfTimeMin: number }),
  dni: z.object({ likelyWm2: maybe, secondModelWm2: maybe, boundWm2: maybe, measuredWm2: maybe, atOpticLikelyWm2: maybe, atOpticBoundWm2: maybe, basis: text }),
  missLateralMm: maybe,
  missAxialMm: maybe,
  toleranceLateralMm: maybe,
  toleranceAxialMm: maybe,
});

const traced = z.object({
  rays: number,
  blockedFraction: number.optional(),
  transmittedFraction: number,
  r50Mm: number,
  r80Mm: number,
  hotSpotOffsetMm: maybe,
  stdError: number,
  closedForm: number,
  backTraced: z.object({ centre: z.enum(['hot spot', 'mark']), concentration: number, stdError: number, forward: number, agrees: z.boolean() }).nullable(),
  bestPlanes: z.array(z.object({ disc: text, distanceM: number, concentration: number })),
  map: z.object({ cells: number, sizeMm: number, suns: z.array(number) }).nullable(),
});

const focus = z.object({
  method: z.enum(['closed-form', 'ray-trace']),
  focusKind: z.enum(['point', 'line']),
  focalLengthM: number,
  spotDiameterMm: band,
  discs: z.array(z.object({ disc: z.enum(['sun-image', '1 mm', '5 mm']), diameterMm: number, centre: z.enum(['hot spot', 'mark']), concentration: band, fluxKwm2: band })),
  plane: text,
  spotAtDistance: z.array(z.object({ distanceM: number, diameterMm: number, fluxKwm2: number })),
  dangerZone: z.object({ thresholdKwm2: number, nearM: number, farM: number, widthMm: number.optional() }).nullable(),
  trailSpeedMmPerH: maybe,
  trailHeadingDeg: maybe,
  trailMinutesAtLeast: maybe,
  dwellS: z.array(z.object({ thresholdKwm2: number, seconds: band })),
  traced: traced.nullish().transform((figures) => figures ?? null),
});

const heating = z.object({
  materialId: text,
  surfaceTemperatureC: z.array(z.object({ timeS: number, celsius: band })),
  outcomes: z.array(
    z.object({
      id: z.enum(['softening', 'scorch', 'smoulder', 'flaming', 'skin-burn']),
      answer: z.enum(['reached', 'not reached', 'cannot tell']),
      timeS: band.nullable(),
      sentence: text,
      basis: text,
      sampleSizeMm: maybe,
      source,
    }),
  ),
});

const recurrence = z.object({
  firstOn: text,
  lastOn: text,
  days: z.array(z.object({ on: text, bestUtc: text, fromUtc: text, toUtc: text, minutes: number, separationDeg: number })),
  bestUtc: text,
  minutes: number,
});

const lightInterval = z.object({ fromUtc: text, toUtc: text, minutes: number, greatestSuns: number });

const margin = z.object({ value: number, low: number, high: number, unit: text, agreeFrom: maybe, agreeTo: maybe });

export const releasedResultSchema = z.object({
  engineVersion: text,
  window: z.object({ startUtc: text, endUtc: text, minutes: number }),
  daylight: z.array(z.object({ on: text, sunriseUtc: text.nullable(), sunsetUtc: text.nullable(), polar: z.enum(['day', 'night']).nullable() })),
  minutes: z.array(z.object({ atUtc: text, azimuthDeg: number, apparentElevationDeg: number, verdict, reason, missLateralMm: maybe, missAxialMm: maybe, fluxKwm2: maybe })),
  runs: z.array(z.object({ fromUtc: text, toUtc: text, minutes: number, verdict, reason })),
  totals: z.object({ sunlit: number, notSunlit: number, cannotTell: number }),
  light: z.object({ lit: z.array(lightInterval), focused: z.array(lightInterval), litFromSuns: number, focusedFromSuns: number }).nullish().transform((light) => light ?? null),
  best: best.nullable(),
  focus: focus.nullable(),
  heating: heating.nullable(),
  recurrence: z.array(recurrence),
  requiredSun: z.object({ azimuthDeg: number, apparentElevationDeg: number, declinationDeg: number, reachable: z.boolean() }).nullable(),
  checks: z.array(z.object({ id: text, test: testName, passed: z.boolean().nullable(), margin: maybe, unit: text, sentence: text })),
  tests: z.array(z.object({ test: testName, result: z.enum(['supports', 'contradicts', 'inconclusive', 'not tested']), sentence: text, margin: margin.nullable() })),
  grade: z.object({ word: z.enum(['consistent', 'not refuted', 'inconsistent because', 'cannot tell because']), because: z.array(text) }),
  sampling: z
    .object({
      samples: number,
      alignedShare: number,
      missLateralMm: band,
      fluxKwm2: band,
      fluxOver: z.array(z.object({ thresholdKwm2: number, share: number })),
      ignitedWithinDwellShare: maybe.optional(),
      convergenceKwm2: number,
      halfSampleMedianKwm2: number.optional(),
      table: z.object({ traces: number, raysEach: number, axes: z.array(z.object({ axis: text, unit: text, nodes: z.array(number) })) }).nullable().optional(),
      tornado: z.array(z.object({ input: text, lowKwm2: number, highKwm2: number })),
    })
    .nullish()
    .transform((sampling) => sampling ?? null),
  assumptions: z.array(z.object({ field: text, value: text, source })),
  warnings: z.array(text),
});
export type ReleasedResult = z.infer<typeof releasedResultSchema>;

/** Keys of the engine's result that are known and stay inside. */
export const resultKeysKept = ['seed'] as const;
