import { formatClock, formatIsoDay, localDay } from '#app/domain/local-time.ts';
import type { FigureMark, ReportFigure } from '#app/domain/report-document.ts';
import type { ReportedRun } from '#app/domain/report-source.ts';
import { textWidth } from './text-size.ts';
import type { FigureOptions } from './window-figure.ts';

type Minute = ReportedRun['result']['minutes'][number];

/** Bearings in one piece around `middleDeg`, so that a path across north is not torn. */
const near = (azimuthDeg: number, middleDeg: number): number => middleDeg + ((((azimuthDeg - middleDeg + 180) % 360) + 360) % 360) - 180;

/** Path of the sun through the window over the skyline: bearing across, height up. Null without minutes of daylight. */
export function sunPathFigure(run: ReportedRun, { number, width, textSize, zone }: FigureOptions): ReportFigure | null {
  const { window } = run.result;
  const severalDays = Date.parse(window.endUtc) - Date.parse(window.startUtc) > 86_400_000;
  const day = localDay(new Date(run.result.best?.atUtc ?? window.startUtc), zone);
  const minutes = run.result.minutes.filter((minute) => minute.apparentElevationDeg > -1 && (!severalDays || localDay(new Date(minute.atUtc), zone) === day));
  const [first] = minutes;
  const last = minutes.at(-1);
  if (!first || !last) return null;
  const middle = minutes[Math.floor(minutes.length / 2)]?.azimuthDeg ?? first.azimuthDeg;
  const az = (deg: number) => near(deg, middle);
  const bearings = minutes.map((minute) => az(minute.azimuthDeg));
  const spread = Math.max(30, Math.max(...bearings) - Math.min(...bearings));
  const centre = (Math.max(...bearings) + Math.min(...bearings)) / 2;
  const [fromAz, toAz] = [Math.floor((centre - spread / 2 - 8) / 10) * 10, Math.ceil((centre + spread / 2 + 8) / 10) * 10];
  const skyline = run.drawing.skyline.map((point) => ({ az: az(point.azimuthDeg), alt: point.elevationDeg })).filter((point) => point.az >= fromAz - 20 && point.az <= toAz + 20).sort((a, b) => a.az - b.az);
  const highest = Math.ceil((Math.max(10, ...minutes.map((minute) => minute.apparentElevationDeg), ...skyline.map((point) => point.alt)) + 4) / 5) * 5;
  const [left, right, top, bottom] = [34, width - 6, 6, 170];
  const x = (deg: number) => left + ((deg - fromAz) / (toAz - fromAz)) * (right - left);
  const y = (deg: number) => bottom - (Math.max(0, deg) / highest) * (bottom - top);
  const inside = skyline.map((point): [number, number] => [Math.min(Math.max(x(point.az), left), right), y(point.alt)]);
  const [firstEdge] = inside;
  const lastEdge = inside.at(-1);
  const marks: FigureMark[] = [...grid({ fromAz, toAz, highest, x, y, left, right, bottom, textSize })];
  if (firstEdge && lastEdge) {
    marks.push({ mark: 'area', points: [[firstEdge[0], bottom], ...inside, [lastEdge[0], bottom]], fill: 'hair' });
    marks.push({ mark: 'line', points: inside, ink: 'ink', widthPt: 1.2 });
  }
  for (const stretch of stretches(minutes)) {
    const points = stretch.map((minute): [number, number] => [x(az(minute.azimuthDeg)), y(minute.apparentElevationDeg)]);
    marks.push(...stretchMarks(stretch[0]?.verdict ?? 'not-sunlit', points));
  }
  for (const minute of [first, last]) {
    const [px, py] = [x(az(minute.azimuthDeg)), y(minute.apparentElevationDeg)];
    const under = minute === first && py + textSize * 1.8 < bottom;
    marks.push({ mark: 'text', x: px, y: under ? py + textSize * 1.6 : py - 8, text: formatClock(new Date(minute.atUtc), zone), sizePt: textSize, anchor: minute === first ? 'start' : 'end', bed: 'paper' });
  }
  const { requiredSun } = run.result;
  if (requiredSun && az(requiredSun.azimuthDeg) > fromAz && az(requiredSun.azimuthDeg) < toAz && requiredSun.apparentElevationDeg > 0 && requiredSun.apparentElevationDeg < highest) {
    const [px, py] = [x(az(requiredSun.azimuthDeg)), y(requiredSun.apparentElevationDeg)];
    marks.push({ mark: 'line', points: [[px - 5, py], [px + 5, py]], ink: 'burn', widthPt: 1.4 }, { mark: 'line', points: [[px, py - 5], [px, py + 5]], ink: 'burn', widthPt: 1.4 });
    marks.push({ mark: 'text', x: px + 7, y: py + textSize + 2, text: 'needed', sizePt: textSize, ink: 'burn', bed: 'paper' });
  }
  return {
    kind: 'figure',
    number,
    title: `Path of the sun ${severalDays ? `on ${formatIsoDay(day)}, one day of the window` : 'through the window'}; bearing from true north across, height up, in degrees`,
    alt: `The sun goes from ${first.azimuthDeg.toFixed(0)}° at a height of ${first.apparentElevationDeg.toFixed(1)}°, ${formatClock(new Date(first.atUtc), zone)}, to ${last.azimuthDeg.toFixed(0)}° at ${last.apparentElevationDeg.toFixed(1)}°, ${formatClock(new Date(last.atUtc), zone)}. Thick: sunlit; dots: cannot be told; thin: not sunlit.${skyline.length > 0 ? ' The skyline stands below as a grey band.' : ' No skyline is shown.'}`,
    widthPt: width,
    heightPt: 190,
    marks,
  };
}

