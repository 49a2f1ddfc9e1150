import { useMemo, useState } from 'react';
import { Form } from 'react-router';
import { formFields } from '#app/components/cases/form-fields.ts';
import type { RefusedForm } from '#app/components/cases/form-fields.ts';
import { ChartFrame } from '#app/components/charts/plot.tsx';
import { scaleFrame, seenFrom } from '#app/domain/scale-drawing.ts';
import type { Flat, Sight } from '#app/domain/scale-drawing.ts';
import { ErrorSummary } from '#app/components/forms/error-summary.tsx';
import { TextArea, TextInput } from '#app/components/forms/text-field.tsx';
import { useHydrated } from '#app/components/report/use-hydrated.ts';
import { Button } from '#app/components/ui/button.tsx';
import { FactList } from '#app/components/ui/fact-list.tsx';
import { SectionHeading } from '#app/components/ui/page-title.tsx';
import { formatClock, formatDayClock } from '#app/domain/local-time.ts';
import type { Scene, SceneSkyline } from '#app/domain/scene.ts';
import { allSceneFields, fieldName } from '#app/domain/scene-fields.ts';
import { readSceneForm } from '#app/domain/scene-form.ts';
import { nearestMoment, sceneMoment, scenePlan } from '#app/domain/scene-plan.ts';
import type { PlanPlace, ScenePlan } from '#app/domain/scene-plan.ts';
import type { Vector } from '#app/physics/vector.ts';
import { PlanFigure, planSight } from './plan-figure.tsx';
import { sceneTableNames, SceneTable } from './scene-table.tsx';
import { SectionFigure, sectionSight } from './section-figure.tsx';
import { useSceneEdit } from './use-scene-edit.ts';

export interface SceneEditorProps {
  readonly stored: Readonly<Record<string, string>>;
  readonly scene: Scene;
  readonly siteSkyline: SceneSkyline | null;
  readonly place: PlanPlace & { readonly zone: string };
  readonly span: { readonly fromUtc: string; readonly toUtc: string; readonly words: string };
  readonly baseVersion: number;
  readonly mayEdit: boolean;
  readonly whoEdits: string;
  readonly problem: RefusedForm | undefined;
}

const noModel = { declinationDeg: null, declinationSource: '' };

