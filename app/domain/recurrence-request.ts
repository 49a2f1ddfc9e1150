import { z } from 'zod';
import type { ReconstructionInput } from '#app/physics/model/input.ts';
import { declinationOf } from '#app/physics/sun/solar-position.ts';
import { reconstruct } from '#app/physics/reconstruct.ts';
import { recurrenceBands } from '#app/physics/recurrence.ts';
import { settleSite } from '#app/physics/site.ts';
import { readSkyline } from '#app/physics/skyline.ts';
import { airlessElevationDeg } from '#app/physics/sun/refraction.ts';
import { fromAzimuthElevation } from '#app/physics/vector.ts';
import { reconstructionSchema } from './reconstruction-schema.ts';

const { shape } = reconstructionSchema;
const common = {
  place: shape.place,
  sky: shape.sky.default({ climateClass: 'temperate-rural' }),
  opening: shape.opening,
  skyline: shape.skyline,
  fromUtc: z.iso.datetime({ offset: true }),
  toUtc: z.iso.datetime({ offset: true }),
};

/** When does the sun put the focus of this optic on this mark? */
const byOpticSchema = z.strictObject({ ...common, optic: shape.optic.unwrap(), opticSigmaRel: shape.opticSigmaRel, mark: shape.mark.unwrap() });

/** When does the sun stand in this direction, as seen? */
const byDirectionSchema = z.strictObject({
  ...common,
  sun: z.strictObject({ azimuthDeg: z.number().min(0).max(360), apparentElevationDeg: z.number().min(-1).max(90) }),
  toleranceDeg: z.number().min(0.05).max(5),
});

/** A span of at most five years, and either an optic with its mark or a direction of the sun with a tolerance. */
export const recurrenceSchema = z.union([byOpticSchema, byDirectionSchema]);
export type RecurrenceRequest = z.infer<typeof recurrenceSchema>;

const daySchema = z.object({ on: z.string(), bestUtc: z.string(), fromUtc: z.string(), toUtc: z.string(), minutes: z.int(), separationDeg: z.number() });
export const recurrenceBandSchema = z.object({ firstOn: z.string(), lastOn: z.string(), days: z.array(daySchema), bestUtc: z.string(), minutes: z.int() });
export const requiredSunSchema = z.object({ azimuthDeg: z.number(), apparentElevationDeg: z.number(), declinationDeg: z.number(), reachable: z.boolean() });
export const assumptionSchema = z.object({ field: z.string(), value: z.string(), source: z.object({ text: z.string(), verified: z.boolean() }) });

export const recurrenceAnswerSchema = z.object({ requiredSun: requiredSunSchema.nullable(), bands: z.array(recurrenceBandSchema), assumptions: z.array(assumptionSchema) });
export interface RecurrenceAnswer {
  readonly requiredSun: { readonly azimuthDeg: number; readonly apparentElevationDeg: number; readonly declinationDeg: number; readonly reachable: boolean } | null;
  readonly bands: ReturnType<typeof recurrenceBands>;
  readonly assumptions: ReturnType<typeof settleSite>['assumptions'];
}

const fiveYearsMs = 5 * 366 * 86_400_000;
/** Greatest declination of the sun's centre in this age, with a margin for its radius and refraction. [°] */
const highestDeclinationDeg = 23.44 + 0.32;

function spanOf(request: RecurrenceRequest): { startMs: number; minutes: number } {
  const startMs = Math.ceil(Date.parse(request.fromUtc) / 60_000) * 60_000;
  const lengthMs = Date.parse(request.toUtc) - startMs;
  if (lengthMs <= 0 || lengthMs > fiveYearsMs) throw new RangeError('fromUtc and toUtc disagree: toUtc must lie after fromUtc, by five years at most.');
  return { startMs, minutes: Math.ceil(lengthMs / 60_000) };
}

/**
 * Days on which the alignment comes back.
 *
 * @throws RangeError for values out of range, or two fields that disagree.
 */
export function recurrenceAnswer(request: RecurrenceRequest): RecurrenceAnswer {
  const span = spanOf(request);
  return 'sun' in request ? byDirection(request, span) : byOptic(request, span.startMs);
}

/** The engine's own calendar, asked for with a window of one minute and as little else as it allows. */
function byOptic({ fromUtc: _from, toUtc, ...request }: z.infer<typeof byOpticSchema>, startMs: number): RecurrenceAnswer {
  const startUtc = new Date(startMs).toISOString();
  const input: ReconstructionInput = {
    ...request,
    window: { startUtc, endUtc: new Date(startMs + 60_000).toISOString(), clockSigmaS: 0 },
    recurrenceFromUtc: startUtc,
    recurrenceToUtc: new Date(toUtc).toISOString(),
    rays: 1000,
    samples: 64,
    seed: 0,
  };
  const { requiredSun, recurrence, assumptions } = reconstruct(input);
  return { requiredSun, bands: recurrence, assumptions };
}

function byDirection(request: z.infer<typeof byDirectionSchema>, span: { readonly startMs: number; readonly minutes: number }): RecurrenceAnswer {
  const { place, sun, skyline } = request;
  const site = settleSite(request);
  const airlessDeg = airlessElevationDeg(sun.apparentElevationDeg, site.air.pressureHpa, site.air.temperatureC);
  const declinationDeg = declinationOf(place.latitudeDeg, sun.azimuthDeg, airlessDeg);
  const required = { ...sun, declinationDeg: Math.round(declinationDeg * 1000) / 1000, reachable: Math.abs(declinationDeg) <= highestDeclinationDeg };
  const bands = recurrenceBands({
    observer: site.observer,
    zone: place.zone,
    startMs: span.startMs,
    minutes: span.minutes,
    required: { ...required, towards: fromAzimuthElevation(sun.azimuthDeg, sun.apparentElevationDeg) },
    toleranceDeg: request.toleranceDeg,
    skyline: skyline && skyline.points.length > 0 ? readSkyline(skyline) : null,
    opening: request.opening,
  });
  return { requiredSun: required, bands, assumptions: site.assumptions };
}

/** Checks a body against the form that it means to have, so that problems name its own fields. */
export function parseRecurrenceRequest(body: unknown) {
  const meansDirection = typeof body === 'object' && body !== null && 'sun' in body;
  return meansDirection ? byDirectionSchema.safeParse(body) : byOpticSchema.safeParse(body);
}
