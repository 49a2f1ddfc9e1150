import { Numbers } from '#app/components/ui/numbers.tsx';
import { discWords, fluxSentence, halfSpanMm, scaleBarMm } from '#app/domain/flux-discs.ts';
import type { FluxDiscsData } from '#app/domain/flux-discs.ts';
import { plainNumber } from '#app/domain/plain-number.ts';
import { NumberTable } from './number-table.tsx';
import { ChartFrame, PlotSvg } from './plot.tsx';

export interface FluxDiscsProps extends FluxDiscsData {
  readonly width: number;
}

/** Averaging discs to scale over the rings of the flux map; each figure names its disc. */
export function FluxDiscs({ width, ...data }: FluxDiscsProps) {
  const side = width < 400 ? Math.min(190, width * 0.55) : 260;
  const box = { widthPx: width, heightPx: Math.max(side + 4, (data.discs.length + (data.track ? 1 : 0)) * 46 + 8), left: 0, right: 0, top: 0, bottom: 0 };
  const half = halfSpanMm(data);
  const px = (mm: number) => (mm / half) * (side / 2);
  const centre = side / 2 + 1;
  return (
    <PlotSvg box={box} label={fluxSentence(data)}>
      <rect x="1" y="1" width={side} height={side} className="fill-sheet stroke-edge" />
      <svg x="1" y="1" width={side} height={side} viewBox={`0 0 ${side} ${side}`}>
        <g transform={`translate(${side / 2} ${side / 2})`}>
          <g transform={`rotate(${-(data.lineTurnDeg ?? 0)})`}>
            <Rings data={data} px={px} side={side} />
            {data.discs.map((disc) => <DiscOutline key={`${disc.disc}${disc.centre}`} radiusPx={px(disc.diameterMm / 2)} line={data.focusKind === 'line'} side={side} />)}
          </g>
          <Track data={data} px={px} />
        </g>
      </svg>
      {data.edges ? <g className="fill-second"><text x="10" y="18">{data.edges.left}</text><text x={side - 8} y="18" textAnchor="end">{data.edges.right}</text></g> : null}
      <ScaleBar px={px} side={side} halfMm={half} />
      <Callouts data={data} px={px} centre={centre} side={side} width={width} />
    </PlotSvg>
  );
}

interface PartProps {
  readonly data: FluxDiscsData;
  readonly px: (mm: number) => number;
}

function Rings({ data, px, side }: PartProps & { readonly side: number }) {
  const rings = (data.rings ?? []).toSorted((a, b) => b.radiusMm - a.radiusMm);
  return (
    <g className="fill-burn">
      {rings.map((ring) => data.focusKind === 'line'
        ? <rect key={ring.fluxKwm2} x={-side} y={-px(ring.radiusMm)} width={2 * side} height={2 * px(ring.radiusMm)} fillOpacity="0.16" className="stroke-burn" strokeOpacity="0.5" />
        : <circle key={ring.fluxKwm2} r={px(ring.radiusMm)} fillOpacity="0.16" className="stroke-burn" strokeOpacity="0.5" />)}
    </g>
  );
}

function DiscOutline({ radiusPx, line, side }: { readonly radiusPx: number; readonly line: boolean; readonly side: number }) {
  const style = { className: 'fill-none stroke-ink', strokeWidth: 1.8 } as const;
  return line ? <rect x={-side} y={-radiusPx} width={2 * side} height={2 * radiusPx} {...style} /> : <circle r={Math.max(1.5, radiusPx)} {...style} />;
}

function Track({ data, px }: PartProps) {
  if (!data.track || data.track.points.length < 2) return null;
  return <path d={data.track.points.map(([right, up], index) => `${index === 0 ? 'M' : 'L'}${px(right).toFixed(1)} ${(-px(up)).toFixed(1)}`).join('')} className="fill-none stroke-ink" strokeWidth="1.5" strokeDasharray="5 4" />;
}

function ScaleBar({ px, side, halfMm }: { readonly px: (mm: number) => number; readonly side: number; readonly halfMm: number }) {
  const mm = scaleBarMm(halfMm);
  const y = side - 10;
  return (
    <g>
      <path d={`M10 ${y - 4}v8M10 ${y}h${px(mm)}M${10 + px(mm)} ${y - 4}v8`} className="fill-none stroke-ink" strokeWidth="1.5" />
      <text x={16 + px(mm)} y={y + 4} className="fill-ink">{mm} mm</text>
    </g>
  );
}

function Callouts({ data, px, centre, side, width }: PartProps & { readonly centre: number; readonly side: number; readonly width: number }) {
  const x = side + (width < 400 ? 18 : 40);
  return (
    <g>
      {data.discs.map((disc, index) => {
        const y = 24 + index * 46;
        const edge = Math.max(1.5, px(disc.diameterMm / 2)) * Math.SQRT1_2;
        return (
          <g key={`${disc.disc}${disc.centre}`}>
            <line x1={centre + edge} y1={centre - edge} x2={x - 4} y2={y - 4} className="stroke-second" />
            <text x={x} y={y} className="fill-ink font-semibold">{plainNumber(disc.fluxKwm2.mid)} kW/m²</text>
            <text x={x} y={y + 16} className="fill-second">{discWords(disc.disc)}</text>
          </g>
        );
      })}
      {data.track ? <text x={x} y={24 + data.discs.length * 46} className="fill-second">{data.track.words}</text> : null}
    </g>
  );
}

export function FluxDiscsFigure({ figure, title, note, ...data }: FluxDiscsData & { readonly figure?: string; readonly title: string; readonly note?: string }) {
  return (
    <Numbers
      csv="flux-discs"
      {...(figure ? { figure } : {})}
      title={title}
      {...(note ? { note } : {})}
      picture={<ChartFrame draw={(width) => <FluxDiscs width={width} {...data} />} />}
      numbers={
        <NumberTable
          caption={title}
          columns={[{ head: 'Averaged over' }, { head: 'Centred on' }, { head: 'Suns', numeric: true }, { head: 'kW/m²', numeric: true }, { head: '5 to 95', numeric: true }]}
          rows={data.discs.map((disc) => [
            `${discWords(disc.disc)}, ${plainNumber(disc.diameterMm)} mm`, disc.centre, plainNumber(disc.concentration.mid), plainNumber(disc.fluxKwm2.mid), `${plainNumber(disc.fluxKwm2.low)} to ${plainNumber(disc.fluxKwm2.high)}`,
          ])}
        />
      }
    />
  );
}
