import { irradianceSentence, mostIrradianceWm2, sunshineThresholdWm2 } from '#app/domain/irradiance-day.ts';
import type { IrradianceDayData } from '#app/domain/irradiance-day.ts';
import { formatClock } from '#app/domain/local-time.ts';
import type { FigureMark, FigurePoint, ReportFigure } from '#app/domain/report-document.ts';
import { clockTicks, linear, roundTicks, roundTop, to2, xAxis, yAxis } from './plot.ts';
import { textWidth } from './text-size.ts';
import type { FigureOptions } from './window-figure.ts';

const [top, plotHeight] = [16, 132];
const boundWords = 'clear-sky upper bound';

/** Direct irradiance through the window: bound dashed, measured as steps, sunlit minutes on a wash. Null without any value. */
export function irradianceFigure(data: IrradianceDayData, { number, width, textSize, zone }: FigureOptions): ReportFigure | null {
  const { bound, likely = [], measured = [], sunlit = [] } = data;
  if (bound.length < 2 && measured.length === 0) return null;
  const box = { left: 34, top, right: width - 8, bottom: top + plotHeight };
  const [fromMs, toMs] = [Date.parse(data.fromUtc), Date.parse(data.toUtc)];
  const onAxis = linear([fromMs, toMs], [box.left, box.right]);
  const x = (utc: string) => Math.min(Math.max(onAxis(Date.parse(utc)), box.left), box.right);
  // The name of the steps stands above the highest of them.
  const most = roundTop(Math.max(mostIrradianceWm2(data) * 1.02, ...measured.map((one) => one.wm2 * 1.15)), 7);
  const y = linear([0, most], [box.bottom, box.top]);
  const at = (utc: string, wm2: number): FigurePoint => [to2(x(utc)), to2(y(wm2))];
  const curve = (samples: IrradianceDayData['bound']) => samples.map((one) => at(one.atUtc, one.wm2));
  const threshold = y(sunshineThresholdWm2);
  const marks: FigureMark[] = [
    ...sunlit.map((run): FigureMark => ({ mark: 'rect', x: to2(x(run.fromUtc)), y: box.top, width: to2(Math.max(2, x(run.toUtc) - x(run.fromUtc))), height: plotHeight, fill: 'hair', opacity: 0.5 })),
    ...sunlitWords(sunlit.map((run) => (x(run.fromUtc) + x(run.toUtc)) / 2), textSize),
    ...yAxis(box, roundTicks(0, most, 7).map((value) => ({ at: y(value), text: String(value) })), textSize),
    { mark: 'line', points: [[box.left, to2(threshold)], [box.right, to2(threshold)]], ink: 'second', widthPt: 0.8, dash: [1.5, 3] },
    ...(bound.length > 1 ? [{ mark: 'line', points: curve(bound), ink: 'clear', widthPt: 1.2, dash: [5, 3.5] } satisfies FigureMark] : []),
    ...(likely.length > 1 ? [{ mark: 'line', points: curve(likely), ink: 'clear', widthPt: 0.9 } satisfies FigureMark] : []),
    ...stepMarks(measured, at),
    { mark: 'text', x: box.right - 2, y: to2(threshold - 4), text: `${sunshineThresholdWm2} W/m², counted as sunshine`, sizePt: textSize, anchor: 'end', ink: 'second', bed: 'paper' },
    ...boundText(curve(bound), box, textSize),
    ...measuredText(data, at, box, textSize),
    ...xAxis(box, clockTicks(fromMs, toMs, zone, onAxis, textSize), textSize),
  ];
  return {
    kind: 'figure',
    number,
    title: 'Direct irradiance, square to the sun, before any glass; W/m²',
    alt: irradianceSentence(data, (utc) => formatClock(new Date(utc), zone)),
    widthPt: width,
    heightPt: box.bottom + textSize + 9,
    marks,
  };
}

/** Means as steps; a gap in the record is a gap in the line. */
function stepMarks(measured: NonNullable<IrradianceDayData['measured']>, at: (utc: string, wm2: number) => FigurePoint): FigureMark[] {
  const pieces: { endUtc: string; points: FigurePoint[] }[] = [];
  for (const { startUtc, endUtc, wm2 } of measured.toSorted((a, b) => a.startUtc.localeCompare(b.startUtc))) {
    const last = pieces.at(-1);
    const step = [at(startUtc, wm2), at(endUtc, wm2)];
    if (last && Date.parse(last.endUtc) === Date.parse(startUtc)) {
      last.points.push(...step);
      last.endUtc = endUtc;
    } else pieces.push({ endUtc, points: step });
  }
  return pieces.map(({ points }): FigureMark => ({ mark: 'line', points, ink: 'ink', widthPt: 1.5 }));
}

function sunlitWords(middles: readonly number[], textSize: number): FigureMark[] {
  const half = textWidth('sunlit', textSize) / 2;
  let free = -Infinity;
  return middles.flatMap((x): FigureMark[] => {
    if (x - half < free) return [];
    free = x + half + 4;
    return [{ mark: 'text', x: to2(x), y: top - 5, text: 'sunlit', sizePt: textSize, anchor: 'middle' }];
  });
}

function boundText(points: readonly FigurePoint[], box: { readonly left: number; readonly top: number; readonly right: number }, textSize: number): FigureMark[] {
  const x = box.left + (box.right - box.left) * 0.08;
  const under = points.filter(([px]) => px >= x - 4 && px <= x + textWidth(boundWords, textSize) + 4).map(([, py]) => py);
  return under.length > 0 ? [{ mark: 'text', x: to2(x), y: to2(Math.max(box.top + textSize + 1, Math.min(...under) - 6)), text: boundWords, sizePt: textSize, ink: 'clear', bed: 'paper' }] : [];
}

/** Above the highest step. */
function measuredText({ measured = [], measuredName }: IrradianceDayData, at: (utc: string, wm2: number) => FigurePoint, box: { readonly left: number; readonly right: number; readonly top: number }, textSize: number): FigureMark[] {
  const highest = measured.reduce<(typeof measured)[number] | null>((most, one) => (most === null || one.wm2 > most.wm2 ? one : most), null);
  if (!highest || !measuredName) return [];
  const half = textWidth(measuredName, textSize) / 2;
  const [from, y] = at(highest.startUtc, highest.wm2);
  const middle = (from + at(highest.endUtc, highest.wm2)[0]) / 2;
  return [{ mark: 'text', x: to2(Math.min(Math.max(middle, box.left + half + 2), box.right - half - 2)), y: to2(Math.max(box.top + textSize, y - 4)), text: measuredName, sizePt: textSize, anchor: 'middle', bed: 'paper' }];
}
