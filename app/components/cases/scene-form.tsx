import type { ReactNode } from 'react';
import { Form } from 'react-router';
import { ChoiceChips, dontKnowOption } from '#app/components/forms/choice-chips.tsx';
import { ErrorSummary } from '#app/components/forms/error-summary.tsx';
import { Select, TextArea, TextInput } from '#app/components/forms/text-field.tsx';
import type { SelectOption } from '#app/components/forms/text-field.tsx';
import { Button } from '#app/components/ui/button.tsx';
import { SectionHeading } from '#app/components/ui/page-title.tsx';
import type { SceneOpticKind } from '#app/domain/scene.ts';
import { damages, markShapes, opticMaterials, sceneOpticKinds, sceneOpticLabels, targetMaterialLabels, targetMaterials } from '#app/domain/scene.ts';
import { allSceneFields, fieldName, markFields, openingFields, opticFieldsFor, targetFields } from '#app/domain/scene-fields.ts';
import { formFields } from './form-fields.ts';
import type { RefusedForm } from './form-fields.ts';
import { MeasuredRows } from './measured-rows.tsx';

export interface SceneFormProps {
  readonly kind: SceneOpticKind;
  readonly stored: Readonly<Record<string, string>>;
  readonly baseVersion: number;
  readonly today: string;
  readonly declinationWords: string;
  readonly problem: RefusedForm | undefined;
}

const words = (value: string) => `${value.charAt(0).toUpperCase()}${value.slice(1).replaceAll('-', ' ')}`;
const plain = (values: readonly string[]): SelectOption[] => values.map((value) => ({ value, label: words(value) }));
const yesNo = [{ value: 'yes', label: 'Yes' }, { value: 'no', label: 'No' }, dontKnowOption] as const;
const otherNames: Readonly<Record<string, string>> = { 'skyline.points': 'Skyline', 'dni.values': 'Sun strength', 'dni.source': 'Source of the sun strength', note: 'What was measured' };

/** The measured scene, part by part, saved together as a new version. */
export function SceneForm({ kind, stored, baseVersion, today, declinationWords, problem }: SceneFormProps) {
  const { field: fieldOf, refused } = formFields('save-scene', problem, 'scene');
  const field = (name: string) => fieldOf(name, stored[name]);
  const labels = [...allSceneFields.map((one) => ({ field: field(fieldName(one)), label: one.label })), ...Object.entries(otherNames).map(([name, label]) => ({ field: field(name), label }))];
  return (
    <Form method="post" className="space-y-7" preventScrollReset>
      {refused ? <ErrorSummary errors={refused.formErrors} fields={labels} /> : null}
      <input type="hidden" name="intent" value="save-scene" />
      <input type="hidden" name="baseVersion" value={baseVersion} />
      <OpticPart kind={kind} field={field} />
      <Part title="Opening in the path" note="window, rooflight or windscreen that the light came through">
        <MeasuredRows fields={openingFields} field={field} />
        <div className="grid gap-4 tablet:grid-cols-4">
          <Select field={field('opening.glass')} label="Glass" options={plain(['unknown', 'none', 'single-clear-3', 'single-clear-6', 'double-clear', 'double-low-e', 'vehicle-glass'])} />
          <TextInput field={field('opening.halfWidthDeg')} label="Open to each side, °" inputMode="decimal" help="85 when not said." />
          <TextInput field={field('opening.lowestElevationDeg')} label="Lowest sun let in, °" inputMode="decimal" />
          <TextInput field={field('opening.highestElevationDeg')} label="Highest sun let in, °" inputMode="decimal" />
        </div>
      </Part>
      <Part title="Mark and target" note="from the centre of the optic to the centre of the mark">
        <MeasuredRows fields={[...markFields, ...targetFields]} field={field} />
        <div className="grid gap-4 tablet:grid-cols-4">
          <Select field={field('mark.shape')} label="Shape" emptyLabel="Not known" options={plain(markShapes)} />
          <Select field={field('mark.damage')} label="Damage" emptyLabel="Not known" options={plain(damages)} />
          <Select field={field('target.material')} label="Material" options={targetMaterials.map((value) => ({ value, label: targetMaterialLabels[value] }))} />
          <TextInput field={field('target.colour')} label="Colour" maxLength={80} />
        </div>
        <ChoiceChips field={field('target.sampleKept')} legend="Sample kept?" options={yesNo} />
      </Part>
      <BearingPart field={field} today={today} declinationWords={declinationWords} />
      <SkyPart field={field} />
      <TextInput field={field('note')} label="What was measured or changed, and by whom" help="Kept with the version and in the log." maxLength={500} required />
      <Button>Save as version {baseVersion + 1}</Button>
    </Form>
  );
}

type FieldOf = (name: string) => ReturnType<ReturnType<typeof formFields>['field']>;

