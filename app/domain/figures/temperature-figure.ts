import type { FigureMark, FigurePoint, ReportFigure } from '#app/domain/report-document.ts';
import { secondsWords, temperatureSentence } from '#app/domain/temperature-curve.ts';
import type { TemperatureCurveData } from '#app/domain/temperature-curve.ts';
import { linear, roundTicks, roundTop, to2, xAxis, yAxis } from './plot.ts';
import { textWidth } from './text-size.ts';
import type { FigureOptions } from './window-figure.ts';

const [top, plotHeight, rowHeight] = [8, 132, 16];

/** Surface temperature under steady sun: middle line in its band, times of the outcomes as bars below. Null where no heat was computed. */
export function temperatureFigure(data: TemperatureCurveData, title: string, { number, width, textSize }: Omit<FigureOptions, 'zone'>): ReportFigure | null {
  const { points } = data;
  const last = points.at(-1);
  if (points.length < 2 || !last) return null;
  const box = { left: 34, top, right: width - 8, bottom: top + plotHeight };
  const longest = Math.max(1, ...points.map((point) => point.timeS));
  const hottest = roundTop(Math.max(100, ...points.map((point) => point.celsius.high)) * 1.02, 5);
  const x = linear([0, longest], [box.left, box.right]);
  const y = linear([0, hottest], [box.bottom, box.top]);
  const at = (timeS: number, celsius: number): FigurePoint => [to2(x(timeS)), to2(Math.min(box.bottom, y(celsius)))];
  const middleX = x(last.timeS * 0.5);
  const timed = (data.outcomes ?? []).filter((outcome) => outcome.timeS !== null);
  const marks: FigureMark[] = [
    ...yAxis(box, roundTicks(0, hottest, 5).map((value) => ({ at: y(value), text: String(value) })), textSize),
    { mark: 'area', points: [...points.map((point) => at(point.timeS, point.celsius.high)), ...points.toReversed().map((point) => at(point.timeS, point.celsius.low))], fill: 'clear', opacity: 0.16 },
    { mark: 'line', points: points.map((point) => at(point.timeS, point.celsius.mid)), ink: 'ink', widthPt: 1.5 },
    { mark: 'text', x: to2(middleX), y: to2(Math.min(box.bottom - 3, y(last.celsius.mid) + textSize + 6)), text: 'middle estimate', sizePt: textSize, anchor: 'middle', bold: true, bed: 'paper' },
    { mark: 'text', x: to2(middleX), y: to2(Math.max(box.top + textSize, y(last.celsius.high) + textSize + 3)), text: '5 to 95', sizePt: textSize, anchor: 'middle', ink: 'clear', bed: 'paper' },
    ...xAxis(box, roundTicks(0, longest, 6).map((value) => ({ at: x(value), text: String(value) })), textSize, 's'),
    ...timed.flatMap((outcome, index) => outcomeMarks(outcome, { y: box.bottom + textSize + 20 + index * rowHeight, x, longest, left: box.left, right: box.right, textSize })),
  ];
  return { kind: 'figure', number, title, alt: `${temperatureSentence(data)} An estimate for one steady spot, not a measurement.`, widthPt: width, heightPt: box.bottom + textSize + 9 + timed.length * rowHeight + (timed.length > 0 ? 8 : 0), marks };
}

interface Row {
  readonly y: number;
  readonly x: (timeS: number) => number;
  readonly longest: number;
  readonly left: number;
  readonly right: number;
  readonly textSize: number;
}

/** A bar from the lowest to the highest time with a diamond at the middle one; what lies beyond the axis is said in words. */
function outcomeMarks({ label, answer, timeS }: NonNullable<TemperatureCurveData['outcomes']>[number], { y, x, longest, left, right, textSize }: Row): FigureMark[] {
  if (!timeS) return [];
  const clip = (value: number) => x(Math.min(longest, value));
  const beyond = timeS.mid > longest;
  const [from, to, middle] = [clip(timeS.low), clip(timeS.high), clip(timeS.mid)];
  const words = `${label}, ${answer}${beyond ? `, ${secondsWords(timeS.mid)}` : ''}`;
  const fits = to + 8 + textWidth(words, textSize) < right;
  const before = from - 8 - textWidth(words, textSize) > left;
  return [
    { mark: 'line', points: [[to2(from), y], [to2(Math.max(to, from + 1)), y]], ink: 'burn', widthPt: 3.2 },
    ...(beyond ? [] : [{ mark: 'area', points: [[to2(middle), y - 3.6], [to2(middle + 3.6), y], [to2(middle), y + 3.6], [to2(middle - 3.6), y]], fill: 'ink' } satisfies FigureMark]),
    { mark: 'text', x: to2(fits ? to + 8 : before ? from - 8 : right), y: y + textSize * 0.35, text: words, sizePt: textSize, anchor: fits ? 'start' : 'end', bed: 'paper' },
  ];
}
