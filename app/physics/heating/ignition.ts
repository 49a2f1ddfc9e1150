import type { IgnitionSeries } from './target-material.ts';

/** Absorptance of samples for the heater of the cone apparatus; common practice, 0.9 for most surfaces. */
export const coneAbsorptance = 0.9;

export interface IgnitionTime {
  /** Null where the series gives no ignition at this flux. [s] */
  readonly seconds: number | null;
  /** True outside the measured fluxes. */
  readonly extrapolated: boolean;
}

/**
 * Time to piloted ignition read from measured points: 1/√t is linear in flux between neighbours, and the end slopes are
 * carried on beyond the measured range.
 *
 * @param fluxKwm2 Flux that a black sample would have to receive in the apparatus. [kW/m²]
 */
export function ignitionTime(series: IgnitionSeries, fluxKwm2: number): IgnitionTime {
  const points = series.points;
  const first = points[0];
  const last = points.at(-1);
  if (first === undefined || last === undefined) return { seconds: null, extrapolated: true };
  let index = 0;
  while (index < points.length - 2 && fluxKwm2 > (points[index + 1]?.[0] ?? 0)) index++;
  const low = points[index] ?? first;
  const high = points[index + 1] ?? last;
  const extrapolated = fluxKwm2 < first[0] || fluxKwm2 > last[0];
  if (low === high) return { seconds: fluxKwm2 >= low[0] ? low[1] : null, extrapolated };
  const share = (fluxKwm2 - low[0]) / (high[0] - low[0]);
  const rate = (1 - share) / Math.sqrt(low[1]) + share / Math.sqrt(high[1]);
  return { seconds: rate > 0 ? 1 / (rate * rate) : null, extrapolated };
}

/**
 * Time to ignition of a thermally thick solid from a fitted response parameter of one source. [s]
 *
 * The algebra only: parameters from memory are several times off and none is shipped.
 *
 * @see A. Tewarson, SFPE Handbook of Fire Protection Engineering.
 */
export function thickIgnitionTimeS(fluxKwm2: number, criticalFluxKwm2: number, responseParameter: number): number | null {
  if (fluxKwm2 <= criticalFluxKwm2) return null;
  return (Math.PI / 4) * (responseParameter / (fluxKwm2 - criticalFluxKwm2)) ** 2;
}
