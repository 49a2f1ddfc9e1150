import * as L from 'leaflet';
import { geoEquirectangular, geoStream } from 'd3-geo';
import type { GeoPermissibleObjects } from 'd3-geo';
import { feature, mesh } from 'topojson-client';
import type { GeometryCollection, Topology } from 'topojson-specification';
import type { Extent } from './graticule.ts';
import { gridLabel, gridStepDeg, gridValues, nightEdge } from './graticule.ts';

type World = Topology<{ countries: GeometryCollection; land: GeometryCollection }>;

/** Zoom at and above which the finer outlines are used. */
const FINE_FROM_ZOOM = 4;
const files: Record<'coarse' | 'fine', () => Promise<World>> = {
  coarse: async () => asWorld((await import('world-atlas/countries-110m.json')).default),
  fine: async () => asWorld((await import('world-atlas/countries-50m.json')).default),
};

function asWorld(file: unknown): World {
  if (!isWorld(file)) throw new TypeError('The map outlines that came with the application are not readable.');
  return file;
}

function isWorld(file: unknown): file is World {
  return typeof file === 'object' && file !== null && 'type' in file && file.type === 'Topology'
    && 'objects' in file && typeof file.objects === 'object' && file.objects !== null
    && 'countries' in file.objects && 'land' in file.objects;
}

/**
 * Lays land and country outlines under everything else, from files that ship with the application (Natural Earth,
 * public domain, as packed by world-atlas): coarse ones first, finer ones when looked at closely. Nothing is asked of
 * any outside server. Returns a function that stops it.
 */
export function addWorld(map: L.Map, onReady: () => void): () => void {
  const pane = map.createPane('world');
  pane.style.zIndex = '150';
  const renderer = L.svg({ pane: 'world', padding: 0.3 });
  let shown: 'coarse' | 'fine' | null = null;
  let layers: L.Layer[] = [];
  let stopped = false;
  const show = async (): Promise<void> => {
    const wanted = map.getZoom() >= FINE_FROM_ZOOM ? 'fine' : 'coarse';
    if (wanted === shown) return;
    shown = wanted;
    const world = await files[wanted]();
    if (stopped || shown !== wanted) return;
    layers.forEach((layer) => layer.remove());
    layers = worldLayers(world, renderer).map((layer) => layer.addTo(map));
    onReady();
  };
  const follow = (): void => void show();
  map.on('zoomend', follow);
  follow();
  return () => {
    stopped = true;
    map.off('zoomend', follow);
  };
}

function worldLayers(world: World, renderer: L.SVG): L.Layer[] {
  const common = { interactive: false, renderer, pane: 'world' } satisfies L.PathOptions;
  const { countries, land } = world.objects;
  return [
    L.polygon(cutAtDateLine(feature(world, land)), { ...common, className: 'map-land' }),
    L.polyline(cutAtDateLine(mesh(world, countries, (a, b) => a === b)), { ...common, className: 'map-coast' }),
    L.polyline(cutAtDateLine(mesh(world, countries, (a, b) => a !== b)), { ...common, className: 'map-border' }),
  ];
}

/** Rings or lines in degrees, cut where they cross the meridian of 180 degrees, so that none runs back across the map. */
function cutAtDateLine(shape: GeoPermissibleObjects): L.LatLngTuple[][] {
  const flat = geoEquirectangular().scale(180 / Math.PI).translate([0, 0]).precision(0.5);
  const lines: L.LatLngTuple[][] = [];
  geoStream(shape, flat.stream({
    point: (x, y) => void lines.at(-1)?.push([-y, x]),
    lineStart: () => void lines.push([]),
    lineEnd: () => undefined,
    polygonStart: () => undefined,
    polygonEnd: () => undefined,
  }));
  return lines;
}

