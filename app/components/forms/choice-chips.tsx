import type { ReactNode } from 'react';
import { ChipGroup } from '#app/components/ui/chip-group.tsx';
import type { ChipOption } from '#app/components/ui/chip-group.tsx';
import { FieldGroup } from './field.tsx';
import { describedBy, fieldChoices, fieldIds, hasErrors } from './field-like.ts';
import type { FieldLike } from './field-like.ts';

/** The answer that nobody has to be ashamed of; add it to the options of any question. */
export const dontKnowOption: ChipOption = { value: 'dont-know', label: "Don't know", dashed: true };

export interface ChoiceChipsProps {
  readonly field: FieldLike;
  readonly legend: ReactNode;
  readonly options: readonly ChipOption[];
  readonly help?: ReactNode;
  readonly step?: ReactNode;
  readonly multiple?: boolean;
  readonly size?: 'normal' | 'large';
  readonly spread?: boolean;
  readonly onChange?: (value: string, checked: boolean) => void;
  /** Anything that belongs under the chips, such as a line of free text. */
  readonly children?: ReactNode;
}

/** A question answered by square chips; behaves as a radio group, or as checkboxes when `multiple`. */
export function ChoiceChips({ field, legend, options, help, step, multiple = false, size = 'normal', spread = false, onChange, children }: ChoiceChipsProps) {
  return (
    <FieldGroup field={field} legend={legend} help={help} step={step}>
      <ChipGroup
        name={field.name}
        idPrefix={fieldIds(field).id}
        options={options}
        multiple={multiple}
        chosen={fieldChoices(field)}
        size={size}
        spread={spread}
        required={field.required ?? false}
        invalid={hasErrors(field)}
        {...(hasErrors(field) ? { describedBy: describedBy(field, Boolean(help)) ?? '' } : {})}
        {...(onChange ? { onChange } : {})}
      />
      {children ? <div className="pt-2">{children}</div> : null}
    </FieldGroup>
  );
}

export interface DontKnowProps {
  readonly field: FieldLike;
  readonly label?: ReactNode;
}

/** A lone "Don't know" beside a field, sent as `dont-know`. */
export function DontKnow({ field, label = "Don't know" }: DontKnowProps) {
  return <ChipGroup name={field.name} idPrefix={fieldIds(field).id} multiple options={[{ value: 'dont-know', label, dashed: true }]} chosen={fieldChoices(field)} />;
}
