import { clockWords } from '#app/components/burn-card/wall-clock.ts';
import { verdictWords } from '#app/components/burn-card/words.ts';
import { Numbers } from '#app/components/ui/numbers.tsx';
import { plainNumber } from '#app/domain/plain-number.ts';
import type { BeamView } from '#app/domain/run-beam.ts';
import { metresWords, pathOf, roundLengthM, scaleFrame } from '#app/domain/scale-drawing.ts';
import type { Flat, ScaleFrame } from '#app/domain/scale-drawing.ts';
import type { BeamFigureProps } from './beam-figures.tsx';
import { NumberTable } from './number-table.tsx';
import { ChartFrame, PlotText } from './plot.tsx';
import { trailExtent, trailShape } from './trail-shape.ts';
import type { TrailShape } from './trail-shape.ts';
import { textWidthPx } from './text-width.ts';

export interface TrailProps extends BeamFigureProps {
  /** Width of the spot on the target at the best minute. */
  readonly spotMm: number | null;
}

/** The way of the spot over the target as one stands before it, with the mark as measured. */
export function TrailFigure({ figure, ...props }: TrailProps & { readonly figure: string }) {
  const { beam, minutes, bestUtc, zone } = props;
  const shape = trailShape(beam, minutes);
  const title = 'Way of the spot over the target, as one faces it';
  const rows = [...shape.spotAt].filter(([atUtc], index, all) => index % 10 === 0 || index === all.length - 1 || atUtc === bestUtc);
  const verdicts = new Map(minutes.map((minute) => [minute.atUtc, minute.verdict]));
  return (
    <Numbers
      csv="beam"
      figure={figure}
      title={title}
      picture={<ChartFrame draw={(width) => <Trail {...props} width={width} shape={shape} />} />}
      numbers={<NumberTable caption={title} columns={[{ head: 'Clock' }, { head: 'Right of the mark, mm', numeric: true }, { head: 'Above the mark, mm', numeric: true }, { head: 'Result' }]} rows={rows.map(([atUtc, [right, above]]) => [clockWords(atUtc, zone), plainNumber(right), plainNumber(above), verdictWords[verdicts.get(atUtc) ?? 'cannot-tell']])} />}
      note={noteWords(beam)}
    />
  );
}

function noteWords(beam: BeamView): string {
  const ways = beam.facing ? `Right is ${beam.facing.rightWords}, up is ${beam.facing.upWords}. ` : '';
  const taken = beam.facing?.recorded === false ? 'The direction of the surface was not recorded; it is taken square to the line from the optic. ' : '';
  const line = beam.focusKind === 'line' ? 'The way of the middle of the line. ' : '';
  return `${ways}Thick: sunlit; dots: can't tell; dashed: not sunlit. Brown: the mark as measured. Dashed ellipse: one sigma of its survey. ${line}${taken}`;
}


function Trail({ width, beam, shape, cursorUtc, bestUtc, zone, spotMm }: TrailProps & { readonly width: number; readonly shape: TrailShape }) {
  const frame = scaleFrame(trailExtent(shape, beam, bestUtc), width, { leastPx: 200, mostPx: width < 400 ? 260 : 320, marginPx: 44 });
  const at = cursorUtc ? shape.spotAt.get(cursorUtc) : undefined;
  return (
    <svg viewBox={`0 0 ${width} ${frame.heightPx.toFixed(0)}`} width="100%" role="img" aria-label={trailSentence(shape, cursorUtc, zone)} className="block overflow-hidden" fontSize="12">
      <rect x="0.5" y="0.5" width={width - 1} height={frame.heightPx - 1} className="fill-sheet stroke-edge" />
      <TrailLayer shape={shape} beam={beam} frame={frame} zone={zone} />
      {at ? <Spot at={at} frame={frame} spotMm={spotMm} /> : null}
      <Scale frame={frame} />
      {beam.facing ? <g className="fill-second"><text x="8" y="16">{opposite(beam.facing.rightWords)}</text><text x={width - 8} y="16" textAnchor="end">{beam.facing.rightWords}</text></g> : null}
    </svg>
  );
}

const opposites: Readonly<Record<string, string>> = { north: 'south', south: 'north', east: 'west', west: 'east', 'north-east': 'south-west', 'south-west': 'north-east', 'north-west': 'south-east', 'south-east': 'north-west', up: 'down', down: 'up' };
const opposite = (words: string): string => opposites[words] ?? words;

export interface TrailLayerProps {
  readonly shape: TrailShape;
  readonly beam: BeamView;
  readonly frame: ScaleFrame;
  readonly zone: string;
}

