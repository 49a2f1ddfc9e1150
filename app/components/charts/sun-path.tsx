import { useId } from 'react';
import { scaleLinear } from 'd3-scale';
import { line } from 'd3-shape';
import { Numbers } from '#app/components/ui/numbers.tsx';
import { clockWords } from '#app/components/burn-card/wall-clock.ts';
import { NumberTable } from './number-table.tsx';
import { ChartFrame, HatchPattern, innerOf, PlotSvg, PlotText, XAxis, YAxis } from './plot.tsx';
import type { PlotBox } from './plot.tsx';
import { sunPathView } from './sun-path-view.ts';
import type { SunPathData, SunPathView } from './sun-path-view.ts';
import { textWidthPx } from './text-width.ts';

export interface SunPathProps extends SunPathData {
  readonly width: number;
}

/** Sun's path over the skyline, azimuth across and apparent altitude up, zoomed to the window. */
export function SunPath({ width, ...data }: SunPathProps) {
  const id = useId();
  const box: PlotBox = { widthPx: width, heightPx: width < 400 ? 250 : 330, left: 34, right: 10, top: 14, bottom: 24 };
  const inner = innerOf(box);
  const view = sunPathView(data);
  const x = scaleLinear([view.fromAz, view.toAz], [inner.x1, inner.x2]);
  const y = scaleLinear([view.lowest, view.highest], [inner.y2, inner.y1]);
  const path = line<{ az: number; alt: number }>((point) => x(point.az), (point) => y(point.alt));
  const xTicks = x.ticks(width < 400 ? 4 : 6).map((az) => ({ at: x(az), text: `${((az % 360) + 360) % 360}°${compass(az)}` }));
  return (
    <PlotSvg box={box} label={sunPathSentence(data)}>
      <defs>
        <HatchPattern id={`${id}h`} />
        <clipPath id={`${id}c`}><rect x={inner.x1} y={inner.y1} width={inner.x2 - inner.x1} height={inner.y2 - inner.y1} /></clipPath>
      </defs>
      <YAxis box={box} ticks={y.ticks(4).map((alt) => ({ at: y(alt), text: `${alt}°` }))} />
      <g clipPath={`url(#${id}c)`}>
        <Opening view={view} x={x} inner={inner} />
        {view.references.map((reference) => <path key={reference.label} d={path([...reference.points]) ?? ''} className="fill-none stroke-slate" strokeDasharray="2 4" />)}
        {view.skyline.length > 0 ? <Skyline view={view} x={x} y={y} floor={inner.y2} hatch={`url(#${id}h)`} /> : null}
        <path d={path([...view.day]) ?? ''} className="fill-none stroke-clear" strokeWidth="1.5" />
        <WindowBand view={view} path={path} />
      </g>
      <Required view={view} x={x} y={y} width={width} inner={inner} />
      <PathNames view={view} x={x} y={y} inner={inner} />
      {view.cursor ? <g><circle cx={x(view.cursor.az)} cy={y(view.cursor.alt)} r="7" className="fill-paper" /><circle cx={x(view.cursor.az)} cy={y(view.cursor.alt)} r="5" className="fill-clear" /></g> : null}
      <XAxis box={box} ticks={xTicks} />
    </PlotSvg>
  );
}

type Scale = (value: number) => number;
interface LayerProps {
  readonly view: SunPathView;
  readonly x: Scale;
  readonly y: Scale;
}
type Inner = ReturnType<typeof innerOf>;

function compass(az: number): string {
  const words: Record<number, string> = { 0: ' N', 90: ' E', 180: ' S', 270: ' W' };
  return words[((az % 360) + 360) % 360] ?? '';
}

function Opening({ view, x, inner }: Omit<LayerProps, 'y'> & { readonly inner: Inner }) {
  if (!view.opening) return null;
  const [left, right] = [x(view.opening.fromAz), x(view.opening.toAz)];
  return (
    <g className="stroke-clear" strokeDasharray="6 4">
      <rect x={left} y={inner.y1} width={Math.max(0, right - left)} height={inner.y2 - inner.y1} className="fill-clear" fillOpacity="0.06" stroke="none" />
      <line x1={left} x2={left} y1={inner.y1} y2={inner.y2} />
      <line x1={right} x2={right} y1={inner.y1} y2={inner.y2} />
    </g>
  );
}

function Skyline({ view, x, y, floor, hatch }: LayerProps & { readonly floor: number; readonly hatch: string }) {
  const top = view.skyline.map((point) => `${x(point.az).toFixed(1)} ${y(point.alt).toFixed(1)}`).join('L');
  const first = view.skyline[0];
  const last = view.skyline.at(-1);
  if (!first || !last) return null;
  const area = `M${x(first.az).toFixed(1)} ${floor}L${top}L${x(last.az).toFixed(1)} ${floor}Z`;
  return <g><path d={area} className="fill-wash" /><path d={area} fill={hatch} /><path d={`M${top}`} className="fill-none stroke-ink" strokeWidth="1.9" strokeLinejoin="round" /></g>;
}

