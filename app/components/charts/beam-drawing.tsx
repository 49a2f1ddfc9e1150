import { useId } from 'react';
import { incomingRays, markHalfDrawn, targetFace } from '#app/domain/beam-shape.ts';
import type { BeamAt, BeamShape } from '#app/domain/beam-shape.ts';
import type { BeamView } from '#app/domain/run-beam.ts';
import { metresWords, pathOf, roundLengthM, scaleFrame } from '#app/domain/scale-drawing.ts';
import type { Flat, ScaleFrame } from '#app/domain/scale-drawing.ts';
import { HatchPattern, PlotText } from './plot.tsx';

export interface BeamDrawingProps {
  readonly width: number;
  readonly beam: BeamView;
  readonly shape: BeamShape;
  /** Points that must be inside the picture, whatever the minute. */
  readonly extent: readonly Flat[];
  readonly at: BeamAt | null;
  /** Places of the spot through the sunlit minutes. */
  readonly trail: readonly Flat[];
  readonly sunWords: string;
  readonly label: string;
  /** A plan shows north; a section has up. */
  readonly north: boolean;
}

/** Optic, target and beam to one scale. Only what was entered or computed is drawn. */
export function BeamDrawing({ width, beam, shape, extent, at, trail, sunWords, label, north }: BeamDrawingProps) {
  const id = useId();
  const frame = scaleFrame(extent, width, { leastPx: width < 400 ? 220 : 260, mostPx: width < 400 ? 290 : 340, marginPx: 24 });
  return (
    <svg viewBox={`0 0 ${width} ${frame.heightPx.toFixed(0)}`} width="100%" role="img" aria-label={label} className="block" fontSize="12">
      <defs>
        <HatchPattern id={`${id}t`} className="stroke-burn" />
        <clipPath id={`${id}c`}><rect width={width} height={frame.heightPx} /></clipPath>
      </defs>
      <g clipPath={`url(#${id}c)`}>
        {at ? <Light at={at} shape={shape} frame={frame} /> : null}
        <Target beam={beam} shape={shape} frame={frame} hatch={`url(#${id}t)`} />
        <Optic shape={shape} frame={frame} />
        {trail.length > 1 ? <path d={pathOf(frame, trail)} className="fill-none stroke-burn" strokeWidth="4" strokeLinecap="round" /> : null}
        {at?.spot ? <g><circle cx={frame.x(at.spot[0])} cy={frame.y(at.spot[1])} r="6.5" className="fill-paper" /><circle cx={frame.x(at.spot[0])} cy={frame.y(at.spot[1])} r="4.5" className="fill-clear" /></g> : null}
      </g>
      {at ? <SunWords at={at} frame={frame} words={sunWords} /> : null}
      <ScaleBar frame={frame} />
      {north ? <NorthArrow x={at && at.towardsSun[0] >= 0 && at.towardsSun[1] >= 0 ? 16 : width - 18} /> : null}
    </svg>
  );
}

interface Layer {
  readonly shape: BeamShape;
  readonly frame: ScaleFrame;
}

/** Light that comes in, parallel, and the beam beyond: its outline holds four fifths of the light. */
function Light({ at, shape, frame }: Layer & { readonly at: BeamAt }) {
  const farM = (frame.widthPx + frame.heightPx) / frame.pxPerM;
  return (
    <g className="stroke-clear">
      {at.envelope.length === 0 ? null : <path d={`${pathOf(frame, at.envelope)}Z`} className="fill-clear" fillOpacity="0.2" strokeWidth="1" />}
      <path d={pathOf(frame, at.axis)} strokeWidth="1.2" strokeDasharray="8 3 2 3" />
      {incomingRays(shape, at, farM).map((ray, index) => <path key={index} d={pathOf(frame, ray)} strokeWidth="1" />)}
    </g>
  );
}

