import { Form } from 'react-router';
import { Select, TextArea, TextInput } from '#app/components/forms/text-field.tsx';
import { Button } from '#app/components/ui/button.tsx';
import { SectionHeading } from '#app/components/ui/page-title.tsx';
import type { InjuryView } from '#app/domain/case-view.ts';
import { injuryKindLabels, injuryKinds, treatmentLabels, treatments } from '#app/domain/injury.ts';
import { formFields } from './form-fields.ts';
import type { RefusedForm } from './form-fields.ts';
import { Refusal } from './refusal.tsx';

/** Health fields, apart from the account; shown only to those who may read them. */
export function InjuryBox({ injuries, problem }: { readonly injuries: readonly InjuryView[]; readonly problem: RefusedForm | undefined }) {
  return (
    <section aria-labelledby="injury-heading">
      <SectionHeading id="injury-heading" note="open to an investigator and the privacy lead; write only what is needed">Injury</SectionHeading>
      {injuries.length === 0 ? <p className="text-second">Nothing is recorded here.</p> : null}
      {injuries.map((injury) => (
        <div key={injury.id} className="border-b border-hair py-1.5">
          <p>{injury.words}</p>
          {injury.description ? <p className="text-small text-second">{injury.description}</p> : null}
          <InjuryForm injury={injury} problem={problem} />
        </div>
      ))}
      <InjuryForm injury={null} problem={problem} />
    </section>
  );
}

function InjuryForm({ injury, problem }: { readonly injury: InjuryView | null; readonly problem: RefusedForm | undefined }) {
  const id = injury?.id ?? '';
  const mine = problem && (problem.typed['injuryId'] ?? '') === id ? problem : undefined;
  const { field, refused } = formFields('save-injury', mine, `injury-${id || 'new'}`);
  return (
    <details open={refused !== undefined}>
      <summary className="inline-flex min-h-11 items-center text-small underline decoration-ember decoration-2 underline-offset-4 desk:min-h-8">{injury ? 'Change' : 'Add an injury'}</summary>
      <Form method="post" className="grid max-w-[52rem] gap-4 py-2 tablet:grid-cols-2" preventScrollReset>
        <div className="tablet:col-span-2"><Refusal refused={refused} /></div>
        <input type="hidden" name="intent" value="save-injury" />
        <input type="hidden" name="injuryId" value={id} />
        <Select field={field('kind', injury?.kind)} label="Kind" emptyLabel="Not known" options={injuryKinds.map((kind) => ({ value: kind, label: injuryKindLabels[kind] }))} />
        <TextInput field={field('part', injury?.part)} label="Part of the body" maxLength={80} />
        <Select field={field('treatment', injury?.treatment ?? 'unknown')} label="Treatment" options={treatments.map((one) => ({ value: one, label: treatmentLabels[one] }))} />
        <div className="flex gap-4">
          <TextInput field={field('daysAway', injury?.daysAway)} label="Days away" inputMode="numeric" />
          <TextInput field={field('restrictedDays', injury?.restrictedDays)} label="Days restricted" inputMode="numeric" />
        </div>
        <div className="tablet:col-span-2"><TextArea field={field('description', injury?.description)} label="What is needed to understand it" rows={2} maxLength={1_000} /></div>
        <div><Button look="outlined">Save</Button></div>
      </Form>
    </details>
  );
}
