import { ChoiceChips } from '#app/components/forms/choice-chips.tsx';
import { TextInput } from '#app/components/forms/text-field.tsx';
import type { MomentField as MomentFieldName } from '#app/domain/report-fields.ts';
import { passField } from '#app/domain/report-fields.ts';
import type { ReportField, ReportFormState } from './report-fields.ts';

export interface MomentFieldProps {
  readonly name: MomentFieldName;
  readonly label: string;
  readonly field: ReportField;
  readonly state: ReportFormState;
  readonly fallback?: string;
  readonly help?: string;
}

/** A wall-clock time of the place. Where the clock showed it twice, asks which of the two is meant. */
export function MomentField({ name, label, field, state, fallback = '', help }: MomentFieldProps) {
  const repeated = state.repeated[name];
  return (
    <div className="min-w-0 space-y-2">
      <TextInput field={field(name, fallback)} label={label} {...(help === undefined ? {} : { help })} type="datetime-local" step={60} />
      {repeated ? (
        <ChoiceChips field={field(passField(name))} legend="Which one?" options={[{ value: 'first', label: repeated.first }, { value: 'second', label: repeated.second }]} />
      ) : null}
    </div>
  );
}
