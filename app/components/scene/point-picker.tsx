import { useMemo, useState } from 'react';
import type { Place } from '#app/domain/coordinate-text.ts';
import { PickerMap } from './base-map-lazy.tsx';
import { useMapTiles } from './map-tiles.ts';
import type { PlacedPlan } from '#app/domain/plan-view.ts';
import { SegmentButtons } from '#app/components/ui/segment-buttons.tsx';

export interface PointToSet {
  readonly name: string;
  /** "The mark", as the button that lets the cross set it. */
  readonly label: string;
  readonly place: Place | null;
  /** Its name stands beside the pin. */
  readonly named: boolean;
}

export interface PointPickerProps {
  readonly points: readonly PointToSet[];
  readonly lines: readonly { readonly from: Place; readonly to: Place; readonly label: string }[];
  /** Where the map looks while nothing is set: the site, or the whole world. */
  readonly around: Place | null;
  /** Reported accuracy of the first point. [m] */
  readonly accuracyM: number | null;
  readonly plans: readonly PlacedPlan[];
  readonly onMove: (name: string, place: Place, decimals: number) => void;
}

/**
 * One cross for several points: a button says which of them the cross sets, the others stand as pins. What it sets are
 * boxes of the form, which can be typed in as well.
 */
export function PointPicker({ points, lines, around, accuracyM, plans, onMove }: PointPickerProps) {
  const [chosen, setChosen] = useState(points[0]?.name ?? '');
  const [planId, setPlanId] = useState(plans[0]?.id ?? '');
  const tiles = useMapTiles();
  const active = points.find(({ name }) => name === chosen) ?? points[0];
  const first = points.find(({ place }) => place)?.place ?? null;
  const pins = useMemo(
    () => points.flatMap(({ name, label, place, named }) => (place && name !== active?.name ? [{ place, label: named ? label : null }] : [])),
    [points, active?.name],
  );
  const plan = plans.find(({ id }) => id === planId) ?? null;
  if (!active) return null;
  return (
    <div className="space-y-2">
      {plans.length > 0 ? <SegmentButtons label="Under the pins" options={[...plans.map(({ id, name }) => ({ value: id, label: name })), { value: '', label: 'Map only' }]} chosen={planId} onChoose={setPlanId} /> : null}
      <SegmentButtons label="The cross sets" options={points.map(({ name, label }) => ({ value: name, label }))} chosen={active.name} onChoose={setChosen} />
      <PickerMap
        place={active.place}
        around={first ?? around}
        accuracyM={active.name === points[0]?.name ? accuracyM : null}
        pins={pins}
        lines={lines}
        plan={plan}
        tiles={tiles}
        crossLabel={active.label.toLowerCase()}
        onMove={(place, decimals) => onMove(active.name, place, decimals)}
      />
      <p className="text-small text-second">Drag the map under the cross, or step 1 m with the arrows. Everything can be typed below as well.</p>
    </div>
  );
}
