import { scaleLinear } from 'd3-scale';
import { useId } from 'react';
import { ChartFrame, HatchPattern, innerOf, PlotSvg, PlotText, XAxis, YAxis } from '#app/components/charts/plot.tsx';
import type { PlotBox } from '#app/components/charts/plot.tsx';
import { textWidthPx } from '#app/components/charts/text-width.ts';

export interface SunPathLine {
  readonly label: string;
  readonly points: readonly { readonly azimuthDeg: number; readonly elevationDeg: number }[];
}
interface SkylineFigureProps {
  readonly points: readonly { readonly azimuthDeg: number; readonly elevationDeg: number; readonly name: string; readonly isTree: boolean }[];
  readonly paths: readonly SunPathLine[];
}

const compass = ['N', 'NE', 'E', 'SE', 'S', 'SW', 'W', 'NW'] as const;

/** The skyline all round, with the sun's way on chosen days above or behind it. */
export function SkylineFigure(props: SkylineFigureProps) {
  return (
    <figure className="min-w-0 border-t-[1.5px] border-ink">
      <figcaption className="pt-1.5 pb-2 font-semibold">Skyline from the optic, and the sun’s way</figcaption>
      <ChartFrame widthsPx={[328, 640, 1160]} draw={(width) => <SkylinePlot width={width} {...props} />} />
      <p className="pt-1 text-axis text-second">Bearing from true north across, elevation up, straight between points and closed round the circle, as a run reads it. Trees are dotted.</p>
    </figure>
  );
}

function SkylinePlot({ width, points, paths }: SkylineFigureProps & { readonly width: number }) {
  const id = useId();
  const box: PlotBox = { widthPx: width, heightPx: width < 400 ? 210 : 270, left: 34, right: 10, top: 12, bottom: 24 };
  const inner = innerOf(box);
  const highest = Math.min(92, Math.max(30, ...points.map((point) => point.elevationDeg + 6), ...paths.flatMap((path) => path.points.map((point) => point.elevationDeg + 4))));
  // The side on which the sun culminates stands in the middle: north, south of the tropics.
  const middleDeg = culminatesNorth(paths) ? 0 : 180;
  const across = scaleLinear([middleDeg - 180, middleDeg + 180], [inner.x1, inner.x2]);
  const x = (azimuthDeg: number) => across(turned(azimuthDeg, middleDeg));
  const y = scaleLinear([0, highest], [inner.y2, inner.y1]);
  const sorted = points.toSorted((a, b) => turned(a.azimuthDeg, middleDeg) - turned(b.azimuthDeg, middleDeg));
  const [first, last] = [sorted[0], sorted.at(-1)];
  const [toEdge, fromEdge] = first && last ? [middleDeg + 180 - turned(last.azimuthDeg, middleDeg), turned(first.azimuthDeg, middleDeg) - middleDeg + 180] : [0, 0];
  const closing = first && last ? last.elevationDeg + (toEdge / Math.max(1e-9, toEdge + fromEdge)) * (first.elevationDeg - last.elevationDeg) : 0;
  const edge = y(Math.max(0, closing)).toFixed(1);
  const line = `M${inner.x1} ${edge}${sorted.map((point) => `L${x(point.azimuthDeg).toFixed(1)} ${y(Math.max(0, point.elevationDeg)).toFixed(1)}`).join('')}L${inner.x2} ${edge}`;
  const step = width < 400 ? 2 : 1;
  return (
    <PlotSvg box={box} label={`Skyline of ${points.length} points, up to ${Math.max(0, ...points.map((point) => point.elevationDeg)).toFixed(1)}°.`}>
      <defs><HatchPattern id={`${id}h`} /></defs>
      <YAxis box={box} ticks={y.ticks(4).map((value) => ({ at: y(value), text: `${value}°` }))} />
      {paths.map((path, index) => <Path key={path.label} path={path} x={x} y={y} middleDeg={middleDeg} place={index} highestDeg={highest} rightPx={inner.x2} />)}
      {sorted.length > 1 ? <path d={`${line}L${inner.x2} ${inner.y2}L${inner.x1} ${inner.y2}Z`} fill={`url(#${id}h)`} className="stroke-none" /> : null}
      {sorted.length > 1 ? <path d={line} className="fill-none stroke-ink" strokeWidth="1.9" /> : null}
      {sorted.map((point, index) => <circle key={index} cx={x(point.azimuthDeg)} cy={y(Math.max(0, point.elevationDeg))} r="2.6" className={point.isTree ? 'fill-paper stroke-ink' : 'fill-ink'} />)}
      {width < 400 ? null : highestOfName(sorted).map((point) => <PlotText key={point.name + point.azimuthDeg} x={x(point.azimuthDeg)} y={y(point.elevationDeg) - 11} anchor="middle">{point.name}</PlotText>)}
      <XAxis box={box} ticks={Array.from({ length: 9 }, (_unused, index) => ({ at: inner.x1 + (index / 8) * (inner.x2 - inner.x1), text: compass[(index + (middleDeg === 0 ? 4 : 0)) % 8] ?? '' })).filter((_tick, index) => index % step === 0)} />
    </PlotSvg>
  );
}

