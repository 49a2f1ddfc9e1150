import { Form } from 'react-router';
import type { RefusedForm } from '#app/components/cases/form-fields.ts';
import { formFields } from '#app/components/cases/form-fields.ts';
import { Refusal } from '#app/components/cases/refusal.tsx';
import { TextInput } from '#app/components/forms/text-field.tsx';
import { Button } from '#app/components/ui/button.tsx';

export interface RunFormProps {
  readonly intent: 'run' | 'repeat' | 'attach';
  readonly label: string;
  readonly fieldLabel: string;
  readonly help: string;
  /** Why it cannot be done now; the button then stays grey and the sentence stands beside it. */
  readonly refusal: string | null;
  readonly problem: RefusedForm | undefined;
  readonly look?: 'filled' | 'outlined';
}

/** A note and a button: ask for a run, or attach one. */
export function RunForm({ intent, label, fieldLabel, help, refusal, problem, look = 'filled' }: RunFormProps) {
  const { refused, field } = formFields(intent, problem);
  if (refusal !== null) {
    return (
      <div className="space-y-1.5" data-print="no">
        <Button type="button" look="waiting" disabled aria-describedby={`${intent}-refusal`}>{label}</Button>
        <p id={`${intent}-refusal`} className="max-w-[40ch] text-small text-second">{refusal}</p>
      </div>
    );
  }
  return (
    <Form method="post" className="space-y-3" data-print="no">
      <Refusal refused={refused} />
      <input type="hidden" name="intent" value={intent} />
      <div className="flex flex-wrap items-end gap-x-4 gap-y-3">
        <div className="min-w-0 flex-1 basis-64"><TextInput field={field(intent === 'attach' ? 'reason' : 'note')} label={fieldLabel} help={help} maxLength={300} /></div>
        <Button look={look}>{label}</Button>
      </div>
    </Form>
  );
}
