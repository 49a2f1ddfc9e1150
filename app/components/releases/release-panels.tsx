import { Form } from 'react-router';
import { formFields } from '#app/components/cases/form-fields.ts';
import type { RefusedForm } from '#app/components/cases/form-fields.ts';
import { Refusal } from '#app/components/cases/refusal.tsx';
import { TextArea } from '#app/components/forms/text-field.tsx';
import { Button } from '#app/components/ui/button.tsx';
import type { ReleaseCheck } from '#app/domain/release-check.ts';

/** What the searches of the bytes found. A failed one is said in bold words, with a mark. */
export function ReleaseChecks({ checks }: { readonly checks: readonly ReleaseCheck[] }) {
  return (
    <ul>
      {checks.map((check) => (
        <li key={check.id} className={`flex gap-2.5 border-b border-hair py-1.5 ${check.passed ? '' : 'font-semibold'}`}>
          <svg width="14" height="14" viewBox="0 0 14 14" aria-hidden="true" className="mt-[0.2em] flex-none">
            {check.passed ? (
              <>
                <rect width="14" height="14" fill="currentColor" />
                <path d="m3.4 7.2 2.5 2.5 4.7-5.3" fill="none" stroke="var(--color-paper)" strokeWidth="1.8" />
              </>
            ) : <path d="M7 1v8M7 11v2.4" stroke="currentColor" strokeWidth="2.6" />}
          </svg>
          <span>
            <span className="sr-only">{check.passed ? 'Passed: ' : 'Failed: '}</span>
            {check.label}
            <span className="block text-axis text-second">{check.passed ? check.note : `Failed, ${check.note}`}</span>
          </span>
        </li>
      ))}
    </ul>
  );
}

export interface SecondPersonProps {
  readonly number: number;
  readonly recipient: string;
  readonly preparedBy: string;
  readonly isPreparer: boolean;
  readonly mayApprove: boolean;
  readonly whoCanApprove: string;
  readonly passed: boolean;
  readonly caseUnchanged: boolean;
  readonly problem: RefusedForm | undefined;
}

/** Approval by another person than the preparer. */
export function SecondPerson({ number, recipient, preparedBy, isPreparer, mayApprove, whoCanApprove, passed, caseUnchanged, problem }: SecondPersonProps) {
  const { refused } = formFields('approve', problem);
  return (
    <section aria-labelledby="second-heading" className="space-y-3">
      <h3 id="second-heading" className="border-b-[1.5px] border-ink pb-1 font-semibold">Second person</h3>
      <p>{isPreparer ? 'You prepared this, so somebody else approves it.' : `Prepared by ${preparedBy}.`}</p>
      {caseUnchanged ? null : <p className="border-l-6 border-ink pl-3">The case has changed since: the same decisions would give something else today. Prepare a new number if the change matters to the reader.</p>}
      <Refusal refused={refused} />
      {mayApprove ? (
        <Form method="post">
          <input type="hidden" name="intent" value="approve" />
          <Button block look={passed ? 'filled' : 'waiting'}>Approve and release to {recipient}</Button>
          <p className="pt-1 text-axis text-second">{passed ? `Release ${number} is then open to its readers, who are told by mail. It cannot be edited, only withdrawn.` : 'A search has failed. Withdraw this one, and prepare the next with that held back.'}</p>
        </Form>
      ) : <p className="text-small text-second">{whoCanApprove}</p>}
    </section>
  );
}

export function WithdrawPanel({ isOut, problem }: { readonly isOut: boolean; readonly problem: RefusedForm | undefined }) {
  const { field, refused } = formFields('withdraw', problem);
  return (
    <details open={refused !== undefined}>
      <summary className="inline-flex min-h-9 items-center font-semibold underline decoration-ember decoration-2 underline-offset-4">Withdraw this release</summary>
      <Form method="post" className="space-y-3 pt-2">
        <Refusal refused={refused} />
        <input type="hidden" name="intent" value="withdraw" />
        <TextArea field={field('reason')} label="Why" rows={3} help="Stays in the house." />
        <Button look="outlined">{isOut ? 'Close it to its readers' : 'Drop it'}</Button>
        <p className="text-axis text-second">{isOut ? 'Its readers are told by mail that it is closed. What they took away cannot be called back.' : 'Nobody outside has seen it. Its number is not used again.'}</p>
      </Form>
    </details>
  );
}
