import * as L from 'leaflet';
import { useEffect, useRef, useState } from 'react';
import type { KeyboardEvent } from 'react';
import type { Place } from './coordinate-text.ts';
import { stepped } from './coordinate-text.ts';
import { lengthText, scaleBar } from './graticule.ts';
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
  /** Called when the map is moved by hand; `decimals` is as fine as the zoom can show. */
  readonly onMove: (place: Place, decimals: number) => void;
}

const MAX_ZOOM = 20;
const CLOSE_ZOOM = 17;
const ARROWS = [
  { key: 'ArrowUp', words: 'north', east: 0, north: 1, turn: 0, spot: 'right-14 bottom-24' },
  { key: 'ArrowLeft', words: 'west', east: -1, north: 0, turn: -90, spot: 'right-[100px] bottom-[52px]' },
  { key: 'ArrowRight', words: 'east', east: 1, north: 0, turn: 90, spot: 'right-3 bottom-[52px]' },
  { key: 'ArrowDown', words: 'south', east: 0, north: -1, turn: 180, spot: 'right-14 bottom-2' },
] as const;

/** A map under a fixed cross: whatever lies under the cross is the place. */
export default function PickerMap({ place, around, accuracyM, onMove }: PickerMapProps) {
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
    map.current.setView([place.latitudeDeg, place.longitudeDeg], Math.max(map.current.getZoom(), 12), { animate: false });
  }, [place]);

  useEffect(() => {
    if (!map.current || !place || accuracyM === null) return;
    const ring = L.circle([place.latitudeDeg, place.longitudeDeg], { radius: accuracyM, className: 'map-accuracy', interactive: false, renderer: L.svg() }).addTo(map.current);
    return () => void ring.remove();
  }, [place, accuracyM]);

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
        aria-label="Map. Arrow keys move the cross 1 metre, with Shift 10 metres; plus and minus zoom."
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
    </div>
  );
}

function look(map: L.Map, place: Place | null, around: Place | null): void {
  const at = place ?? around;
  map.setView(at ? [at.latitudeDeg, at.longitudeDeg] : [20, 0], place ? 15 : around ? 9 : 1, { animate: false });
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

/** The fixed cross at the middle; its centre is filled once a place is set. */
function Cross({ set }: { readonly set: boolean }) {
  return (
    <svg className="pointer-events-none absolute top-1/2 left-1/2 -translate-x-1/2 -translate-y-1/2" style={{ zIndex: 550 }} width="92" height="92" viewBox="-46 -46 92 92" aria-hidden="true">
      <g stroke="var(--color-sheet)" strokeWidth="5"><path d="M0-45V-12M0 12V45M-45 0H-12M12 0H45" /></g>
      <g stroke="var(--color-ink)" strokeWidth="1.9" fill="none"><path d="M0-45V-12M0 12V45M-45 0H-12M12 0H45" /></g>
      <circle r="4.5" fill={set ? 'var(--color-ink)' : 'var(--color-sheet)'} stroke="var(--color-ink)" strokeWidth="1.5" strokeDasharray={set ? undefined : '2 2'} />
    </svg>
  );
}

/** Degrees along the top and left edges, clear of the buttons and of the scale bar. */
function Ticks({ ticks }: { readonly ticks: readonly EdgeTick[] }) {
  return (
    <div aria-hidden="true">
      {ticks.filter(hasRoom).map(({ axis, text, atPx }) => (axis === 'longitude' ? (
        <span key={`x${text}`} className="map-tick top-0 -translate-x-1/2" style={{ left: atPx }}>{text}</span>
      ) : (
        <span key={`y${text}`} className="map-tick left-0 -translate-y-1/2" style={{ top: atPx }}>{text}</span>
      )))}
    </div>
  );
}

/** Top right belongs to the zoom buttons, bottom left to the scale bar, top left to neither edge. */
function hasRoom({ axis, atPx, ofPx }: EdgeTick): boolean {
  return axis === 'longitude' ? atPx > 120 && atPx < ofPx - 100 : atPx > 28 && atPx < ofPx - 40;
}

function Scale({ metres, widthPx }: { readonly metres: number; readonly widthPx: number }) {
  if (metres === 0) return null;
  return (
    <div className="pointer-events-none absolute bottom-2 left-3 flex items-center gap-2 bg-sheet px-1 text-axis" style={{ zIndex: 550 }}>
      <svg width={widthPx + 2} height="12" aria-hidden="true"><path d={`M1 1V11M${widthPx + 1} 1V11M1 6H${widthPx + 1}`} stroke="var(--color-ink)" strokeWidth="1.5" /></svg>
      {lengthText(metres)}
    </div>
  );
}

function Sign({ plus = false }: { readonly plus?: boolean }) {
  return <svg width="20" height="20" viewBox="0 0 20 20" aria-hidden="true"><path d={plus ? 'M3 10H17M10 3V17' : 'M3 10H17'} stroke="currentColor" strokeWidth="1.9" /></svg>;
}