function Part({ title, note, children }: { readonly title: string; readonly note?: string; readonly children: ReactNode }) {
  return (
    <section className="space-y-4">
      <SectionHeading note={note}>{title}</SectionHeading>
      {children}
    </section>
  );
}

function OpticPart({ kind, field }: { readonly kind: SceneOpticKind; readonly field: FieldOf }) {
  const { first, others } = opticFieldsFor(kind);
  return (
    <Part title="Optic" note="what bends or throws the light; never cleaned, never tried out with the sun">
      <div className="grid gap-4 tablet:grid-cols-3">
        <Select field={field('optic.kind')} label="Kind" options={sceneOpticKinds.map((value) => ({ value, label: sceneOpticLabels[value] }))} help="The sizes that matter for the kind stand first once it is saved." />
        <Select field={field('optic.material')} label="Material" emptyLabel="Not said" options={plain(opticMaterials)} />
        <ChoiceChips field={field('optic.movedSince')} legend="Moved since?" options={yesNo} />
      </div>
      <MeasuredRows fields={first} field={field} />
      <details open={first.length === 0}>
        <summary className="inline-flex min-h-11 items-center underline decoration-ember decoration-2 underline-offset-4 desk:min-h-8">Other sizes and directions</summary>
        <MeasuredRows fields={others} field={field} />
        <div className="grid gap-4 pt-3 tablet:grid-cols-3">
          <Select field={field('optic.generators')} label="Straight lines of a curved face run" emptyLabel="Not said" options={plain(['vertical', 'horizontal'])} />
          <Select field={field('optic.coatingSurface')} label="Coated surface of the pane" emptyLabel="Not known" options={['1', '2', '3', '4'].map((value) => ({ value, label: `Surface ${value}, counted from outside` }))} />
          <Select field={field('optic.faceToSun')} label="Lens face to the sun" emptyLabel="Not known" options={plain(['curved', 'flat'])} />
        </div>
      </details>
    </Part>
  );
}

function BearingPart({ field, today, declinationWords }: { readonly field: FieldOf; readonly today: string; readonly declinationWords: string }) {
  return (
    <Part title="How bearings are turned to true north" note="stored bearings are always from true north; the version's note keeps the reading">
      <div className="grid gap-4 tablet:grid-cols-2">
        <TextInput field={{ ...field('measuredOn'), defaultValue: field('measuredOn').defaultValue || today }} label="Day of the compass readings" type="date" help={declinationWords} />
        <TextInput field={field('gridConvergenceDeg')} label="Grid convergence, °, for grid bearings" inputMode="decimal" help="From the margin of the map; added to a grid bearing, east positive." />
      </div>
    </Part>
  );
}

function SkyPart({ field }: { readonly field: FieldOf }) {
  return (
    <Part title="Skyline and air">
      <div className="grid gap-x-8 gap-y-4 tablet:grid-cols-2">
        <div className="space-y-4">
          <TextArea field={field('skyline.points')} label="Skyline" rows={7} help='One point a line: bearing from true north, elevation, and a name if you like, such as "120 11.5 Grain House". Left empty, the skyline of the site is used.' spellCheck={false} />
          <div className="grid grid-cols-2 gap-4">
            <TextInput field={field('skyline.plusMinusDeg')} label="± of the skyline, °" inputMode="decimal" />
            <Select field={field('skyline.source')} label="Taken with" options={plain(['clinometer', 'panorama', 'drawing', 'model'])} />
          </div>
        </div>
        <div className="space-y-4">
          <TextArea field={field('dni.values')} label="Sun strength measured, direct, W/m²" rows={7} help='One value a line: start, end and the mean between them, such as "2026-02-03T10:00+01:00 2026-02-03T11:00+01:00 640".' spellCheck={false} />
          <div className="grid grid-cols-2 gap-4">
            <TextInput field={field('dni.source')} label="Source" maxLength={200} />
            <TextInput field={field('dni.stationDistanceKm')} label="Distance of the station, km" inputMode="decimal" help="30 km off cannot prove a clear gap." />
            <Select field={field('dni.basis')} label="Kind of value" options={[{ value: 'measured', label: 'Measured' }, { value: 'derived', label: 'Derived from global values' }, { value: 'hourly-archive', label: 'Hourly archive' }]} />
          </div>
        </div>
        <div className="grid grid-cols-2 gap-4 tablet:col-span-2 tablet:grid-cols-3">
          <Select field={field('air.climateClass')} label="Air, as a class" options={plain(['clean-dry-mountain', 'temperate-rural', 'urban-maritime', 'humid-tropics', 'dusty-desert'])} />
          <TextInput field={field('air.temperatureC')} label="Air temperature, °C" inputMode="decimal" />
          <TextInput field={field('air.pressureHpa')} label="Air pressure, hPa" inputMode="decimal" />
        </div>
      </div>
    </Part>
  );
}
