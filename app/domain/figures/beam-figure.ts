import { beamAt, beamShape, extentOf, incomingRays, markHalfDrawn, targetFace } from '#app/domain/beam-shape.ts';
import type { BeamAt, BeamShape } from '#app/domain/beam-shape.ts';
import { beamSentence, planSight, sectionSight, sunlitTrail, sunWords } from '#app/domain/beam-words.ts';
import type { RunMinute } from '#app/domain/beam-words.ts';
import { formatClock } from '#app/domain/local-time.ts';
import type { FigureMark, FigurePoint, ReportFigure } from '#app/domain/report-document.ts';
import type { BeamMinuteView, BeamView } from '#app/domain/run-beam.ts';
import { metresWords, roundLengthM, scaleFrame } from '#app/domain/scale-drawing.ts';
import type { Flat, ScaleFrame, Sight } from '#app/domain/scale-drawing.ts';
import { clipArea, clipPath, hatchLines, isInside } from './clip.ts';
import type { FigureBox } from './clip.ts';
import { to2 } from './plot.ts';
import { textWidth } from './text-size.ts';
import type { FigureOptions } from './window-figure.ts';

/** Minute at which plan and section are drawn: the best one, or the middle of those that were worked out. */
export function drawnMinute(beam: BeamView, bestUtc: string | null): BeamMinuteView | null {
  return beam.minutes.find((minute) => minute.atUtc === bestUtc) ?? beam.minutes[Math.floor(beam.minutes.length / 2)] ?? null;
}

interface BeamSource {
  readonly beam: BeamView | null;
  readonly bestUtc: string | null;
  readonly minutes: readonly RunMinute[];
}

const gap = 14;
const marginPt = 22;

/** Section and plan side by side at one minute, each to its own scale. Null without an optic, or where no light meets it. */
export function beamFigure({ beam, bestUtc, minutes }: BeamSource, { number, width, textSize, zone }: FigureOptions): ReportFigure | null {
  const minute = beam && drawnMinute(beam, bestUtc);
  if (!beam || !minute) return null;
  const panelWidth = (width - gap) / 2;
  const sights = [sectionSight(beam), planSight];
  const views = sights.map((sight) => viewOf(beam, minute, sight));
  const heights = views.map((view) => scaleFrame(view.extent, panelWidth, { leastPx: 150, mostPx: 230, marginPx: marginPt }).heightPx);
  const height = Math.max(...heights);
  const top = textSize * 1.8;
  const names = [`Section along ${beam.sectionBearingDeg.toFixed(1)}°; up is up`, 'Plan; true north is up'];
  const panels = views.map((view, index): Panel => {
    const frame = scaleFrame(view.extent, panelWidth, { leastPx: height, mostPx: height, marginPx: marginPt });
    const left = index * (panelWidth + gap);
    return { ...view, frame, box: { left, top, right: left + panelWidth, bottom: top + height }, at: (point) => [left + frame.x(point[0]), top + frame.y(point[1])], beam, trail: sunlitTrail(beam, minutes, view.sight), textSize };
  });
  const clock = formatClock(new Date(minute.atUtc), zone);
  return {
    kind: 'figure',
    number,
    title: `Section and plan with the beam at ${clock}, each to its own scale`,
    alt: `Section and plan at ${clock}: ${sunWords(minute)}. ${beamSentence(beam, minute)}`,
    widthPt: width,
    heightPt: top + height + 2,
    marks: panels.flatMap((panel, index): FigureMark[] => [
      { mark: 'text', x: panel.box.left, y: textSize, text: names[index] ?? '', sizePt: textSize, bold: true },
      ...panelMarks(panel, sunWords(minute)),
      ...(index === 1 ? northMarks(panel) : []),
    ]),
  };
}

