import type { OpeningInput } from './model/input.ts';
import type { RecurrenceBand } from './model/result.ts';
import type { RequiredSun } from './alignment.ts';
import type { Skyline } from './skyline.ts';
import { airlessElevationDeg, refractionDeg } from '#app/physics/sun/refraction.ts';
import type { Observer } from '#app/physics/sun/solar-position.ts';
import { scanSun, type SunScan } from '#app/physics/sun/sun-scan.ts';
import { localDay, nextDay } from '#app/physics/sun/zone-days.ts';
import { degree, roundTo, toIsoUtc, wrap180 } from './units.ts';
import { angleBetween, azimuthOf, elevationOf, fromAzimuthElevation, type Vector } from './vector.ts';

const minuteMs = 60_000;

/** One minute near the required direction. */
interface NearMinute {
  readonly index: number;
  readonly towards: Vector;
  readonly separation: number;
}

export interface RecurrenceQuery {
  readonly observer: Observer;
  readonly zone: string;
  readonly startMs: number;
  readonly minutes: number;
  readonly required: RequiredSun;
  readonly toleranceDeg: number;
  readonly skyline: Skyline | null;
  readonly opening: OpeningInput | undefined;
}

/** Minutes of twelve months, leap day included. */
export const yearMinutes = 366 * 1440;

function clearsObstacles(query: RecurrenceQuery): boolean {
  const { azimuthDeg, apparentElevationDeg } = query.required;
  if (apparentElevationDeg < -0.27) return false;
  const { opening, skyline, toleranceDeg } = query;
  if (skyline !== null && apparentElevationDeg + toleranceDeg < skyline.elevationDeg(azimuthDeg)) return false;
  if (opening === undefined) return true;
  const offDeg = Math.abs(wrap180(azimuthDeg - opening.azimuthDeg));
  return offDeg <= opening.halfWidthDeg + 2 * opening.azimuthSigmaDeg + toleranceDeg;
}

/** Minutes whose apparent sun stands within the tolerance and one minute's motion of the required direction. */
function nearMinutes(query: RecurrenceQuery): readonly NearMinute[] {
  const { observer, required } = query;
  const reach = (query.toleranceDeg + 0.3) * degree;
  const airlessRequired = fromAzimuthElevation(
    required.azimuthDeg, airlessElevationDeg(required.apparentElevationDeg, observer.pressureHpa, observer.temperatureC),
  );
  // Refraction differs by a few tenths of a degree over the tolerance near the horizon; the coarse sieve allows for it.
  const sieve = Math.cos(reach + 0.6 * degree);
  const near: NearMinute[] = [];
  // Year by year, so that a span of several years needs no more memory than one.
  for (let first = 0; first < query.minutes; first += yearMinutes) {
    const scan = scanSun(observer, query.startMs + first * minuteMs, minuteMs, Math.min(yearMinutes, query.minutes - first));
    siftYear(scan, first, airlessRequired, sieve, (index, airless) => {
      const elevation = elevationOf(airless);
      const apparent = elevation + refractionDeg(elevation, observer.pressureHpa, observer.temperatureC);
      const towards = fromAzimuthElevation(azimuthOf(airless), apparent);
      const separation = angleBetween(towards, required.towards);
      if (separation <= reach) near.push({ index, towards, separation });
    });
  }
  return near;
}

/** Hands on the minutes whose airless sun passes the coarse sieve. */
function siftYear(scan: SunScan, first: number, towards: Vector, sieve: number, pass: (index: number, airless: Vector) => void): void {
  const [e, n, u] = towards;
  const { east, north, up } = scan;
  for (let i = 0; i < scan.count; i++) {
    const x = east[i] ?? 0;
    const y = north[i] ?? 0;
    const z = up[i] ?? 0;
    if (x * e + y * n + z * u >= sieve) pass(first + i, [x, y, z]);
  }
}

