import type { ReactNode } from 'react';
import { FieldError, FieldGroup } from './field.tsx';
import { describedBy, fieldIds, fieldText, hasErrors } from './field-like.ts';
import type { FieldLike } from './field-like.ts';

export interface DateTimeRangeProps {
  readonly legend: ReactNode;
  /** Local wall time at the place, `YYYY-MM-DDTHH:MM`; the server turns it into an instant with the zone. */
  readonly from: FieldLike;
  readonly to: FieldLike;
  readonly fromLabel?: string;
  readonly toLabel?: string;
  /** IANA zone of the place, shown in words. */
  readonly zone: string;
  /** "UTC+1", or what differs for the reader. */
  readonly zoneNote?: string;
  readonly help?: ReactNode;
  readonly step?: ReactNode;
  /** Latest local time that makes sense. */
  readonly max?: string;
}

interface MomentProps {
  readonly field: FieldLike;
  readonly label: string;
  readonly max?: string | undefined;
}

function Moment({ field, label, max }: MomentProps) {
  return (
    <div className="min-w-0 flex-1 basis-52">
      <label htmlFor={fieldIds(field).id} className="block pb-1 text-small text-second">{label}</label>
      <input type="datetime-local" id={fieldIds(field).id} name={field.name} defaultValue={fieldText(field)} max={max} step={60} required={field.required ?? false} className="field-box" aria-invalid={hasErrors(field) || undefined} aria-describedby={describedBy(field, false)} />
      <FieldError field={field} />
    </div>
  );
}

/** Two moments in the clock of the place; a range is as good an answer as an exact time. */
export function DateTimeRange({ legend, from, to, fromLabel = 'Last seen sound', toLabel = 'Found, or latest possible', zone, zoneNote, help, step, max }: DateTimeRangeProps) {
  const group: FieldLike = { name: `${from.name}-group`, id: `${fieldIds(from).id}-group` };
  return (
    <FieldGroup field={group} legend={legend} help={help} step={step}>
      <div className="flex flex-wrap gap-2.5">
        <Moment field={from} label={fromLabel} max={max} />
        <Moment field={to} label={toLabel} max={max} />
      </div>
      <ZoneLine zone={zone} note={zoneNote} />
    </FieldGroup>
  );
}

function ZoneLine({ zone, note }: { readonly zone: string; readonly note?: string | undefined }) {
  return (
    <p className="mt-1 text-axis text-second">
      Clock time at the place, {zone.replaceAll('_', ' ')}
      {note ? `, ${note}` : ''}. For one exact time give the same moment twice.
    </p>
  );
}

export interface DateTimeFieldProps extends Pick<DateTimeRangeProps, 'zone' | 'zoneNote' | 'help' | 'max'> {
  readonly field: FieldLike;
  readonly label: string;
}

/** One moment in the clock of the place. */
export function DateTimeField({ field, label, zone, zoneNote, help, max }: DateTimeFieldProps) {
  const { id, helpId } = fieldIds(field);
  return (
    <div>
      <label htmlFor={id} className="block pb-1 font-semibold">{label}</label>
      <input type="datetime-local" id={id} name={field.name} defaultValue={fieldText(field)} max={max} step={60} required={field.required ?? false} className="field-box" aria-invalid={hasErrors(field) || undefined} aria-describedby={describedBy(field, true)} />
      <FieldError field={field} />
      <p id={helpId} className="mt-1 text-axis text-second">
        Clock time at the place, {zone.replaceAll('_', ' ')}
        {zoneNote ? `, ${zoneNote}` : ''}. {help}
      </p>
    </div>
  );
}