interface View {
  readonly sight: Sight;
  readonly shape: BeamShape;
  readonly light: BeamAt | null;
  readonly extent: readonly Flat[];
}
interface Panel extends View {
  readonly beam: BeamView;
  readonly frame: ScaleFrame;
  readonly box: FigureBox;
  readonly at: (point: Flat) => FigurePoint;
  readonly trail: readonly Flat[];
  readonly textSize: number;
}

function viewOf(beam: BeamView, minute: BeamMinuteView, sight: Sight): View {
  const shape = beamShape(beam, sight);
  const light = beamAt(beam, minute, sight);
  return { sight, shape, light, extent: extentOf(shape, beam, light) };
}

const rounded = (points: readonly FigurePoint[]): FigurePoint[] => points.map(([x, y]): FigurePoint => [to2(x), to2(y)]);

function lines(points: readonly FigurePoint[], box: FigureBox, style: { readonly ink: 'ink' | 'burn' | 'clear'; readonly widthPt: number; readonly dash?: readonly [number, number] }): FigureMark[] {
  return clipPath(points, box).map((piece): FigureMark => ({ mark: 'line', points: rounded(piece), ...style }));
}

function panelMarks(panel: Panel, sun: string): FigureMark[] {
  const { light, shape, box, at, trail } = panel;
  const spot = light?.spot ? at(light.spot) : null;
  return [
    ...(light ? lightMarks(panel, light) : []),
    ...targetMarks(panel),
    ...opticMarks(shape, panel),
    ...(trail.length > 1 ? lines(trail.map(at), box, { ink: 'burn', widthPt: 3 }) : []),
    ...(spot && isInside(spot, box) ? [dot(spot, 4.6, 'paper'), dot(spot, 3.2, 'clear')] : []),
    ...markWords(panel),
    ...(light ? [sunText(panel, light, sun)] : []),
    ...scaleMarks(panel),
  ];
}

const dot = ([x, y]: FigurePoint, radiusPt: number, fill: 'paper' | 'clear'): FigureMark => ({ mark: 'dot', x: to2(x), y: to2(y), radiusPt, fill });

/** Light that comes in, parallel, and the beam beyond: its outline holds four fifths of the light. */
function lightMarks({ shape, frame, box, at }: Panel, light: BeamAt): FigureMark[] {
  const outline = light.envelope.map(at);
  const [first] = outline;
  const inside = clipArea(outline, box);
  const farM = (frame.widthPx + frame.heightPx) / frame.pxPerM;
  return [
    ...(inside.length > 2 ? [{ mark: 'area', points: rounded(inside), fill: 'clear', opacity: 0.2 } satisfies FigureMark] : []),
    ...(first ? lines([...outline, first], box, { ink: 'clear', widthPt: 0.7 }) : []),
    ...lines(light.axis.map(at), box, { ink: 'clear', widthPt: 0.9, dash: [7, 3] }),
    ...incomingRays(shape, light, farM).flatMap((ray) => lines(ray.map(at), box, { ink: 'clear', widthPt: 0.7 })),
  ];
}

function opticMarks(shape: BeamShape, { frame, box, at }: Panel): FigureMark[] {
  const body = clipArea(shape.body.map(at), box);
  const [first] = shape.body.map(at);
  const ball = shape.ball && { centre: at(shape.ball.centre), radiusPt: Math.max(2, shape.ball.radiusM * frame.pxPerM) };
  return [
    ...(ball ? [{ mark: 'dot', x: to2(ball.centre[0]), y: to2(ball.centre[1]), radiusPt: to2(ball.radiusPt), fill: 'hair', opacity: 0.45, edge: 'ink' } satisfies FigureMark] : []),
    ...(body.length > 2 ? [{ mark: 'area', points: rounded(body), fill: 'hair', opacity: 0.45 } satisfies FigureMark] : []),
    ...(first ? lines([...shape.body.map(at), first], box, { ink: 'ink', widthPt: 1.4 }) : []),
    ...shape.lines.flatMap((line) => lines(line.map(at), box, { ink: 'ink', widthPt: 1.4 })),
  ];
}