/** Plan and section to one scale, the numbers they share, and the light at a chosen time. */
export function SceneEditor({ stored, scene, siteSkyline, place, span, baseVersion, mayEdit, whoEdits, problem }: SceneEditorProps) {
  const { field: fieldOf, refused } = formFields('save-scene', problem, 'scene');
  const edit = useSceneEdit({ ...stored, ...refused?.typed });
  const hydrated = useHydrated();
  const reading = useMemo(() => readSceneForm(edit.values, noModel), [edit.values]);
  // A number that is half typed leaves the last drawing in place.
  const [drawn, setDrawn] = useState(scene);
  if (reading.ok && reading.scene !== drawn) setDrawn(reading.scene);
  const plan = useMemo(() => scenePlan(drawn, siteSkyline), [drawn, siteSkyline]);
  const [fromMs, toMs] = [Date.parse(span.fromUtc), Date.parse(span.toUtc)];
  const [atMs, setAtMs] = useState(() => nearestMoment(scenePlan(scene, siteSkyline), place, fromMs, toMs)?.utcMs ?? (fromMs + toMs) / 2);
  const moment = sceneMoment(plan, place, atMs);
  const [whole, setWhole] = useState(false);
  const [fitted, setFitted] = useState(plan);
  const errors = reading.ok ? {} : reading.fieldErrors;
  const field = (name: string) => ({ ...fieldOf(name), errors: refused?.fieldErrors[name] ?? errors[name] });
  const sight = sectionSight(fitted);
  const frameOf = (seen: Sight, width: number) => scaleFrame(sameScale(extent(fitted, whole), seen, [planSight, sight]), width, { leastPx: 300, mostPx: 420, marginPx: 44 });
  const hiddenNames = Object.keys(edit.values).filter((name) => name in stored && !sceneTableNames.includes(name) && name !== 'walls' && name !== 'note');
  const shared = { plan, moment, edit, mayEdit: mayEdit && hydrated };
  return (
    <Form method="post" className="space-y-6" preventScrollReset>
      {refused ? <ErrorSummary errors={refused.formErrors} fields={[...allSceneFields.map((one) => ({ field: field(fieldName(one)), label: one.label })), { field: field('walls'), label: 'Walls' }, { field: field('note'), label: 'What was changed' }]} /> : null}
      <input type="hidden" name="intent" value="save-scene" />
      <input type="hidden" name="baseVersion" value={baseVersion} />
      {hiddenNames.map((name) => <input key={name} type="hidden" name={name} value={edit.values[name] ?? ''} />)}
      <TimeLine atMs={atMs} fromMs={fromMs} toMs={toMs} zone={place.zone} words={span.words} onChange={setAtMs} />
      <div className="flex flex-wrap gap-3" data-print="no">
        <button type="button" className="chip" aria-pressed={!whole} onClick={() => { setWhole(false); setFitted(plan); }}>Optic and mark</button>
        <button type="button" className="chip" aria-pressed={whole} onClick={() => { setWhole(true); setFitted(plan); }}>Whole scene</button>
        <Button type="button" look="outlined" onClick={() => setFitted(plan)}>Fit to the drawing</Button>
        {edit.undoable > 0 ? <Button type="button" look="outlined" onClick={edit.undo}>Undo, {edit.undoable} {edit.undoable === 1 ? 'step' : 'steps'}</Button> : null}
      </div>
      <div className="grid gap-8 desk:grid-cols-2 max-tablet:order-2">
        <figure className="min-w-0 border-t-[1.5px] border-ink">
          <figcaption className="pt-1.5 pb-2 font-semibold"><span className="mr-2 font-serif font-normal text-second">Fig. 1</span>Plan at the height of the optic</figcaption>
          <ChartFrame draw={(width) => <PlanFigure {...shared} frame={frameOf(planSight, width)} />} />
        </figure>
        <figure className="min-w-0 border-t-[1.5px] border-ink">
          <figcaption className="pt-1.5 pb-2 font-semibold"><span className="mr-2 font-serif font-normal text-second">Fig. 2</span>Section, to the mark, same scale</figcaption>
          <ChartFrame draw={(width) => <SectionFigure {...shared} sight={sight} frame={frameOf(sight, width)} />} />
        </figure>
      </div>
      {mayEdit ? <p className="text-small text-second">Drag a square, or give it the focus and use the arrow keys; Shift moves ten steps. Or type below. A dashed line was not measured. Thick blue: where the beam goes; the cross is its focus.</p> : null}
      <div className="grid gap-8 desk:grid-cols-[minmax(0,1fr)_320px]">
        <div className="min-w-0 space-y-5">
          <SceneTable edit={edit} field={field} mayEdit={mayEdit} />
          <TextArea field={field('walls')} label="Walls, fences and blocks near by" rows={4} disabled={!mayEdit} value={edit.values['walls'] ?? ''} onChange={(event) => edit.put({ walls: event.currentTarget.value })} help='One a line: bearing and metres of one end, bearing and metres of the other, metres of its top above the optic, and a name, such as "140 4.2 186 3.8 2.5 Garden wall". Their ends can be dragged in the plan; a run tests the light against them.' spellCheck={false} />
        </div>
        <Follows plan={plan} moment={moment} nearest={nearestMoment(plan, place, fromMs, toMs)} zone={place.zone} atMs={atMs} />
      </div>
      {mayEdit ? (
        <div className="max-w-[48rem] space-y-4">
          <TextInput field={field('note')} label="What was measured or changed, and by whom" help="Kept with the version and in the log." maxLength={500} required />
          <Button>Save as version {baseVersion + 1}</Button>
        </div>
      ) : <p className="text-small text-second">Changing it now: {whoEdits}</p>}
    </Form>
  );
}

/** The points of one drawing, with room added until it is as wide and as high as the other, so that both get one scale. */
function sameScale(points: readonly Vector[], seen: Sight, sights: readonly Sight[]): Flat[] {
  const boxes = sights.map((one) => boxOf(points.map(seenFrom(one))));
  const [wide, tall] = [Math.max(...boxes.map((box) => box.wide)), Math.max(...boxes.map((box) => box.tall))];
  const own = points.map(seenFrom(seen));
  const { middle } = boxOf(own);
  return [...own, [middle[0] - wide / 2, middle[1] - tall / 2], [middle[0] + wide / 2, middle[1] + tall / 2]];
}

