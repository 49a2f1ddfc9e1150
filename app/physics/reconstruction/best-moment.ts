import type { BestMoment, DniResult } from '#app/physics/model/focus.ts';
import { lateralToleranceM, surveySigmaM } from '#app/physics/lit.ts';
import { directBeamAt, type DirectBeam } from '#app/physics/sky/direct-beam.ts';
import { geocentricSun } from '#app/physics/sun/ephemeris.ts';
import { solarPosition } from '#app/physics/sun/solar-position.ts';
import { angularDiameterDeg } from '#app/physics/sun/sun-disc.ts';
import { roundSignificant, roundTo, toIsoUtc } from '#app/physics/units.ts';
import type { Setting } from './setting.ts';
import type { JudgedMinute } from './window.ts';

/** Direct beam at a minute of the window. */
export function lightAt(minute: JudgedMinute, setting: Setting): DirectBeam {
  const { sun } = minute;
  return directBeamAt(
    sun.utcMs, sun.azimuthDeg, sun.apparentElevationDeg, sun.distanceAu, setting.input.place.elevationM, setting.site.air, setting.series, setting.opening,
  );
}

function basisOf(light: DirectBeam, setting: Setting): string {
  if (light.measuredWm2 !== null && setting.series !== null) {
    const words = { measured: 'measured', derived: 'derived from measured global irradiance', 'hourly-archive': 'hourly archive mean; a clear gap inside the hour is possible' };
    return `${words[setting.series.basis]}: ${setting.series.source}`;
  }
  if (light.likelyWm2 === null) return 'no clear-sky figure below 3°';
  return 'median of the climate class, clear sky (Bird and Hulstrom 1981; second model Ineichen and Perez 2002)';
}

export function dniResult(light: DirectBeam, setting: Setting): DniResult {
  const whole = (value: number | null): number | null => (value === null ? null : roundTo(value, 0));
  const through = (value: number | null): number | null => (value === null ? null : roundTo(value * light.transmittance, 0));
  return {
    likelyWm2: whole(light.likelyWm2),
    secondModelWm2: whole(light.secondModelWm2),
    boundWm2: whole(light.boundWm2),
    measuredWm2: whole(light.measuredWm2),
    atOpticLikelyWm2: through(light.likelyWm2),
    atOpticBoundWm2: through(light.boundWm2),
    basis: basisOf(light, setting),
  };
}

export function bestMoment(minute: JudgedMinute, setting: Setting): BestMoment {
  const { observer } = setting.site;
  const position = solarPosition(minute.sun.utcMs, observer);
  const { mark, model, reach } = setting;
  const { miss } = minute;
  const lateral = mark === null || reach === null || model === null ? null : lateralToleranceM(reach, mark, model.focusKind) + 2 * surveySigmaM(mark);
  const axial = mark === null || reach === null || miss === null
    ? null
    : Math.abs((miss.axialM >= 0 ? reach.farM : reach.nearM) - (miss.alongM - miss.axialM)) + 2 * mark.sigmaAxialM;
  const mm = (value: number | null): number | null => (value === null ? null : roundSignificant(value * 1000, 3));
  return {
    atUtc: toIsoUtc(minute.sun.utcMs),
    sun: {
      azimuthDeg: roundTo(position.azimuthDeg, 3),
      airlessElevationDeg: roundTo(position.airlessElevationDeg, 3),
      apparentElevationDeg: roundTo(position.apparentElevationDeg, 3),
      declinationDeg: roundTo(position.declinationDeg, 3),
      distanceAu: roundTo(position.distanceAu, 5),
      angularDiameterDeg: roundTo(angularDiameterDeg(position.distanceAu), 4),
      equationOfTimeMin: roundTo(geocentricSun(minute.sun.utcMs).equationOfTimeMin, 2),
    },
    dni: dniResult(lightAt(minute, setting), setting),
    missLateralMm: mm(miss?.lateralM ?? null),
    missAxialMm: mm(miss?.axialM ?? null),
    toleranceLateralMm: mm(lateral),
    toleranceAxialMm: mm(axial),
  };
}
