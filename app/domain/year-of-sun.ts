import type { OpeningInput, SkylineInput } from '#app/physics/model/input.ts';
import { readSkyline } from '#app/physics/skyline.ts';
import { refractionDeg } from '#app/physics/sun/refraction.ts';
import type { Observer } from '#app/physics/sun/solar-position.ts';
import { scanSun } from '#app/physics/sun/sun-scan.ts';
import { nextDay, startOfLocalDay, zoneOffsetMs } from '#app/physics/sun/zone-days.ts';
import { degree, wrap180 } from '#app/physics/units.ts';

/** Daylight of one local day in minutes after local midnight; null when the sun stays down. */
export interface YearDay {
  readonly on: string;
  readonly riseMin: number | null;
  readonly setMin: number | null;
}
export interface YearSpan {
  readonly on: string;
  readonly fromMin: number;
  readonly toMin: number;
}

/** Airless elevation of the centre when the refracted upper limb stands on a level horizon. [°] */
const upperLimbDeg = -0.8333;
const stepMs = 600_000;

export interface YearQuery {
  readonly observer: Observer;
  readonly zone: string;
  /** First local day, YYYY-MM-DD. */
  readonly firstOn: string;
  readonly days: number;
  readonly skyline?: SkylineInput | undefined;
  readonly opening?: OpeningInput | undefined;
}

/**
 * Sunrise, sunset and the times at which the sun reaches the optic, for each day of a year: looked at every ten
 * minutes and drawn straight between, which keeps within a minute of the exact times outside the polar circles. Meant
 * for a picture of the year; single days are computed by `daylightOn`.
 */
export function yearOfSun(query: YearQuery): { readonly days: readonly YearDay[]; readonly reach: readonly YearSpan[] } {
  const { observer, zone } = query;
  const startMs = startOfLocalDay(query.firstOn, zone);
  const scan = scanSun(observer, startMs, stepMs, query.days * 144 + 12);
  const height = (index: number): number => (scan.up[index] ?? -1) - Math.sin(upperLimbDeg * degree);
  const reaches = reachTest(query);
  const clear = (index: number): boolean => height(index) > 0 && reaches(scan.east[index] ?? 0, scan.north[index] ?? 0, scan.up[index] ?? -1);
  const days: YearDay[] = [];
  const reach: YearSpan[] = [];
  let day = query.firstOn;
  let dayMs = startMs;
  let offsetMs = zoneOffsetMs(dayMs, zone);
  for (let count = 0; count < query.days; count += 1) {
    const following = nextDay(day);
    // Most days keep their offset; asking the zone data costs more than all the rest.
    const steady = zoneOffsetMs(dayMs + 86_400_000, zone) === offsetMs;
    const endMs = steady ? dayMs + 86_400_000 : startOfLocalDay(following, zone);
    const begin = dayMs;
    const first = Math.ceil((dayMs - startMs) / stepMs);
    const last = Math.floor((endMs - startMs) / stepMs);
    const minute = (index: number): number => {
      const atMs = startMs + index * stepMs;
      return steady ? Math.min(1440, Math.max(0, (atMs - begin) / 60_000)) : minuteOfDay(atMs, begin, endMs, zone);
    };
    days.push({ on: day, ...daylightBetween(first, last, height, minute) });
    reach.push(...spansBetween(first, last, clear, minute).map((span) => ({ on: day, ...span })));
    day = following;
    dayMs = endMs;
    if (!steady) offsetMs = zoneOffsetMs(dayMs, zone);
  }
  return { days, reach };
}

/** Reading of the wall clock in minutes, kept inside its day. */
function minuteOfDay(utcMs: number, dayMs: number, endMs: number, zone: string): number {
  if (utcMs <= dayMs) return 0;
  if (utcMs >= endMs) return 1440;
  const wallMs = utcMs + zoneOffsetMs(utcMs, zone);
  return (wallMs % 86_400_000) / 60_000;
}

function daylightBetween(first: number, last: number, height: (index: number) => number, minute: (index: number) => number): { riseMin: number | null; setMin: number | null } {
  let riseMin: number | null = height(first) > 0 ? 0 : null;
  let setMin: number | null = height(last) > 0 ? 1440 : null;
  for (let index = first; index < last; index += 1) {
    const here = height(index);
    const next = height(index + 1);
    if (here > 0 === next > 0) continue;
    const at = minute(index + here / (here - next));
    if (next > 0) riseMin ??= at;
    else if (setMin === null || setMin < 1440) setMin = at;
  }
  return riseMin === null || setMin === null ? { riseMin: null, setMin: null } : { riseMin, setMin };
}

function spansBetween(first: number, last: number, clear: (index: number) => boolean, minute: (index: number) => number): { fromMin: number; toMin: number }[] {
  const spans: { fromMin: number; toMin: number }[] = [];
  let from: number | null = null;
  for (let index = first; index <= last; index += 1) {
    const lit = index < last && clear(index);
    if (lit && from === null) from = index;
    if (!lit && from !== null) {
      spans.push({ fromMin: minute(from), toMin: minute(index) });
      from = null;
    }
  }
  return spans;
}

/** Whether a sun in this airless direction stands over the skyline and in front of the opening. */
function reachTest({ observer, skyline, opening }: YearQuery): (east: number, north: number, up: number) => boolean {
  const mask = skyline && skyline.points.length > 0 ? readSkyline(skyline) : null;
  return (east, north, up) => {
    const azimuthDeg = (Math.atan2(east, north) / degree + 360) % 360;
    const airlessDeg = Math.asin(Math.max(-1, Math.min(1, up))) / degree;
    const elevationDeg = airlessDeg + refractionDeg(airlessDeg, observer.pressureHpa, observer.temperatureC);
    if (mask && elevationDeg < mask.elevationDeg(azimuthDeg)) return false;
    if (!opening) return true;
    const { lowestElevationDeg: lowest = -90, highestElevationDeg: highest = 90 } = opening;
    return Math.abs(wrap180(azimuthDeg - opening.azimuthDeg)) <= opening.halfWidthDeg && elevationDeg >= lowest && elevationDeg <= highest;
  };
}
