import type { ReactNode } from 'react';

export interface ChipOption {
  readonly value: string;
  readonly label: ReactNode;
  /** "Don't know" and its like: a real choice, drawn dashed. */
  readonly dashed?: boolean;
  readonly disabled?: boolean;
}
export interface ChipGroupProps {
  readonly name: string;
  readonly options: readonly ChipOption[];
  /** Several may be chosen: checkboxes in place of radios. */
  readonly multiple?: boolean;
  readonly chosen?: string | readonly string[];
  readonly size?: 'normal' | 'large';
  readonly idPrefix?: string;
  readonly required?: boolean;
  readonly describedBy?: string;
  readonly invalid?: boolean;
  /** Equal widths across the line. */
  readonly spread?: boolean;
  readonly onChange?: (value: string, checked: boolean) => void;
}

/** Square chips over native radios or checkboxes; wrap it in a fieldset that asks the question. */
export function ChipGroup({ name, options, multiple = false, chosen, size = 'normal', idPrefix = name, required = false, describedBy, invalid = false, spread = false, onChange }: ChipGroupProps) {
  const isChosen = (value: string) => (typeof chosen === 'string' ? chosen === value : (chosen?.includes(value) ?? false));
  return (
    <div className="flex flex-wrap gap-2">
      {options.map((option) => (
        <label key={option.value} className={`chip ${spread ? 'flex-1' : ''}`} data-size={size} {...(option.dashed ? { 'data-dashed': '' } : {})}>
          <input
            type={multiple ? 'checkbox' : 'radio'}
            id={`${idPrefix}-${option.value.replaceAll(/[^\w-]+/gu, '-')}`}
            name={name}
            value={option.value}
            defaultChecked={isChosen(option.value)}
            disabled={option.disabled ?? false}
            required={required && !multiple}
            aria-describedby={describedBy}
            aria-invalid={invalid || undefined}
            onChange={onChange ? (event) => onChange(option.value, event.currentTarget.checked) : undefined}
          />
          <span>{option.label}</span>
        </label>
      ))}
    </div>
  );
}
