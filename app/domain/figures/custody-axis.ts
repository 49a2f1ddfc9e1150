import { formatDay } from '#app/domain/local-time.ts';
import type { FigureMark } from '#app/domain/report-document.ts';
import type { FoldedScale } from './folded-scale.ts';
import { textWidth } from './text-size.ts';

interface AxisOptions {
  readonly textSize: number;
  readonly zone: string;
  readonly head: number;
  readonly height: number;
  readonly now: Date;
  readonly endWords: string;
  /** Days that are written before others where there is no room for all. */
  readonly first: readonly Date[];
}

interface Label {
  readonly at: Date;
  readonly x: number;
  readonly text: string;
  readonly left: number;
  readonly right: number;
}

/** Days along the head of the custody figure, folded stretches dotted, and the line of today through all items. */
export function custodyAxis(scale: FoldedScale, { textSize, zone, head, height, now, endWords, first }: AxisOptions): FigureMark[] {
  const y = head - textSize * 0.6;
  const isNow = (at: Date) => at.getTime() === now.getTime();
  const end = scale.stops.at(-1)?.x ?? 0;
  const labels = scale.stops.map(({ at, x }): Label => {
    const text = isNow(at) ? endWords : formatDay(at, zone).replace(/ \d{4}$/u, '');
    const width = textWidth(text, textSize);
    const left = Math.max(0, Math.min(x - width / 2, end + 4 - width));
    return { at, x, text, left, right: left + width };
  });
  const rank = ({ at }: Label) => (isNow(at) ? 0 : first.some((one) => one.getTime() === at.getTime()) ? 1 : 2);
  const placed: Label[] = [];
  for (const label of labels.toSorted((a, b) => rank(a) - rank(b))) {
    const gap = textSize * 0.6;
    if (placed.every((one) => one.text !== label.text && (label.left >= one.right + gap || label.right <= one.left - gap))) placed.push(label);
  }
  return [
    ...scale.folds.map((fold): FigureMark => ({ mark: 'line', points: [[fold.from + 2, y], [fold.to - 2, y]], ink: 'edge', widthPt: 1, dash: [1, 3] })),
    { mark: 'line', points: [[scale.x(now), y], [scale.x(now), height]], ink: 'clear', widthPt: 1.2 },
    ...placed.flatMap(({ at, x, text, left }): FigureMark[] => [
      { mark: 'line', points: [[x, y - 3], [x, y + 3]], ink: 'ink', widthPt: 1 },
      { mark: 'text', x: left, y: y - 5, text, sizePt: textSize, ink: isNow(at) ? 'clear' : 'ink' },
    ]),
    ...scale.folds.flatMap((fold): FigureMark[] => {
      const text = `${fold.days} days`;
      return fold.to - fold.from > textWidth(text, textSize) ? [{ mark: 'text', x: (fold.from + fold.to) / 2, y: y + textSize + 1, text, sizePt: textSize, anchor: 'middle', ink: 'second' }] : [];
    }),
  ];
}
