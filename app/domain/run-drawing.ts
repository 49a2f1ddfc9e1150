import type { ReconstructionInput } from '#app/physics/model/input.ts';
import type { ReconstructionResult } from '#app/physics/model/result.ts';
import { localDay } from '#app/physics/sun/zone-days.ts';
import { beamView } from './run-beam.ts';
import type { BeamView } from './run-beam.ts';
import { bestDay, clearSkyCurve, irradianceSpan } from './run-day.ts';
import type { IrradianceSample } from './run-day.ts';
import { yearPlate } from './run-returns.ts';
import type { YearDay, YearSpan } from './year-of-sun.ts';

/**
 * What the figures of a report need beyond the result of its run: numbers only, no name and no coordinate of the place.
 * A part that the run has no data for, or that a reader may not have, is null or empty.
 */
export interface RunDrawing {
  readonly skyline: readonly { readonly azimuthDeg: number; readonly elevationDeg: number }[];
  /** At the best minute and others of its day; too few for a film, enough for the way of the spot. */
  readonly beam: BeamView | null;
  readonly markDistanceM: number | null;
  /** Direct irradiance of the clear sky through the window, or through the day of the best minute. */
  readonly sky: { readonly fromUtc: string; readonly toUtc: string; readonly bound: readonly IrradianceSample[]; readonly likely: readonly IrradianceSample[] } | null;
  /** Twelve months from the month of the window: daylight at the place, and where the sun reaches the optic. */
  readonly year: { readonly days: readonly YearDay[]; readonly reach: readonly YearSpan[]; readonly reachKnown: boolean } | null;
}

export const noDrawing: RunDrawing = { skyline: [], beam: null, markDistanceM: null, sky: null, year: null };

/** A beam is worked out at about so many minutes. */
const mostBeamMinutes = 48;

/** The same run always gives the same drawing, whenever it is asked for. */
export function runDrawing(input: ReconstructionInput, result: ReconstructionResult): RunDrawing {
  const { zone } = input.place;
  const day = bestDay(result, zone);
  const light = result.daylight.find((one) => one.on === day);
  const span = irradianceSpan(result.window, day, zone, light?.sunriseUtc && light.sunsetUtc ? { riseUtc: light.sunriseUtc, setUtc: light.sunsetUtc } : null);
  const sky = clearSkyCurve(input, span.fromUtc, span.toUtc);
  const { days, reach } = yearPlate(input, result, new Date(result.window.startUtc));
  return {
    skyline: (input.skyline?.points ?? []).map(({ azimuthDeg, elevationDeg }) => ({ azimuthDeg, elevationDeg })),
    beam: withoutRepeats(beamView(input, beamMinutes(result, day, zone))),
    markDistanceM: markDistanceM(input),
    sky: sky.bound.length > 0 ? { ...span, ...sky } : null,
    year: { days, reach, reachKnown: input.skyline !== undefined || input.opening !== undefined },
  };
}

/** Many optics have one beam whatever the minute; it is kept once. */
function withoutRepeats(beam: BeamView | null): BeamView | null {
  if (!beam) return null;
  const keys = beam.profiles.map((profile) => JSON.stringify(profile));
  const kept = [...new Set(keys)];
  return { ...beam, profiles: kept.flatMap((key) => beam.profiles[keys.indexOf(key)] ?? []), minutes: beam.minutes.map((minute) => ({ ...minute, profile: kept.indexOf(keys[minute.profile] ?? '') })) };
}

/** Evenly chosen minutes of a day, the best among them, and those at which the sun comes to the mark and leaves it. */
function beamMinutes(result: ReconstructionResult, day: string, zone: string): string[] {
  const minutes = result.minutes.filter((minute) => localDay(Date.parse(minute.atUtc), zone) === day);
  const every = Math.max(1, Math.ceil(minutes.length / mostBeamMinutes));
  const turns = (index: number) => minutes[index - 1]?.verdict !== minutes[index]?.verdict || minutes[index + 1]?.verdict !== minutes[index]?.verdict;
  return minutes.filter(({ atUtc }, index) => index % every === 0 || atUtc === result.best?.atUtc || turns(index)).map(({ atUtc }) => atUtc);
}

/** As surveyed from the optic's origin. [m] */
export function markDistanceM({ mark, markCoordinates }: ReconstructionInput): number | null {
  if (mark) return mark.distanceM;
  return markCoordinates ? Math.hypot(markCoordinates.eastM, markCoordinates.northM, markCoordinates.upM) : null;
}
