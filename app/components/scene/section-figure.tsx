import { PlotText } from '#app/components/charts/plot.tsx';
import { pathOf, seenFrom } from '#app/domain/scale-drawing.ts';
import type { Flat, ScaleFrame, Sight } from '#app/domain/scale-drawing.ts';
import { moveMark, moveSill } from '#app/domain/scene-moves.ts';
import type { ScenePlan } from '#app/domain/scene-plan.ts';
import { add, azimuthOf, dot, elevationOf, fromAzimuthElevation, scale } from '#app/physics/vector.ts';
import type { Vector } from '#app/physics/vector.ts';
import { DragHandle } from './drag-handle.tsx';
import { keyStepM } from './plan-figure.tsx';
import type { FigureProps } from './plan-figure.tsx';
import { SceneDrawing } from './scene-drawing.tsx';

/** Cut upright along the line from the optic to the mark; without a mark, along the way the optic faces, else north. */
export function sectionSight(plan: ScenePlan): Sight {
  const towards = plan.markAt ?? plan.faces ?? plan.opening?.outward ?? [0, 1, 0];
  return { right: fromAzimuthElevation(azimuthOf(towards), 0), up: [0, 0, 1] };
}

/** Where a wall crosses the plane of the section, and how high it stands there; null where it does not. */
function crossing(wall: { readonly from: Vector; readonly to: Vector; readonly topM: number }, along: Vector): Flat | null {
  const side: Vector = [along[1], -along[0], 0];
  const [a, b] = [dot(wall.from, side), dot(wall.to, side)];
  if (a * b > 0 || a === b) return null;
  const point = add(wall.from, scale(add(wall.to, scale(wall.from, -1)), a / (a - b)));
  return [dot(point, along), wall.topM];
}

export function SectionFigure({ plan, moment, frame, edit, mayEdit, sight }: FigureProps & { readonly sight: Sight }) {
  const flat = seenFrom(sight);
  const bearing = azimuthOf(sight.right);
  const mark = plan.markAt ? flat(plan.markAt) : null;
  const corners = plan.opening?.corners;
  // An opening seen edge-on is drawn; one that lies along the section would only be a patch.
  const glass = plan.opening && corners && Math.abs(dot(plan.opening.outward, sight.right)) > 0.35 ? corners : null;
  const sill = glass?.[0] ? flat(add(scale(glass[0], 0.5), scale(glass[1] ?? glass[0], 0.5))) : null;
  const head = glass?.[2] ? flat(add(scale(glass[2], 0.5), scale(glass[3] ?? glass[2], 0.5))) : null;
  const stepM = keyStepM(frame);
  const at = (point: Flat) => ({ x: frame.x(point[0]), y: frame.y(point[1]) });
  const toSection = (x: number, y: number): Flat => [(x - frame.x(0)) / frame.pxPerM, (frame.y(0) - y) / frame.pxPerM];
  const putMark = ([across, up]: Flat) => edit.put(moveMark(add(scale(sight.right, Math.max(0.001, across)), [0, 0, up])));
  return (
    <SceneDrawing plan={plan} moment={moment} sight={sight} frame={frame} north={false} label={`Section along ${bearing.toFixed(0)}° true, up is up`}>
      <path d={`M0 ${frame.y(0)}H${frame.widthPx}`} className="stroke-edge" strokeDasharray="1 5" />
      <PlotText x={frame.widthPx - 10} y={frame.y(0) - 5} anchor="end" tone="second">level of the optic</PlotText>
      <Skyline plan={plan} frame={frame} sight={sight} />
      {plan.walls.map((wall, index) => {
        const cut = crossing(wall, sight.right);
        return cut ? <g key={index}><path d={pathOf(frame, [[cut[0], cut[1]], [cut[0], -1000]])} className="stroke-ink" strokeWidth="6" strokeOpacity="0.5" /><PlotText x={frame.x(cut[0]) + 8} y={frame.y(cut[1]) + 12}>{wall.name}</PlotText></g> : null;
      })}
      {sill && head ? <path d={pathOf(frame, [sill, head])} className="stroke-ink" strokeWidth="3.5" /> : null}
      <PlotText x={12} y={20} tone="second">{`towards ${bearing.toFixed(0)}° true, to the right`}</PlotText>
      {mayEdit && sill ? (
        <DragHandle {...at(sill)} size={10} label="Lower edge of the opening" valueText={`${(sill[1] * 1000).toFixed(0)} mm above the optic`} valueNow={sill[1] * 1000} chosen={edit.chosen === 'sill'} onChoose={() => edit.choose('sill')} onBegin={edit.remember} onMove={(_x, y) => edit.put(moveSill(toSection(0, y)[1]))} onStep={(_right, down) => edit.put(moveSill(sill[1] - down * stepM))} />
      ) : null}
      {mayEdit && mark && plan.markAt ? (
        <DragHandle {...at(mark)} size={10} label="Mark, in height and distance" valueText={`${elevationOf(plan.markAt).toFixed(1)}° from the optic, ${(mark[1] * 1000).toFixed(0)} mm up, ${(mark[0] * 1000).toFixed(0)} mm on the level`} valueNow={elevationOf(plan.markAt)} chosen={edit.chosen === 'mark-height'} onChoose={() => edit.choose('mark-height')} onBegin={edit.remember} onMove={(x, y) => putMark(toSection(x, y))} onStep={(right, down) => putMark([mark[0] + right * stepM, mark[1] - down * stepM])} />
      ) : null}
    </SceneDrawing>
  );
}

/** Height of the skyline on both sides of the section, as a line of sight from the optic. */
function Skyline({ plan, frame, sight }: { readonly plan: ScenePlan; readonly frame: ScaleFrame; readonly sight: Sight }) {
  if (!plan.skyline) return null;
  const farM = frame.widthPx / frame.pxPerM;
  return (
    <g>
      {[1, -1].map((side) => {
        const bearing = azimuthOf(scale(sight.right, side));
        const heightDeg = plan.skyline?.(bearing) ?? 0;
        const end: Flat = [side * farM, farM * Math.tan((heightDeg * Math.PI) / 180)];
        const labelX = frame.x(0) + side * Math.min(120, frame.widthPx / 4);
        return (
          <g key={side}>
            <path d={pathOf(frame, [[0, 0], end])} className="stroke-second" strokeDasharray="6 4" strokeWidth="1.1" />
            {Math.abs(heightDeg) > 0.5 ? <PlotText x={labelX} y={frame.y(0) - Math.tan((heightDeg * Math.PI) / 180) * Math.abs(labelX - frame.x(0)) - 6} anchor="middle" tone="second">{`skyline ${heightDeg.toFixed(1)}°`}</PlotText> : null}
          </g>
        );
      })}
    </g>
  );
}
