import type { ReactNode } from 'react';
import type { FieldLike } from './field-like.ts';
import { fieldIds } from './field-like.ts';

/** Mark and sentence saying how to mend it. */
export function FieldError({ field }: { readonly field: FieldLike }) {
  if (!field.errors || field.errors.length === 0) return null;
  return (
    <p id={fieldIds(field).errorId} className="mt-1 flex gap-2 text-small font-semibold">
      <span aria-hidden="true" className="w-2 flex-none text-center">!</span>
      <span>{field.errors.join(' ')}</span>
    </p>
  );
}

export interface FieldProps {
  readonly field: FieldLike;
  readonly label: ReactNode;
  readonly help?: ReactNode;
  /** Said beside the label, such as "not required". */
  readonly aside?: ReactNode;
  readonly children: ReactNode;
}

/** Label above, control, error, help. The control takes its ids from `fieldIds` and `describedBy`. */
export function Field({ field, label, help, aside, children }: FieldProps) {
  const { id, helpId } = fieldIds(field);
  return (
    <div className="min-w-0">
      <div className="flex items-baseline justify-between gap-3 pb-1">
        <label htmlFor={id} className="font-semibold">{label}</label>
        {aside ? <span className="text-axis text-second">{aside}</span> : null}
      </div>
      {children}
      <FieldError field={field} />
      {help ? <p id={helpId} className="mt-1 text-axis text-second">{help}</p> : null}
    </div>
  );
}

export interface FieldGroupProps {
  readonly field: FieldLike;
  readonly legend: ReactNode;
  readonly help?: ReactNode;
  /** Shown in a ring before the question; a number on the reporter's pages. */
  readonly step?: ReactNode;
  readonly children: ReactNode;
}

/** A question with several controls under it. */
export function FieldGroup({ field, legend, help, step, children }: FieldGroupProps) {
  const { id, helpId, errorId } = fieldIds(field);
  const invalid = (field.errors?.length ?? 0) > 0;
  return (
    <fieldset
      id={id}
      tabIndex={-1}
      className={`min-w-0 ${invalid ? 'border-l-5 border-ink pl-3' : ''}`}
      aria-describedby={[invalid ? errorId : '', help ? helpId : ''].filter(Boolean).join(' ') || undefined}
    >
      <legend className={step === undefined ? 'pb-1 font-semibold' : 'flex items-center gap-3 pb-2 text-account font-semibold'}>
        {step === undefined ? null : <StepDisc>{step}</StepDisc>}
        {legend}
      </legend>
      {help ? <p id={helpId} className="pb-2 text-small text-second">{help}</p> : null}
      {children}
      <FieldError field={field} />
    </fieldset>
  );
}

/** Numbered question disc; `done` fills it and shows a tick. */
export function StepDisc({ children, done = false }: { readonly children?: ReactNode; readonly done?: boolean }) {
  return (
    <span className={`inline-flex size-7 flex-none items-center justify-center rounded-[50%] border-[1.5px] border-ink font-serif text-body font-normal ${done ? 'bg-ink text-paper' : ''}`}>
      {done ? (
        <svg width="14" height="14" viewBox="0 0 14 14" role="img" aria-label="answered"><path d="m2.6 7.4 3 3 5.6-6.6" fill="none" stroke="currentColor" strokeWidth="2" /></svg>
      ) : children}
    </span>
  );
}
