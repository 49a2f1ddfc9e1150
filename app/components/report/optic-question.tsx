import { ChoiceChips } from '#app/components/forms/choice-chips.tsx';
import { fieldText } from '#app/components/forms/field-like.ts';
import { TextInput } from '#app/components/forms/text-field.tsx';
import { MeasureSketch } from '#app/components/optics/measure-sketch.tsx';
import { OpticPicker } from '#app/components/optics/optic-drawing.tsx';
import type { UnitSystem } from '#app/domain/lengths.ts';
import { ifUnknown, kindsByFacing, kindsThatLie, kindsWithCoating, kindsWithFaces, kindsWithMaterial, kindsWithPrint, reportMaterials, sizeQuestions } from '#app/domain/report-optic-sizes.ts';
import { sceneOpticKinds } from '#app/domain/scene.ts';
import { FacingFields } from './facing-fields.tsx';
import { Follows, OnlyMarks, Question } from './question.tsx';
import type { ReportField } from './report-fields.ts';
import { SizeFields } from './size-fields.tsx';

const dontKnow = { value: 'dont-know', label: "Don't know", dashed: true } as const;
const coatings = [
  { value: '1', label: '1: the outermost face' },
  { value: '2', label: '2: behind the outer pane' },
  { value: '3', label: '3: before the inner pane' },
  { value: '4', label: '4: the room side' },
  dontKnow,
];

export interface OpticQuestionProps {
  readonly field: ReportField;
  readonly units: UnitSystem;
  /** What the form holds at the moment. */
  readonly values: Readonly<Record<string, string>>;
}

/** What may have bent the light, by picture; then only what the model of that kind uses. Nothing here is required. */
export function OpticQuestion({ field, units, values }: OpticQuestionProps) {
  return (
    <Question title="What may have bent the light?" help="Not required. Pick the nearest shape. Blue is light, brown is where it lands.">
      <OpticPicker name="opticKind" legend={<span className="sr-only">What may have bent the light?</span>} chosen={fieldText(field('opticKind'))} />
      <Follows on="optic-known">
        <p className="border-l-6 border-ink py-1 pl-4 text-small">Measure only what you can reach with your feet on the ground, with the thing shaded or covered. Do not clean it, move it or pour anything out. A guess, a photo or “Don't know” is fine.</p>
      </Follows>
      {sceneOpticKinds.filter((kind) => kind !== 'dont-know').map((kind) => (
        <Follows key={kind} on={kind}>
          <OnlyMarks>
            <MeasureSketch kind={kind} />
            {sizeQuestions[kind].map((question) => <SizeFields key={question.dimension} kind={kind} question={question} field={field} units={units} />)}
            <p className="text-small text-second">{ifUnknown[kind]}</p>
          </OnlyMarks>
        </Follows>
      ))}
      <Follows on={kindsWithPrint.join(' ')}>
        <TextInput field={field('opticPrinted')} label="Is anything printed on it?" help="Such as 5×, f 200 or 8 × 40. A number like 5× is a clue, not a measurement." autoComplete="off" maxLength={80} />
      </Follows>
      <Follows on={kindsWithMaterial.join(' ')}>
        <ChoiceChips field={field('opticMaterial')} legend="What is it made of?" options={reportMaterials.map((option) => ({ ...option, dashed: option.value === 'unknown' }))} />
      </Follows>
      <Follows on={kindsWithFaces.join(' ')}>
        <ChoiceChips field={field('opticFace')} legend="Which face was up, toward the sun?" options={[{ value: 'curved', label: 'The curved face' }, { value: 'flat', label: 'The flat face' }, dontKnow]} />
      </Follows>
      <Follows on={kindsWithCoating.join(' ')}>
        <ChoiceChips field={field('opticCoating')} legend="Which face of the glass is coated?" help="Often printed in the bar between the panes. Faces are counted from outside." options={coatings} />
      </Follows>
      <Follows on={kindsThatLie.join(' ')}>
        <ChoiceChips field={field('opticLies')} legend="How did it stand?" options={[{ value: 'upright', label: 'Upright' }, { value: 'lying', label: 'Lying down' }, dontKnow]} />
      </Follows>
      <Follows on={kindsByFacing.join(' ')}>
        <FacingFields field={field} values={values} />
      </Follows>
      <Follows on="optic-known">
        <ChoiceChips field={field('opticMoved')} legend="Has it been moved since?" options={[{ value: 'no', label: 'No' }, { value: 'yes', label: 'Yes' }, dontKnow]} />
      </Follows>
    </Question>
  );
}
