import { PlotText } from '#app/components/charts/plot.tsx';
import { pathOf, seenFrom } from '#app/domain/scale-drawing.ts';
import type { Flat, ScaleFrame, Sight } from '#app/domain/scale-drawing.ts';
import { moveMark, moveOpening, moveWallEnd, turnOptic } from '#app/domain/scene-moves.ts';
import type { SceneMoment, ScenePlan } from '#app/domain/scene-plan.ts';
import { add, azimuthOf, scale } from '#app/physics/vector.ts';
import type { Vector } from '#app/physics/vector.ts';
import { DragHandle } from './drag-handle.tsx';
import { SceneDrawing } from './scene-drawing.tsx';
import type { SceneEdit } from './use-scene-edit.ts';

export const planSight: Sight = { right: [1, 0, 0], up: [0, 1, 0] };

export interface FigureProps {
  readonly plan: ScenePlan;
  readonly moment: SceneMoment;
  readonly frame: ScaleFrame;
  readonly edit: SceneEdit;
  readonly mayEdit: boolean;
}

/** Steps of the arrow keys: a round length that is a few pixels. [m] */
export const keyStepM = (frame: ScaleFrame): number => 10 ** Math.round(Math.log10(3 / frame.pxPerM));
const handlePx = 10;
const flat = seenFrom(planSight);
const degrees = (towards: Vector) => `${azimuthOf(towards).toFixed(1)}° true`;

/** Plan at the height of the optic, true north up. */
export function PlanFigure({ plan, moment, frame, edit, mayEdit }: FigureProps) {
  const back = (x: number, y: number): Flat => [(x - frame.x(0)) / frame.pxPerM, (frame.y(0) - y) / frame.pxPerM];
  const height = plan.markAt?.[2] ?? 0;
  const facesAt = plan.faces && plan.outline ? scale(plan.faces, Math.max(plan.outline.halfApertureM * 1.6, 46 / frame.pxPerM)) : null;
  const openingAt = plan.opening ? scale(plan.opening.outward, plan.opening.distanceM ?? 90 / frame.pxPerM) : null;
  const handle = (key: string, label: string, at: Vector, text: string, value: number, put: (place: Vector) => Record<string, string>) => {
    const [across, up] = flat(at);
    const [x, y] = [frame.x(across), frame.y(up)];
    if (x < -20 || y < -20 || x > frame.widthPx + 20 || y > frame.heightPx + 20) return null;
    const stepM = keyStepM(frame);
    return (
      <DragHandle key={key} x={x} y={y} size={handlePx} label={label} valueText={text} valueNow={value} chosen={edit.chosen === key} onChoose={() => edit.choose(key)} onBegin={edit.remember}
        onMove={(toX, toY) => { const [east, north] = back(toX, toY); edit.put(put([east, north, at[2]])); }}
        onStep={(right, down) => edit.put(put([at[0] + right * stepM, at[1] - down * stepM, at[2]]))} />
    );
  };
  return (
    <SceneDrawing plan={plan} moment={moment} sight={planSight} frame={frame} north label="Plan, true north up">
      <Opening plan={plan} frame={frame} openingAt={openingAt} />
      {plan.walls.map((wall, index) => (
        <g key={index}>
          <path d={pathOf(frame, [flat(wall.from), flat(wall.to)])} className="stroke-ink" strokeWidth="5" strokeOpacity="0.35" />
          <path d={pathOf(frame, [flat(wall.from), flat(wall.to)])} className="stroke-ink" strokeWidth="1.5" />
          <PlotText x={frame.x((wall.from[0] + wall.to[0]) / 2) + 8} y={frame.y((wall.from[1] + wall.to[1]) / 2)}>{wall.name}</PlotText>
        </g>
      ))}
      <SunWords moment={moment} />
      {mayEdit ? (
        <>
          {openingAt ? handle('opening', 'Opening, where it looks outward', openingAt, `${degrees(openingAt)}${plan.opening?.distanceM ? `, ${(plan.opening.distanceM * 1000).toFixed(0)} mm away` : ''}`, azimuthOf(openingAt), moveOpening) : null}
          {facesAt ? handle('faces', 'Optic, which way it faces', facesAt, degrees(facesAt), azimuthOf(facesAt), turnOptic) : null}
          {plan.walls.flatMap((wall, index) => [
            handle(`wall-${index}-from`, `${wall.name}, first end`, wall.from, `${degrees(wall.from)}, ${Math.hypot(wall.from[0], wall.from[1]).toFixed(2)} m`, azimuthOf(wall.from), (place) => moveWallEnd(edit.values, index, 'first', place)),
            handle(`wall-${index}-to`, `${wall.name}, other end`, wall.to, `${degrees(wall.to)}, ${Math.hypot(wall.to[0], wall.to[1]).toFixed(2)} m`, azimuthOf(wall.to), (place) => moveWallEnd(edit.values, index, 'second', place)),
          ])}
          {plan.markAt ? handle('mark', 'Mark', plan.markAt, `${degrees(plan.markAt)}, ${(Math.hypot(plan.markAt[0], plan.markAt[1]) * 1000).toFixed(0)} mm on the level, ${(height * 1000).toFixed(0)} mm up`, azimuthOf(plan.markAt), moveMark) : null}
        </>
      ) : null}
    </SceneDrawing>
  );
}

/** The glass as a double line over its width; dashed where its distance or its width was not measured. */
function Opening({ plan, frame, openingAt }: { readonly plan: ScenePlan; readonly frame: ScaleFrame; readonly openingAt: Vector | null }) {
  if (!plan.opening || !openingAt) return null;
  const { outward, distanceM, halfWidthM, corners } = plan.opening;
  const right: Vector = [outward[1], -outward[0], 0];
  const known = distanceM !== null && halfWidthM !== null;
  const half = halfWidthM ?? 60 / frame.pxPerM;
  const from = corners?.[0] ?? add(openingAt, scale(right, -half));
  const to = corners?.[1] ?? add(openingAt, scale(right, half));
  const gap = scale(outward, 4 / frame.pxPerM);
  return (
    <g className="stroke-ink" strokeWidth="1.9" {...(known ? {} : { strokeDasharray: '5 4' })}>
      <path d={pathOf(frame, [flat(from), flat(to)])} />
      <path d={pathOf(frame, [flat(add(from, gap)), flat(add(to, gap))])} />
    </g>
  );
}

export function SunWords({ moment }: { readonly moment: SceneMoment }) {
  const up = moment.elevationDeg > 0;
  const hidden = up && moment.skylineDeg !== null && moment.elevationDeg < moment.skylineDeg;
  return <PlotText x={12} y={20} tone="clear" bold>{up ? `sun ${moment.azimuthDeg.toFixed(1)}°, ${moment.elevationDeg.toFixed(1)}° up${hidden ? `, behind the skyline of ${moment.skylineDeg?.toFixed(1)}°` : ''}` : 'sun below the horizon'}</PlotText>;
}
