import { Form } from 'react-router';
import { answerTo, problemFields } from '#app/components/findings/problem-fields.ts';
import type { FormAnswer } from '#app/components/findings/problem-fields.ts';
import { ErrorSummary } from '#app/components/forms/error-summary.tsx';
import { Select, TextInput } from '#app/components/forms/text-field.tsx';
import { AppLink } from '#app/components/ui/app-link.tsx';
import { Button } from '#app/components/ui/button.tsx';
import { SectionHeading } from '#app/components/ui/page-title.tsx';
import { personOptions } from './action-form.tsx';
import type { PersonOption } from './action-form.tsx';

export const bulkActs = ['re-date', 'reassign', 'remind'] as const;
export type BulkAct = (typeof bulkActs)[number];
export const bulkWords: Record<BulkAct, string> = { 're-date': 'Re-date', reassign: 'Give to', remind: 'Remind' };

export interface BulkView {
  readonly act: BulkAct;
  readonly dueOn: string;
  readonly chosen: readonly { readonly value: string; readonly title: string; readonly now: string; readonly preview: string }[];
}

export interface BulkPanelProps {
  readonly bulk: BulkView;
  readonly people: readonly PersonOption[];
  readonly todayOn: string;
  readonly answer: FormAnswer | undefined;
  readonly closeHref: string;
  /** Filter of the list, kept while the preview is made. */
  readonly kept: readonly (readonly [name: string, value: string])[];
}

/** What is about to be done to the chosen rows, row by row, before it is done. */
export function BulkPanel({ bulk, people, todayOn, answer, closeHref, kept }: BulkPanelProps) {
  const problem = answerTo(answer, bulk.act);
  const field = problemFields(problem, { dueOn: bulk.dueOn }, 'bulk-');
  const count = `${bulk.chosen.length} ${bulk.chosen.length === 1 ? 'action' : 'actions'}`;
  const options = personOptions(people);
  return (
    <section aria-labelledby="bulk-title" className="mb-6 border-y-[1.5px] border-ink bg-sheet px-4 py-3">
      <SectionHeading id="bulk-title" aside={<AppLink href={closeHref} className="text-small">Leave it</AppLink>}>{bulkWords[bulk.act]} {count}</SectionHeading>
      <Form method="post" className="max-w-[60rem] space-y-4">
        {bulk.chosen.map((row) => <input key={row.value} type="hidden" name="chosen" value={row.value} />)}
        {kept.map(([name, value]) => <input key={name} type="hidden" name={name} value={value} />)}
        <input type="hidden" name="intent" value={bulk.act} />
        <ErrorSummary errors={problem?.formErrors} title="Not done yet. None of the rows was changed." fields={[{ field: field('dueOn'), label: 'New day' }, { field: field('ownerId'), label: 'Owner' }, { field: field('verifierId'), label: 'Verifier' }, { field: field('reason'), label: 'Reason' }]} />
        {bulk.act === 're-date' ? (
          <div className="flex flex-wrap items-end gap-3">
            <div className="w-48"><TextInput field={field('dueOn')} label="New day" type="date" min={todayOn} /></div>
            <Button look="outlined" formMethod="get" name="bulk" value="re-date">Show what changes</Button>
          </div>
        ) : null}
        {bulk.act === 'reassign' ? (
          <div className="grid gap-4 tablet:grid-cols-2">
            <Select field={field('ownerId')} label="Owner" emptyLabel="Choose a person" options={options} />
            <Select field={field('verifierId')} label="Verifier" emptyLabel="Choose somebody else" options={options} />
          </div>
        ) : null}
        <ul>
          {bulk.chosen.map((row) => <li key={row.value} className="border-b border-hair py-1.5"><span className="font-semibold">{row.title}</span> <span className="text-second">{row.now}</span>{row.preview ? <span className="block">{row.preview}</span> : null}</li>)}
        </ul>
        {bulk.act === 'remind' ? <p className="text-second">Each owner gets one mail about each action; pressed twice on one day it is still one.</p> : <TextInput field={field('reason')} label="Reason" help="It stands in the history of each action." />}
        <Button>{bulkWords[bulk.act]} {count}</Button>
      </Form>
    </section>
  );
}
