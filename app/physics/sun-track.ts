import { geocentricSun } from '#app/physics/sun/ephemeris.ts';
import { refractionDeg } from '#app/physics/sun/refraction.ts';
import type { Observer } from '#app/physics/sun/solar-position.ts';
import { scanSun } from '#app/physics/sun/sun-scan.ts';
import { azimuthOf, elevationOf, fromAzimuthElevation, type Vector } from './vector.ts';

/** The sun at one minute of a window. */
export interface SunMinute {
  readonly utcMs: number;
  readonly azimuthDeg: number;
  readonly airlessElevationDeg: number;
  readonly apparentElevationDeg: number;
  readonly towardsSun: Vector;
  readonly distanceAu: number;
}

export const minuteMs = 60_000;

/** Number of minutes in [start, end): one at least. */
export function minutesIn(startMs: number, endMs: number): number {
  return Math.max(1, Math.ceil((endMs - startMs) / minuteMs));
}

/** The apparent sun at every minute from a start. */
export function sunTrack(observer: Observer, startMs: number, count: number): readonly SunMinute[] {
  const scan = scanSun(observer, startMs, minuteMs, count);
  const endMs = startMs + count * minuteMs;
  const nearAu = geocentricSun(startMs).distanceAu;
  const farAu = geocentricSun(endMs).distanceAu;
  const track: SunMinute[] = [];
  for (let i = 0; i < count; i++) {
    const airless: Vector = [scan.east[i] ?? 0, scan.north[i] ?? 0, scan.up[i] ?? 0];
    const airlessElevationDeg = elevationOf(airless);
    const azimuthDeg = azimuthOf(airless);
    const apparentElevationDeg = airlessElevationDeg + refractionDeg(airlessElevationDeg, observer.pressureHpa, observer.temperatureC);
    track.push({
      utcMs: startMs + i * minuteMs,
      azimuthDeg,
      airlessElevationDeg,
      apparentElevationDeg,
      towardsSun: fromAzimuthElevation(azimuthDeg, apparentElevationDeg),
      distanceAu: nearAu + ((farAu - nearAu) * i) / count,
    });
  }
  return track;
}
