import { formatIsoDay } from '#app/domain/local-time.ts';
import type { FigureMark, FigurePoint, ReportFigure } from '#app/domain/report-document.ts';
import { clockOfMinutes, litBands, plateGrid, plateHours, plateMonths, platePieces, plateSentence, spanPieces, yearStart } from '#app/domain/year-plate.ts';
import type { LitBand, YearPlateData } from '#app/domain/year-plate.ts';
import type { FigureBox } from './clip.ts';
import { to2 } from './plot.ts';
import { textWidth } from './text-size.ts';
import type { FigureOptions } from './window-figure.ts';

const [left, top, plotHeight] = [22, 6, 176];
const monthNames = ['Jan', 'Feb', 'Mar', 'Apr', 'May', 'Jun', 'Jul', 'Aug', 'Sep', 'Oct', 'Nov', 'Dec'] as const;

interface Plate {
  readonly data: YearPlateData;
  readonly at: (index: number, minute: number) => FigurePoint;
  readonly textSize: number;
  readonly width: number;
  readonly slots: readonly FigureBox[];
}

/** One year: day across, clock time down. Daylight dark, lighter where the sun reaches the optic, cut where it lands on the mark. Null without daylight. */
export function yearFigure(data: YearPlateData, { number, width, textSize }: Omit<FigureOptions, 'zone'>): ReportFigure | null {
  if (data.days.every((day) => day.riseMin === null)) return null;
  const { fromHour, toHour } = plateHours(data.days);
  const right = width - 2;
  const at = (index: number, minute: number): FigurePoint => [to2(left + (index / data.days.length) * (right - left)), to2(top + ((minute / 60 - fromHour) / (toHour - fromHour)) * plotHeight)];
  const hours = Array.from({ length: (toHour - fromHour) / 2 + 1 }, (_, index) => fromHour + index * 2);
  const bands = litBands(data);
  const plate: Plate = { data, at, textSize, width, slots: bands.map((band) => bandBox(band, at)) };
  const marks: FigureMark[] = [
    ...hours.map((hour): FigureMark => ({ mark: 'text', x: left - 5, y: to2(at(0, hour * 60)[1] + textSize * 0.35), text: String(hour).padStart(2, '0'), sizePt: textSize, anchor: 'end', ink: 'second' })),
    ...platePieces(data.days).map((piece): FigureMark => ({ mark: 'area', points: piece.map(([index, minute]) => at(index, minute)), fill: 'card' })),
    ...spanPieces(data.reach ?? [], yearStart(data)).map((piece): FigureMark => ({ mark: 'area', points: piece.map(([index, minute]) => at(index, minute)), fill: 'card-text', opacity: 0.3 })),
    ...plateGrid(data, hours).map(([from, to]): FigureMark => ({ mark: 'line', points: [at(...from), at(...to)], ink: 'edge', widthPt: 0.5 })),
    ...bands.flatMap((band) => cellMarks(band, plate)),
    ...bands.flatMap((band) => bandWords(band, plate)),
    ...plateMonths(data).map(({ month, from, to }): FigureMark => ({ mark: 'text', x: to2((at(from, 0)[0] + at(to, 0)[0]) / 2), y: top + plotHeight + textSize + 5, text: monthNames[month] ?? '', sizePt: textSize, anchor: 'middle', ink: 'second' })),
  ];
  return {
    kind: 'figure',
    number,
    title: `When this mark can be lit again: day and clock time, twelve months from ${formatIsoDay(data.days[0]?.on ?? '1970-01-01').split(' ').slice(1).join(' ')}`,
    alt: plateSentence(data, formatIsoDay),
    widthPt: width,
    heightPt: top + plotHeight + textSize + 9,
    marks,
  };
}

