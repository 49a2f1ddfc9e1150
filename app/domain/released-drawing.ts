import { z } from 'zod';
import { noDrawing } from './run-drawing.ts';
import type { RunDrawing } from './run-drawing.ts';

/** What the figures of a report may take out of the house; a key that is not named here is dropped on the way. */
const number = z.number();
const text = z.string();
const vector = z.tuple([number, number, number]);
const sample = z.object({ atUtc: text, wm2: number });

const beam = z.object({
  focusKind: z.enum(['point', 'line']),
  reflects: z.boolean(),
  outline: z.object({ ball: z.object({ centre: vector, radiusM: number }).nullable(), body: z.array(vector), lines: z.array(z.array(vector)), entersAt: vector, halfApertureM: number, leavesAtM: number }),
  startsAt: vector,
  generator: vector.nullable(),
  lineHalfLengthM: number,
  mark: z.object({ position: vector, lengthMm: number.nullable(), widthMm: number.nullable(), headingDeg: number.nullable(), sigmaRightMm: number, sigmaUpMm: number }).nullable(),
  facing: z.object({ normal: vector, right: vector, up: vector, rightWords: text, upWords: text, recorded: z.boolean() }).nullable(),
  sectionAlong: vector,
  sectionBearingDeg: number,
  shares: z.array(number),
  reachM: number,
  profiles: z.array(z.object({ focusM: number, widthsMm: z.array(number) })),
  minutes: z.array(z.object({ atUtc: text, towardsSun: vector, direction: vector, profile: number, across: vector.nullable(), spotMm: z.object({ rightMm: number, upMm: number }).nullable() })),
});

export const releasedDrawingSchema = z.object({
  skyline: z.array(z.object({ azimuthDeg: number, elevationDeg: number })),
  beam: beam.nullable(),
  markDistanceM: number.nullable(),
  sky: z.object({ fromUtc: text, toUtc: text, bound: z.array(sample), likely: z.array(sample) }).nullable(),
  year: z.object({ days: z.array(z.object({ on: text, riseMin: number.nullable(), setMin: number.nullable() })), reach: z.array(z.object({ on: text, fromMin: number, toMin: number })), reachKnown: z.boolean() }).nullable(),
}) satisfies z.ZodType<RunDrawing>;

/**
 * The drawing for a reader. Skyline, directions of the beam, and the rise and set of the sun through a year each give the
 * place away; who may not know it gets the distance on the measurement sheet and nothing else.
 */
export const releasedDrawing = (drawing: RunDrawing, place: 'shown' | 'reduced'): RunDrawing => (place === 'shown' ? drawing : { ...noDrawing, markDistanceM: drawing.markDistanceM });