function WindowBand({ view, path }: Pick<LayerProps, 'view'> & { readonly path: (points: { az: number; alt: number }[]) => string | null }) {
  return (
    <g strokeLinecap="butt" className="fill-none">
      <path d={path([...view.window.map((minute) => minute)]) ?? ''} className="stroke-card-edge" strokeWidth="11" />
      <path d={path([...view.window.map((minute) => minute)]) ?? ''} className="stroke-card" strokeWidth="10" />
      {view.stretches.map((stretch) => {
        const key = `${stretch.verdict}${stretch.points[0]?.az}`;
        if (stretch.verdict === 'sunlit') return <path key={key} d={path([...stretch.points]) ?? ''} className="stroke-slot" strokeWidth="5" strokeLinecap="round" />;
        return stretch.verdict === 'cannot-tell' ? <path key={key} d={path([...stretch.points]) ?? ''} className="stroke-slot" strokeWidth="4" strokeLinecap="round" strokeDasharray="0 7" /> : null;
      })}
    </g>
  );
}

function Required({ view, x, y, width, inner }: LayerProps & { readonly width: number; readonly inner: Inner }) {
  const need = view.required;
  if (!need || need.az < view.fromAz || need.az > view.toAz) return null;
  const [cx, cy] = [x(need.az), y(need.alt)];
  const rx = Math.max(5, Math.abs(x(need.az + need.azSigma) - cx));
  const ry = Math.max(5, Math.abs(y(need.alt + need.altSigma) - cy));
  const short = `mark needs ${(((need.az % 360) + 360) % 360).toFixed(1)}° ±${need.azSigma}`;
  const words = width < 400 ? short : `${short}, ${need.alt.toFixed(1)}° ±${need.altSigma}`;
  const half = textWidthPx(words, 12) / 2;
  const textX = Math.min(inner.x2 - half, Math.max(inner.x1 + half, cx));
  const textY = Math.max(inner.y1 + 12, cy - ry - 40);
  return (
    <g>
      <ellipse cx={cx} cy={cy} rx={rx} ry={ry} className="fill-none stroke-ink" strokeWidth="1.5" />
      <line x1={cx} x2={textX} y1={cy - ry} y2={textY + 4} className="stroke-second" />
      <PlotText x={textX} y={textY} anchor="middle">{words}</PlotText>
    </g>
  );
}

function PathNames({ view, x, y, inner }: LayerProps & { readonly inner: Inner }) {
  const visible = (point: { az: number; alt: number }) => point.az > view.fromAz && point.az < view.toAz && point.alt < view.highest && point.alt > view.lowest;
  const end = view.day.filter(visible).at(-1);
  return (
    <g>
      {view.skyline.flatMap((point) => (point.name && visible(point) && x(point.az) + 4 + textWidthPx(point.name, 12) < inner.x2 ? [<PlotText key={point.name} x={x(point.az) + 4} y={inner.y2 - 8}>{point.name}</PlotText>] : []))}
      {view.references.map((reference) => {
        const at = reference.points.filter(visible).at(-1);
        return at ? <PlotText key={reference.label} x={Math.min(inner.x2, x(at.az))} y={y(at.alt) - 5} anchor="end" tone="slate">{reference.label}</PlotText> : null;
      })}
      {end && view.dayLabel ? <PlotText x={Math.min(inner.x2, x(end.az))} y={y(end.alt) - 8} anchor="end" tone="clear" bold>{view.dayLabel}</PlotText> : null}
      {view.opening?.name ? <PlotText x={Math.max(inner.x1 + 4, x(view.opening.fromAz) + 4)} y={inner.y1 + 12} tone="clear">{view.opening.name}</PlotText> : null}
    </g>
  );
}

/** The figure in one sentence. */
export function sunPathSentence(data: SunPathData): string {
  const first = data.minutes[0];
  const last = data.minutes.at(-1);
  if (!first || !last) return 'No minute of the window was examined.';
  const said = (minute: typeof first) => `${clockWords(minute.atUtc, data.zone)} at ${minute.azimuthDeg.toFixed(1)}° and ${minute.apparentElevationDeg.toFixed(1)}° up`;
  const need = data.required ? ` The mark needs ${data.required.azimuthDeg.toFixed(1)}° and ${data.required.elevationDeg.toFixed(1)}° up.` : '';
  return `Sun from ${said(first)} to ${said(last)}.${need}`;
}

export interface SunPathFigureProps extends SunPathData {
  readonly figure?: string;
  readonly title: string;
  readonly note?: string;
}

/** Picture and numbers: every tenth minute and every change of result. */
export function SunPathFigure({ figure, title, note, ...data }: SunPathFigureProps) {
  const rows = data.minutes.filter((minute, index) => index % 10 === 0 || index === data.minutes.length - 1 || minute.verdict !== data.minutes[index - 1]?.verdict);
  const words = { sunlit: 'sunlit', 'not-sunlit': 'not sunlit', 'cannot-tell': "can't tell" } as const;
  return (
    <Numbers
      csv="sun-path"
      {...(figure ? { figure } : {})}
      title={title}
      {...(note ? { note } : {})}
      picture={<ChartFrame draw={(width) => <SunPath width={width} {...data} />} />}
      numbers={
        <NumberTable
          caption={title}
          columns={[{ head: 'Clock' }, { head: 'Azimuth, ° true', numeric: true }, { head: 'Altitude, ° apparent', numeric: true }, { head: 'Result' }]}
          rows={rows.map((minute) => [clockWords(minute.atUtc, data.zone), minute.azimuthDeg.toFixed(2), minute.apparentElevationDeg.toFixed(2), words[minute.verdict]])}
        />
      }
    />
  );
}
