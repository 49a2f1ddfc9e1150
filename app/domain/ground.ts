import type { Place } from './coordinate-text.ts';

/**
 * Lengths and directions on the ground between places a few kilometres apart, on the WGS 84 ellipsoid (a = 6 378 137 m,
 * 1/f = 298.257 223 563; NIMA TR 8350.2, Department of Defense World Geodetic System 1984, 3rd edition, 2000, table 3.1).
 */
const semiMajorM = 6_378_137;
const flattening = 1 / 298.257_223_563;
const eccentricity2 = flattening * (2 - flattening);
const rad = Math.PI / 180;

/**
 * Metres in one degree of latitude and of longitude at a latitude: the radii of curvature of the meridian and of the
 * prime vertical, times π/180 (J. P. Snyder, Map Projections: A Working Manual, USGS Professional Paper 1395, 1987,
 * equations 4-18 to 4-21).
 */
export function metresPerDegree(latitudeDeg: number): { readonly northM: number; readonly eastM: number } {
  const bulge = 1 - eccentricity2 * Math.sin(latitudeDeg * rad) ** 2;
  const meridianM = (semiMajorM * (1 - eccentricity2)) / bulge ** 1.5;
  const primeVerticalM = semiMajorM / Math.sqrt(bulge);
  return { northM: meridianM * rad, eastM: primeVerticalM * Math.cos(latitudeDeg * rad) * rad };
}

/** How far one place lies east and north of another. [m] Good to a part in a thousand within 20 km. */
export function offsetM(from: Place, to: Place): { readonly eastM: number; readonly northM: number } {
  const per = metresPerDegree((from.latitudeDeg + to.latitudeDeg) / 2);
  const eastDeg = ((((to.longitudeDeg - from.longitudeDeg + 180) % 360) + 360) % 360) - 180;
  return { eastM: eastDeg * per.eastM, northM: (to.latitudeDeg - from.latitudeDeg) * per.northM };
}

/** The place that lies so far east and north of another. [m] Inverse of `offsetM` within a millimetre over a kilometre. */
export function placeAt(from: Place, { eastM, northM }: { readonly eastM: number; readonly northM: number }): Place {
  const middleDeg = from.latitudeDeg + northM / metresPerDegree(from.latitudeDeg).northM / 2;
  const per = metresPerDegree(middleDeg);
  return { latitudeDeg: from.latitudeDeg + northM / per.northM, longitudeDeg: from.longitudeDeg + eastM / per.eastM };
}

/** Length of a line on the ground [m] and its direction from true north clockwise, 0 ≤ bearing < 360. [°] */
export function lineOnGround(from: Place, to: Place): { readonly lengthM: number; readonly bearingDeg: number } {
  const { eastM, northM } = offsetM(from, to);
  return { lengthM: Math.hypot(eastM, northM), bearingDeg: ((Math.atan2(eastM, northM) / rad) % 360 + 360) % 360 };
}

/**
 * Distance over a sphere of mean radius 6 371 008.8 m (IUGG mean radius R1 of WGS 84; H. Moritz, Geodetic Reference
 * System 1980, Journal of Geodesy 74, 2000), by the haversine formula. For any two places; within 0.6 % of the ellipsoid. [m]
 */
export function farM(a: Place, b: Place): number {
  const half = (deg: number) => Math.sin((deg * rad) / 2) ** 2;
  const h = half(b.latitudeDeg - a.latitudeDeg) + Math.cos(a.latitudeDeg * rad) * Math.cos(b.latitudeDeg * rad) * half(b.longitudeDeg - a.longitudeDeg);
  return 2 * 6_371_008.8 * Math.asin(Math.min(1, Math.sqrt(h)));
}
