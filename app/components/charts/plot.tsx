import type { ReactNode } from 'react';

/** Outer size and inner margins of a plot. [px] */
export interface PlotBox {
  readonly widthPx: number;
  readonly heightPx: number;
  readonly left: number;
  readonly right: number;
  readonly top: number;
  readonly bottom: number;
}

export function innerOf(box: PlotBox): { x1: number; x2: number; y1: number; y2: number } {
  return { x1: box.left, x2: box.widthPx - box.right, y1: box.top, y2: box.heightPx - box.bottom };
}

export interface ChartFrameProps {
  readonly draw: (widthPx: number) => ReactNode;
  /** Phone, column, wide column. [px] */
  readonly widthsPx?: readonly [number, number, number];
}

/** Draws a figure for three widths; the frame shows the widest that fits. A drawing may grow a little, and scrolls rather than shrink. */
export function ChartFrame({ draw, widthsPx = [328, 500, 640] }: ChartFrameProps) {
  const names = ['narrow', 'middle', 'wide'] as const;
  return (
    <div className="chart-frame" data-wide={widthsPx[2]}>
      {names.map((name, index) => {
        const px = widthsPx[index] ?? 328;
        return <div key={name} data-drawn={name} style={{ minWidth: index === 0 ? 286 : undefined, maxWidth: px * (index === 0 ? 1.5 : 1.25) }}>{draw(px)}</div>;
      })}
    </div>
  );
}

export interface PlotSvgProps {
  readonly box: PlotBox;
  readonly label: string;
  readonly children: ReactNode;
}

export function PlotSvg({ box, label, children }: PlotSvgProps) {
  return (
    <svg viewBox={`0 0 ${box.widthPx} ${box.heightPx}`} width="100%" role="img" aria-label={label} className="block overflow-visible" fontSize="12">
      {children}
    </svg>
  );
}

export interface AxisProps {
  readonly box: PlotBox;
  readonly ticks: readonly { readonly at: number; readonly text: string }[];
  /** Unit after the last figure. */
  readonly unit?: string;
}

/** Figures left of hairlines; the lowest line is the axis. */
export function YAxis({ box, ticks, unit = '' }: AxisProps) {
  const { x1, x2, y2 } = innerOf(box);
  return (
    <g>
      {ticks.map((tick) => (
        <g key={tick.at}>
          {Math.abs(tick.at - y2) < 0.5 ? null : <line x1={x1} x2={x2} y1={tick.at} y2={tick.at} className="stroke-hair" />}
          <text x={x1 - 6} y={tick.at + 4} textAnchor="end" className="fill-second">{tick.text}{unit}</text>
        </g>
      ))}
    </g>
  );
}

/** Axis line with ticks and figures under it; figures at the ends stay inside the drawing. */
export function XAxis({ box, ticks, unit = '' }: AxisProps) {
  const { x1, x2, y2 } = innerOf(box);
  return (
    <g>
      <line x1={x1} x2={x2} y1={y2} y2={y2} className="stroke-ink" strokeWidth="1.5" />
      {ticks.map((tick, index) => {
        const last = index === ticks.length - 1;
        return (
          <g key={tick.at}>
            <line x1={tick.at} x2={tick.at} y1={y2} y2={y2 + 4} className="stroke-ink" />
            <text x={tick.at} y={y2 + 17} textAnchor={last && tick.at > x2 - 24 ? 'end' : 'middle'} className="fill-second">{tick.text}{last && unit ? ` ${unit}` : ''}</text>
          </g>
        );
      })}
    </g>
  );
}

/** Diagonal lines for skylines, walls and published ranges. */
export function HatchPattern({ id, className = 'stroke-edge' }: { readonly id: string; readonly className?: string }) {
  return (
    <pattern id={id} width="6" height="6" patternUnits="userSpaceOnUse" patternTransform="rotate(45)">
      <line x1="0" x2="0" y1="0" y2="6" className={className} strokeWidth="1" />
    </pattern>
  );
}

/** Text with a bed of the page's ground, so that lines under it do not cut it. */
export function PlotText({ x, y, anchor = 'start', tone = 'ink', bold = false, children }: { readonly x: number; readonly y: number; readonly anchor?: 'start' | 'middle' | 'end'; readonly tone?: 'ink' | 'second' | 'clear' | 'burn' | 'slate'; readonly bold?: boolean; readonly children: ReactNode }) {
  const tones = { ink: 'fill-ink', second: 'fill-second', clear: 'fill-clear', burn: 'fill-burn', slate: 'fill-slate' } as const;
  return (
    <text x={x} y={y} textAnchor={anchor} className={`${tones[tone]} stroke-paper ${bold ? 'font-semibold' : ''}`} strokeWidth="4" strokeLinejoin="round" paintOrder="stroke">
      {children}
    </text>
  );
}
