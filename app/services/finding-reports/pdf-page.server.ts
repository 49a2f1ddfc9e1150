import { faces, printable } from './fonts.server.ts';
import type { Doc } from './fonts.server.ts';

/** A4 with the margins of the printed report. [pt] */
export const sheet = { width: 595.28, height: 841.89, left: 48, right: 48, top: 66, bottom: 66 } as const;
export const textWidthPt = sheet.width - sheet.left - sheet.right;
export const lowest = sheet.height - sheet.bottom;

export const inks = {
  ink: '#1c2430', second: '#48525e', hair: '#d5ccba', edge: '#857f70', card: '#0f4c4a', 'card-text': '#cfe3dc', pale: '#dee6dd', slot: '#f8edd6', burn: '#6b3a1e', clear: '#2f6b8f', paper: '#ffffff',
} as const;

export const roomLeft = (doc: Doc): number => lowest - doc.y;

/** Begins a new page unless this much room is left. */
export function keepTogether(doc: Doc, heightPt: number): void {
  if (roomLeft(doc) < Math.min(heightPt, lowest - sheet.top)) doc.addPage();
}

/** A line or a mark that carries no meaning of its own. */
export function artifact(doc: Doc, draw: () => void): void {
  doc.markContent('Artifact', { type: 'Layout' });
  draw();
  doc.endMarkedContent();
}

/** Running head, foot and page numbers, once all pages are there. */
export function drawRunningHeads(doc: Doc, words: { readonly running: string; readonly foot: string; readonly caution: string }): void {
  const { start, count } = doc.bufferedPageRange();
  for (let index = 0; index < count; index += 1) {
    doc.switchToPage(start + index);
    // Words below the margin would otherwise begin a page of their own.
    doc.page.margins.top = 0;
    doc.page.margins.bottom = 0;
    doc.markContent('Artifact', { type: 'Pagination' });
    doc.font(faces.strong).fontSize(8.5).fillColor(inks.ink);
    doc.text('Scorchline', sheet.left, 34, { width: 120, lineBreak: false });
    doc.font(faces.plain).text(printable(doc, words.running), sheet.left + 120, 34, { width: textWidthPt - 240, align: 'center', lineBreak: false });
    doc.text(`Page ${index + 1} of ${count}`, sheet.width - sheet.right - 120, 34, { width: 120, align: 'right', lineBreak: false });
    doc.moveTo(sheet.left, 50).lineTo(sheet.width - sheet.right, 50).lineWidth(1.5).strokeColor(inks.ink).stroke();
    doc.moveTo(sheet.left, sheet.height - 52).lineTo(sheet.width - sheet.right, sheet.height - 52).lineWidth(0.6).stroke();
    doc.fontSize(7).fillColor(inks.second).text(printable(doc, words.caution), sheet.left, sheet.height - 48, { width: textWidthPt, height: 20 });
    doc.text(printable(doc, words.foot), sheet.left, sheet.height - 27, { width: textWidthPt, lineBreak: false });
    doc.endMarkedContent();
  }
}
