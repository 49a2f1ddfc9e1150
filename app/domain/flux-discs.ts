import { dot } from '#app/physics/vector.ts';
import { plainNumber } from './plain-number.ts';
import type { BeamView } from './run-beam.ts';

interface FluxBand {
  readonly low: number;
  readonly mid: number;
  readonly high: number;
}
export interface FluxDiscRow {
  readonly disc: string;
  readonly diameterMm: number;
  readonly centre: string;
  readonly concentration: FluxBand;
  readonly fluxKwm2: FluxBand;
}
/** What the flux map shows, on screen and in print. A flux never stands without the disc over which it is the mean. */
export interface FluxDiscsData {
  readonly discs: readonly FluxDiscRow[];
  /** Contours of the flux map, where rays were traced: radius from the hot spot at 1, 3, 10 … kW/m². */
  readonly rings?: readonly FluxRing[];
  /** Way of the spot over the target, from the hot spot, right and up as one faces the target. [mm] */
  readonly track?: { readonly points: readonly (readonly [rightMm: number, upMm: number])[]; readonly words: string } | null;
  /** Turn of a line focus in the target's plane, anticlockwise from level. [°] */
  readonly lineTurnDeg?: number;
  /** A line focus is shown as a band, never as a disc. */
  readonly focusKind: 'point' | 'line';
  /** Directions of the left and right edge, such as W and E. */
  readonly edges?: { readonly left: string; readonly right: string };
}
export interface FluxRing {
  readonly fluxKwm2: number;
  readonly radiusMm: number;
}

export const discWords = (disc: string): string => (disc === 'sun-image' ? "sun's image" : `${disc} disc`);

/** Half the width of ground that the picture holds: the widest disc or ring, and a quarter more. [mm] */
export function halfSpanMm({ discs, rings = [] }: Pick<FluxDiscsData, 'discs' | 'rings'>): number {
  return 1.25 * Math.max(1, ...discs.map((disc) => disc.diameterMm / 2), ...rings.map((ring) => ring.radiusMm));
}

const roundScaleMm = [0.5, 1, 2, 5, 10, 20, 50, 100, 200, 500, 1000] as const;
/** A round length that fits into the picture. [mm] */
export const scaleBarMm = (halfMm: number): number => roundScaleMm.filter((one) => one <= halfMm * 0.7).at(-1) ?? 0.5;

export function fluxSentence({ discs }: Pick<FluxDiscsData, 'discs'>): string {
  return discs.map((disc) => `${plainNumber(disc.fluxKwm2.mid)} kW/m² averaged over the ${disc.disc} disc, ${plainNumber(disc.fluxKwm2.low)} to ${plainNumber(disc.fluxKwm2.high)}`).join('; ');
}

/** The way of the spot relative to where it stands at the best minute, and how a line lies in the target's plane. */
export function trackOver(beam: BeamView | null, bestUtc: string | null): Pick<FluxDiscsData, 'track' | 'lineTurnDeg' | 'edges'> {
  const best = beam?.minutes.find((minute) => minute.atUtc === bestUtc)?.spotMm;
  if (!beam?.facing || !best) return {};
  const { right, up, rightWords } = beam.facing;
  const points = beam.minutes.flatMap(({ spotMm }): [number, number][] => (spotMm ? [[spotMm.rightMm - best.rightMm, spotMm.upMm - best.upMm]] : []));
  const along = beam.generator ? [dot(beam.generator, right), dot(beam.generator, up)] as const : null;
  return {
    track: { points, words: 'dashes: way of the spot' },
    edges: { left: '', right: rightWords },
    ...(along ? { lineTurnDeg: (Math.atan2(along[1], along[0]) * 180) / Math.PI } : {}),
  };
}

const ringsKwm2 = [1, 3, 10, 30, 100, 300] as const;

export interface FluxMapSource {
  readonly focus: { readonly focusKind: 'point' | 'line'; readonly traced?: { readonly map?: { readonly cells: number; readonly sizeMm: number; readonly suns: readonly number[] } | null | undefined } | null | undefined } | null;
  readonly best: { readonly dni: { readonly atOpticLikelyWm2: number | null } } | null;
}

/** From the traced map: radius of a circle as large as the area over each flux; for a line, half its mean width. */
export function ringsOf({ focus, best }: FluxMapSource): FluxRing[] {
  const map = focus?.traced?.map;
  const dniWm2 = best?.dni.atOpticLikelyWm2;
  if (!map || !dniWm2) return [];
  const cellMm2 = (map.sizeMm / map.cells) ** 2;
  return ringsKwm2.flatMap((fluxKwm2) => {
    const cells = map.suns.filter((suns) => (suns * dniWm2) / 1000 >= fluxKwm2).length;
    const areaMm2 = cells * cellMm2;
    const radiusMm = focus?.focusKind === 'line' ? areaMm2 / (2 * map.sizeMm) : Math.sqrt(areaMm2 / Math.PI);
    // A contour of one or two cells, or one that runs out of the map, has no radius to speak of.
    return cells < 3 || radiusMm >= map.sizeMm / 2 ? [] : [{ fluxKwm2, radiusMm: Number(radiusMm.toPrecision(3)) }];
  });
}
