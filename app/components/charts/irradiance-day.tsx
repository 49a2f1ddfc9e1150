import { scaleLinear } from 'd3-scale';
import { line } from 'd3-shape';
import { Numbers } from '#app/components/ui/numbers.tsx';
import { timeAxis, hourStep } from '#app/components/burn-card/time-axis.ts';
import { clockWords } from '#app/components/burn-card/wall-clock.ts';
import { NumberTable, plainNumber } from './number-table.tsx';
import { ChartFrame, innerOf, PlotSvg, PlotText, XAxis, YAxis } from './plot.tsx';
import type { PlotBox } from './plot.tsx';
import { textWidthPx } from './text-width.ts';

interface Sample {
  readonly atUtc: string;
  readonly wm2: number;
}
export interface IrradianceDayData {
  readonly zone: string;
  readonly fromUtc: string;
  readonly toUtc: string;
  /** Clear-sky upper bound: no cloud, clean air. */
  readonly bound: readonly Sample[];
  /** Clear sky with the likely air of the place. */
  readonly likely?: readonly Sample[];
  /** Station or archive means, drawn as steps. */
  readonly measured?: readonly { readonly startUtc: string; readonly endUtc: string; readonly wm2: number }[];
  /** "Hulme field station, 14 km, 10-minute means" */
  readonly measuredName?: string;
  readonly sunlit?: readonly { readonly fromUtc: string; readonly toUtc: string }[];
}

/** Direct irradiance that counts as sunshine. [W/m²] WMO, Guide to Instruments and Methods of Observation, WMO-No. 8, sunshine duration. */
export const sunshineThresholdWm2 = 120;

const boundWords = 'clear-sky upper bound';

/** Direct irradiance through the window: bound dashed, measured as steps, sunlit minutes on a wash. */
export function IrradianceDay({ width, ...data }: IrradianceDayData & { readonly width: number }) {
  const box: PlotBox = { widthPx: width, heightPx: width < 400 ? 220 : 260, left: 36, right: 8, top: 20, bottom: 24 };
  const inner = innerOf(box);
  const axis = timeAxis(data.fromUtc, data.toUtc, data.zone, inner.x2 - inner.x1);
  const x = (utc: string) => inner.x1 + axis.x(utc);
  const most = Math.max(200, sunshineThresholdWm2, ...data.bound.map((one) => one.wm2), ...(data.measured ?? []).map((one) => one.wm2));
  const y = scaleLinear([0, most * 1.08], [inner.y2, inner.y1]).nice(4);
  const curve = line<Sample>((one) => x(one.atUtc), (one) => y(one.wm2));
  const step = axis.pxPerHour >= 90 ? 1 : hourStep(axis.pxPerHour, 48);
  const steps = (data.measured ?? []).map((one, index) => `${index === 0 ? 'M' : 'L'}${x(one.startUtc).toFixed(1)} ${y(one.wm2).toFixed(1)}H${x(one.endUtc).toFixed(1)}`).join('');
  const nameX = inner.x1 + (inner.x2 - inner.x1) * 0.08;
  const under = data.bound.filter((one) => x(one.atUtc) >= nameX - 4 && x(one.atUtc) <= nameX + textWidthPx(boundWords, 12) + 4).map((one) => y(one.wm2));
  return (
    <PlotSvg box={box} label={irradianceSentence(data)}>
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
      {data.measuredName && data.measured?.length ? <PlotText x={inner.x2} y={inner.y2 - 10} anchor="end">{data.measuredName}</PlotText> : null}
      <XAxis box={box} ticks={axis.hours.filter((hour) => hour.hour % step === 0).map((hour) => ({ at: inner.x1 + hour.x, text: `${String(hour.hour).padStart(2, '0')}:00` }))} />
    </PlotSvg>
  );
}

function irradianceSentence(data: IrradianceDayData): string {
  const most = Math.max(0, ...data.bound.map((one) => one.wm2));
  const measured = data.measured?.length ? ` Measured ${plainNumber(Math.min(...data.measured.map((one) => one.wm2)))} to ${plainNumber(Math.max(...data.measured.map((one) => one.wm2)))} W/m².` : ' No measured series.';
  return `Direct irradiance ${clockWords(data.fromUtc, data.zone)} to ${clockWords(data.toUtc, data.zone)}: clear-sky bound up to ${plainNumber(most)} W/m².${measured}`;
}

export function IrradianceDayFigure({ figure, title, note, ...data }: IrradianceDayData & { readonly figure?: string; readonly title: string; readonly note?: string }) {
  const measuredAt = (utc: string) => data.measured?.find((one) => one.startUtc <= utc && utc < one.endUtc);
  const likelyAt = new Map((data.likely ?? []).map((one) => [one.atUtc, one.wm2]));
  const rows = data.bound.filter((_, index) => data.bound.length <= 40 || index % Math.ceil(data.bound.length / 40) === 0);
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
          columns={[{ head: 'Clock' }, { head: 'Upper bound, W/m²', numeric: true }, { head: 'Likely, W/m²', numeric: true }, { head: 'Measured, W/m²', numeric: true }]}
          rows={rows.map((one) => {
            const measured = measuredAt(one.atUtc);
            const likely = likelyAt.get(one.atUtc);
            return [clockWords(one.atUtc, data.zone), Math.round(one.wm2), likely === undefined ? 'none' : Math.round(likely), measured ? Math.round(measured.wm2) : 'none'];
          })}
        />
      }
    />
  );
}
