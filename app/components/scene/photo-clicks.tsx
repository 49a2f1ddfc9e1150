import { useRef, useState } from 'react';
import type { MouseEvent } from 'react';
import { pointLabels } from '#app/domain/photo-measure.ts';
import type { PointName } from '#app/domain/photo-measure.ts';
import { DragHandle, pointIn } from './drag-handle.tsx';

export const pointMarks: Record<PointName, string> = { a: '1', b: '2', c: '3', d: '4', p: 'A', q: 'B', r: 'C', s: 'D' };

export interface PhotoClicksProps {
  readonly source: string;
  readonly alt: string;
  readonly names: readonly PointName[];
  readonly active: PointName;
  readonly points: Readonly<Partial<Record<PointName, { readonly x: number; readonly y: number }>>>;
  readonly onActive: (name: PointName) => void;
  readonly onPoint: (name: PointName, x: number, y: number) => void;
}

/** The photo as taken, on which points are set by a click, dragged, or moved by the arrow keys. */
export function PhotoClicks({ source, alt, names, active, points, onActive, onPoint }: PhotoClicksProps) {
  const [size, setSize] = useState<{ width: number; height: number } | null>(null);
  const [zoom, setZoom] = useState(1);
  const svg = useRef<SVGSVGElement>(null);
  const set = (event: MouseEvent<SVGSVGElement>) => {
    // A click on a square is its own affair.
    if (event.target instanceof Element && event.target.closest('[role=slider]')) return;
    const point = pointIn(svg.current, event);
    if (point) onPoint(active, point.x, point.y);
  };
  const line = (from: PointName, to: PointName) => {
    const [a, b] = [points[from], points[to]];
    return a && b ? <g key={`${from}${to}`}><line x1={a.x} y1={a.y} x2={b.x} y2={b.y} stroke="#fcf9f3" strokeWidth="5" vectorEffect="non-scaling-stroke" /><line x1={a.x} y1={a.y} x2={b.x} y2={b.y} stroke="#1c2430" strokeWidth="1.9" vectorEffect="non-scaling-stroke" /></g> : null;
  };
  const rectangle = names.includes('c');
  return (
    <div className="min-w-0 space-y-3">
      <fieldset>
        <legend className="pb-1 font-semibold">Next click sets</legend>
        <div className="flex flex-wrap gap-2">
          {names.map((name) => <button key={name} type="button" aria-pressed={name === active} className="chip min-w-11" onClick={() => onActive(name)}>{pointMarks[name]}<span className="sr-only">, {pointLabels[name]}</span></button>)}
        </div>
        <p className="pt-1 text-small text-second">{pointLabels[active]}</p>
      </fieldset>
      <fieldset className="flex items-center gap-3">
        <legend className="sr-only">Size of the photo on the screen</legend>
        {[1, 2, 4].map((factor) => <button key={factor} type="button" aria-pressed={zoom === factor} className="chip" onClick={() => setZoom(factor)}>{factor}×</button>)}
      </fieldset>
      {/* A frame that scrolls must take the keyboard. */}
      {/* eslint-disable-next-line jsx-a11y/no-noninteractive-tabindex */}
      <div className="relative max-h-[80vh] overflow-auto border border-edge" role="region" aria-label="Photo as taken" tabIndex={0}>
        <div className="relative" style={{ width: `${zoom * 100}%` }}>
          <img src={source} alt={alt} className="block w-full" onLoad={(event) => setSize({ width: event.currentTarget.naturalWidth, height: event.currentTarget.naturalHeight })} ref={(image) => { if (image?.complete && image.naturalWidth > 0 && !size) setSize({ width: image.naturalWidth, height: image.naturalHeight }); }} />
          {size ? (
            <svg ref={svg} viewBox={`0 0 ${size.width} ${size.height}`} className="absolute inset-0 h-full w-full cursor-crosshair" role="group" aria-label="Points on the photo" onClick={set}>
              {rectangle ? [line('a', 'b'), line('b', 'c'), line('c', 'd'), line('d', 'a')] : line('a', 'b')}
              {line('p', 'q')}
              {line('r', 's')}
              {names.map((name) => {
                const point = points[name];
                return point ? (
                  <DragHandle key={name} x={point.x} y={point.y} size={size.width / 60 / zoom} label={pointLabels[name]} valueNow={point.x} valueText={`${Math.round(point.x)} right, ${Math.round(point.y)} down, in pixels`} mark={pointMarks[name]} chosen={name === active} onChoose={() => onActive(name)} onMove={(x, y) => onPoint(name, x, y)} onStep={(right, down) => onPoint(name, point.x + right, point.y + down)} />
                ) : null;
              })}
            </svg>
          ) : null}
        </div>
      </div>
    </div>
  );
}
