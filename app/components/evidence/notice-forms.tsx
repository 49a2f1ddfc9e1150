import { Form } from 'react-router';
import { ChoiceChips } from '#app/components/forms/choice-chips.tsx';
import { ClockTimeField } from '#app/components/forms/clock-time-field.tsx';
import { ErrorSummary } from '#app/components/forms/error-summary.tsx';
import { Select, TextInput } from '#app/components/forms/text-field.tsx';
import { problemFields } from '#app/components/findings/problem-fields.ts';
import type { FormAnswer } from '#app/components/findings/problem-fields.ts';
import { Button } from '#app/components/ui/button.tsx';
import { noticeAnswerLabels, noticeAnswers, noticeWayLabels, noticeWays, partyRoleLabels, partyRoles } from '#app/domain/evidence-notice.ts';
import type { PlanView } from '#app/domain/evidence-steps-view.ts';

interface FormProps {
  /** Makes a repeated sending harmless. */
  readonly clientId: string;
  readonly zone: string;
  readonly answer: FormAnswer | null;
}

/** A notice that was sent: to which party, how and when. */
export function NoticeForm({ clientId, zone, answer, plans }: FormProps & { readonly plans: readonly PlanView[] }) {
  const field = problemFields(answer, { planId: plans[0]?.id ?? '' }, 'notice-');
  const names = [['planId', 'About'], ['partyRole', 'Which party'], ['toWhom', 'To whom'], ['way', 'How'], ['sentAt', 'Sent at']] as const;
  return (
    <details open={answer !== null} className="border-b border-hair">
      <summary className="inline-flex min-h-11 items-center underline decoration-ember decoration-2 underline-offset-4 desk:min-h-9">Record a notice</summary>
      <Form method="post" className="space-y-4 pt-1 pb-4">
        <input type="hidden" name="intent" value="notice" />
        <input type="hidden" name="clientId" value={answer?.typed['clientId'] ?? clientId} />
        <ErrorSummary errors={answer?.formErrors} fields={names.map(([name, label]) => ({ field: field(name), label }))} />
        {plans.length > 0 ? <Select field={field('planId')} label="About" emptyLabel="The item as a whole" options={plans.map((plan) => ({ value: plan.id, label: `Examination planned for ${plan.when}` }))} /> : null}
        <div className="grid gap-4 tablet:grid-cols-2">
          <Select field={field('partyRole', { required: true })} label="Which party" emptyLabel="Choose" options={partyRoles.map((value) => ({ value, label: partyRoleLabels[value] }))} />
          <TextInput field={field('toWhom', { required: true })} label="To whom" help="Person or firm. Never leaves the house." autoComplete="off" />
          <Select field={field('way', { required: true })} label="How" emptyLabel="Choose" options={noticeWays.map((value) => ({ value, label: noticeWayLabels[value] }))} />
          <ClockTimeField field={field('sentAt', { required: true })} fieldFor={field} label="Sent at" zone={zone} />
        </div>
        <Button look="outlined">Record the notice</Button>
      </Form>
    </details>
  );
}

/** What a party answered. The newest answer holds; earlier ones stay in the log. */
export function AnswerForm({ clientId, zone, answer, notices }: FormProps & { readonly notices: readonly { readonly id: string; readonly words: string }[] }) {
  const field = problemFields(answer, {}, 'answer-');
  const names = [['noticeId', 'Which notice'], ['answer', 'What they answered'], ['answeredAt', 'Came at'], ['note', 'In their words']] as const;
  return (
    <details open={answer !== null} className="border-b border-hair">
      <summary className="inline-flex min-h-11 items-center underline decoration-ember decoration-2 underline-offset-4 desk:min-h-9">Record an answer</summary>
      <Form method="post" className="space-y-4 pt-1 pb-4">
        <input type="hidden" name="intent" value="answer" />
        <input type="hidden" name="clientId" value={answer?.typed['clientId'] ?? clientId} />
        <ErrorSummary errors={answer?.formErrors} fields={names.map(([name, label]) => ({ field: field(name), label }))} />
        <Select field={field('noticeId', { required: true })} label="Which notice" emptyLabel="Choose" options={notices.map(({ id, words }) => ({ value: id, label: words }))} />
        <ChoiceChips field={field('answer')} legend="What they answered" options={noticeAnswers.map((value) => ({ value, label: noticeAnswerLabels[value] }))} />
        <div className="grid gap-4 tablet:grid-cols-2">
          <ClockTimeField field={field('answeredAt', { required: true })} fieldFor={field} label="Came at" zone={zone} />
          <TextInput field={field('note')} label="In their words" aside="not required" autoComplete="off" />
        </div>
        <Button look="outlined">Record the answer</Button>
      </Form>
    </details>
  );
}
