import { lineHint, naturalPlane } from './best-plane.ts';
import { cutPlane, emptyHits } from './bundle.ts';
import { SpotFinder } from './hot-spot.ts';
import { digits, fewestRays } from './trace-focus.ts';
import type { TracedOptic } from './trace-bundle.ts';

/** Concentration of a disc on its hot spot in one plane. */
export interface ZonePoint {
  /** From O along the focal axis. [m] */
  readonly distanceM: number;
  readonly concentration: number;
}

/** Concentration of a disc on its hot spot at distances along the focal axis, from one bundle. */
export function concentrationAlongAxis(traced: TracedOptic, diameterM: number, distancesM: readonly number[]): ZonePoint[] {
  const finder = new SpotFinder(traced.bundle.capacity);
  const hits = emptyHits(traced.bundle.capacity);
  return distancesM.map((distanceM) => {
    const plane = naturalPlane(traced, distanceM);
    cutPlane(traced.bundle, plane, hits);
    const spot = finder.find(hits, diameterM / 2, lineHint(traced, plane, hits, null), fewestRays, 'quick');
    return { distanceM, concentration: digits(spot?.concentration ?? 0, 4) };
  });
}

/** Nearest and farthest distance at which a table of concentrations reaches a threshold; null if it never does. */
export function dangerZone(table: readonly ZonePoint[], thresholdSuns: number): { readonly nearM: number; readonly farM: number } | null {
  const crossing = (a: ZonePoint, b: ZonePoint): number =>
    a.distanceM + ((thresholdSuns - a.concentration) / (b.concentration - a.concentration)) * (b.distanceM - a.distanceM);
  const hot = table.map((p, i) => (p.concentration >= thresholdSuns ? i : -1)).filter((i) => i >= 0);
  const first = hot[0];
  const last = hot[hot.length - 1];
  if (first === undefined || last === undefined) return null;
  const [before, near, far, after] = [table[first - 1], table[first], table[last], table[last + 1]];
  if (!near || !far) return null;
  return { nearM: digits(before ? crossing(before, near) : near.distanceM), farM: digits(after ? crossing(far, after) : far.distanceM) };
}
