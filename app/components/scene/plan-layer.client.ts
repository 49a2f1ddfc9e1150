import * as L from 'leaflet';
import type { PlacedPlan } from '#app/domain/plan-view.ts';

const at = (map: L.Map, place: { readonly latitudeDeg: number; readonly longitudeDeg: number }): L.Point => map.latLngToLayerPoint([place.latitudeDeg, place.longitudeDeg]);

/** Lays the picture under the pins, turned and scaled by its corners. Returns a function that takes it away. */
export function addPlan(map: L.Map, plan: PlacedPlan): () => void {
  const pane = map.getPane('plan') ?? map.createPane('plan');
  pane.style.zIndex = '160';
  const picture = L.DomUtil.create('img', 'map-plan leaflet-zoom-hide', pane);
  picture.src = plan.address;
  picture.alt = '';
  picture.width = plan.widthPx;
  picture.height = plan.heightPx;
  const lay = (): void => {
    const [origin, right, down] = [at(map, plan.corners.upperLeft), at(map, plan.corners.upperRight), at(map, plan.corners.lowerLeft)];
    const across = right.subtract(origin).divideBy(plan.widthPx);
    const along = down.subtract(origin).divideBy(plan.heightPx);
    picture.style.transform = `matrix(${across.x}, ${across.y}, ${along.x}, ${along.y}, ${origin.x}, ${origin.y})`;
  };
  map.on('zoomend viewreset moveend', lay);
  lay();
  return () => {
    map.off('zoomend viewreset moveend', lay);
    picture.remove();
  };
}
