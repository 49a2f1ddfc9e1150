import { daylightOn } from '#app/physics/sun/daylight.ts';
import { solarPosition } from '#app/physics/sun/solar-position.ts';
import { formatClock, localDay } from './local-time.ts';

export interface Place {
  readonly latitudeDeg: number;
  readonly longitudeDeg: number;
  readonly elevationM: number;
  readonly zone: string;
}

/** Standard atmosphere at sea level, ISO 2533:1975: pressure and temperature that the refraction starts from. */
export const standardAir = { pressureHpa: 1_013.25, temperatureC: 15 } as const;

const positionAt = (at: Date, place: Omit<Place, 'zone'>) => solarPosition(at.getTime(), { ...standardAir, latitudeDeg: place.latitudeDeg, longitudeDeg: place.longitudeDeg, elevationM: place.elevationM });

export interface SunNow {
  readonly azimuthDeg: number;
  readonly elevationDeg: number;
  /** "Sun 43.9° up at 116.9° true; sets 20:11." */
  readonly words: string;
}

/** Where the sun stands at a place, in degrees from true north clockwise and above the horizon, in words. */
export function sunNow(at: Date, place: Place): SunNow {
  const { azimuthDeg, apparentElevationDeg } = positionAt(at, place);
  const light = daylightOn(localDay(at, place.zone), place.zone, { ...standardAir, latitudeDeg: place.latitudeDeg, longitudeDeg: place.longitudeDeg, elevationM: place.elevationM });
  const clock = (ms: number) => formatClock(new Date(ms), place.zone);
  const isUp = light.polar === 'day' || (light.polar === null && (light.sunriseMs === null || at.getTime() >= light.sunriseMs) && (light.sunsetMs === null || at.getTime() < light.sunsetMs));
  const next = isUp ? (light.sunsetMs === null ? '' : `; sets ${clock(light.sunsetMs)}`) : light.sunriseMs !== null && at.getTime() < light.sunriseMs ? `; rises ${clock(light.sunriseMs)}` : '';
  const words = isUp ? `Sun ${apparentElevationDeg.toFixed(1)}° up at ${azimuthDeg.toFixed(1)}° true${next}.` : `The sun is below the horizon${next}.`;
  return { azimuthDeg, elevationDeg: apparentElevationDeg, words };
}

/** Azimuth of the sun at one instant, from true north clockwise. [°] */
export const sunAzimuthDeg = (at: Date, place: Omit<Place, 'zone'>): number => positionAt(at, place).azimuthDeg;

/** Where on the earth the sun stands overhead. [°], east positive, longitude −180…180 */
export function sunOverhead(at: Date): { readonly latitudeDeg: number; readonly longitudeDeg: number } {
  const { declinationDeg, equationOfTimeMin } = positionAt(at, { latitudeDeg: 0, longitudeDeg: 0, elevationM: 0 });
  const utcHours = (at.getTime() / 3_600_000) % 24;
  const west = 15 * (utcHours - 12 + equationOfTimeMin / 60);
  return { latitudeDeg: declinationDeg, longitudeDeg: ((((-west + 180) % 360) + 360) % 360) - 180 };
}
