import * as L from 'leaflet';
import { useEffect, useRef, useState } from 'react';
import type { CasePoint, CaseMapProps } from './case-point.ts';
import { nearestPoint, placeLabels } from './label-places.ts';
import type { Box } from './label-places.ts';
import type { EdgeTick } from './world-layers.client.ts';
import { STILL, addGraticule, addNight, addWorld } from './world-layers.client.ts';
import { useLatest } from './use-latest.ts';
import './map.css';

const PIN_RADIUS = 5;
const WEDGE_PX = 24;
const LABEL_HEIGHT = 24;

/** Cases on a plain world map: a pin, a wedge towards the sun when the mark was made, and a label that is a link. */
export default function CaseMap({ points, sunOverhead, onFollow }: CaseMapProps) {
  const frame = useRef<HTMLDivElement>(null);
  const [ticks, setTicks] = useState<readonly EdgeTick[]>([]);
  const [map, setMap] = useState<L.Map | null>(null);
  const [narrow, setNarrow] = useState(false);
  const follow = useLatest(onFollow);
  const overheadLatitude = sunOverhead?.latitudeDeg;
  const overheadLongitude = sunOverhead?.longitudeDeg;

  useEffect(() => {
    if (!frame.current) return;
    const element = frame.current;
    const made = L.map(element, {
      ...STILL, crs: L.CRS.EPSG4326, minZoom: -1, maxZoom: 10, zoomSnap: 0.05, zoomDelta: 0.75, wheelPxPerZoomLevel: 140,
      maxBounds: [[-90, -180], [90, 180]], maxBoundsViscosity: 1,
    });
    setNarrow(element.clientWidth < 640);
    made.setView([20, 10], 0, { animate: false });
    const stops = [addWorld(made, () => undefined), addGraticule(made, setTicks)];
    const watcher = new ResizeObserver(() => {
      made.invalidateSize({ animate: false });
      setNarrow(element.clientWidth < 640);
    });
    watcher.observe(element);
    setMap(made);
    return () => {
      watcher.disconnect();
      stops.forEach((stop) => stop());
      made.remove();
      setMap(null);
    };
  }, []);

  useEffect(() => {
    if (map && overheadLatitude !== undefined && overheadLongitude !== undefined) {
      addNight(map, { latitudeDeg: overheadLatitude, longitudeDeg: overheadLongitude });
    }
  }, [map, overheadLatitude, overheadLongitude]);

  useEffect(() => (map ? showPoints(map, points, narrow, follow) : undefined), [map, points, narrow, follow]);
  useEffect(() => {
    if (map) fitTo(map, points);
  }, [map, points]);

  return (
    <div className="map-outer relative pb-6 tablet:pl-14">
      <div className="map-frame h-60 tablet:h-[420px] desk:h-[612px]">
        <div ref={frame} role="group" aria-label={`Map of ${points.length} ${points.length === 1 ? 'case' : 'cases'}. The same cases are in the list.`} />
        <button type="button" className="map-button top-2 right-2" aria-label="Zoom in" onClick={() => map?.zoomIn(1, { animate: false })}><Sign plus /></button>
        <button type="button" className="map-button top-[51px] right-2" aria-label="Zoom out" onClick={() => map?.zoomOut(1, { animate: false })}><Sign /></button>
        <button type="button" className="map-button top-[94px] right-2" aria-label="Show all cases" onClick={() => map && fitTo(map, points)}><All /></button>
        <Edge ticks={ticks} axis="latitude" inside />
      </div>
      <Edge ticks={ticks} axis="longitude" />
      <Edge ticks={ticks} axis="latitude" />
    </div>
  );
}

function fitTo(map: L.Map, points: readonly CasePoint[]): void {
  if (points.length === 0) {
    map.fitBounds([[-56, -130], [72, 165]], { animate: false });
    return;
  }
  const bounds = L.latLngBounds(points.map(({ latitudeDeg, longitudeDeg }) => [latitudeDeg, longitudeDeg]));
  map.fitBounds(bounds, { animate: false, padding: [44, 40], maxZoom: 5 });
}