/** One label a name, over its highest point. */
function highestOfName<Point extends { readonly name: string; readonly elevationDeg: number }>(points: readonly Point[]): Point[] {
  return points.filter((point) => point.name !== '' && !points.some((other) => other.name === point.name && other.elevationDeg > point.elevationDeg));
}

type Scale = (value: number) => number;

/** A bearing in the half turns round the middle of the drawing. */
const turned = (azimuthDeg: number, middleDeg: number): number => middleDeg + ((((azimuthDeg - middleDeg + 180) % 360) + 360) % 360) - 180;

function culminatesNorth(paths: readonly SunPathLine[]): boolean {
  const tops = paths.map((path) => path.points.reduce((best, point) => (point.elevationDeg > best.elevationDeg ? point : best), { azimuthDeg: 180, elevationDeg: -90 }));
  return tops.filter((top) => top.azimuthDeg < 90 || top.azimuthDeg > 270).length * 2 > paths.length;
}

/** Broken where the path crosses the edge of the drawing, and below the horizon. The label keeps off those of the others. */
function Path({ path, x, y, middleDeg, place, highestDeg, rightPx }: { readonly path: SunPathLine; readonly x: Scale; readonly y: Scale; readonly middleDeg: number; readonly place: number; readonly highestDeg: number; readonly rightPx: number }) {
  const dashed = place > 0;
  const up = path.points.filter((point) => point.elevationDeg >= 0);
  const d = up.map((point, index) => {
    const before = up[index - 1];
    const broken = !before || Math.abs(turned(before.azimuthDeg, middleDeg) - turned(point.azimuthDeg, middleDeg)) > 180;
    return `${broken ? 'M' : 'L'}${x(point.azimuthDeg).toFixed(1)} ${y(point.elevationDeg).toFixed(1)}`;
  }).join('');
  const beside = besideTheTop(up, place, highestDeg, (point) => x(point.azimuthDeg));
  return (
    <g>
      <path d={d} className="fill-none stroke-clear" strokeWidth={dashed ? 1 : 2} {...(dashed ? { strokeDasharray: '5 4' } : {})} />
      {beside ? <PlotText x={Math.min(x(beside.azimuthDeg) + 6, rightPx - textWidthPx(path.label, 12))} y={y(beside.elevationDeg) - 4} tone="clear">{path.label}</PlotText> : null}
    </g>
  );
}

/** Shares of its own height up to which the label of a line may stand, for the day itself, June and December. */
const labelShares = [0.95, 0.92, 0.45];

/** The point right of the highest one where the label stands: lower for each further line, so that labels keep apart. */
function besideTheTop(points: SunPathLine['points'], place: number, highestDeg: number, x: (point: SunPathLine['points'][number]) => number): SunPathLine['points'][number] | null {
  const top = points.reduce<SunPathLine['points'][number] | null>((best, point) => (best && best.elevationDeg >= point.elevationDeg ? best : point), null);
  if (!top) return null;
  const wantedDeg = Math.min(highestDeg * (0.78 - 0.26 * place), top.elevationDeg * (labelShares[place] ?? 0.5));
  return points.filter((point) => x(point) >= x(top)).reduce((best, point) => (Math.abs(point.elevationDeg - wantedDeg) < Math.abs(best.elevationDeg - wantedDeg) ? point : best), top);
}
