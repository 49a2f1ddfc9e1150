import type { KnownPoint, PlanPlacement } from './site-plan.ts';
import { placePlan } from './site-plan.ts';

interface StoredPlan {
  readonly id: string;
  readonly name: string;
  readonly widthPx: number;
  readonly heightPx: number;
  readonly points: readonly KnownPoint[];
}

/** A drawing as maps need it; null while it is not placed. */
export interface PlacedPlan {
  readonly id: string;
  readonly name: string;
  readonly address: string;
  readonly widthPx: number;
  readonly heightPx: number;
  readonly corners: PlanPlacement['corners'];
}

export function placedPlan({ id, name, widthPx, heightPx, points }: StoredPlan): PlacedPlan | null {
  const placement = placePlan({ widthPx, heightPx }, points);
  if (!placement) return null;
  return { id, name, address: `/site-plans/${id}`, widthPx, heightPx, corners: placement.corners };
}