/** Degrees of the grid, outside the frame: below it, and left of it where there is room (inside on a phone). */
function Edge({ ticks, axis, inside = false }: { readonly ticks: readonly EdgeTick[]; readonly axis: EdgeTick['axis']; readonly inside?: boolean }) {
  const place = axis === 'longitude' ? 'absolute bottom-0 right-0 left-0 h-4 tablet:left-14'
    : inside ? 'tablet:hidden' : 'absolute top-0 left-0 hidden w-12 tablet:block';
  return (
    <div aria-hidden="true" className={place}>
      {ticks.filter((tick) => tick.axis === axis && tick.atPx > 12 && (axis === 'latitude' || tick.atPx < tick.ofPx - 20)).map(({ text, atPx }) => (
        <span
          key={`${text}${atPx}`}
          className={`map-tick ${axis === 'longitude' ? '-translate-x-1/2' : `-translate-y-1/2 ${inside ? 'left-0' : 'right-0'}`}`}
          style={axis === 'longitude' ? { left: atPx } : { top: atPx }}
        >
          {text}
        </span>
      ))}
    </div>
  );
}

type Follow = { readonly current: CaseMapProps['onFollow'] };

interface Pin {
  readonly point: CasePoint;
  readonly marker: L.Marker;
  readonly label: HTMLAnchorElement;
  readonly leader: SVGLineElement;
}

/** Puts a marker for each case, arranges the labels, and arranges them again after each move. Returns the way back. */
function showPoints(map: L.Map, points: readonly CasePoint[], narrow: boolean, follow: Follow): () => void {
  const pins = points.map((point) => addPin(map, point, narrow, follow));
  const arrange = () => arrangeLabels(map, pins);
  map.on('moveend zoomend resize', arrange);
  arrange();
  return () => {
    map.off('moveend zoomend resize', arrange);
    pins.forEach(({ marker }) => marker.remove());
  };
}

function addPin(map: L.Map, point: CasePoint, narrow: boolean, follow: Follow): Pin {
  const holder = document.createElement('div');
  const { svg, leader } = drawPin(point);
  const label = document.createElement('a');
  label.className = 'map-pin-label';
  label.href = point.href;
  label.setAttribute('aria-label', `${point.number}, ${point.title}${point.note ? `, ${point.note}` : ''}`);
  const number = document.createElement('strong');
  number.textContent = point.number;
  label.append(number);
  if (point.note && !narrow) label.append(document.createTextNode(point.note));
  label.addEventListener('click', (event) => {
    event.stopPropagation();
    if (!follow.current || event.metaKey || event.ctrlKey || event.shiftKey || event.button !== 0) return;
    event.preventDefault();
    follow.current(point.href);
  });
  holder.append(svg, label);
  const icon = L.divIcon({ html: holder, className: '', iconSize: [0, 0] });
  const marker = L.marker([point.latitudeDeg, point.longitudeDeg], { icon, keyboard: false, interactive: false }).addTo(map);
  marker.getElement()?.removeAttribute('aria-hidden');
  return { point, marker, label, leader };
}

const SVG = 'http://www.w3.org/2000/svg';

