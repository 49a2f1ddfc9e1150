import type { ExamKind, HolderRole } from '#app/domain/evidence.ts';
import { examKindLabels, holderRoleLabels, isStored } from '#app/domain/evidence.ts';
import { formatDay } from '#app/domain/local-time.ts';
import type { FigureMark, ReportFigure } from '#app/domain/report-document.ts';
import { custodyAxis } from './custody-axis.ts';
import { foldedScale } from './folded-scale.ts';
import type { FoldedScale } from './folded-scale.ts';
import { textWidth } from './text-size.ts';

/** One item as the custody figure draws it: parts in the matter, never names. */
export interface CustodyLine {
  readonly code: string;
  readonly description: string;
  readonly seal: string;
  readonly holders: readonly { readonly role: HolderRole; readonly from: Date; readonly to: Date | null }[];
  readonly exams: readonly { readonly kind: ExamKind; readonly at: Date }[];
  /** Days of planned examinations that may alter the item. */
  readonly planned: readonly Date[];
}

export interface CustodyFigureOptions {
  readonly number: number;
  readonly width: number;
  readonly textSize: number;
  readonly zone: string;
  /** The line ends here, or at the last record where that is later. */
  readonly now: Date;
  /** Words at the end of the line; `today` on a page. */
  readonly endWords?: string;
}

/**
 * One line an item over folded days: thick in a person's hands, thin in a store, a tick with a foot at each hand-over,
 * a square for each examination, dashed while it is planned. Drawn from records that cannot have a gap between them; the
 * line ends at `now`, and a plan after it stands on bare ground.
 */
export function custodyFigure(lines: readonly CustodyLine[], { number, width, textSize, zone, now: asked, endWords = 'today' }: CustodyFigureOptions): ReportFigure {
  const recorded = lines.flatMap((line) => [...line.holders.map((holder) => holder.from), ...line.exams.map((exam) => exam.at)]);
  const now = new Date(Math.max(asked.getTime(), ...recorded.map((instant) => instant.getTime())));
  const planned = lines.flatMap((line) => line.planned);
  const instants = [...recorded, now, ...planned];
  const scale = foldedScale(instants, 4, width - 8);
  const head = textSize * 2.4;
  const row = textSize * 2 + 38;
  const height = head + lines.length * row + 4;
  return {
    kind: 'figure',
    number,
    title: 'Custody, one line an item',
    alt: `Custody of ${lines.length} ${lines.length === 1 ? 'item' : 'items'} without a gap. ${lines.map((line) => lineWords(line, zone)).join(' ')}`,
    widthPt: width,
    heightPt: height,
    marks: [...custodyAxis(scale, { textSize, zone, head, height, now, endWords, first: planned }), ...lines.flatMap((line, index) => itemMarks(line, scale, { top: head + index * row, row, textSize, width, now }))],
  };
}

function lineWords({ code, holders, exams, planned }: CustodyLine, zone: string): string {
  const held = holders.map((holder) => `${holderRoleLabels[holder.role]} from ${formatDay(holder.from, zone)}`).join(', ');
  const made = exams.map((exam) => `${examKindLabels[exam.kind].toLowerCase()} ${formatDay(exam.at, zone)}`);
  const examined = [...made, ...planned.map((at) => `planned, may alter the item, ${formatDay(at, zone)}`)].join(', ');
  return `${code}: ${held}${examined ? `; ${examined}` : ''}.`;
}

interface RowBox {
  readonly top: number;
  readonly row: number;
  readonly textSize: number;
  readonly width: number;
  readonly now: Date;
}

function itemMarks(line: CustodyLine, scale: FoldedScale, { top, row, textSize, width, now }: RowBox): FigureMark[] {
  const title = top + textSize * 2;
  const y = top + textSize * 2 + 25;
  const words = [line.description, line.seal].filter(Boolean).join(', ');
  const room = Math.floor((width - textWidth(line.code, textSize) - 24) / (textSize * 0.56));
  const marks: FigureMark[] = [
    { mark: 'text', x: 0, y: title, text: line.code, sizePt: textSize, bold: true },
    { mark: 'text', x: textWidth(line.code, textSize) + 10, y: title, text: words.length > room ? `${words.slice(0, Math.max(0, room - 3)).trimEnd()}…` : words, sizePt: textSize, ink: 'second' },
    { mark: 'line', points: [[0, top + row], [width, top + row]], ink: 'hair', widthPt: 0.8 },
  ];
  let free = -Infinity;
  for (const [index, holder] of line.holders.entries()) {
    const [x1, x2] = [scale.x(holder.from), scale.x(holder.to ?? now)];
    marks.push({ mark: 'line', points: [[x1, y], [x2, y]], ink: 'ink', widthPt: isStored(holder.role) ? 1.6 : 4 });
    marks.push({ mark: 'line', points: [[x1, y - 6], [x1, y + 6]], ink: 'ink', widthPt: 1.4 });
    if (index > 0) marks.push({ mark: 'line', points: [[x1 - 3, y + 6], [x1 + 3, y + 6]], ink: 'ink', widthPt: 1.4 });
    const label = holderRoleLabels[holder.role];
    if (x1 + 4 >= free && x1 + 4 + textWidth(label, textSize) <= width) {
      marks.push({ mark: 'text', x: x1 + 4, y: y - 9, text: label, sizePt: textSize });
      free = x1 + 4 + textWidth(label, textSize) + textSize * 0.5;
    }
  }
  return [...marks, ...line.exams.flatMap((exam) => examMarks(exam.kind, scale.x(exam.at), y)), ...line.planned.flatMap((at) => plannedMarks(scale.x(at), y))];
}

/** Small filled: looked at. Square in square: nothing altered. Square with a diagonal: may have altered it. */
function examMarks(kind: ExamKind, x: number, y: number): FigureMark[] {
  const square = (half: number, fill: 'ink' | 'paper'): FigureMark => ({ mark: 'rect', x: x - half, y: y - half, width: half * 2, height: half * 2, fill, edge: 'ink', widthPt: 1.4 });
  if (kind === 'visual') return [square(4, 'ink')];
  if (kind === 'non-destructive') return [square(6, 'paper'), square(2, 'ink')];
  return [square(6, 'paper'), { mark: 'line', points: [[x - 6, y + 6], [x + 6, y - 6]], ink: 'ink', widthPt: 1.4 }];
}

/** The square with a diagonal, dashed: planned, may alter. */
function plannedMarks(x: number, y: number): FigureMark[] {
  const corners = [[x - 6, y - 6], [x + 6, y - 6], [x + 6, y + 6], [x - 6, y + 6], [x - 6, y - 6]] as const;
  return [
    { mark: 'rect', x: x - 6, y: y - 6, width: 12, height: 12, fill: 'paper' },
    { mark: 'line', points: corners, ink: 'ink', widthPt: 1.4, dash: [3, 2] },
    { mark: 'line', points: [[x - 6, y + 6], [x + 6, y - 6]], ink: 'ink', widthPt: 1.4, dash: [3, 2] },
  ];
}
