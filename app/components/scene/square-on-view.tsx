import { mapped } from '#app/domain/homography.ts';
import { planeOf } from '#app/domain/photo-measure.ts';
import type { PhotoClicks } from '#app/domain/photo-measure.ts';

const boxPx = 360;

/** Step of the grid that leaves some twenty squares. [mm] */
function gridStep(spanMm: number): number {
  return [0.1, 0.5, 1, 5, 10, 50, 100, 500, 1_000, 5_000].find((step) => spanMm / step <= 30) ?? 10_000;
}

/** The photo as seen from square in front, with a grid in millimetres: drawn over the view copy, never stored. */
export function SquareOnView({ clicks, source, alt }: { readonly clicks: PhotoClicks; readonly source: string; readonly alt: string }) {
  const plane = planeOf(clicks.scale);
  if (!plane) return null;
  const shown = [...clicks.lengthEnds, ...(clicks.widthEnds ?? []), ...(clicks.scale.kind === 'rectangle' ? clicks.scale.corners : [clicks.scale.from, clicks.scale.to])].flatMap((point) => mapped(plane, point) ?? []);
  const [xs, ys] = [shown.map((point) => point.x), shown.map((point) => point.y)];
  const [x1, x2, y1, y2] = [Math.min(...xs), Math.max(...xs), Math.min(...ys), Math.max(...ys)];
  const spanMm = Math.max(x2 - x1, y2 - y1) * 1.3;
  if (!(spanMm > 0)) return null;
  const scale = boxPx / spanMm;
  const [left, top] = [(x1 + x2) / 2 - spanMm / 2, (y1 + y2) / 2 - spanMm / 2];
  const [a, b, c, d, e, f, g, h] = plane;
  // Millimetres to the box, after pixels to millimetres: rows of the product, written by columns for the style.
  const row1 = [a - left * g, b - left * h, c - left].map((value) => value * scale);
  const row2 = [d - top * g, e - top * h, f - top].map((value) => value * scale);
  const matrix = [row1[0], row2[0], 0, g, row1[1], row2[1], 0, h, 0, 0, 1, 0, row1[2], row2[2], 0, 1];
  const step = gridStep(spanMm);
  const lines = Array.from({ length: Math.ceil(spanMm / step) + 1 }, (_, index) => (Math.ceil(left / step) + index) * step);
  const across = Array.from({ length: Math.ceil(spanMm / step) + 1 }, (_, index) => (Math.ceil(top / step) + index) * step);
  const inBox = (point: { x: number; y: number }) => {
    const there = mapped(plane, point);
    return { x: ((there?.x ?? 0) - left) * scale, y: ((there?.y ?? 0) - top) * scale };
  };
  const [p, q] = clicks.lengthEnds.map(inBox);
  return (
    <figure className="min-w-0">
      <div className="relative overflow-hidden border border-edge bg-wash" style={{ width: boxPx, maxWidth: '100%', height: boxPx }}>
        <img src={source} alt={alt} className="absolute top-0 left-0 max-w-none origin-top-left" style={{ transform: `matrix3d(${matrix.map((value) => Number((value ?? 0).toPrecision(9))).join(',')})` }} />
        <svg viewBox={`0 0 ${boxPx} ${boxPx}`} className="absolute inset-0" width={boxPx} height={boxPx} aria-hidden="true">
          {lines.map((x) => <line key={`x${x}`} x1={(x - left) * scale} x2={(x - left) * scale} y1="0" y2={boxPx} stroke="#fcf9f3" strokeOpacity="0.45" strokeWidth="0.7" />)}
          {across.map((y) => <line key={`y${y}`} y1={(y - top) * scale} y2={(y - top) * scale} x1="0" x2={boxPx} stroke="#fcf9f3" strokeOpacity="0.45" strokeWidth="0.7" />)}
          {p && q ? <line x1={p.x} y1={p.y} x2={q.x} y2={q.y} stroke="#1c2430" strokeWidth="4" /> : null}
          {p && q ? <line x1={p.x} y1={p.y} x2={q.x} y2={q.y} stroke="#fcf9f3" strokeWidth="1.8" /> : null}
        </svg>
      </div>
      <figcaption className="pt-1.5 text-small text-second">Square-on, grid of {step} mm. A layer over the view copy: the original is never changed.</figcaption>
    </figure>
  );
}
