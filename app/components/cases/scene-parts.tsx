import { ChoiceChips, dontKnowOption } from '#app/components/forms/choice-chips.tsx';
import { Select, TextInput } from '#app/components/forms/text-field.tsx';
import type { SceneOpticKind } from '#app/domain/scene.ts';
import { blindStates, damages, markShapes, moistures, opticMaterials, sceneOpticKinds, sceneOpticLabels, targetMaterialLabels, targetMaterials } from '#app/domain/scene.ts';
import { markFields, openingFields, opticFieldsFor, targetFields } from '#app/domain/scene-fields.ts';
import type { WorkedOut } from '#app/domain/scene-worked-out.ts';
import { MeasuredRows } from './measured-rows.tsx';
import type { FieldOf } from './scene-form-part.tsx';
import { FollowsFrom, Part, plain } from './scene-form-part.tsx';

const yesNo = [{ value: 'yes', label: 'Yes' }, { value: 'no', label: 'No' }, dontKnowOption] as const;

interface PartProps {
  readonly field: FieldOf;
  readonly stamps: Readonly<Record<string, string>>;
  readonly follows: WorkedOut;
}

export function OpticPart({ kind, field, stamps, follows }: PartProps & { readonly kind: SceneOpticKind }) {
  const { first, others } = opticFieldsFor(kind);
  return (
    <Part title="Optic" note="what bends or throws the light; never cleaned, never tried out with the sun">
      <div className="grid gap-4 tablet:grid-cols-3">
        <Select field={field('optic.kind')} label="Kind" options={sceneOpticKinds.map((value) => ({ value, label: sceneOpticLabels[value] }))} help="The sizes that matter for the kind stand first once it is saved." />
        <Select field={field('optic.material')} label="Material" emptyLabel="Not said" options={plain(opticMaterials)} />
        <ChoiceChips field={field('optic.movedSince')} legend="Moved since?" options={yesNo} />
      </div>
      <MeasuredRows fields={first} field={field} stamps={stamps} />
      <FollowsFrom words={follows.optic} />
      <details open={first.length === 0}>
        <summary className="inline-flex min-h-11 items-center underline decoration-ember decoration-2 underline-offset-4 desk:min-h-8">Other sizes and directions</summary>
        <MeasuredRows fields={others} field={field} stamps={stamps} />
        <div className="grid gap-4 pt-3 tablet:grid-cols-3">
          <Select field={field('optic.generators')} label="Straight lines of a curved face run" emptyLabel="Not said" options={plain(['vertical', 'horizontal'])} />
          <Select field={field('optic.coatingSurface')} label="Coated surface of the pane" emptyLabel="Not known" options={['1', '2', '3', '4'].map((value) => ({ value, label: `Surface ${value}, counted from outside` }))} />
          <Select field={field('optic.faceToSun')} label="Lens face to the sun" emptyLabel="Not known" options={plain(['curved', 'flat'])} />
        </div>
      </details>
      <TextInput field={field('optic.condition')} label="Cracks, coating, dirt" help="As seen. Do not clean it." maxLength={200} />
    </Part>
  );
}

export function OpeningPart({ field, stamps, follows }: PartProps) {
  return (
    <Part title="Opening in the path" note="window, rooflight or windscreen that the light came through">
      <MeasuredRows fields={openingFields} field={field} stamps={stamps} />
      <FollowsFrom words={follows.opening} />
      <div className="grid gap-4 tablet:grid-cols-3">
        <TextInput field={field('opening.halfWidthDeg')} label="Open to each side, °" inputMode="decimal" help="85 when not said." />
        <TextInput field={field('opening.lowestElevationDeg')} label="Lowest sun let in, °" inputMode="decimal" />
        <TextInput field={field('opening.highestElevationDeg')} label="Highest sun let in, °" inputMode="decimal" />
        <Select field={field('opening.glass')} label="Glass" options={plain(['unknown', 'none', 'single-clear-3', 'single-clear-6', 'double-clear', 'double-low-e', 'vehicle-glass'])} />
        <Select field={field('opening.blind')} label="Blind or curtain then" emptyLabel="Not said" options={plain(blindStates)} />
        <Select field={field('opening.insectScreen')} label="Insect screen" emptyLabel="Not said" options={[{ value: 'yes', label: 'Yes' }, { value: 'no', label: 'No' }, { value: 'dont-know', label: "Don't know" }]} />
      </div>
    </Part>
  );
}

export function MarkPart({ field, stamps, follows }: PartProps) {
  return (
    <Part title="Mark and target" note="from the centre of the optic to the centre of the mark">
      <MeasuredRows fields={[...markFields, ...targetFields]} field={field} stamps={stamps} />
      <FollowsFrom words={follows.mark} />
      <div className="grid gap-4 tablet:grid-cols-3">
        <Select field={field('mark.shape')} label="Shape" emptyLabel="Not known" options={plain(markShapes)} />
        <Select field={field('mark.damage')} label="Damage" emptyLabel="Not known" options={plain(damages)} />
        <Select field={field('target.material')} label="Material" options={targetMaterials.map((value) => ({ value, label: targetMaterialLabels[value] }))} />
        <TextInput field={field('target.colour')} label="Colour" maxLength={80} />
        <TextInput field={field('target.layers')} label="Layers" inputMode="numeric" />
        <Select field={field('target.moisture')} label="Moisture then" emptyLabel="Not said" options={[...plain(moistures.slice(0, 3)), { value: 'dont-know', label: "Don't know" }]} />
      </div>
      <ChoiceChips field={field('target.sampleKept')} legend="Sample kept?" options={yesNo} />
    </Part>
  );
}

export function AirPart({ field, around }: { readonly field: FieldOf; readonly around: { readonly skyline: string; readonly weather: string } }) {
  return (
    <Part title="Skyline and air">
      <p>{around.skyline} {around.weather}</p>
      <div className="grid grid-cols-2 gap-4 tablet:grid-cols-3">
        <Select field={field('air.climateClass')} label="Air, as a class" options={plain(['clean-dry-mountain', 'temperate-rural', 'urban-maritime', 'humid-tropics', 'dusty-desert'])} />
        <TextInput field={field('air.temperatureC')} label="Air temperature, °C" inputMode="decimal" />
        <TextInput field={field('air.pressureHpa')} label="Air pressure, hPa" inputMode="decimal" />
      </div>
    </Part>
  );
}
