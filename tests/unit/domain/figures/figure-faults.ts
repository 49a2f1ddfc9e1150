import { textWidthPx } from '#app/components/charts/text-width.ts';
import type { FigureMark, FigurePoint, ReportFigure } from '#app/domain/report-document.ts';

/** Size for the tests: that of a printed report. [pt] */
export const size = { number: 1, width: 499, textSize: 8 } as const;

function corners(mark: FigureMark): FigurePoint[] {
  switch (mark.mark) {
    case 'line':
    case 'area':
      return [...mark.points];
    case 'rect':
      return [[mark.x, mark.y], [mark.x + mark.width, mark.y + mark.height]];
    case 'dot':
      return [[mark.x - mark.radiusPt, mark.y - mark.radiusPt], [mark.x + mark.radiusPt, mark.y + mark.radiusPt]];
    case 'text': {
      // Advance widths of the face, and its letters from base line to ascender and a little below.
      const width = textWidthPx(mark.text, mark.sizePt, mark.bold);
      const left = mark.x - (mark.anchor === 'end' ? width : mark.anchor === 'middle' ? width / 2 : 0);
      return [[left, mark.y - mark.sizePt * 0.75], [left + width, mark.y + mark.sizePt * 0.22]];
    }
  }
}

/** What stands outside the figure's own box, has words under 8 pt, or is no number; empty for a sound figure. */
export function faultsOf(figure: ReportFigure): string[] {
  const slack = 0.75;
  return figure.marks.flatMap((mark, index) => {
    const where = `${index} ${mark.mark}${mark.mark === 'text' ? ` "${mark.text}"` : ''}`;
    const outside = corners(mark).some(([x, y]) => !(x >= -slack && x <= figure.widthPt + slack && y >= -slack && y <= figure.heightPt + slack));
    return [...(outside ? [`${where} is outside: ${JSON.stringify(corners(mark))}`] : []), ...(mark.mark === 'text' && mark.sizePt < 8 ? [`${where} is too small`] : [])];
  });
}

export const textsOf = (figure: ReportFigure): string[] => figure.marks.flatMap((mark) => (mark.mark === 'text' ? [mark.text] : []));
export function drawn<Value>(value: Value | null | undefined): Value {
  if (value === null || value === undefined) throw new Error('Nothing was drawn.');
  return value;
}
