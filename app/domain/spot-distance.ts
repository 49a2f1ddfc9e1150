import { plainNumber } from './plain-number.ts';

/** The beam along its way, as its figure shows it on screen and in print. */
export interface SpotDistanceData {
  readonly points: readonly { readonly distanceM: number; readonly diameterMm: number; readonly fluxKwm2: number }[];
  /** Stretch along the beam in which the flux is at or above a threshold. */
  readonly dangerZone?: { readonly thresholdKwm2: number; readonly nearM: number; readonly farM: number } | null;
  readonly markDistanceM?: number | null;
  readonly focusKind: 'point' | 'line';
}

/** Ends of both axes: the farthest distance, and the widest spot. */
export function spotReach({ points, markDistanceM }: Pick<SpotDistanceData, 'points' | 'markDistanceM'>): { readonly farM: number; readonly widestMm: number } {
  return { farM: Math.max(...points.map((point) => point.distanceM), markDistanceM ?? 0, 1e-6), widestMm: Math.max(...points.map((point) => point.diameterMm), 1e-6) };
}

export function spotSentence({ points, dangerZone }: Pick<SpotDistanceData, 'points' | 'dangerZone'>): string {
  const tightest = points.reduce<SpotDistanceData['points'][number] | null>((best, point) => (best === null || point.diameterMm < best.diameterMm ? point : best), null);
  const zone = dangerZone ? ` At or above ${plainNumber(dangerZone.thresholdKwm2)} kW/m² from ${plainNumber(dangerZone.nearM)} to ${plainNumber(dangerZone.farM)} m.` : '';
  return tightest ? `Narrowest ${plainNumber(tightest.diameterMm)} mm at ${plainNumber(tightest.distanceM)} m from the optic.${zone}` : 'No beam was computed.';
}
