import * as L from 'leaflet';
import { useEffect, useRef, useState } from 'react';
import type { KeyboardEvent } from 'react';
import type { Place } from '#app/domain/coordinate-text.ts';
import { stepped } from '#app/domain/coordinate-text.ts';
import { scaleBar } from './graticule.ts';
import { Cross, Scale, Sign, Ticks } from './map-furniture.tsx';
import type { MapTiles } from './map-tiles.ts';
import type { PlacedPlan } from '#app/domain/plan-view.ts';
import { addPlan } from './plan-layer.client.ts';
import type { EdgeTick } from './world-layers.client.ts';
import { STILL, addGraticule, addWorld } from './world-layers.client.ts';
import { useLatest } from './use-latest.ts';
import './map.css';

export interface PickerMapProps {
  /** What the map looks at first, and where it goes when the boxes are typed in. */
  readonly place: Place | null;
  /** Shown while no place is given: the site, or nothing for the whole world. */
  readonly around: Place | null;
  /** Reported accuracy in metres, drawn as a dashed ring. */
  readonly accuracyM: number | null;
  /** Pins that stay where they are, with their names where they have one, and lines with their length and direction. */
  readonly pins?: readonly { readonly place: Place; readonly label: string | null }[];
  readonly lines?: readonly { readonly from: Place; readonly to: Place; readonly label: string }[];
  /** Drawing of the site under the pins. */
  readonly plan?: PlacedPlan | null;
  readonly tiles?: MapTiles | null;
  /** What the cross is, for those who hear the map. */
  readonly crossLabel?: string;
  /** Called when the map is moved by hand; `decimals` is as fine as the zoom can show. */
  readonly onMove: (place: Place, decimals: number) => void;
}

const MAX_ZOOM = 22;
/** Tiles beyond this zoom are enlarged: few servers draw finer ones. */
const TILE_ZOOM = 19;
const NO_PINS: NonNullable<PickerMapProps['pins']> = [];
const NO_LINES: NonNullable<PickerMapProps['lines']> = [];
const CLOSE_ZOOM = 17;
const ARROWS = [
  { key: 'ArrowUp', words: 'north', east: 0, north: 1, turn: 0, spot: 'right-14 bottom-24' },
  { key: 'ArrowLeft', words: 'west', east: -1, north: 0, turn: -90, spot: 'right-[100px] bottom-[52px]' },
  { key: 'ArrowRight', words: 'east', east: 1, north: 0, turn: 90, spot: 'right-3 bottom-[52px]' },
  { key: 'ArrowDown', words: 'south', east: 0, north: -1, turn: 180, spot: 'right-14 bottom-2' },
] as const;

