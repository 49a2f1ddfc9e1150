export interface GeoPoint {
  readonly latitudeDeg: number;
  readonly longitudeDeg: number;
}

/** Mean radius of the earth. [km] IUGG R1 of the GRS 80 ellipsoid: H. Moritz, Geodetic Reference System 1980, J. Geod. 74, 2000. */
const earthRadiusKm = 6_371.0088;
const rad = Math.PI / 180;

/** Great-circle distance [km] and first bearing [° true, 0…360] from one place to another; haversine on a sphere. */
export function distanceAndBearing(from: GeoPoint, to: GeoPoint): { readonly distanceKm: number; readonly bearingDeg: number } {
  const [phi1, phi2] = [from.latitudeDeg * rad, to.latitudeDeg * rad];
  const lambda = (to.longitudeDeg - from.longitudeDeg) * rad;
  const a = Math.sin((phi2 - phi1) / 2) ** 2 + Math.cos(phi1) * Math.cos(phi2) * Math.sin(lambda / 2) ** 2;
  const east = Math.sin(lambda) * Math.cos(phi2);
  const north = Math.cos(phi1) * Math.sin(phi2) - Math.sin(phi1) * Math.cos(phi2) * Math.cos(lambda);
  return { distanceKm: 2 * earthRadiusKm * Math.asin(Math.min(1, Math.sqrt(a))), bearingDeg: (Math.atan2(east, north) / rad + 360) % 360 };
}
