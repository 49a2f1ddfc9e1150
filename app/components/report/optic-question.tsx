import { ChoiceChips } from '#app/components/forms/choice-chips.tsx';
import { FieldError } from '#app/components/forms/field.tsx';
import { fieldIds, fieldText } from '#app/components/forms/field-like.ts';
import { OpticPicker } from '#app/components/optics/optic-drawing.tsx';
import { dimensionFields, dimensionsOfKind, dimensionTexts, kindsWithMaterial, lengthUnits, reportDimensions, reportMaterials } from '#app/domain/report-optic.ts';
import type { ReportDimension } from '#app/domain/report-optic.ts';
import { sceneOpticKinds } from '#app/domain/scene.ts';
import { Follows, Question } from './question.tsx';
import type { ReportField } from './report-fields.ts';

const kindsWith = (dimension: ReportDimension) => sceneOpticKinds.filter((kind) => dimensionsOfKind[kind].includes(dimension)).join(' ');

/** What may have bent the light, by picture; then only the sizes that matter for that kind. Nothing here is required. */
export function OpticQuestion({ field }: { readonly field: ReportField }) {
  return (
    <Question title="What may have bent the light?" help="Not required. Pick the nearest shape. Blue is light, brown is where it lands.">
      <OpticPicker name="opticKind" legend={<span className="sr-only">What may have bent the light?</span>} chosen={fieldText(field('opticKind'))} />
      {reportDimensions.map((dimension) => (
        <Follows key={dimension} on={kindsWith(dimension)}>
          <DimensionFields dimension={dimension} field={field} />
        </Follows>
      ))}
      <Follows on={kindsWithMaterial.join(' ')}>
        <ChoiceChips field={field('opticMaterial')} legend="What is it made of?" options={reportMaterials.map((option) => ({ ...option, dashed: option.value === 'unknown' }))} />
      </Follows>
      <Follows on="optic-known">
        <ChoiceChips
          field={field('opticMoved')}
          legend="Has it been moved since?"
          options={[{ value: 'no', label: 'No' }, { value: 'yes', label: 'Yes' }, { value: 'dont-know', label: "Don't know", dashed: true }]}
        />
      </Follows>
    </Question>
  );
}

/** Value, unit, ± and how it was got; "Don't know" is one of the ways. */
function DimensionFields({ dimension, field }: { readonly dimension: ReportDimension; readonly field: ReportField }) {
  const names = dimensionFields(dimension);
  const text = dimensionTexts[dimension];
  const value = field(names.value);
  const plusMinus = field(names.plusMinus);
  const unit = field(names.unit, text.unit);
  const invalid = { 'aria-invalid': (value.errors?.length ?? 0) > 0 || undefined, 'aria-describedby': `${names.value}-help${value.errors ? ` ${fieldIds(value).errorId}` : ''}` };
  return (
    <fieldset className="min-w-0 pt-2">
      <legend className="pb-1 font-semibold">{text.question}</legend>
      <p id={`${names.value}-help`} className="pb-1.5 text-small text-second">{text.help}</p>
      <div className="flex gap-2.5 pb-2">
        <div className="min-w-0 flex-[2]">
          <label htmlFor={names.value} className="block pb-1 text-small text-second">About</label>
          <input id={names.value} name={names.value} defaultValue={fieldText(value)} inputMode="decimal" autoComplete="off" className="field-box" {...invalid} />
        </div>
        <div className="min-w-20 flex-1">
          <label htmlFor={names.unit} className="block pb-1 text-small text-second">Unit</label>
          <select id={names.unit} name={names.unit} defaultValue={fieldText(unit)} className="field-box">
            {lengthUnits.map((one) => <option key={one} value={one}>{one}</option>)}
          </select>
        </div>
        <div className="min-w-0 flex-1">
          <label htmlFor={names.plusMinus} className="block pb-1 text-small text-second"><span aria-hidden="true">±</span><span className="sr-only">Plus or minus</span></label>
          <input id={names.plusMinus} name={names.plusMinus} defaultValue={fieldText(plusMinus)} inputMode="decimal" autoComplete="off" className="field-box" aria-invalid={(plusMinus.errors?.length ?? 0) > 0 || undefined} />
        </div>
      </div>
      <FieldError field={value} />
      <FieldError field={plusMinus} />
      <ChoiceChips
        field={field(names.method)}
        legend={<span className="sr-only">{text.question} How was it got?</span>}
        options={[{ value: 'measured', label: 'Measured' }, { value: 'estimated', label: 'Estimated' }, { value: 'dont-know', label: "Don't know", dashed: true }]}
      />
    </fieldset>
  );
}
