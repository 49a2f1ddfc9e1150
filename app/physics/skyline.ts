import type { SkylineInput } from './model/input.ts';
import { wrap360 } from './units.ts';

/** Elevation of the skyline by bearing, closed round the circle. */
export interface Skyline {
  readonly elevationDeg: (azimuthDeg: number) => number;
  /** Lowest and highest skyline within a bearing uncertainty. [°] */
  readonly rangeDeg: (azimuthDeg: number, plusMinusDeg: number) => { readonly lowDeg: number; readonly highDeg: number };
}

export function readSkyline(input: SkylineInput): Skyline {
  const points = input.points.map(({ azimuthDeg, elevationDeg }) => ({ azimuthDeg: wrap360(azimuthDeg), elevationDeg }));
  points.sort((a, b) => a.azimuthDeg - b.azimuthDeg);
  const elevationDeg = (bearing: number): number => {
    const azimuth = wrap360(bearing);
    const after = points.findIndex((point) => point.azimuthDeg >= azimuth);
    const high = points[after === -1 ? 0 : after];
    const low = points[after <= 0 ? points.length - 1 : after - 1];
    if (high === undefined || low === undefined) return 0;
    const span = wrap360(high.azimuthDeg - low.azimuthDeg);
    if (span === 0) return high.elevationDeg;
    return low.elevationDeg + (wrap360(azimuth - low.azimuthDeg) / span) * (high.elevationDeg - low.elevationDeg);
  };
  return {
    elevationDeg,
    rangeDeg: (azimuthDeg, plusMinusDeg) => {
      const steps = plusMinusDeg > 0 ? Math.max(2, Math.ceil(plusMinusDeg / 0.25)) : 0;
      let lowDeg = elevationDeg(azimuthDeg);
      let highDeg = lowDeg;
      for (let step = -steps; step <= steps; step++) {
        const value = elevationDeg(azimuthDeg + (steps === 0 ? 0 : (step / steps) * plusMinusDeg));
        lowDeg = Math.min(lowDeg, value);
        highDeg = Math.max(highDeg, value);
      }
      return { lowDeg, highDeg };
    },
  };
}