interface Grid {
  readonly fromAz: number;
  readonly toAz: number;
  readonly highest: number;
  readonly x: (deg: number) => number;
  readonly y: (deg: number) => number;
  readonly left: number;
  readonly right: number;
  readonly bottom: number;
  readonly textSize: number;
}

function grid({ fromAz, toAz, highest, x, y, left, right, bottom, textSize }: Grid): FigureMark[] {
  const marks: FigureMark[] = [];
  const step = highest > 40 ? 20 : highest > 20 ? 10 : 5;
  for (let alt = 0; alt <= highest; alt += step) {
    marks.push({ mark: 'line', points: [[left, y(alt)], [right, y(alt)]], ink: alt === 0 ? 'ink' : 'hair', widthPt: alt === 0 ? 1.2 : 0.6 });
    marks.push({ mark: 'text', x: left - 5, y: y(alt) + textSize * 0.35, text: `${alt}`, sizePt: textSize, anchor: 'end', ink: 'second' });
  }
  const across = toAz - fromAz > 90 ? 30 : toAz - fromAz > 50 ? 20 : 10;
  for (let bearing = Math.ceil(fromAz / across) * across; bearing <= toAz; bearing += across) {
    marks.push({ mark: 'line', points: [[x(bearing), bottom], [x(bearing), bottom + 3]], ink: 'ink', widthPt: 0.8 });
    const text = String(((bearing % 360) + 360) % 360);
    marks.push({ mark: 'text', x: Math.min(x(bearing), right + 6 - textWidth(text, textSize) / 2), y: bottom + 5 + textSize, text, sizePt: textSize, anchor: 'middle', ink: 'second' });
  }
  return marks;
}

function stretches(minutes: readonly Minute[]): Minute[][] {
  const found: Minute[][] = [];
  for (const minute of minutes) {
    const last = found.at(-1);
    const before = last?.at(-1);
    const together = before?.verdict === minute.verdict && Date.parse(minute.atUtc) - Date.parse(before.atUtc) < 120_000;
    if (last && together) last.push(minute);
    else found.push([minute]);
  }
  return found;
}

function stretchMarks(verdict: Minute['verdict'], points: readonly [number, number][]): FigureMark[] {
  if (verdict === 'sunlit') return [{ mark: 'line', points, ink: 'burn', widthPt: 5 }, { mark: 'line', points, ink: 'slot', widthPt: 2.6 }];
  if (verdict === 'not-sunlit') return [{ mark: 'line', points, ink: 'clear', widthPt: 1 }];
  return points.filter((_unused, index) => index % Math.max(1, Math.floor(points.length / 20)) === 0).map(([x, y]): FigureMark => ({ mark: 'dot', x, y, radiusPt: 1.8, fill: 'paper', edge: 'ink' }));
}
