import { faces, printable } from './fonts.server.ts';
import type { Doc } from './fonts.server.ts';
import { artifact, inks, lowest, sheet, textWidthPt } from './pdf-page.server.ts';

export interface PrintedTable {
  readonly caption: string;
  /** Empty for a list of facts, whose first column heads the row. */
  readonly head: readonly string[];
  /** Parts of the width, one a column. */
  readonly widths: readonly number[];
  readonly rows: readonly (readonly string[])[];
}

type Structure = ReturnType<Doc['struct']>;
const size = 8.5;
const gap = 8;
const padding = 3;

/** A table whose rows stay whole; its head comes again on each page, as decoration for those who read by structure. */
export function drawTable(doc: Doc, parent: Structure, table: PrintedTable): void {
  const total = table.widths.reduce((sum, width) => sum + width, 0);
  const columns = table.widths.map((width) => (width / total) * textWidthPt);
  const structure = doc.struct('Table', { title: printable(doc, table.caption) });
  parent.add(structure);
  if (table.head.length > 0) {
    const heights = heightsOf(doc, table.head, columns, faces.strong);
    if (doc.y + heights + 40 > lowest) doc.addPage();
    const head = doc.struct('THead');
    structure.add(head);
    drawRow(doc, { cells: table.head, columns, height: heights, bold: () => true, section: head, tag: () => ['TH', 'Column'] });
    rule(doc, 1.1, inks.ink);
  }
  const body = doc.struct('TBody');
  structure.add(body);
  for (const cells of table.rows) {
    const height = heightsOf(doc, cells, columns, faces.plain);
    if (doc.y + height + 6 > lowest) {
      doc.addPage();
      repeatHead(doc, table, columns);
    }
    const headed = table.head.length === 0;
    drawRow(doc, { cells, columns, height, bold: () => false, section: body, tag: (index) => (headed && index === 0 ? ['TH', 'Row'] : ['TD', null]), quietFirst: headed });
    rule(doc, 0.5, inks.hair);
  }
  structure.end();
  doc.y += 8;
  doc.x = sheet.left;
}

function heightsOf(doc: Doc, cells: readonly string[], columns: readonly number[], face: string): number {
  doc.font(face).fontSize(size);
  return Math.max(...cells.map((cell, index) => doc.heightOfString(printable(doc, cell) || ' ', { width: (columns[index] ?? 50) - gap }))) + padding * 2;
}

interface PrintedRow {
  readonly cells: readonly string[];
  readonly columns: readonly number[];
  readonly height: number;
  readonly bold: (index: number) => boolean;
  readonly section: Structure;
  readonly tag: (index: number) => readonly ['TH' | 'TD', 'Row' | 'Column' | null];
  readonly quietFirst?: boolean;
}

function drawRow(doc: Doc, row: PrintedRow): void {
  const structure = doc.struct('TR');
  row.section.add(structure);
  const top = doc.y;
  let x: number = sheet.left;
  for (const [index, cell] of row.cells.entries()) {
    const width = row.columns[index] ?? 50;
    const at = x;
    const [tag, scope] = row.tag(index);
    const draw = () => {
      doc.font(row.bold(index) ? faces.strong : faces.plain).fontSize(size).fillColor(row.quietFirst && index === 0 ? inks.second : inks.ink);
      doc.text(printable(doc, cell) || ' ', at, top + padding, { width: width - gap });
    };
    structure.add(scope ? doc.struct(tag, { scope }, [draw]) : doc.struct(tag, {}, [draw]));
    x += width;
  }
  structure.end();
  doc.y = top + row.height;
}

function repeatHead(doc: Doc, table: PrintedTable, columns: readonly number[]): void {
  if (table.head.length === 0) return;
  const top = doc.y;
  const height = heightsOf(doc, table.head, columns, faces.strong);
  artifact(doc, () => {
    let x: number = sheet.left;
    doc.font(faces.strong).fontSize(size).fillColor(inks.ink);
    for (const [index, cell] of table.head.entries()) {
      doc.text(printable(doc, cell), x, top + padding, { width: (columns[index] ?? 50) - gap });
      x += columns[index] ?? 50;
    }
  });
  doc.y = top + height;
  rule(doc, 1.1, inks.ink);
}

function rule(doc: Doc, widthPt: number, ink: string): void {
  const y = doc.y;
  artifact(doc, () => doc.moveTo(sheet.left, y).lineTo(sheet.left + textWidthPt, y).lineWidth(widthPt).strokeColor(ink).stroke());
}