/** Slots with a charred rim, wide and tall enough to be seen. */
function cellMarks({ cells }: LitBand, { at }: Plate): FigureMark[] {
  const slots = cells.map((cell) => {
    const [[x1, y1], [x2, y2]] = [at(cell.index, cell.fromMin), at(cell.index + 1, cell.toMin)];
    return { x: x1, y: y1, width: Math.max(1.4, x2 - x1), height: Math.max(2.4, y2 - y1) };
  });
  return [
    ...slots.map((slot): FigureMark => ({ mark: 'rect', x: to2(slot.x - 0.9), y: to2(slot.y - 0.9), width: to2(slot.width + 1.8), height: to2(slot.height + 1.8), fill: 'burn' })),
    ...slots.map((slot): FigureMark => ({ mark: 'rect', x: slot.x, y: slot.y, width: to2(slot.width), height: to2(slot.height), fill: 'slot' })),
  ];
}

const shortDay = (on: string): string => formatIsoDay(on).replace(/ \d{4}$/u, '');

function bandBox({ cells, fromMin, toMin }: LitBand, at: Plate['at']): FigureBox {
  const [first, last] = [cells[0]?.index ?? 0, cells.at(-1)?.index ?? 0];
  const [[left, top], [right, bottom]] = [at(first, fromMin), at(last + 1, toMin)];
  return { left, top, right, bottom };
}

/** Between which heights there is daylight all along a stretch of the axis: light words are read nowhere else. */
function daylightAcross({ data, at }: Plate, fromX: number, toX: number): readonly [least: number, most: number] {
  const days = data.days.filter((_, index) => at(index + 1, 0)[0] >= fromX && at(index, 0)[0] <= toX);
  return [Math.max(top, ...days.map((day) => at(0, day.riseMin ?? 0)[1])), Math.min(top + plotHeight, ...days.map((day) => at(0, day.setMin ?? 1440)[1]))];
}

function bandWords(band: LitBand, plate: Plate): FigureMark[] {
  const { at, textSize, width } = plate;
  const days = band.firstOn === band.lastOn ? shortDay(band.firstOn) : `${band.firstOn.slice(0, 7) === band.lastOn.slice(0, 7) ? (shortDay(band.firstOn).split(' ')[0] ?? '') : shortDay(band.firstOn)} to ${shortDay(band.lastOn)}`;
  const times = `${clockOfMinutes(band.fromMin)} to ${clockOfMinutes(band.toMin)}`;
  const [first, last] = [band.cells[0], band.cells.at(-1)];
  if (!first || !last) return [];
  const room = Math.max(textWidth(days, textSize), textWidth(times, textSize));
  const rightwards = at(last.index + 1, 0)[0] + 26 + room < width - 20;
  const edge = rightwards ? at(last.index + 1, 0)[0] : at(first.index, 0)[0];
  const x = to2(edge + (rightwards ? 18 : -18));
  const under = at(0, band.toMin)[1];
  const [least, most] = daylightAcross(plate, rightwards ? x : x - room, rightwards ? x + room : x);
  const within = (y: number) => to2(Math.max(least + textSize + 2, Math.min(y, most - textSize * 1.7)));
  const [boxLeft, boxRight] = rightwards ? [x, x + room] : [x - room, x];
  const free = (y: number) => plate.slots.every((slot) => slot.right < boxLeft - 2 || slot.left > boxRight + 2 || slot.bottom < y - textSize || slot.top > y + textSize * 1.7);
  const y = [16, 26, 36, 46].map((down) => within(under + down)).find(free) ?? within(under + 16);
  const anchor = rightwards ? 'start' : 'end';
  return [
    { mark: 'line', points: [[to2(edge + (rightwards ? 2 : -2)), to2(under + 1)], [to2(x + (rightwards ? -2 : 2)), to2(y - 4)]], ink: 'card-text', widthPt: 0.8 },
    { mark: 'text', x, y, text: days, sizePt: textSize, anchor, ink: 'card-text', bold: true, bed: 'card' },
    { mark: 'text', x, y: to2(y + textSize * 1.3), text: times, sizePt: textSize, anchor, ink: 'card-text', bed: 'card' },
  ];
}
