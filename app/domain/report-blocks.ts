import type { ReportBlock, ReportFigure } from './report-document.ts';

/** Width of a printed figure and size of its words. [pt] */
export const printWidthPt = 499;
export const printTextPt = 8;

export const heading = (text: string): ReportBlock => ({ kind: 'heading', level: 1, text });
export const sub = (text: string): ReportBlock => ({ kind: 'heading', level: 2, text });
export const plain = (text: string): ReportBlock => ({ kind: 'text', text });
export const serif = (text: string): ReportBlock => ({ kind: 'text', text, voice: 'serif' });
export const small = (text: string): ReportBlock => ({ kind: 'text', text, voice: 'small' });

export function tableIf(caption: string, head: readonly string[], widths: readonly number[], rows: readonly (readonly string[])[]): ReportBlock[] {
  return rows.length === 0 ? [] : [{ kind: 'table', caption, head, widths, rows }];
}

/** Numbers the figures of a report in the order in which they stand; a figure that cannot be drawn takes no number. */
export class FigureCount {
  #next = 1;

  place(draw: (size: { readonly number: number; readonly width: number; readonly textSize: number }) => ReportFigure | null): ReportFigure[] {
    const figure = draw({ number: this.#next, width: printWidthPt, textSize: printTextPt });
    if (!figure) return [];
    this.#next += 1;
    return [figure];
  }
}
