import { solarPosition } from '#app/physics/sun/solar-position.ts';
import { startOfLocalDay } from '#app/physics/sun/zone-days.ts';
import { formatIsoDay } from './local-time.ts';

interface LinePlace {
  readonly latitudeDeg: number;
  readonly longitudeDeg: number;
  readonly elevationM: number;
  readonly zone: string;
}

/** Standard atmosphere at sea level, ISO 2533:1975. */
const standardAir = { pressureHpa: 1_013.25, temperatureC: 15 } as const;
const stepMs = 4 * 60_000;
/** Every fifth step is enough for a smooth line, except where the bearing runs fast and where the line meets the horizon. */
const isDrawn = (elevationDeg: number, index: number) => index % 5 === 0 || elevationDeg > 60 || Math.abs(elevationDeg) < 3;

/** The sun's way over one local day, every twenty minutes or closer: bearing from true north and apparent elevation. [°] */
export function sunLine(on: string, place: LinePlace, label = formatIsoDay(on)): { readonly label: string; readonly points: readonly { readonly azimuthDeg: number; readonly elevationDeg: number }[] } {
  const startMs = startOfLocalDay(on, place.zone);
  return {
    label,
    points: Array.from({ length: 361 }, (_unused, index) => {
      const sun = solarPosition(startMs + index * stepMs, { ...place, ...standardAir });
      return { azimuthDeg: Math.round(sun.azimuthDeg * 100) / 100, elevationDeg: Math.round(sun.apparentElevationDeg * 100) / 100 };
    }).filter(({ elevationDeg }, index) => isDrawn(elevationDeg, index)),
  };
}

/** Longest and shortest day of a year, to compare any other with. */
export const turningDays = (year: string) => [[`${year}-06-21`, '21 June'], [`${year}-12-21`, '21 December']] as const;
