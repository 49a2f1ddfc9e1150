import { degree, safeAsin } from '#app/physics/units.ts';
import { azimuthOf, elevationOf, fromAzimuthElevation, type Vector } from '#app/physics/vector.ts';
import { geocentricSun, type GeocentricSun } from './ephemeris.ts';
import { refractionDeg } from './refraction.ts';

/** Where the observer stands and what air lies above. */
export interface Observer {
  readonly latitudeDeg: number;
  readonly longitudeDeg: number;
  readonly elevationM: number;
  readonly pressureHpa: number;
  readonly temperatureC: number;
}

export interface SolarPosition {
  readonly azimuthDeg: number;
  readonly airlessElevationDeg: number;
  readonly apparentElevationDeg: number;
  readonly refractionDeg: number;
  /** Topocentric, without refraction. [°] */
  readonly declinationDeg: number;
  readonly distanceAu: number;
  readonly equationOfTimeMin: number;
  /** Unit vector to the sun as seen, refraction included. */
  readonly towardsSun: Vector;
}

/** Flattening of the reference ellipsoid as 1 − f, and its equatorial radius. [m] NREL/TP-560-34302, section 3.12. */
const polarRatio = 0.99664719;
const equatorialRadiusM = 6_378_140;

/** Place of the observer in earth radii: distance from the axis and from the equator's plane. */
export function observerInEarthRadii(latitudeDeg: number, elevationM: number): readonly [number, number] {
  const latitude = latitudeDeg * degree;
  const reduced = Math.atan(polarRatio * Math.tan(latitude));
  const height = elevationM / equatorialRadiusM;
  return [
    Math.cos(reduced) + height * Math.cos(latitude),
    polarRatio * Math.sin(reduced) + height * Math.sin(latitude),
  ];
}

/** Sine of the sun's horizontal parallax. */
export function parallaxSine(distanceAu: number): number {
  return Math.sin((8.794 / 3600 / distanceAu) * degree);
}

/** Topocentric unit vector [east, north, up] without refraction, and the topocentric declination. [°] */
function topocentric(sun: GeocentricSun, observer: Observer): { readonly airless: Vector; readonly declinationDeg: number } {
  const hourAngle = (sun.siderealTimeDeg + observer.longitudeDeg - sun.rightAscensionDeg) * degree;
  const declination = sun.declinationDeg * degree;
  const [axial, polar] = observerInEarthRadii(observer.latitudeDeg, observer.elevationM);
  const parallax = parallaxSine(sun.distanceAu);
  const towardsMeridian = Math.cos(declination) * Math.cos(hourAngle) - axial * parallax;
  const towardsWest = Math.cos(declination) * Math.sin(hourAngle);
  const towardsPole = Math.sin(declination) - polar * parallax;
  const norm = Math.hypot(towardsMeridian, towardsWest, towardsPole);
  const sinLat = Math.sin(observer.latitudeDeg * degree);
  const cosLat = Math.cos(observer.latitudeDeg * degree);
  return {
    airless: [
      -towardsWest / norm,
      (cosLat * towardsPole - sinLat * towardsMeridian) / norm,
      (cosLat * towardsMeridian + sinLat * towardsPole) / norm,
    ],
    declinationDeg: safeAsin(towardsPole / norm) / degree,
  };
}

/**
 * Position of the sun's centre for an observer on the ground.
 *
 * @param utcMs Milliseconds since 1970, UTC.
 * @param observer Geodetic place, north and east positive, with station pressure and temperature for refraction.
 * @param deltaTS TT − UT1 where it must be forced; left out: leap-second table. [s]
 * @see I. Reda and A. Andreas, NREL/TP-560-34302, 2003, revised 2008; ±0.0003° as published.
 */
export function solarPosition(utcMs: number, observer: Observer, deltaTS?: number): SolarPosition {
  const sun = geocentricSun(utcMs, deltaTS);
  const { airless, declinationDeg } = topocentric(sun, observer);
  const airlessElevation = elevationOf(airless);
  const azimuthDeg = azimuthOf(airless);
  const lift = refractionDeg(airlessElevation, observer.pressureHpa, observer.temperatureC);
  return {
    azimuthDeg,
    airlessElevationDeg: airlessElevation,
    apparentElevationDeg: airlessElevation + lift,
    refractionDeg: lift,
    declinationDeg,
    distanceAu: sun.distanceAu,
    equationOfTimeMin: sun.equationOfTimeMin,
    towardsSun: fromAzimuthElevation(azimuthDeg, airlessElevation + lift),
  };
}

/** Declination of a body seen at a direction without atmosphere. [°] */
export function declinationOf(latitudeDeg: number, azimuthDeg: number, airlessElevation: number): number {
  const latitude = latitudeDeg * degree;
  const elevation = airlessElevation * degree;
  const sine =
    Math.sin(latitude) * Math.sin(elevation) +
    Math.cos(latitude) * Math.cos(elevation) * Math.cos(azimuthDeg * degree);
  return safeAsin(sine) / degree;
}