function boxOf(points: readonly Flat[]): { readonly wide: number; readonly tall: number; readonly middle: Flat } {
  const [xs, ys] = [points.map(([across]) => across), points.map(([, up]) => up)];
  const [left, right, low, high] = [Math.min(...xs), Math.max(...xs), Math.min(...ys), Math.max(...ys)];
  return { wide: right - left, tall: high - low, middle: [(left + right) / 2, (low + high) / 2] };
}

/** Points that the drawings must hold. */
function extent(plan: ScenePlan, whole: boolean): [number, number, number][] {
  const half = plan.outline ? Math.max(plan.outline.halfApertureM, ...plan.outline.lines.flat().map(([east, north, up]) => Math.hypot(east, north, up)), ...plan.outline.body.map(([east, north, up]) => Math.hypot(east, north, up))) * 1.15 : 0.05;
  const around: [number, number, number][] = [[half, half, half], [-half, -half, -half]];
  const mark = plan.markAt ? [[...plan.markAt] as [number, number, number]] : [];
  const reach = Math.max(half, ...mark.map(([east, north, up]) => Math.hypot(east, north, up)));
  const { opening } = plan;
  const near = opening?.distanceM && (whole || opening.distanceM < reach * 6) ? [-1, 1].map((side): [number, number, number] => [opening.outward[0] * (opening.distanceM ?? 0) + side * opening.outward[1] * (opening.halfWidthM ?? 0), opening.outward[1] * (opening.distanceM ?? 0) - side * opening.outward[0] * (opening.halfWidthM ?? 0), 0]) : [];
  const walls = whole ? plan.walls.flatMap((wall): [number, number, number][] => [[wall.from[0], wall.from[1], wall.topM], [wall.to[0], wall.to[1], wall.topM]]) : [];
  return [...around, ...mark, ...near, ...walls];
}

interface TimeLineProps {
  readonly atMs: number;
  readonly fromMs: number;
  readonly toMs: number;
  readonly zone: string;
  readonly words: string;
  readonly onChange: (utcMs: number) => void;
}

/** The moment that is drawn: by the slider, a minute a step, ten with the page keys. */
function TimeLine({ atMs, fromMs, toMs, zone, words, onChange }: TimeLineProps) {
  const minutes = Math.round((toMs - fromMs) / 60_000);
  return (
    <div className="max-w-[48rem]">
      <label htmlFor="scene-time" className="flex justify-between gap-4 font-semibold"><span>Time drawn</span><output htmlFor="scene-time">{formatDayClock(new Date(atMs), zone)}</output></label>
      <input id="scene-time" type="range" min={0} max={minutes} step={1} value={Math.round((atMs - fromMs) / 60_000)} onChange={(event) => onChange(fromMs + Number(event.currentTarget.value) * 60_000)} aria-valuetext={formatDayClock(new Date(atMs), zone)} className="h-11 w-full accent-(--color-clear)" />
      <p className="text-small text-second">{words}</p>
    </div>
  );
}

function Follows({ plan, moment, nearest, zone, atMs }: { readonly plan: ScenePlan; readonly moment: ReturnType<typeof sceneMoment>; readonly nearest: ReturnType<typeof nearestMoment>; readonly zone: string; readonly atMs: number }) {
  const mm = (metres: number) => `${Number((metres * 1000).toPrecision(3))} mm`;
  const sigma = plan.mark ? Math.max(plan.mark.sigmaLevelM, plan.mark.sigmaUprightM) : null;
  return (
    <section>
      <SectionHeading>What follows</SectionHeading>
      <FactList
        facts={[
          { term: `Beam to mark at ${formatClock(new Date(atMs), zone)}`, value: moment.missM === null ? 'no beam' : mm(moment.missM) },
          { term: 'Nearest in this time', value: nearest ? `${mm(nearest.missM)}, ${formatClock(new Date(nearest.utcMs), zone)}` : 'no beam' },
          { term: 'Mark known across to', value: sigma === null ? 'not measured' : `±${mm(sigma)}` },
          { term: 'Focus from the optic', value: moment.beam ? mm(moment.beam.focusM) : 'no beam' },
          { term: 'Mark from the optic', value: plan.mark ? mm(plan.mark.distanceM) : 'not measured' },
        ]}
      />
      {plan.problem ? <p className="pt-2 font-semibold">{plan.problem}</p> : null}
      {plan.outline ? null : <p className="pt-2">The beam is drawn once the sizes of the optic are on the page Values.</p>}
      <p className="pt-2 text-small text-second">Middle of the beam by the closed form; spread, walls and skyline are tested by a reconstruction.</p>
    </section>
  );
}
