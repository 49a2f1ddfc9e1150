import { asksWhichPass, whichField } from '#app/domain/typed-moment.ts';
import { ChoiceChips } from './choice-chips.tsx';
import { DateTimeField } from './date-time-range.tsx';
import type { DateTimeFieldProps } from './date-time-range.tsx';
import type { FieldLike } from './field-like.ts';

export interface ClockTimeFieldProps extends DateTimeFieldProps {
  /** Makes the field that says which pass of a repeated hour is meant. */
  readonly fieldFor: (name: string) => FieldLike;
}

/** A clock time of the place. In the night on which the clock is put back it asks which of the two passes is meant. */
export function ClockTimeField({ fieldFor, ...moment }: ClockTimeFieldProps) {
  const which = fieldFor(whichField(moment.field.name));
  const asked = moment.field.errors?.some(asksWhichPass) || Boolean(which.initialValue);
  return (
    <div>
      <DateTimeField {...moment} />
      {asked ? <div className="pt-2"><ChoiceChips field={which} legend="Which of the two" options={[{ value: 'first', label: 'The first' }, { value: 'second', label: 'The second' }]} /></div> : null}
    </div>
  );
}