/** A dot, filled where the sun comes back before the fix is proven, with the sun's direction as a wedge. */
function drawPin(point: CasePoint): { readonly svg: SVGSVGElement; readonly leader: SVGLineElement } {
  const svg = document.createElementNS(SVG, 'svg');
  svg.setAttribute('class', 'map-pin-svg');
  svg.setAttribute('width', '1');
  svg.setAttribute('height', '1');
  svg.setAttribute('aria-hidden', 'true');
  const leader = document.createElementNS(SVG, 'line');
  leader.setAttribute('stroke', 'var(--color-ink)');
  const parts: SVGElement[] = [leader];
  if (point.sunAzimuthDeg !== undefined && point.sunAzimuthDeg !== null) {
    const wedge = document.createElementNS(SVG, 'path');
    wedge.setAttribute('d', `M0 0 L-4.4 ${-WEDGE_PX} L4.4 ${-WEDGE_PX} Z`);
    wedge.setAttribute('transform', `rotate(${point.sunAzimuthDeg})`);
    wedge.setAttribute('fill', 'var(--color-clear)');
    parts.push(wedge);
  }
  const dot = document.createElementNS(SVG, 'circle');
  dot.setAttribute('r', String(PIN_RADIUS));
  dot.setAttribute('fill', point.litBeforeFix ? 'var(--color-ink)' : 'var(--color-sheet)');
  dot.setAttribute('stroke', 'var(--color-ink)');
  dot.setAttribute('stroke-width', '2');
  parts.push(dot);
  svg.append(...parts);
  return { svg, leader };
}

function arrangeLabels(map: L.Map, pins: readonly Pin[]): void {
  const size = map.getSize();
  const frame: Box = { x: 4, y: 4, w: size.x - 8, h: size.y - 8 };
  pins.forEach(({ label }) => (label.dataset['hidden'] = 'no'));
  const requests = pins.map(({ point, label }) => {
    const { x, y } = map.latLngToContainerPoint([point.latitudeDeg, point.longitudeDeg]);
    return { x, y, w: Math.ceil(label.offsetWidth), h: LABEL_HEIGHT };
  });
  // The corner with the buttons is no place for a label.
  const buttons: Box = { x: size.x - 58, y: 0, w: 58, h: 142 };
  placeLabels(requests, frame, PIN_RADIUS + 1, [buttons, ...wedges(pins, requests)]).forEach((box, i) => {
    const pin = pins[i];
    const from = requests[i];
    if (pin && from) settle(pin, from, box);
  });
}

/** The boxes of the sun wedges, which labels keep off. */
function wedges(pins: readonly Pin[], at: readonly { readonly x: number; readonly y: number }[]): Box[] {
  return pins.flatMap(({ point }, i) => {
    const from = at[i];
    if (!from || typeof point.sunAzimuthDeg !== 'number') return [];
    const turn = (point.sunAzimuthDeg * Math.PI) / 180;
    const [x, y] = [from.x + WEDGE_PX * Math.sin(turn), from.y - WEDGE_PX * Math.cos(turn)];
    return [{ x: Math.min(x, from.x), y: Math.min(y, from.y), w: Math.abs(x - from.x), h: Math.abs(y - from.y) }];
  });
}

/** Sets a label in its place with a line to its pin; a label with no room folds onto the pin and opens on focus. */
function settle({ label, leader }: Pin, from: { readonly x: number; readonly y: number }, box: Box | null): void {
  label.dataset['hidden'] = box ? 'no' : 'yes';
  label.style.height = `${LABEL_HEIGHT}px`;
  label.style.left = `${box ? box.x - from.x : -12}px`;
  label.style.top = `${box ? box.y - from.y : -12}px`;
  const [x, y] = box ? nearestPoint(box, from.x, from.y) : [from.x, from.y];
  leader.setAttribute('x2', String(x - from.x));
  leader.setAttribute('y2', String(y - from.y));
}

function Sign({ plus = false }: { readonly plus?: boolean }) {
  return <svg width="20" height="20" viewBox="0 0 20 20" aria-hidden="true"><path d={plus ? 'M3 10H17M10 3V17' : 'M3 10H17'} stroke="currentColor" strokeWidth="1.9" /></svg>;
}

function All() {
  return <svg width="20" height="20" viewBox="0 0 20 20" aria-hidden="true"><path d="M3 8V3H8M12 3H17V8M17 12V17H12M8 17H3V12" fill="none" stroke="currentColor" strokeWidth="1.9" /></svg>;
}