/** A map under a fixed cross: whatever lies under the cross is the place. */
export default function PickerMap({ place, around, accuracyM, onMove, pins = NO_PINS, lines = NO_LINES, plan = null, tiles = null, crossLabel = 'the place' }: PickerMapProps) {
  const frame = useRef<HTMLDivElement>(null);
  const map = useRef<L.Map | null>(null);
  const [ticks, setTicks] = useState<readonly EdgeTick[]>([]);
  const [bar, setBar] = useState({ metres: 0, widthPx: 0 });
  const [zoom, setZoom] = useState(0);
  const moved = useLatest(onMove);
  const first = useRef({ place, around });

  useEffect(() => {
    if (!frame.current) return;
    const made = L.map(frame.current, { ...STILL, minZoom: 1, maxZoom: MAX_ZOOM, zoomSnap: 1, maxBounds: [[-85.05, -180], [85.05, 180]] });
    map.current = made;
    look(made, first.current.place, first.current.around);
    const measure = () => {
      setZoom(made.getZoom());
      setBar(scaleBar(metresPerPixel(made), 110));
    };
    made.on('moveend zoomend resize', measure);
    measure();
    made.on('dragend', () => moved.current(centreOf(made), decimalsAt(made.getZoom())));
    const stops = [addWorld(made, () => undefined), addGraticule(made, setTicks), followSize(made, frame.current)];
    return () => {
      stops.forEach((stop) => stop());
      made.remove();
      map.current = null;
    };
  }, [moved]);

  useEffect(() => {
    if (!map.current || !place) return;
    // A move made on the map comes back as a prop and is already under the cross.
    if (map.current.latLngToContainerPoint([place.latitudeDeg, place.longitudeDeg]).distanceTo(map.current.getSize().divideBy(2)) < 2) return;
    map.current.setView([place.latitudeDeg, place.longitudeDeg], Math.max(map.current.getZoom(), 18), { animate: false });
  }, [place]);

  useEffect(() => {
    if (!map.current || !place || accuracyM === null) return;
    const ring = L.circle([place.latitudeDeg, place.longitudeDeg], { radius: accuracyM, className: 'map-accuracy', interactive: false, renderer: L.svg() }).addTo(map.current);
    return () => void ring.remove();
  }, [place, accuracyM]);

  useEffect(() => {
    if (!map.current) return;
    const drawn = L.layerGroup().addTo(map.current);
    for (const line of lines) {
      L.polyline([pair(line.from), pair(line.to)], { className: 'map-wall', interactive: false, renderer: L.svg() }).bindTooltip(textOf(line.label), { ...LABEL, direction: 'bottom', offset: [0, 6] }).addTo(drawn);
    }
    for (const pin of pins) {
      const dot = L.circleMarker(pair(pin.place), { radius: 5, className: 'map-set-pin', interactive: false, renderer: L.svg() }).addTo(drawn);
      if (pin.label !== null) dot.bindTooltip(textOf(pin.label), LABEL);
    }
    return () => void drawn.remove();
  }, [pins, lines]);

  useEffect(() => (map.current && plan ? addPlan(map.current, plan) : undefined), [plan]);

  useEffect(() => {
    if (!map.current || !tiles) return;
    const layer = L.tileLayer(tiles.url, { maxNativeZoom: TILE_ZOOM, maxZoom: MAX_ZOOM, attribution: tiles.attribution }).addTo(map.current);
    return () => void layer.remove();
  }, [tiles]);

  const step = (eastM: number, northM: number) => {
    if (!map.current) return;
    const next = stepped(place ?? centreOf(map.current), eastM, northM);
    const closer = Math.max(map.current.getZoom(), CLOSE_ZOOM);
    map.current.setView([next.latitudeDeg, next.longitudeDeg], closer, { animate: false });
    moved.current(next, 6);
  };
  const closer = (by: number) => map.current?.setZoom(map.current.getZoom() + by, { animate: false });
  const press = (event: KeyboardEvent) => {
    const arrow = ARROWS.find(({ key }) => key === event.key);
    const far = event.shiftKey ? 10 : 1;
    if (arrow) step(arrow.east * far, arrow.north * far);
    else if (event.key === '+' || event.key === '=') closer(1);
    else if (event.key === '-') closer(-1);
    else return;
    event.preventDefault();
  };

  return (
    <div className="map-frame h-80 tablet:h-96">
      {/* The map itself takes the arrow keys, as a widget of role application does; the same steps are buttons beside it. */}
      {/* eslint-disable-next-line jsx-a11y/no-noninteractive-element-interactions -- the rule does not count role application as a widget */}
      <div
        ref={frame}
        role="application"
        aria-label={`Map. The cross is ${crossLabel}. Arrow keys move the cross 1 metre, with Shift 10 metres; plus and minus zoom.`}
        // eslint-disable-next-line jsx-a11y/no-noninteractive-tabindex -- as above
        tabIndex={0}
        onKeyDown={press}
      />
      <Cross set={place !== null} />
      <Ticks ticks={ticks} />
      <button type="button" className="map-button top-2 right-3" aria-label="Zoom in" disabled={zoom >= MAX_ZOOM} onClick={() => closer(1)}><Sign plus /></button>
      <button type="button" className="map-button top-[51px] right-3" aria-label="Zoom out" disabled={zoom <= 1} onClick={() => closer(-1)}><Sign /></button>
      {ARROWS.map(({ key, words, east, north, turn, spot }) => (
        <button key={key} type="button" className={`map-button ${spot}`} aria-label={`Move the cross 1 metre ${words}`} onClick={() => step(east, north)}>
          <svg width="20" height="20" viewBox="0 0 20 20" aria-hidden="true"><path d="M10 17V3.5M4.5 9 10 3.5 15.5 9" transform={`rotate(${turn} 10 10)`} fill="none" stroke="currentColor" strokeWidth="1.9" /></svg>
        </button>
      ))}
      <Scale {...bar} />
      {tiles ? <p className="pointer-events-none absolute right-0 bottom-0 bg-sheet px-1 text-axis text-second" style={{ zIndex: 540 }}>{tiles.attribution}</p> : null}
    </div>
  );
}

const LABEL: L.TooltipOptions = { permanent: true, direction: 'top', className: 'map-note', offset: [0, -4] };
const pair = (place: Place): L.LatLngTuple => [place.latitudeDeg, place.longitudeDeg];

/** Labels are text, never markup. */
function textOf(words: string): HTMLElement {
  const element = document.createElement('span');
  element.textContent = words;
  return element;
}

function look(map: L.Map, place: Place | null, around: Place | null): void {
  const at = place ?? around;
  map.setView(at ? [at.latitudeDeg, at.longitudeDeg] : [20, 0], place ? 18 : around ? 15 : 1, { animate: false });
}

function centreOf(map: L.Map): Place {
  const { lat, lng } = map.getCenter().wrap();
  return { latitudeDeg: lat, longitudeDeg: lng };
}

function metresPerPixel(map: L.Map): number {
  const middle = map.getSize().divideBy(2);
  const a = map.containerPointToLatLng(middle);
  const b = map.containerPointToLatLng(middle.add([1, 0]));
  return map.distance(a, b);
}

/** Decimals of a degree worth writing down: about a tenth of a pixel, 6 at most (0.1 m). */
function decimalsAt(zoom: number): number {
  return Math.min(6, Math.max(1, Math.ceil(Math.log10((256 * 2 ** zoom) / 360))));
}

/** The frame may be shown later than it is made, inside a folded part: tell the map when its size changes. */
function followSize(map: L.Map, element: HTMLElement): () => void {
  const watcher = new ResizeObserver(() => map.invalidateSize({ animate: false }));
  watcher.observe(element);
  return () => watcher.disconnect();
}
