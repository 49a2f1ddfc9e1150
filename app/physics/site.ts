import { solarConstantWm2 } from './constants.ts';
import type { ReconstructionInput } from './model/input.ts';
import type { Assumption, SourceRef } from './model/stated.ts';
import { standardPressureAtPa } from '#app/physics/sky/air-mass.ts';
import type { Air } from '#app/physics/sky/clear-sky.ts';
import { angstromExponent, climateAir, defaultOzoneCm } from '#app/physics/sky/climate-classes.data.ts';
import { horizonDipDeg } from '#app/physics/sun/refraction.ts';
import type { Observer } from '#app/physics/sun/solar-position.ts';
import { roundSignificant } from './units.ts';

/** A place with every value settled, and the list of those that had to be assumed. */
export interface Site {
  readonly observer: Observer;
  readonly air: Air;
  readonly zone: string;
  readonly dipDeg: number;
  readonly assumptions: readonly Assumption[];
}

const classSource: SourceRef = { text: 'climate class, stated median', verified: false };
const standardSource: SourceRef = { text: 'ICAO standard atmosphere at the site’s height', verified: true };

/** Settles pressure, temperature, ozone, water and aerosol; what was not given comes from the climate class. */
export function settleSite(input: Pick<ReconstructionInput, 'place' | 'sky'>): Site {
  const { place, sky } = input;
  const assumptions: Assumption[] = [];
  const settle = (field: string, given: number | undefined, fallback: number, unit: string, source: SourceRef): number => {
    if (given !== undefined) return given;
    assumptions.push({ field, value: `${roundSignificant(fallback, 4)}${unit === '' ? '' : ` ${unit}`}`, source });
    return fallback;
  };
  const median = climateAir[sky.climateClass];
  const pressureHpa = settle('sky.pressureHpa', sky.pressureHpa, standardPressureAtPa(place.elevationM) / 100, 'hPa', standardSource);
  const temperatureC = settle('sky.temperatureC', sky.temperatureC, median.temperatureC, '°C', classSource);
  const aod500 = settle('sky.aod500', sky.aod500, median.aod500, '', classSource);
  const air: Air = {
    pressureHpa,
    temperatureC,
    ozoneCm: settle('sky.ozoneCm', sky.ozoneCm, defaultOzoneCm, 'cm', classSource),
    waterCm: settle('sky.waterCm', sky.waterCm, median.waterCm, 'cm', classSource),
    aod500,
    aod380: settle('sky.aod380', sky.aod380, aod500 * (500 / 380) ** angstromExponent, '', classSource),
    solarConstantWm2: settle('sky.solarConstantWm2', sky.solarConstantWm2, solarConstantWm2, 'W/m²', {
      text: 'C. A. Gueymard, Solar Energy 168, 2018', verified: true,
    }),
  };
  return {
    observer: { latitudeDeg: place.latitudeDeg, longitudeDeg: place.longitudeDeg, elevationM: place.elevationM, pressureHpa, temperatureC },
    air,
    zone: place.zone,
    dipDeg: horizonDipDeg(place.heightAboveGroundM),
    assumptions,
  };
}
