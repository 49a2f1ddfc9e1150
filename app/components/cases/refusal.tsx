import type { RefusedForm } from './form-fields.ts';

/** Sentences of a refused form that belong to no single field; what was typed stays in the fields. */
export function Refusal({ refused }: { readonly refused: RefusedForm | undefined }) {
  if (!refused) return null;
  const fields = Object.values(refused.fieldErrors).flat();
  return (
    <div role="alert" className="border-2 border-l-7 border-ink bg-sheet px-3 py-2">
      <p className="font-semibold">Not saved. What you typed is still here.</p>
      <ul className="list-disc pl-5">
        {refused.formErrors.map((sentence) => <li key={sentence}>{sentence}</li>)}
        {refused.formErrors.length === 0 ? fields.map((sentence) => <li key={sentence}>{sentence}</li>) : null}
      </ul>
    </div>
  );
}