export interface EdgeTick {
  readonly axis: 'latitude' | 'longitude';
  readonly text: string;
  /** Pixels from the left edge for a longitude, from the top for a latitude. */
  readonly atPx: number;
  /** Length of that edge in pixels. */
  readonly ofPx: number;
}

/**
 * Keeps a grid of meridians and parallels over the map, every 10 degrees or as fine as the zoom asks, and tells where
 * its lines leave the frame so that they can be labelled.
 */
export function addGraticule(map: L.Map, onTicks: (ticks: readonly EdgeTick[]) => void): () => void {
  const pane = map.createPane('graticule');
  pane.style.zIndex = '180';
  const renderer = L.svg({ pane: 'graticule', padding: 0.1 });
  const lines = L.layerGroup().addTo(map);
  const draw = (): void => {
    const extent = extentOf(map);
    const size = map.getSize();
    if (size.x === 0 || size.y === 0) return;
    const [stepX, stepY] = [
      gridStepDeg(pixelsBetween(map, [0, 0], [0, 1]).x, 92),
      gridStepDeg(size.y / (map.getBounds().getNorth() - map.getBounds().getSouth()), 56),
    ];
    lines.clearLayers();
    const ticks: EdgeTick[] = [];
    const rule = (line: L.LatLngTuple[]): void => {
      L.polyline(line, { className: 'map-grid', renderer, pane: 'graticule', interactive: false }).addTo(lines);
    };
    for (const value of gridValues(extent.west, extent.east, stepX)) {
      rule([[extent.south, value], [extent.north, value]]);
      ticks.push({ axis: 'longitude', text: gridLabel(value, 'longitude', stepX), atPx: map.latLngToContainerPoint([extent.south, value]).x, ofPx: size.x });
    }
    for (const value of gridValues(extent.south, extent.north, stepY)) {
      rule([[value, extent.west], [value, extent.east]]);
      ticks.push({ axis: 'latitude', text: gridLabel(value, 'latitude', stepY), atPx: map.latLngToContainerPoint([value, extent.west]).y, ofPx: size.y });
    }
    onTicks(ticks);
  };
  map.on('moveend zoomend resize viewreset', draw);
  draw();
  return () => {
    map.off('moveend zoomend resize viewreset', draw);
  };
}

function pixelsBetween(map: L.Map, from: L.LatLngTuple, to: L.LatLngTuple): L.Point {
  return map.project(to).subtract(map.project(from));
}

function extentOf(map: L.Map): Extent {
  const bounds = map.getBounds();
  return {
    south: Math.max(-90, bounds.getSouth()), north: Math.min(90, bounds.getNorth()),
    west: Math.max(-180, bounds.getWest()), east: Math.min(180, bounds.getEast()),
  };
}

/** Shades the side of the world where the sun is down, and rules the parallel where it stands overhead. */
export function addNight(map: L.Map, overhead: { readonly latitudeDeg: number; readonly longitudeDeg: number }): void {
  const pane = map.createPane('night');
  pane.style.zIndex = '170';
  const common = { renderer: L.svg({ pane: 'night', padding: 0.3 }), pane: 'night', interactive: false } satisfies L.PathOptions;
  const edge = nightEdge(overhead).map(([lat, lng]): L.LatLngTuple => [lat, lng]);
  const dark = overhead.latitudeDeg >= 0 ? -90 : 90;
  L.polygon([[dark, -180], ...edge, [dark, 180]], { ...common, className: 'map-night' }).addTo(map);
  L.polyline([[overhead.latitudeDeg, -180], [overhead.latitudeDeg, 180]], { ...common, className: 'map-overhead' }).addTo(map);
}

/** Settings every map here shares: nothing moves by itself, nothing is fetched, no names of others in the corner. */
export const STILL: L.MapOptions = {
  zoomControl: false,
  attributionControl: false,
  zoomAnimation: false,
  fadeAnimation: false,
  markerZoomAnimation: false,
  inertia: false,
  keyboard: false,
  worldCopyJump: false,
};