/** Closest approach between two neighbouring minutes: share of the step and separation there. */
function closestBetween(a: NearMinute, b: NearMinute, required: Vector): { readonly share: number; readonly separation: number } {
  const step: Vector = [b.towards[0] - a.towards[0], b.towards[1] - a.towards[1], b.towards[2] - a.towards[2]];
  const from: Vector = [required[0] - a.towards[0], required[1] - a.towards[1], required[2] - a.towards[2]];
  const length2 = step[0] ** 2 + step[1] ** 2 + step[2] ** 2;
  const share = Math.min(1, Math.max(0, (from[0] * step[0] + from[1] * step[1] + from[2] * step[2]) / length2));
  const gap = Math.hypot(from[0] - share * step[0], from[1] - share * step[1], from[2] - share * step[2]);
  return { share, separation: 2 * Math.asin(Math.min(1, gap / 2)) };
}

/** One passage of the sun by the required direction. */
interface Passage {
  readonly bestMs: number;
  readonly fromMs: number;
  readonly toMs: number;
  readonly minutes: number;
  readonly separationDeg: number;
}

function passageOf(run: readonly NearMinute[], query: RecurrenceQuery): Passage | null {
  const at = (index: number): number => query.startMs + index * minuteMs;
  let bestMs = 0;
  let least = Number.POSITIVE_INFINITY;
  for (const [k, here] of run.entries()) {
    const next = run[k + 1];
    const closest = next === undefined ? { share: 0, separation: here.separation } : closestBetween(here, next, query.required.towards);
    if (closest.separation < least) {
      least = closest.separation;
      bestMs = at(here.index) + closest.share * minuteMs;
    }
  }
  const tolerance = query.toleranceDeg * degree;
  if (least > tolerance) return null;
  const inside = run.filter((minute) => minute.separation <= tolerance);
  const first = inside[0];
  const last = inside.at(-1);
  return {
    bestMs,
    fromMs: first === undefined ? bestMs : at(first.index),
    toMs: last === undefined ? bestMs : at(last.index),
    minutes: Math.max(1, inside.length),
    separationDeg: least / degree,
  };
}

function passages(near: readonly NearMinute[], query: RecurrenceQuery): readonly Passage[] {
  const found: Passage[] = [];
  let run: NearMinute[] = [];
  const close = (): void => {
    const passage = run.length === 0 ? null : passageOf(run, query);
    if (passage !== null) found.push(passage);
    run = [];
  };
  for (const minute of near) {
    const last = run.at(-1);
    if (last !== undefined && minute.index !== last.index + 1) close();
    run.push(minute);
  }
  close();
  return found;
}

/**
 * Days of a year on which the sun stands again where it put the focus on the mark.
 *
 * Every minute is looked at, and the closest approach is found between minutes, so that a grazing day is not lost.
 *
 * @returns Bands of consecutive local days of the zone, in order of time; empty where the direction is blocked or never
 *   reached.
 */
export function recurrenceBands(query: RecurrenceQuery): readonly RecurrenceBand[] {
  if (!clearsObstacles(query)) return [];
  const bands: { firstOn: string; lastOn: string; days: RecurrenceBand['days'][number][] }[] = [];
  for (const passage of passages(nearMinutes(query), query)) {
    const on = localDay(passage.bestMs, query.zone);
    const day = {
      on,
      bestUtc: toIsoUtc(Math.round(passage.bestMs / 1000) * 1000),
      fromUtc: toIsoUtc(passage.fromMs),
      toUtc: toIsoUtc(passage.toMs),
      minutes: passage.minutes,
      separationDeg: roundTo(passage.separationDeg, 3),
    };
    const band = bands.at(-1);
    if (band !== undefined && (on === band.lastOn || on === nextDay(band.lastOn))) {
      band.days.push(day);
      band.lastOn = on;
    } else {
      bands.push({ firstOn: on, lastOn: on, days: [day] });
    }
  }
  return bands.map((band) => {
    const best = band.days.reduce((a, b) => (b.separationDeg < a.separationDeg ? b : a));
    return { ...band, bestUtc: best.bestUtc, minutes: band.days.reduce((sum, day) => sum + day.minutes, 0) };
  });
}
