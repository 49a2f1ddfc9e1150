import { useId } from 'react';
import { scaleLinear } from 'd3-scale';
import { area, line } from 'd3-shape';
import { Numbers } from '#app/components/ui/numbers.tsx';
import { secondsWords, temperatureRows, temperatureSentence } from '#app/domain/temperature-curve.ts';
import type { TemperatureCurveData } from '#app/domain/temperature-curve.ts';
import { NumberTable } from './number-table.tsx';
import { ChartFrame, HatchPattern, innerOf, PlotSvg, PlotText, XAxis, YAxis } from './plot.tsx';
import type { PlotBox } from './plot.tsx';
import { textWidthPx } from './text-width.ts';

/** Surface temperature under steady sun: middle line in its band, published ranges hatched, outcomes as bars below. */
export function TemperatureCurve({ width, ...data }: TemperatureCurveData & { readonly width: number }) {
  const id = useId();
  const timed = (data.outcomes ?? []).filter((outcome) => outcome.timeS !== null);
  const narrow = width < 400;
  const rightPx = 14 + Math.max(0, ...(data.published ?? []).map((range) => Math.max(textWidthPx(range.label, 12), textWidthPx(rangeWords(range), 12))));
  const rowPx = narrow ? 34 : 20;
  const box: PlotBox = { widthPx: width, heightPx: (narrow ? 240 : 280) + timed.length * rowPx, left: 40, right: narrow ? 8 : rightPx, top: 12, bottom: 26 + timed.length * rowPx };
  const inner = innerOf(box);
  const longest = Math.max(1, ...data.points.map((point) => point.timeS));
  const hottest = Math.max(100, ...data.points.map((point) => point.celsius.high), ...(data.published ?? []).map((range) => range.toC));
  const x = scaleLinear([0, longest], [inner.x1, inner.x2]);
  const y = scaleLinear([0, hottest * 1.05], [inner.y2, inner.y1]).nice(4);
  const points = [...data.points];
  const band = area<(typeof points)[number]>((point) => x(point.timeS), (point) => y(point.celsius.low), (point) => y(point.celsius.high));
  const middle = line<(typeof points)[number]>((point) => x(point.timeS), (point) => y(point.celsius.mid));
  const last = points.at(-1);
  return (
    <PlotSvg box={box} label={temperatureSentence(data)}>
      <HatchPattern id={id} className="stroke-burn" />
      <YAxis box={box} ticks={y.ticks(4).map((value) => ({ at: y(value), text: String(value) }))} />
      <path d={band(points) ?? ''} className="fill-clear" fillOpacity="0.16" />
      {(data.published ?? []).map((range) => (
        <g key={range.label}>
          <rect x={inner.x1} y={y(range.toC)} width={inner.x2 - inner.x1} height={Math.max(3, y(range.fromC) - y(range.toC))} fill={`url(#${id})`} fillOpacity="0.8" />
          <PublishedWords range={range} narrow={narrow} x={narrow ? inner.x2 - 4 : inner.x2 + 6} y={(y(range.fromC) + y(range.toC)) / 2} />
        </g>
      ))}
      <path d={middle(points) ?? ''} className="fill-none stroke-ink" strokeWidth="1.9" />
      {last ? <PlotText x={x(last.timeS * 0.5)} y={y(last.celsius.mid) + 18} anchor="middle" bold>middle estimate</PlotText> : null}
      {last ? <PlotText x={x(last.timeS * 0.5)} y={Math.max(inner.y1 + 10, y(last.celsius.high) + 14)} anchor="middle" tone="clear">5 to 95</PlotText> : null}
      <XAxis box={box} ticks={x.ticks(narrow ? 4 : 5).map((value) => ({ at: x(value), text: String(value) }))} unit="s" />
      {timed.map((outcome, index) => <OutcomeBar key={outcome.label} outcome={outcome} y={inner.y2 + (narrow ? 48 : 34) + index * rowPx} x={x} longest={longest} inner={inner} narrow={narrow} />)}
    </PlotSvg>
  );
}

function rangeWords(range: NonNullable<TemperatureCurveData['published']>[number]): string {
  return `${range.fromC} to ${range.toC} °C${range.verified ? '' : ', unverified'}`;
}

function PublishedWords({ range, narrow, x, y }: { readonly range: NonNullable<TemperatureCurveData['published']>[number]; readonly narrow: boolean; readonly x: number; readonly y: number }) {
  const words = rangeWords(range);
  if (narrow) return <PlotText x={x} y={y + 4} anchor="end" tone="burn">{range.label}{range.verified ? '' : ', unverified'}</PlotText>;
  return <g><PlotText x={x} y={y - 2} tone="burn">{range.label}</PlotText><PlotText x={x} y={y + 14} tone="burn">{words}</PlotText></g>;
}

function OutcomeBar({ outcome, y, x, longest, inner, narrow }: { readonly narrow: boolean; readonly outcome: NonNullable<TemperatureCurveData['outcomes']>[number]; readonly y: number; readonly x: (value: number) => number; readonly longest: number; readonly inner: { readonly x1: number; readonly x2: number } }) {
  const time = outcome.timeS;
  if (!time) return null;
  const clip = (value: number) => Math.min(inner.x2, x(Math.min(longest, value)));
  const beyond = time.mid > longest;
  const after = clip(time.high);
  const words = `${outcome.label}, ${outcome.answer}${beyond ? `, ${secondsWords(time.mid)}` : ''}`;
  const wordsFit = after + 8 + textWidthPx(words, 12) < inner.x2 + 8;
  return (
    <g>
      <line x1={clip(time.low)} x2={after} y1={y} y2={y} className="stroke-burn" strokeWidth="4" />
      {beyond ? null : <path d={`M${clip(time.mid)} ${y - 4.5}l4.5 4.5-4.5 4.5-4.5-4.5Z`} className="fill-ink" />}
      {narrow ? <text x={inner.x1} y={y - 8} className="fill-ink">{words}</text> : <PlotText x={wordsFit ? after + 8 : Math.max(inner.x1, clip(time.low)) - 8} y={y + 4} anchor={wordsFit ? 'start' : 'end'}>{words}</PlotText>}
    </g>
  );
}

export function TemperatureCurveFigure({ figure, title, note, ...data }: TemperatureCurveData & { readonly figure?: string; readonly title: string; readonly note?: string }) {
  return (
    <Numbers
      csv="temperature"
      {...(figure ? { figure } : {})}
      title={title}
      {...(note ? { note } : {})}
      picture={<ChartFrame draw={(width) => <TemperatureCurve width={width} {...data} />} />}
      numbers={
        <div className="space-y-4">
          <NumberTable caption={title} columns={[{ head: 'After' }, { head: 'Middle, °C', numeric: true }, { head: '5 to 95, °C', numeric: true }]} rows={temperatureRows(data)} />
          {data.outcomes ? <NumberTable caption={`${title}: outcomes`} columns={[{ head: 'Outcome' }, { head: 'Answer' }, { head: 'Steady sun on one point', numeric: true }]} rows={data.outcomes.map((outcome) => [outcome.label, outcome.answer, outcome.timeS ? `${secondsWords(outcome.timeS.mid)} (${secondsWords(outcome.timeS.low)} to ${secondsWords(outcome.timeS.high)})` : 'no time'])} /> : null}
        </div>
      }
    />
  );
}
