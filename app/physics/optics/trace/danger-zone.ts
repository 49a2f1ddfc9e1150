import { lineHint, naturalPlane } from './best-plane.ts';
import { cutPlane, raysWithin } from './bundle.ts';
import type { Spot } from './hot-spot.ts';
import { batchCount } from './kernel.ts';
import { digits, fewestRays } from './trace-focus.ts';
import type { TracedOptic } from './trace-bundle.ts';
import { newWorkspace } from './workspace.ts';

/** Concentration of a disc on its hot spot in one plane. */
export interface ZonePoint {
  /** From O along the focal axis. [m] */
  readonly distanceM: number;
  readonly concentration: number;
}

/** Part of the rays that is tried first, and hits on which its answer must rest to be taken. */
const firstLook = 1 / 5;
const enoughInFirstLook = 800;

/**
 * Concentration of a disc on its hot spot at distances along the focal axis, from one bundle. A fifth of the rays serves
 * where it puts enough of them on the disc; weak beams take all.
 */
export function concentrationAlongAxis(traced: TracedOptic, diameterM: number, distancesM: readonly number[], workspace = newWorkspace(traced.bundle.capacity)): ZonePoint[] {
  const { bundle } = traced;
  const { finder, hits } = workspace;
  const perBatch = Math.ceil((firstLook * bundle.count) / batchCount);
  const inPlane = (distanceM: number, most: number, fewest: number): Spot | null => {
    const plane = naturalPlane(traced, distanceM);
    cutPlane(bundle, plane, hits, most);
    return finder.find(hits, diameterM / 2, lineHint(traced, plane, hits, null), fewest, 'quick');
  };
  return distancesM.map((distanceM) => {
    const first = inPlane(distanceM, perBatch, 1);
    const served = first !== null && first.rays >= enoughInFirstLook;
    const concentration = served ? first.concentration * (bundle.count / raysWithin(bundle, perBatch)) : (inPlane(distanceM, Infinity, fewestRays)?.concentration ?? 0);
    return { distanceM, concentration: digits(concentration, 4) };
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