/** Mark, its ± and the way of the spot; laid over a plain sheet here, and over a photo where one has a scale. */
export function TrailLayer({ shape, beam, frame, zone }: TrailLayerProps) {
  const [x, y] = [frame.x(0), frame.y(0)];
  return (
    <g>
      {shape.mark.length > 0 ? <path d={`${pathOf(frame, shape.mark)}Z`} className="fill-burn stroke-burn" fillOpacity="0.25" strokeWidth="1.5" /> : <path d={`M${x - 5} ${y}h10M${x} ${y - 5}v10`} className="stroke-burn" strokeWidth="2" />}
      {beam.mark && beam.mark.sigmaRightMm > 0 ? <ellipse cx={x} cy={y} rx={beam.mark.sigmaRightMm * frame.pxPerM} ry={Math.max(1, beam.mark.sigmaUpMm * frame.pxPerM)} className="fill-none stroke-second" strokeDasharray="4 3" /> : null}
      {shape.stretches.map((one) => {
        const d = one.points.length > 1 ? pathOf(frame, one.points) : '';
        const key = `${one.verdict}${one.points[0]?.join()}`;
        if (one.verdict === 'sunlit') return <path key={key} d={d} className="fill-none stroke-clear" strokeWidth="5" strokeLinecap="round" />;
        return <path key={key} d={d} className="fill-none stroke-clear" strokeWidth={one.verdict === 'cannot-tell' ? 3.5 : 1.2} strokeLinecap="round" strokeDasharray={one.verdict === 'cannot-tell' ? '0 7' : '5 4'} />;
      })}
      {ticksApart(shape, frame, zone).map(({ x: tx, y: ty, words, key }) => (
        <g key={key}><line x1={tx} x2={tx} y1={ty - 6} y2={ty + 6} className="stroke-ink" />{words ? <PlotText x={tx} y={ty - 11} anchor="middle">{words}</PlotText> : null}</g>
      ))}
    </g>
  );
}

const leastApartPx = 9;

/** Ten-minute ticks that are inside the frame and apart from each other, with a clock where there is room for one. */
function ticksApart(shape: TrailShape, frame: ScaleFrame, zone: string): { x: number; y: number; words: string | null; key: string }[] {
  const placed: { x: number; y: number; words: string | null; key: string }[] = [];
  for (const { at, atUtc } of shape.ticks) {
    const [x, y] = [frame.x(at[0]), frame.y(at[1])];
    if (x < 4 || x > frame.widthPx - 4 || y < 18 || y > frame.heightPx - 18 || placed.some((other) => Math.hypot(other.x - x, other.y - y) < leastApartPx)) continue;
    const words = clockWords(atUtc, zone);
    const half = textWidthPx(words, 12) / 2;
    const roomy = x - half > 2 && x + half < frame.widthPx - 2 && placed.every((other) => !other.words || Math.abs(other.x - x) > 2 * half + 8 || Math.abs(other.y - y) > 18);
    placed.push({ x, y, words: roomy ? words : null, key: atUtc });
  }
  return placed;
}

function Spot({ at, frame, spotMm }: { readonly at: Flat; readonly frame: ScaleFrame; readonly spotMm: number | null }) {
  const [x, y] = [frame.x(at[0]), frame.y(at[1])];
  return (
    <g>
      {spotMm && (spotMm / 2) * frame.pxPerM < frame.widthPx / 3 ? <circle cx={x} cy={y} r={Math.max(3, (spotMm / 2) * frame.pxPerM)} className="fill-clear stroke-clear" fillOpacity="0.25" strokeWidth="1.2" /> : null}
      <circle cx={x} cy={y} r="6" className="fill-paper" />
      <circle cx={x} cy={y} r="4.5" className="fill-clear" />
    </g>
  );
}

function Scale({ frame }: { readonly frame: ScaleFrame }) {
  const lengthMm = roundLengthM(90 / frame.pxPerM);
  const px = lengthMm * frame.pxPerM;
  const y = frame.heightPx - 12;
  return <g><path d={`M10 ${y - 4}v8M10 ${y}h${px.toFixed(1)}M${(10 + px).toFixed(1)} ${y - 4}v8`} className="fill-none stroke-ink" strokeWidth="1.5" /><PlotText x={16 + px} y={y + 4}>{metresWords(lengthMm / 1000)}</PlotText></g>;
}

function trailSentence(shape: TrailShape, cursorUtc: string | null, zone: string): string {
  const sunlit = shape.stretches.filter((one) => one.verdict === 'sunlit');
  const lengthMm = sunlit.reduce((sum, one) => sum + one.points.slice(1).reduce((part, point, index) => part + Math.hypot(point[0] - (one.points[index]?.[0] ?? point[0]), point[1] - (one.points[index]?.[1] ?? point[1])), 0), 0);
  const at = cursorUtc ? shape.spotAt.get(cursorUtc) : undefined;
  const now = at && cursorUtc ? ` At ${clockWords(cursorUtc, zone)} it is ${metresWords(Math.hypot(at[0], at[1]) / 1000)} from the mark.` : '';
  return `${sunlit.length === 0 ? 'The spot lies on the mark in no minute.' : `The spot runs ${metresWords(lengthMm / 1000)} while sunlit.`}${now}`;
}
