import type { FigureMark, ReportFigure } from '#app/domain/report-document.ts';
import { faces, printable } from './fonts.server.ts';
import type { Doc } from './fonts.server.ts';
import { inks } from './pdf-page.server.ts';

/** Draws a figure with its upper left corner at x, y, as vectors. */
export function drawFigure(doc: Doc, figure: ReportFigure, x: number, y: number): void {
  doc.save();
  doc.translate(x, y);
  for (const mark of figure.marks) drawMark(doc, mark);
  doc.restore();
}

function drawMark(doc: Doc, mark: FigureMark): void {
  switch (mark.mark) {
    case 'line':
      polyline(doc, mark.points);
      doc.lineWidth(mark.widthPt).strokeColor(inks[mark.ink]);
      if (mark.dash) doc.dash(mark.dash[0], { space: mark.dash[1] });
      else doc.undash();
      doc.stroke();
      doc.undash();
      return;
    case 'area':
      polyline(doc, mark.points);
      doc.closePath();
      paint(doc, mark, mark.widthPt);
      return;
    case 'rect':
      if (mark.roundPt) doc.roundedRect(mark.x, mark.y, mark.width, mark.height, mark.roundPt);
      else doc.rect(mark.x, mark.y, mark.width, mark.height);
      paint(doc, mark, mark.widthPt);
      return;
    case 'dot':
      doc.circle(mark.x, mark.y, mark.radiusPt);
      paint(doc, mark, 1);
      return;
    case 'text':
      drawText(doc, mark);
  }
}

function polyline(doc: Doc, points: readonly (readonly [number, number])[]): void {
  for (const [index, [x, y]] of points.entries()) {
    if (index === 0) doc.moveTo(x, y);
    else doc.lineTo(x, y);
  }
}

function paint(doc: Doc, { fill, edge, opacity = 1 }: { readonly fill?: keyof typeof inks; readonly edge?: keyof typeof inks; readonly opacity?: number }, widthPt: number | undefined): void {
  doc.lineWidth(widthPt ?? 1);
  if (opacity < 1) doc.fillOpacity(opacity);
  if (fill && edge) doc.fillAndStroke(inks[fill], inks[edge]);
  else if (fill) doc.fill(inks[fill]);
  else if (edge) doc.stroke(inks[edge]);
  if (opacity < 1) doc.fillOpacity(1);
}

function drawText(doc: Doc, mark: Extract<FigureMark, { mark: 'text' }>): void {
  doc.font(mark.bold ? faces.strong : faces.plain).fontSize(mark.sizePt).fillColor(inks[mark.ink ?? 'ink']);
  const text = printable(doc, mark.text);
  const width = doc.widthOfString(text);
  const shift = mark.anchor === 'end' ? width : mark.anchor === 'middle' ? width / 2 : 0;
  if (mark.bed) doc.rect(mark.x - shift - 1.5, mark.y - mark.sizePt * 0.8, width + 3, mark.sizePt * 1.05).fill(inks[mark.bed]).fillColor(inks[mark.ink ?? 'ink']);
  // The words of a figure stand on their base line, as in the drawing on the screen.
  doc.text(text, mark.x - shift, mark.y, { lineBreak: false, baseline: 'alphabetic' });
}
