import type { ReconstructionResult } from '#app/physics/model/result.ts';
import { spannedDeg, surveySigmaM } from '#app/physics/lit.ts';
import { recurrenceBands, yearMinutes } from '#app/physics/recurrence.ts';
import { halfAngleRad } from '#app/physics/sun/sun-disc.ts';
import { daylightOn } from '#app/physics/sun/daylight.ts';
import { localDay, nextDay } from '#app/physics/sun/zone-days.ts';
import { parseUtc, toIsoUtc } from '#app/physics/units.ts';
import type { Setting } from './setting.ts';

/** Least and greatest angular tolerance of the recurrence: the sun's radius, and what a rough survey may widen it to. [°] */
const recurrenceToleranceDeg = [0.27, 2] as const;

/** Sunrise and sunset on every local day that the window touches. */
export function daylightOf(setting: Setting): ReconstructionResult['daylight'] {
  const { zone, observer } = setting.site;
  const days: ReconstructionResult['daylight'][number][] = [];
  const lastDay = localDay(Math.max(setting.startMs, setting.endMs - 1), zone);
  for (let day = localDay(setting.startMs, zone); day <= lastDay; day = nextDay(day)) {
    const { sunriseMs, sunsetMs, polar } = daylightOn(day, zone, observer);
    const instant = (utcMs: number | null): string | null => (utcMs === null ? null : toIsoUtc(Math.round(utcMs / 1000) * 1000));
    days.push({ on: day, sunriseUtc: instant(sunriseMs), sunsetUtc: instant(sunsetMs), polar });
  }
  return days;
}

/** Longest span for which recurrence is listed. */
const longestSpanMinutes = 5 * 366 * 1440;

/** Whether openings and bars stop every ray from the required direction, survey error included. */
function frameStops({ required, scene, track }: Setting): boolean {
  const sun = track[0];
  return required !== null && sun !== undefined && scene.mask !== null && scene.mask(required.towards, halfAngleRad(sun.distanceAu)).most === 0;
}

/** Days on which the same alignment comes back; none where no sun can, or something stands in its way for good. */
export function recurrenceOf(setting: Setting): ReconstructionResult['recurrence'] {
  const { required, mark, reach, site, input } = setting;
  const startMs = input.recurrenceFromUtc === undefined ? setting.endMs : parseUtc(input.recurrenceFromUtc, 'recurrenceFromUtc');
  const minutes = spanMinutes(startMs, input.recurrenceToUtc);
  if (required === null || mark === null || reach === null || !required.reachable || frameStops(setting)) return [];
  const spotDeg = spannedDeg(reach.spotRadiusM + mark.halfWidthM, mark.distanceM);
  const surveyDeg = spannedDeg(surveySigmaM(mark), mark.distanceM);
  const [least, most] = recurrenceToleranceDeg;
  return recurrenceBands({
    observer: site.observer, zone: site.zone, required, minutes,
    startMs: Math.ceil(startMs / 60_000) * 60_000,
    toleranceDeg: Math.min(most, Math.hypot(least, spotDeg, surveyDeg)),
    skyline: setting.scene.skyline,
    opening: setting.opening,
  });
}

/** Length of the calendar: a year, or up to the stated end, at most five years. [min] */
function spanMinutes(startMs: number, toUtc: string | undefined): number {
  if (toUtc === undefined) return yearMinutes;
  const minutes = Math.ceil((parseUtc(toUtc, 'recurrenceToUtc') - startMs) / 60_000);
  if (minutes <= 0) throw new RangeError('recurrenceFromUtc and recurrenceToUtc disagree: the span must end after it starts.');
  if (minutes > longestSpanMinutes) throw new RangeError(`recurrenceFromUtc and recurrenceToUtc disagree: the span is ${Math.round(minutes / 1440)} days long; at most ${longestSpanMinutes / 1440} are allowed.`);
  return minutes;
}
