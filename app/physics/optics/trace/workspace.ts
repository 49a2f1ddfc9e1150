import type { PlaneHits } from './bundle.ts';
import { emptyHits } from './bundle.ts';
import { SpotFinder } from './hot-spot.ts';

/** Arrays for cutting planes and finding spots, shared by all measurements of one bundle: making them anew costs more than using them. */
export interface Workspace {
  readonly finder: SpotFinder;
  readonly hits: PlaneHits;
}

/** @param capacity Rays that a plane may meet at most. */
export const newWorkspace = (capacity: number): Workspace => ({ finder: new SpotFinder(capacity), hits: emptyHits(capacity) });
