import PDFDocument from 'pdfkit';
import type { ReportBlock, ReportDocument } from '#app/domain/report-document.ts';
import { faces, printable, registerFaces } from './fonts.server.ts';
import type { Doc } from './fonts.server.ts';
import { drawFigure } from './pdf-figure.server.ts';
import { artifact, drawRunningHeads, inks, keepTogether, sheet, textWidthPt } from './pdf-page.server.ts';
import { drawTable } from './pdf-table.server.ts';

type Structure = ReturnType<Doc['struct']>;

const footCaution = 'Estimates from the values entered. Not a certificate, design approval, legal cause, or proof that a place is safe. A not sunlit result is only as good as the bearing, time and skyline.';

/** The types of the library do not know this subset yet. */
const accessible: object = { subset: 'PDF/UA' };

/**
 * The printed file of a report: PDF 1.7 with a structure tree (ISO 32000-1, 14.8), language, title and alternative texts,
 * set up for PDF/UA-1. The same document always gives the same bytes: its date is the document's own, and nothing else
 * of the file depends on when or where it is made.
 */
export function renderPdf(report: ReportDocument): Promise<Uint8Array> {
  const date = new Date(report.dateUtc);
  const doc = new PDFDocument({
    size: 'A4',
    margins: { top: sheet.top, bottom: sheet.bottom, left: sheet.left, right: sheet.right },
    pdfVersion: '1.7',
    ...accessible,
    tagged: true,
    lang: report.language,
    displayTitle: true,
    bufferPages: true,
    info: { Title: `${report.title}. ${report.running}`, Author: 'Scorchline', Subject: report.subtitle, CreationDate: date, ModDate: date },
  });
  registerFaces(doc);
  const bytes = collect(doc);
  const root = doc.struct('Document');
  doc.addStructure(root);
  drawTitle(doc, root, report);
  for (const [index, block] of report.blocks.entries()) {
    if (block.kind === 'heading') keepTogether(doc, roomForHeading(report.blocks, index));
    drawBlock(doc, root, block);
  }
  drawRunningHeads(doc, { running: report.running, foot: report.foot, caution: footCaution });
  root.end();
  doc.end();
  return bytes;
}

function collect(doc: Doc): Promise<Uint8Array> {
  return new Promise((resolve, reject) => {
    const parts: Uint8Array[] = [];
    doc.on('data', (part: Uint8Array) => parts.push(part));
    doc.on('end', () => resolve(Buffer.concat(parts)));
    doc.on('error', reject);
  });
}

interface Look {
  readonly face: string;
  readonly size: number;
  readonly ink?: string;
  readonly before?: number;
  readonly after?: number;
  readonly indent?: number;
}

/** Words in the flow of the page; they may run on to the next one. */
function words(doc: Doc, parent: Structure, tag: string, text: string, look: Look): void {
  doc.y += look.before ?? 0;
  parent.add(
    doc.struct(tag, {}, [
      () => {
        doc.font(look.face).fontSize(look.size).fillColor(look.ink ?? inks.ink);
        doc.text(printable(doc, text), sheet.left + (look.indent ?? 0), doc.y, { width: textWidthPt - (look.indent ?? 0), lineGap: look.size * 0.2 });
      },
    ]),
  );
  doc.y += look.after ?? 0;
  doc.x = sheet.left;
}

function drawTitle(doc: Doc, root: Structure, report: ReportDocument): void {
  words(doc, root, 'H1', report.title, { face: faces.serif, size: 22, after: 2 });
  words(doc, root, 'P', report.subtitle, { face: faces.serif, size: 11, ink: inks.second, after: 10 });
}

/** A heading stays with what it heads: a figure whole, or the first lines of anything else. */
function roomForHeading(blocks: readonly ReportBlock[], index: number): number {
  let room = 0;
  for (const block of blocks.slice(index, index + 4)) {
    if (block.kind === 'figure') return room + block.heightPt + 40;
    if (block.kind !== 'heading' && !(block.kind === 'text' && block.voice === 'small')) return room + 50;
    room += block.kind === 'heading' ? 36 : 20;
  }
  return room;
}

function drawBlock(doc: Doc, root: Structure, block: ReportBlock): void {
  switch (block.kind) {
    case 'heading':
      if (block.level === 1) {
        doc.y += 10;
        const y = doc.y;
        artifact(doc, () => doc.moveTo(sheet.left, y).lineTo(sheet.left + textWidthPt, y).lineWidth(1.1).strokeColor(inks.ink).stroke());
      }
      return words(doc, root, block.level === 1 ? 'H2' : 'H3', block.text, block.level === 1 ? { face: faces.strong, size: 13, before: 4, after: 4 } : { face: faces.strong, size: 10, before: 6, after: 2 });
    case 'text':
      for (const paragraph of block.text.split(/\n{2,}/u).filter((part) => part.trim() !== '')) {
        keepTogether(doc, 30);
        words(doc, root, 'P', paragraph, block.voice === 'serif' ? { face: faces.serif, size: 10.5, after: 5 } : block.voice === 'small' ? { face: faces.plain, size: 8.5, ink: inks.second, after: 4 } : { face: faces.plain, size: 9.5, after: 4 });
      }
      return;
    case 'list':
      return drawList(doc, root, block.items);
    case 'facts':
      return drawTable(doc, root, { caption: 'Facts', head: [], widths: [1, 2.4], rows: block.rows.map((row) => [row.term, row.note ? `${row.value}\n${row.note}` : row.value]) });
    case 'table':
      if (block.rows.length === 0) return;
      return drawTable(doc, root, block);
    case 'caution':
      return drawCaution(doc, root, block.text);
    case 'figure': {
      keepTogether(doc, block.heightPt + 40);
      words(doc, root, 'P', `Fig. ${block.number}  ${block.title}`, { face: faces.serif, size: 10, before: 4, after: 4 });
      const top = doc.y;
      root.add(doc.struct('Figure', { alt: printable(doc, block.alt), bbox: [sheet.left, top, sheet.left + block.widthPt, top + block.heightPt] }, [() => drawFigure(doc, block, sheet.left, top)]));
      doc.x = sheet.left;
      doc.y = top + block.heightPt + 10;
    }
  }
}

function drawList(doc: Doc, root: Structure, items: readonly string[]): void {
  const list = doc.struct('L');
  root.add(list);
  for (const text of items) {
    keepTogether(doc, 24);
    const item = doc.struct('LI');
    list.add(item);
    const top = doc.y;
    item.add(
      doc.struct('Lbl', {}, [
        () => {
          doc.font(faces.plain).fontSize(9.5).fillColor(inks.ink).text('•', sheet.left, top, { lineBreak: false });
        },
      ]),
    );
    doc.y = top;
    words(doc, item, 'LBody', text, { face: faces.plain, size: 9.5, indent: 12, after: 3 });
    item.end();
  }
  list.end();
}

function drawCaution(doc: Doc, root: Structure, text: string): void {
  doc.font(faces.plain).fontSize(9.5);
  const height = doc.heightOfString(printable(doc, text), { width: textWidthPt - 14, lineGap: 1.9 });
  keepTogether(doc, height + 14);
  const top = doc.y + 4;
  artifact(doc, () => doc.rect(sheet.left, top, 4, height).fill(inks.ink));
  words(doc, root, 'P', text, { face: faces.plain, size: 9.5, indent: 14, before: 4, after: 8 });
}
