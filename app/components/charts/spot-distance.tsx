import { useId } from 'react';
import { scaleLinear } from 'd3-scale';
import { area } from 'd3-shape';
import { Numbers } from '#app/components/ui/numbers.tsx';
import { plainNumber } from '#app/domain/plain-number.ts';
import { spotReach, spotSentence } from '#app/domain/spot-distance.ts';
import type { SpotDistanceData } from '#app/domain/spot-distance.ts';
import { NumberTable } from './number-table.tsx';
import { ChartFrame, HatchPattern, innerOf, PlotSvg, PlotText, XAxis, YAxis } from './plot.tsx';
import type { PlotBox } from './plot.tsx';

/** The beam from the side: its width against distance from the optic, the mark, and where it is strong. */
export function SpotDistance({ width, ...data }: SpotDistanceData & { readonly width: number }) {
  const id = useId();
  const box: PlotBox = { widthPx: width, heightPx: width < 400 ? 220 : 240, left: 44, right: 10, top: 24, bottom: 40 };
  const inner = innerOf(box);
  const { farM: far, widestMm: widest } = spotReach(data);
  const inMm = far < 2;
  const x = scaleLinear([0, far], [inner.x1, inner.x2]);
  const y = scaleLinear([-widest / 2, widest / 2], [inner.y2, inner.y1]).nice(4);
  const shape = area<(typeof data.points)[number]>((point) => x(point.distanceM), (point) => y(-point.diameterMm / 2), (point) => y(point.diameterMm / 2));
  const zone = data.dangerZone;
  return (
    <PlotSvg box={box} label={spotSentence(data)}>
      <HatchPattern id={id} className="stroke-burn" />
      <YAxis box={box} ticks={y.ticks(4).map((value) => ({ at: y(value), text: plainNumber(Math.abs(value)) }))} />
      {zone ? <rect x={x(zone.nearM)} y={inner.y1} width={Math.max(2, x(Math.min(far, zone.farM)) - x(zone.nearM))} height={inner.y2 - inner.y1} fill={`url(#${id})`} fillOpacity="0.7" /> : null}
      <path d={shape([...data.points]) ?? ''} className="fill-clear stroke-clear" fillOpacity="0.18" strokeWidth="1.2" />
      <line x1={inner.x1} x2={inner.x2} y1={y(0)} y2={y(0)} className="stroke-second" strokeDasharray="8 3 2 3" />
      {zone ? <PlotText x={Math.min(inner.x2 - 60, Math.max(inner.x1 + 60, (x(zone.nearM) + x(Math.min(far, zone.farM))) / 2))} y={inner.y1 - 8} anchor="middle" tone="burn">{plainNumber(zone.thresholdKwm2)} kW/m² and up</PlotText> : null}
      {data.markDistanceM ? (
        <g>
          <line x1={x(data.markDistanceM)} x2={x(data.markDistanceM)} y1={inner.y1} y2={inner.y2} className="stroke-burn" strokeWidth="3" />
          <PlotText x={x(data.markDistanceM) + (data.markDistanceM > far * 0.7 ? -6 : 6)} y={inner.y2 - 8} anchor={data.markDistanceM > far * 0.7 ? 'end' : 'start'} tone="burn" bold>mark</PlotText>
        </g>
      ) : null}
      <XAxis box={box} ticks={x.ticks(width < 400 ? 4 : 6).map((value) => ({ at: x(value), text: plainNumber(inMm ? value * 1000 : value) }))} unit={inMm ? 'mm' : 'm'} />
      <text x={inner.x1} y={box.heightPx - 4} className="fill-second">from the optic; upright: half the {data.focusKind === 'line' ? 'line' : 'spot'} width, mm</text>
    </PlotSvg>
  );
}

export function SpotDistanceFigure({ figure, title, note, ...data }: SpotDistanceData & { readonly figure?: string; readonly title: string; readonly note?: string }) {
  return (
    <Numbers
      csv="spot-distance"
      {...(figure ? { figure } : {})}
      title={title}
      {...(note ? { note } : {})}
      picture={<ChartFrame draw={(width) => <SpotDistance width={width} {...data} />} />}
      numbers={<NumberTable caption={title} columns={[{ head: 'Distance, m' }, { head: data.focusKind === 'line' ? 'Line width, mm' : 'Spot, mm', numeric: true }, { head: 'Flux, kW/m²', numeric: true }]} rows={data.points.map((point) => [plainNumber(point.distanceM), plainNumber(point.diameterMm), plainNumber(point.fluxKwm2)])} />}
    />
  );
}