/** The surface that was hit: hatched behind its face, drawn a little way to both sides of the mark. */
function targetMarks({ beam, shape, frame, box, at }: Panel): FigureMark[] {
  const { mark } = shape;
  if (!mark) return [];
  const lengthMm = beam.mark?.lengthMm ?? null;
  const target = targetFace(shape, lengthMm, frame, { leastHalf: 46, thick: 7 });
  if (!target) {
    const [x, y] = at(mark);
    return [{ mark: 'dot', x: to2(x), y: to2(y), radiusPt: to2(Math.max(4, Math.min(markHalfDrawn(lengthMm, frame), 26))), fill: 'burn', opacity: 0.25, edge: 'burn' }];
  }
  const placed = ([x, y]: Flat): FigurePoint => [box.left + x, box.top + y];
  const material = clipArea([target.face[0], target.face[1], target.back[1], target.back[0]].map(placed), box);
  return [
    ...hatchLines(material, 3.5).flatMap((line) => lines(line, box, { ink: 'burn', widthPt: 0.6 })),
    ...lines(target.face.map(placed), box, { ink: 'burn', widthPt: 1.5 }),
    ...lines(target.mark.map(placed), box, { ink: 'burn', widthPt: 4.5 }),
  ];
}

function markWords({ shape, frame, box, at, textSize }: Panel): FigureMark[] {
  if (!shape.mark) return [];
  const [x, y] = at(shape.mark);
  const left = x - box.left > frame.widthPx * 0.72;
  return [{ mark: 'text', x: to2(x + (left ? -10 : 10)), y: to2(Math.min(box.bottom - textSize * 2.4, y + textSize * 2.2)), text: 'mark', sizePt: textSize, anchor: left ? 'end' : 'start', ink: 'burn', bold: true, bed: 'paper' }];
}

/** The sun's place in words, in the corner from which the light comes in. */
function sunText({ box, textSize }: Panel, { towardsSun: [across, up] }: BeamAt, text: string): FigureMark {
  return { mark: 'text', x: across < 0 ? box.left + 2 : box.right - 2, y: up >= 0 ? box.top + textSize + 2 : box.bottom - textSize * 2.6, text, sizePt: textSize, anchor: across < 0 ? 'start' : 'end', ink: 'clear', bold: true, bed: 'paper' };
}

function scaleMarks({ frame, box, textSize }: Panel): FigureMark[] {
  const lengthM = roundLengthM(80 / frame.pxPerM);
  const [x, y, length] = [box.left + 4, box.bottom - 6, lengthM * frame.pxPerM];
  const tick = (at: number): FigureMark => ({ mark: 'line', points: [[to2(at), y - 3], [to2(at), y + 3]], ink: 'ink', widthPt: 1.1 });
  return [{ mark: 'line', points: [[x, y], [to2(x + length), y]], ink: 'ink', widthPt: 1.1 }, tick(x), tick(x + length), { mark: 'text', x: to2(x + length + 5), y: y + 3, text: metresWords(lengthM), sizePt: textSize, bed: 'paper' }];
}

/** In the corner that the light leaves free. */
function northMarks({ box, light, textSize }: Panel): FigureMark[] {
  const half = textWidth('N', textSize) / 2;
  const x = light && light.towardsSun[0] >= 0 && light.towardsSun[1] >= 0 ? box.left + half + 6 : box.right - half - 6;
  return [
    { mark: 'line', points: [[x, box.top + 26], [x, box.top + 4]], ink: 'ink', widthPt: 1.1 },
    { mark: 'line', points: [[x - 4, box.top + 9], [x, box.top + 4], [x + 4, box.top + 9]], ink: 'ink', widthPt: 1.1 },
    { mark: 'text', x, y: box.top + 28 + textSize, text: 'N', sizePt: textSize, anchor: 'middle' },
  ];
}
