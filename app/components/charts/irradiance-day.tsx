import { scaleLinear } from 'd3-scale';
import { line } from 'd3-shape';
import { timeAxis, hourStep } from '#app/components/burn-card/time-axis.ts';
import { clockWords } from '#app/components/burn-card/wall-clock.ts';
import { Numbers } from '#app/components/ui/numbers.tsx';
import { irradianceColumns, irradianceRows, irradianceSentence, mostIrradianceWm2, sunshineThresholdWm2 } from '#app/domain/irradiance-day.ts';
import type { IrradianceDayData } from '#app/domain/irradiance-day.ts';
import { NumberTable } from './number-table.tsx';
import { ChartFrame, innerOf, PlotSvg, PlotText, XAxis, YAxis } from './plot.tsx';
import type { PlotBox } from './plot.tsx';
import { textWidthPx } from './text-width.ts';

interface Sample {
  readonly atUtc: string;
  readonly wm2: number;
}

const boundWords = 'clear-sky upper bound';

/** Direct irradiance through the window: bound dashed, measured as steps, sunlit minutes on a wash. */
export function IrradianceDay({ width, ...data }: IrradianceDayData & { readonly width: number }) {
  const box: PlotBox = { widthPx: width, heightPx: width < 400 ? 220 : 260, left: 36, right: 8, top: 20, bottom: 24 };
  const inner = innerOf(box);
  const axis = timeAxis(data.fromUtc, data.toUtc, data.zone, inner.x2 - inner.x1);
  const x = (utc: string) => inner.x1 + axis.x(utc);
  const y = scaleLinear([0, mostIrradianceWm2(data) * 1.08], [inner.y2, inner.y1]).nice(4);
  const curve = line<Sample>((one) => x(one.atUtc), (one) => y(one.wm2));
  const step = axis.pxPerHour >= 90 ? 1 : hourStep(axis.pxPerHour, 48);
  const measured = data.measured ?? [];
  // A gap in the record is left bare.
  const steps = measured.map((one, index) => `${measured[index - 1]?.endUtc === one.startUtc ? 'L' : 'M'}${x(one.startUtc).toFixed(1)} ${y(one.wm2).toFixed(1)}H${x(one.endUtc).toFixed(1)}`).join('');
  const last = measured.at(-1);
  const nameX = inner.x1 + (inner.x2 - inner.x1) * 0.08;
  const under = data.bound.filter((one) => x(one.atUtc) >= nameX - 4 && x(one.atUtc) <= nameX + textWidthPx(boundWords, 12) + 4).map((one) => y(one.wm2));
  return (
    <PlotSvg box={box} label={irradianceSentence(data, (utc) => clockWords(utc, data.zone))}>
      {(data.sunlit ?? []).map((run) => (
        <g key={run.fromUtc}>
          <rect x={x(run.fromUtc)} y={inner.y1} width={Math.max(2, x(run.toUtc) - x(run.fromUtc))} height={inner.y2 - inner.y1} className="fill-wash" />
          <text x={(x(run.fromUtc) + x(run.toUtc)) / 2} y={inner.y1 - 6} textAnchor="middle" className="fill-ink">sunlit</text>
        </g>
      ))}
      <YAxis box={box} ticks={y.ticks(4).map((value) => ({ at: y(value), text: String(value) }))} />
      <line x1={inner.x1} x2={inner.x2} y1={y(sunshineThresholdWm2)} y2={y(sunshineThresholdWm2)} className="stroke-second" strokeDasharray="1.5 3" />
      <path d={curve([...data.bound]) ?? ''} className="fill-none stroke-clear" strokeWidth="1.5" strokeDasharray="6 4" />
      {data.likely ? <path d={curve([...data.likely]) ?? ''} className="fill-none stroke-clear" strokeWidth="1.2" /> : null}
      {steps === '' ? null : <path d={steps} className="fill-none stroke-ink" strokeWidth="1.9" />}
      <PlotText x={inner.x2} y={y(sunshineThresholdWm2) - 5} anchor="end" tone="second">{sunshineThresholdWm2} W/m², counted as sunshine</PlotText>
      {under.length > 0 ? <PlotText x={nameX} y={Math.max(inner.y1 + 10, Math.min(...under) - 8)} tone="clear">{boundWords}</PlotText> : null}
      {data.measuredName && last ? <PlotText x={Math.min(x(last.endUtc) + 6, inner.x2 - textWidthPx(data.measuredName, 12))} y={x(last.endUtc) + 6 + textWidthPx(data.measuredName, 12) > inner.x2 ? y(last.wm2) - 8 : y(last.wm2) + 4}>{data.measuredName}</PlotText> : null}
      <XAxis box={box} ticks={axis.hours.filter((hour) => hour.hour % step === 0).map((hour) => ({ at: inner.x1 + hour.x, text: `${String(hour.hour).padStart(2, '0')}:00` }))} />
    </PlotSvg>
  );
}

export function IrradianceDayFigure({ figure, title, note, ...data }: IrradianceDayData & { readonly figure?: string; readonly title: string; readonly note?: string }) {
  return (
    <Numbers
      csv="irradiance"
      {...(figure ? { figure } : {})}
      title={title}
      {...(note ? { note } : {})}
      picture={<ChartFrame draw={(width) => <IrradianceDay width={width} {...data} />} />}
      numbers={
        <NumberTable
          caption={title}
          columns={irradianceColumns.map((head, index) => ({ head, numeric: index > 0 }))}
          rows={irradianceRows(data, (utc) => clockWords(utc, data.zone), 40)}
        />
      }
    />
  );
}
