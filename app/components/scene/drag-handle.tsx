import { useRef } from 'react';
import type { KeyboardEvent, PointerEvent } from 'react';

export interface DragHandleProps {
  /** Place in the drawing. */
  readonly x: number;
  readonly y: number;
  /** Side of the square, in units of the drawing. */
  readonly size: number;
  readonly label: string;
  /** What it stands at, read out while it moves. */
  readonly valueText: string;
  readonly valueNow: number;
  readonly chosen: boolean;
  /** Number or letter beside the square. */
  readonly mark?: string;
  readonly onChoose: () => void;
  /** To a place in the drawing. */
  readonly onMove: (x: number, y: number) => void;
  /** One step of the keyboard, right and down; ten with Shift. */
  readonly onStep: (right: number, down: number) => void;
  /** Before the first move of a drag or a key: the moment to remember what stood. */
  readonly onBegin?: () => void;
}

const steps: Readonly<Record<string, readonly [number, number]>> = { ArrowLeft: [-1, 0], ArrowRight: [1, 0], ArrowUp: [0, -1], ArrowDown: [0, 1] };

/** Place of a pointer in the coordinates of the drawing it is over. */
export function pointIn(element: SVGGraphicsElement | null, event: { readonly clientX: number; readonly clientY: number }): { x: number; y: number } | null {
  const matrix = element?.ownerSVGElement?.getScreenCTM() ?? (element instanceof SVGSVGElement ? element.getScreenCTM() : null);
  if (!matrix) return null;
  const point = new DOMPoint(event.clientX, event.clientY).matrixTransform(matrix.inverse());
  return { x: point.x, y: point.y };
}

/** A square that is dragged, or moved by the arrow keys once it has the focus. Filled when chosen. */
export function DragHandle({ x, y, size, label, valueText, valueNow, chosen, mark, onChoose, onMove, onStep, onBegin }: DragHandleProps) {
  const held = useRef(false);
  const begin = (event: PointerEvent<SVGGElement>) => {
    held.current = true;
    event.currentTarget.setPointerCapture(event.pointerId);
    onChoose();
    onBegin?.();
  };
  const move = (event: PointerEvent<SVGGElement>) => {
    const point = held.current ? pointIn(event.currentTarget, event) : null;
    if (point) onMove(point.x, point.y);
  };
  const press = (event: KeyboardEvent<SVGGElement>) => {
    const step = steps[event.key];
    if (!step) return;
    event.preventDefault();
    if (!event.repeat) onBegin?.();
    const factor = event.shiftKey ? 10 : 1;
    onStep(step[0] * factor, step[1] * factor);
  };
  return (
    <g
      role="slider"
      tabIndex={0}
      aria-label={label}
      aria-valuenow={Math.round(valueNow * 10) / 10}
      aria-valuetext={valueText}
      className="cursor-move touch-none outline-none [&:focus-visible>rect:last-of-type]:stroke-[4]"
      onPointerDown={begin}
      onPointerMove={move}
      onPointerUp={() => { held.current = false; }}
      onPointerCancel={() => { held.current = false; }}
      onKeyDown={press}
      onFocus={onChoose}
    >
      {/* A finger needs more room than the square shows. */}
      <rect x={x - size * 1.6} y={y - size * 1.6} width={size * 3.2} height={size * 3.2} fill="transparent" />
      <rect x={x - size / 2} y={y - size / 2} width={size} height={size} className={`stroke-ink ${chosen ? 'fill-ink' : 'fill-sheet'}`} strokeWidth="1.9" vectorEffect="non-scaling-stroke" />
      {mark ? <text x={x + size} y={y - size * 0.7} fontSize={size * 1.5} className="fill-ink stroke-paper font-semibold" strokeWidth={size * 0.4} paintOrder="stroke">{mark}</text> : null}
    </g>
  );
}
