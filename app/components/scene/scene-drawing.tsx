import { useId } from 'react';
import type { ReactNode } from 'react';
import { HatchPattern, PlotText } from '#app/components/charts/plot.tsx';
import { hullOf, metresWords, pathOf, roundLengthM, seenFrom } from '#app/domain/scale-drawing.ts';
import type { Flat, ScaleFrame, Sight } from '#app/domain/scale-drawing.ts';
import type { SceneMoment, ScenePlan } from '#app/domain/scene-plan.ts';
import { add, scale } from '#app/physics/vector.ts';
import type { Vector } from '#app/physics/vector.ts';

export interface SceneDrawingProps {
  readonly plan: ScenePlan;
  readonly moment: SceneMoment;
  readonly sight: Sight;
  readonly frame: ScaleFrame;
  readonly label: string;
  readonly north: boolean;
  readonly children?: ReactNode;
}

/** Optic, opening, walls, mark and the light of one moment, to one scale. Only what was measured or follows from it is drawn. */
export function SceneDrawing({ plan, moment, sight, frame, label, north, children }: SceneDrawingProps) {
  const id = useId();
  const flat = seenFrom(sight);
  return (
    <svg viewBox={`0 0 ${frame.widthPx} ${frame.heightPx.toFixed(0)}`} width="100%" role="group" aria-label={label} className="block touch-pan-y" fontSize="12">
      <defs>
        <HatchPattern id={`${id}w`} />
        <clipPath id={`${id}c`}><rect width={frame.widthPx} height={frame.heightPx} /></clipPath>
      </defs>
      <g clipPath={`url(#${id}c)`}>
        <Light plan={plan} moment={moment} flat={flat} frame={frame} />
        <Target plan={plan} sight={sight} frame={frame} />
        <Optic plan={plan} flat={flat} frame={frame} />
      </g>
      <ScaleBar frame={frame} />
      {north ? <North x={frame.widthPx - 20} /> : null}
      {children}
    </svg>
  );
}

interface Layer {
  readonly plan: ScenePlan;
  readonly flat: (point: Vector) => Flat;
  readonly frame: ScaleFrame;
}

/** Light from the sun towards the optic, and the chief ray beyond it, on past the mark. */
function Light({ plan, moment, flat, frame }: Layer & { readonly moment: SceneMoment }) {
  if (moment.elevationDeg <= 0) return null;
  const start = plan.model?.startsAt ?? [0, 0, 0];
  const farM = (frame.widthPx + frame.heightPx) / frame.pxPerM;
  const half = plan.outline?.halfApertureM ?? 0;
  const [sunX, sunY] = flat(moment.towardsSun);
  const size = Math.max(1e-6, Math.hypot(sunX, sunY));
  const reachM = moment.beam ? Math.max(moment.beam.focusM, plan.mark?.distanceM ?? 0) * 1.25 : 0;
  return (
    <g className="stroke-clear">
      {[-1, -0.5, 0, 0.5, 1].map((share) => {
        const side: Flat = [(-sunY / size) * half * share, (sunX / size) * half * share];
        const from: Flat = [flat(start)[0] + side[0], flat(start)[1] + side[1]];
        return <path key={share} d={pathOf(frame, [from, [from[0] + sunX * farM, from[1] + sunY * farM]])} strokeWidth={share === 0 ? 1.2 : 0.9} />;
      })}
      {moment.beam ? <path d={pathOf(frame, [flat(start), flat(add(start, scale(moment.beam.direction, reachM)))])} className="fill-none" strokeWidth="2" /> : null}
      {moment.beam ? <Cross at={flat(add(start, scale(moment.beam.direction, moment.beam.focusM)))} frame={frame} /> : null}
    </g>
  );
}

function Cross({ at, frame }: { readonly at: Flat; readonly frame: ScaleFrame }) {
  const [x, y] = [frame.x(at[0]), frame.y(at[1])];
  return <path d={`M${x - 6} ${y}H${x + 6}M${x} ${y - 6}V${y + 6}`} strokeWidth="1.6" />;
}

function Optic({ plan, flat, frame }: Layer) {
  const { outline, faces } = plan;
  if (!outline) return <g><circle cx={frame.x(0)} cy={frame.y(0)} r="9" className="fill-none stroke-ink" strokeDasharray="2 3" strokeWidth="1.5" /><PlotText x={frame.x(0) + 14} y={frame.y(0) + 4} tone="second">optic, size not measured</PlotText></g>;
  const hull = hullOf(outline.body.map(flat));
  const arrow = faces ? flat(scale(faces, outline.halfApertureM * 1.6)) : null;
  return (
    <g className="stroke-ink" strokeWidth="1.9" strokeLinejoin="round">
      {outline.ball ? <circle cx={frame.x(flat(outline.ball.centre)[0])} cy={frame.y(flat(outline.ball.centre)[1])} r={outline.ball.radiusM * frame.pxPerM} className="fill-wash" fillOpacity="0.6" /> : null}
      {hull.length > 2 ? <path d={`${pathOf(frame, hull)}Z`} className="fill-wash" fillOpacity="0.6" /> : null}
      {outline.lines.map((line, index) => <path key={index} d={pathOf(frame, line.map(flat))} className="fill-none" />)}
      {arrow ? <path d={pathOf(frame, [[0, 0], arrow])} className="fill-none" strokeWidth="1" strokeDasharray="3 3" /> : null}
    </g>
  );
}

/** The mark with its line to the optic, and the marked surface where its direction was measured. */
function Target({ plan, sight, frame }: { readonly plan: ScenePlan; readonly sight: Sight; readonly frame: ScaleFrame }) {
  if (!plan.markAt) return null;
  const flat = seenFrom(sight);
  const mark = flat(plan.markAt);
  const normal = plan.surface ? flat(plan.surface) : null;
  const size = normal ? Math.hypot(normal[0], normal[1]) : 0;
  const halfM = 60 / frame.pxPerM;
  const along: Flat | null = normal && size > 0.15 ? [(-normal[1] / size) * halfM, (normal[0] / size) * halfM] : null;
  return (
    <g>
      <path d={pathOf(frame, [[0, 0], mark])} className="stroke-edge" strokeDasharray="2 4" strokeWidth="1.2" />
      {along ? <path d={pathOf(frame, [[mark[0] - along[0], mark[1] - along[1]], [mark[0] + along[0], mark[1] + along[1]]])} className="stroke-burn" strokeWidth="4" /> : null}
      <circle cx={frame.x(mark[0])} cy={frame.y(mark[1])} r="3" className="fill-burn" />
    </g>
  );
}

function ScaleBar({ frame }: { readonly frame: ScaleFrame }) {
  const lengthM = roundLengthM(Math.min(120, frame.widthPx / 3) / frame.pxPerM);
  const [x1, y] = [14, frame.heightPx - 12];
  const x2 = x1 + lengthM * frame.pxPerM;
  return (
    <g>
      <path d={`M${x1} ${y - 4}V${y + 4}M${x1} ${y}H${x2}M${x2} ${y - 4}V${y + 4}`} className="stroke-ink" strokeWidth="1.5" />
      <PlotText x={(x1 + x2) / 2} y={y - 7} anchor="middle">{metresWords(lengthM)}</PlotText>
    </g>
  );
}

function North({ x }: { readonly x: number }) {
  return (
    <g>
      <path d={`M${x} 44V14M${x - 5} 21l5-7 5 7`} className="fill-none stroke-ink" strokeWidth="1.6" />
      <PlotText x={x} y={58} anchor="middle">N</PlotText>
    </g>
  );
}