function Optic({ shape, frame }: Layer) {
  return (
    <g className="stroke-ink" strokeWidth="1.9" strokeLinejoin="round" strokeLinecap="round">
      {shape.ball ? <circle cx={frame.x(shape.ball.centre[0])} cy={frame.y(shape.ball.centre[1])} r={Math.max(2, shape.ball.radiusM * frame.pxPerM)} className="fill-wash" fillOpacity="0.7" /> : null}
      {shape.body.length > 0 ? <path d={`${pathOf(frame, shape.body)}Z`} className="fill-wash" fillOpacity="0.7" /> : null}
      {shape.lines.map((line, index) => <path key={index} d={pathOf(frame, line)} className="fill-none" />)}
    </g>
  );
}

/** The surface that was hit: hatched behind its face, drawn a little way to both sides of the mark. */
function Target({ beam, shape, frame, hatch }: Layer & { readonly beam: BeamView; readonly hatch: string }) {
  const { mark } = shape;
  if (!mark) return null;
  const [x, y] = [frame.x(mark[0]), frame.y(mark[1])];
  const lengthMm = beam.mark?.lengthMm ?? null;
  const target = targetFace(shape, lengthMm, frame, { leastHalf: 70, thick: 9 });
  if (!target) return <g><circle cx={x} cy={y} r={Math.max(4, Math.min(markHalfDrawn(lengthMm, frame), 40))} fill={hatch} className="stroke-burn" strokeWidth="1.5" /><PlotText x={x + 10} y={y - 8} tone="burn" bold>mark</PlotText></g>;
  const { face: [from, to], back: [backFrom, backTo], mark: [markFrom, markTo] } = target;
  const wordsLeft = x > frame.widthPx * 0.72;
  const away = wordsLeft ? -14 : 14;
  return (
    <g>
      <path d={`M${from[0]} ${from[1]}L${to[0]} ${to[1]}L${backTo[0]} ${backTo[1]}L${backFrom[0]} ${backFrom[1]}Z`} fill={hatch} className="stroke-none" />
      <line x1={from[0]} y1={from[1]} x2={to[0]} y2={to[1]} className="stroke-burn" strokeWidth="1.9" />
      <line x1={markFrom[0]} y1={markFrom[1]} x2={markTo[0]} y2={markTo[1]} className="stroke-burn" strokeWidth="6" />
      <PlotText x={x + away} y={Math.min(frame.heightPx - 24, y + 26)} anchor={wordsLeft ? 'end' : 'start'} tone="burn" bold>mark</PlotText>
    </g>
  );
}

/** The sun's place in words, in the corner from which the light comes in. */
function SunWords({ at, frame, words }: { readonly at: BeamAt; readonly frame: ScaleFrame; readonly words: string }) {
  const [across, up] = at.towardsSun;
  return <PlotText x={across < 0 ? 4 : frame.widthPx - 4} y={up >= 0 ? 14 : frame.heightPx - 28} anchor={across < 0 ? 'start' : 'end'} tone="clear" bold>{words}</PlotText>;
}

function ScaleBar({ frame }: { readonly frame: ScaleFrame }) {
  const lengthM = roundLengthM(110 / frame.pxPerM);
  const y = frame.heightPx - 10;
  const px = lengthM * frame.pxPerM;
  return (
    <g>
      <path d={`M6 ${y - 4}v8M6 ${y}h${px.toFixed(1)}M${(6 + px).toFixed(1)} ${y - 4}v8`} className="fill-none stroke-ink" strokeWidth="1.5" />
      <PlotText x={12 + px} y={y + 4}>{metresWords(lengthM)}</PlotText>
    </g>
  );
}

function NorthArrow({ x }: { readonly x: number }) {
  return (
    <g>
      <path d={`M${x} 34V8M${x - 5} 14L${x} 7L${x + 5} 14`} className="fill-none stroke-ink" strokeWidth="1.5" />
      <text x={x} y="48" textAnchor="middle" className="fill-ink">N</text>
    </g>
  );
}
