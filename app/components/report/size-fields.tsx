import { ChoiceChips } from '#app/components/forms/choice-chips.tsx';
import { FieldError } from '#app/components/forms/field.tsx';
import { fieldIds, fieldText } from '#app/components/forms/field-like.ts';
import { sizeLetter } from '#app/components/optics/measure-sketch.tsx';
import type { UnitSystem } from '#app/domain/lengths.ts';
import { firstUnit, unitsOf } from '#app/domain/report-optic.ts';
import { dimensionFields, dimensionTexts } from '#app/domain/report-optic-sizes.ts';
import type { SizeQuestion } from '#app/domain/report-optic-sizes.ts';
import type { SceneOpticKind } from '#app/domain/scene.ts';
import type { ReportField } from './report-fields.ts';

const ways = [
  { value: 'measured', label: 'Measured' },
  { value: 'estimated', label: 'Guessed' },
  { value: 'photo', label: "I'll show it in a photo" },
  { value: 'dont-know', label: "Don't know", dashed: true },
];

export interface SizeFieldsProps {
  readonly kind: SceneOpticKind;
  readonly question: SizeQuestion;
  readonly field: ReportField;
  readonly units: UnitSystem;
}

/** Value, unit, ± and how it was got. A photo or "Don't know" stands in for a number. */
export function SizeFields({ kind, question: { dimension, question, help }, field, units }: SizeFieldsProps) {
  const names = dimensionFields(kind, dimension);
  const { quantity } = dimensionTexts[dimension];
  const value = field(names.value);
  const plusMinus = field(names.plusMinus);
  const letter = sizeLetter(kind, dimension);
  const helpId = `${names.value}-help`;
  const described = (one: typeof value) => ((one.errors?.length ?? 0) > 0 ? { 'aria-invalid': true, 'aria-describedby': `${fieldIds(one).errorId} ${helpId}` } : { 'aria-describedby': helpId });
  return (
    <fieldset className="min-w-0 pt-2">
      <legend className="pb-1 font-semibold">{letter ? <span className="font-serif">{letter}. </span> : null}{question}</legend>
      <p id={helpId} className="pb-1.5 text-small text-second">{help}</p>
      <div className="flex gap-2.5 pb-2">
        <div className="min-w-0 flex-[2]">
          <label htmlFor={names.value} className="block pb-1 text-small text-second">About</label>
          <input id={names.value} name={names.value} defaultValue={fieldText(value)} inputMode="decimal" autoComplete="off" className="field-box" {...described(value)} />
        </div>
        <div className="min-w-20 flex-1">
          <label htmlFor={names.unit} className="block pb-1 text-small text-second">Unit</label>
          <select id={names.unit} name={names.unit} defaultValue={fieldText(field(names.unit, firstUnit(dimension, units)))} className="field-box">
            {unitsOf(quantity).map((one) => <option key={one} value={one}>{one}</option>)}
          </select>
        </div>
        <div className="min-w-0 flex-1">
          <label htmlFor={names.plusMinus} className="block pb-1 text-small text-second"><span aria-hidden="true">±</span><span className="sr-only">Plus or minus</span></label>
          <input id={names.plusMinus} name={names.plusMinus} defaultValue={fieldText(plusMinus)} inputMode="decimal" autoComplete="off" className="field-box" {...described(plusMinus)} />
        </div>
      </div>
      <FieldError field={value} />
      <FieldError field={plusMinus} />
      <ChoiceChips field={field(names.method)} legend={<span className="sr-only">{question} How do you know?</span>} options={ways} />
    </fieldset>
  );
}
