import { roundLengthM } from '#app/domain/scale-drawing.ts';
import { SectionHeading } from '#app/components/ui/page-title.tsx';
import type { SimilarCaseView, WhereView } from '#app/domain/case-view.ts';

export interface WherePlanProps {
  readonly where: WhereView;
  readonly similar: readonly SimilarCaseView[];
  readonly caseNumber: number;
}

const sizePx = { width: 330, height: 220 } as const;
const leastSpanM = 20;

interface Pin {
  readonly number: number;
  readonly eastM: number;
  readonly northM: number;
}

/** This report and its neighbours on the same site, north up, with the way to the sun now. */
export function WherePlan({ where, similar, caseNumber }: WherePlanProps) {
  const pins = similar.flatMap(({ row, offM }): Pin[] => (offM && Math.hypot(offM.eastM, offM.northM) > 1.5 ? [{ number: row.number, ...offM }] : []));
  const spanM = Math.max(leastSpanM, where.accuracyM ?? 0, ...pins.map((pin) => Math.hypot(pin.eastM, pin.northM)));
  const pxPerM = (sizePx.height / 2 - 30) / spanM;
  return (
    <section aria-labelledby="where-heading">
      <SectionHeading id="where-heading" note={where.placeWords}>Where</SectionHeading>
      <svg viewBox={`0 0 ${sizePx.width} ${sizePx.height}`} width="100%" role="img" aria-label={sentence(where, pins, caseNumber)} className="block max-w-[440px]" fontSize="12">
        <rect x="0.5" y="0.5" width={sizePx.width - 1} height={sizePx.height - 1} className="fill-sheet stroke-edge" />
        <g transform={`translate(${sizePx.width / 2} ${sizePx.height / 2})`}>
          {where.sun.elevationDeg > 0 ? <SunWedge azimuthDeg={where.sun.azimuthDeg} /> : null}
          {where.markBearingDeg === null ? null : <MarkArrow bearingDeg={where.markBearingDeg} />}
          {where.accuracyM ? <circle r={where.accuracyM * pxPerM} className="fill-none stroke-second" strokeDasharray="4 3" /> : null}
          {pins.map((pin) => <PinMark key={pin.number} x={pin.eastM * pxPerM} y={-pin.northM * pxPerM} number={pin.number} />)}
          <PinMark x={0} y={0} number={caseNumber} here />
        </g>
        <ScaleBar pxPerM={pxPerM} />
        <path d={`M${sizePx.width - 18} 34V8m-5 7l5-8l5 8`} className="fill-none stroke-ink" strokeWidth="1.5" />
        <text x={sizePx.width - 18} y="48" textAnchor="middle" className="fill-ink">N</text>
      </svg>
      <p className="pt-1 text-small text-second">{sentence(where, pins, caseNumber)}</p>
    </section>
  );
}

function sentence(where: WhereView, pins: readonly Pin[], caseNumber: number): string {
  const sun = where.sun.elevationDeg > 0 ? `Blue wedge: sun now, ${where.sun.azimuthDeg.toFixed(1)}° true, ${where.sun.elevationDeg.toFixed(1)}° up.` : 'The sun is below the horizon now.';
  const others = pins.length === 0 ? '' : ` ${pins.map((pin) => `${pin.number} lies ${Math.round(Math.hypot(pin.eastM, pin.northM))} m off`).join(', ')}.`;
  const accuracy = where.accuracyM ? ` Dashed: accuracy of the pin, ${Math.round(where.accuracyM)} m.` : '';
  const mark = where.markBearingDeg === null ? '' : ` Brown: from the optic to the mark, ${Math.round(where.markBearingDeg)}°.`;
  return `Case ${caseNumber} at the centre, true north up. ${sun}${mark}${accuracy}${others}`;
}

/** Point at a distance along a bearing. [px] */
const towards = (bearingDeg: number, px: number): readonly [number, number] => [px * Math.sin((bearingDeg * Math.PI) / 180), -px * Math.cos((bearingDeg * Math.PI) / 180)];

function SunWedge({ azimuthDeg }: { readonly azimuthDeg: number }) {
  const [ax, ay] = towards(azimuthDeg - 7, 86);
  const [bx, by] = towards(azimuthDeg + 7, 86);
  return <path d={`M0 0L${ax.toFixed(1)} ${ay.toFixed(1)}L${bx.toFixed(1)} ${by.toFixed(1)}Z`} className="fill-clear" fillOpacity="0.6" />;
}

function MarkArrow({ bearingDeg }: { readonly bearingDeg: number }) {
  const [x, y] = towards(bearingDeg, 48);
  const [lx, ly] = towards(bearingDeg - 12, 38);
  const [rx, ry] = towards(bearingDeg + 12, 38);
  return <path d={`M0 0L${x.toFixed(1)} ${y.toFixed(1)}M${lx.toFixed(1)} ${ly.toFixed(1)}L${x.toFixed(1)} ${y.toFixed(1)}L${rx.toFixed(1)} ${ry.toFixed(1)}`} className="fill-none stroke-burn" strokeWidth="3" />;
}

function PinMark({ x, y, number, here = false }: { readonly x: number; readonly y: number; readonly number: number; readonly here?: boolean }) {
  return (
    <g transform={`translate(${x.toFixed(1)} ${y.toFixed(1)})`}>
      <circle r="5" className={here ? 'fill-ink' : 'fill-paper stroke-ink'} strokeWidth="1.8" />
      <rect x="8" y="4" width={9 + String(number).length * 7} height="18" className="fill-sheet stroke-ink" strokeWidth={here ? 1.8 : 1} />
      <text x="12.5" y="17.5" className={`fill-ink ${here ? 'font-semibold' : ''}`}>{number}</text>
    </g>
  );
}

function ScaleBar({ pxPerM }: { readonly pxPerM: number }) {
  const lengthM = roundLengthM(80 / pxPerM);
  const px = lengthM * pxPerM;
  const y = sizePx.height - 12;
  return <g><path d={`M10 ${y - 4}v8M10 ${y}h${px.toFixed(1)}M${(10 + px).toFixed(1)} ${y - 4}v8`} className="fill-none stroke-ink" strokeWidth="1.5" /><text x={16 + px} y={y + 4} className="fill-ink">{lengthM} m</text></g>;
}
