import { plainNumber } from '#app/domain/plain-number.ts';
import type { FigureMark, FigurePoint, ReportFigure } from '#app/domain/report-document.ts';
import { spotReach, spotSentence } from '#app/domain/spot-distance.ts';
import type { SpotDistanceData } from '#app/domain/spot-distance.ts';
import { hatchLines } from './clip.ts';
import { linear, roundTicks, roundTop, to2, xAxis, yAxis } from './plot.ts';
import { textWidth } from './text-size.ts';
import type { FigureOptions } from './window-figure.ts';

const [top, plotHeight] = [18, 130];

/** The beam from the side: its width against distance from the optic, the mark, and where it is strong. Null where no beam was computed. */
export function spotDistanceFigure(data: SpotDistanceData, { number, width, textSize }: Omit<FigureOptions, 'zone'>): ReportFigure | null {
  const { points, dangerZone, markDistanceM, focusKind } = data;
  if (points.length < 2) return null;
  const { farM, widestMm } = spotReach(data);
  const box = { left: 34, top, right: width - 8, bottom: top + plotHeight };
  const half = roundTop(widestMm / 2, 4);
  const inMm = farM < 2;
  const x = linear([0, farM], [box.left, box.right]);
  const y = linear([-half, half], [box.bottom, box.top]);
  const sides = (sign: 1 | -1) => points.map((point): FigurePoint => [to2(x(point.distanceM)), to2(y((sign * point.diameterMm) / 2))]);
  const mark = markDistanceM ? x(markDistanceM) : null;
  const marks: FigureMark[] = [
    ...yAxis(box, roundTicks(-half, half, 4).map((value) => ({ at: y(value), text: plainNumber(Math.abs(value)) })), textSize),
    ...(dangerZone ? zoneMarks(dangerZone, { box, x, farM, textSize }) : []),
    { mark: 'area', points: [...sides(1), ...sides(-1).toReversed()], fill: 'clear', opacity: 0.18, edge: 'clear', widthPt: 0.9 },
    { mark: 'line', points: [[box.left, y(0)], [box.right, y(0)]], ink: 'second', widthPt: 0.7, dash: [6, 3] },
    ...(mark === null ? [] : [
      { mark: 'line', points: [[to2(mark), box.top], [to2(mark), box.bottom]], ink: 'burn', widthPt: 2.4 } satisfies FigureMark,
      { mark: 'text', x: to2(mark + (mark > box.right - 60 ? -5 : 5)), y: box.bottom - 5, text: 'mark', sizePt: textSize, anchor: mark > box.right - 60 ? 'end' : 'start', ink: 'burn', bold: true, bed: 'paper' } satisfies FigureMark,
    ]),
    ...xAxis(box, roundTicks(0, farM, 7).map((value) => ({ at: x(value), text: plainNumber(inMm ? value * 1000 : value) })), textSize, inMm ? 'mm' : 'm'),
  ];
  const what = focusKind === 'line' ? 'line' : 'spot';
  return {
    kind: 'figure',
    number,
    title: `Width of the ${what} against distance from the optic; upright, half of that width in mm`,
    alt: `${spotSentence(data)}${markDistanceM ? ` The mark lies at ${plainNumber(markDistanceM)} m.` : ''}`,
    widthPt: width,
    heightPt: box.bottom + textSize + 9,
    marks,
  };
}

interface Plotted {
  readonly box: { readonly left: number; readonly top: number; readonly right: number; readonly bottom: number };
  readonly x: (distanceM: number) => number;
  readonly farM: number;
  readonly textSize: number;
}

function zoneMarks({ thresholdKwm2, nearM, farM: zoneFarM }: NonNullable<SpotDistanceData['dangerZone']>, { box, x, farM, textSize }: Plotted): FigureMark[] {
  if (nearM >= farM) return [];
  const from = x(nearM);
  const to = Math.max(from + 2, x(Math.min(farM, zoneFarM)));
  const words = `${plainNumber(thresholdKwm2)} kW/m² and up, 5 mm disc`;
  const half = textWidth(words, textSize) / 2;
  return [
    ...hatchLines([[from, box.top], [to, box.top], [to, box.bottom], [from, box.bottom]], 6).map(([a, b]): FigureMark => ({ mark: 'line', points: [[to2(a[0]), to2(a[1])], [to2(b[0]), to2(b[1])]], ink: 'burn', widthPt: 0.35 })),
    { mark: 'text', x: to2(Math.min(box.right - half, Math.max(box.left + half, (from + to) / 2))), y: box.top - 5, text: words, sizePt: textSize, anchor: 'middle', ink: 'burn' },
  ];
}
