import { degree, safeAcos } from '#app/physics/units.ts';

/**
 * Direct transmittance of clear 4 mm glass by angle of incidence, relative to normal incidence.
 * Row espr-ang-clear-4-mm: ESRU, University of Strathclyde, ESP-r optics database, 2019.
 */
const angularCurve: readonly (readonly [angleDeg: number, relative: number])[] = [
  [0, 1], [40, 0.802 / 0.819], [55, 0.761 / 0.819], [70, 0.621 / 0.819], [80, 0.376 / 0.819], [90, 0],
];

/**
 * Solar transmittance of a pane at an angle of incidence.
 *
 * @param normalTransmittance At normal incidence; 1 means that there is no glass, and the angle then does not count.
 * @param cosIncidence Cosine of the angle between the light and the pane's normal.
 */
export function paneTransmittance(normalTransmittance: number, cosIncidence: number): number {
  if (normalTransmittance >= 1) return 1;
  const angleDeg = safeAcos(Math.abs(cosIncidence)) / degree;
  let low = angularCurve[0] ?? [0, 1];
  for (const high of angularCurve) {
    if (angleDeg <= high[0]) {
      const span = high[0] - low[0];
      const share = span === 0 ? 0 : (angleDeg - low[0]) / span;
      return normalTransmittance * (low[1] + share * (high[1] - low[1]));
    }
    low = high;
  }
  return 0;
}
