import { Form } from 'react-router';
import { ChoiceChips } from '#app/components/forms/choice-chips.tsx';
import { ErrorSummary } from '#app/components/forms/error-summary.tsx';
import { Select, TextArea } from '#app/components/forms/text-field.tsx';
import { AppLink } from '#app/components/ui/app-link.tsx';
import { Button } from '#app/components/ui/button.tsx';
import { Notice } from '#app/components/ui/notice.tsx';
import { SectionHeading } from '#app/components/ui/page-title.tsx';
import { hypothesisKindLabels, hypothesisKinds, hypothesisResultLabels, hypothesisResults, testLabels, testNames, testResultLabels, testResults } from '#app/domain/hypothesis.ts';
import type { TestName } from '#app/domain/hypothesis.ts';
import { problemFields } from './problem-fields.ts';
import type { FormAnswer } from './problem-fields.ts';

export interface HypothesisFormProps {
  /** Empty for a new one. */
  readonly hypothesisId: string;
  readonly openedAt: string;
  readonly stored: Readonly<Record<string, string>>;
  /** The tests hold the engine's words, not yet a person's. */
  readonly suggested: boolean;
  readonly people: readonly { readonly userId: string; readonly displayName: string }[];
  readonly answer: FormAnswer | null;
  readonly closeHref: string;
}

const kindOptions = hypothesisKinds.map((kind) => ({ value: kind, label: hypothesisKindLabels[kind] }));
const resultOptions = hypothesisResults.map((result) => ({ value: result, label: hypothesisResultLabels[result], dashed: result === 'not-tested' }));
const testOptions = testResults.map((result) => ({ value: result, label: testResultLabels[result], dashed: result === 'not-tested' }));

/** What each test asks of an idea that is not about the sun as well. */
const testHelp: Record<TestName, string> = {
  geometry: 'Could it reach this place, from where it was?',
  weather: 'Did the sky, or the air, allow it then?',
  energy: 'Was there heat enough, for long enough?',
  mark: 'Does the mark look as it would have to?',
};

/** One hypothesis, new or changed. Works as a plain form. */
export function HypothesisForm({ hypothesisId, openedAt, stored, suggested, people, answer, closeHref }: HypothesisFormProps) {
  const field = problemFields(answer, stored);
  const labels = [...testNames.map((name) => ({ field: field(`${name}Result`), label: testLabels[name] }))];
  return (
    <section id="hypothesis-form" aria-labelledby="hypothesis-form-title" className="mb-8">
      <SectionHeading id="hypothesis-form-title" aside={<AppLink href={closeHref} className="text-small">Leave without saving</AppLink>}>{hypothesisId === '' ? 'A further hypothesis' : 'Change the hypothesis'}</SectionHeading>
      <Form method="post" className="max-w-[60rem] space-y-5">
        <input type="hidden" name="intent" value="save-hypothesis" />
        <input type="hidden" name="hypothesisId" value={hypothesisId} />
        <input type="hidden" name="openedAt" value={openedAt} />
        <ErrorSummary
          errors={answer?.formErrors}
          fields={[{ field: field('kind'), label: 'Kind of cause' }, { field: field('statement'), label: 'Statement' }, ...labels, { field: field('result'), label: 'Result' }, { field: field('testedById'), label: 'Tested by' }]}
        />
        {suggested ? <Notice title="The four tests below hold the engine's words" role="note">They are a suggestion. Read each one, change what you see otherwise, and save it as yours.</Notice> : null}
        <ChoiceChips field={field('kind')} legend="Kind of cause" options={kindOptions} />
        <TextArea field={field('statement', { required: true })} label="What would have happened" help="One sentence: what gave the heat, what it reached, and how." rows={2} />
        <TextArea field={field('predicts')} label="If so, we should see" help="One line each. Think of what would disprove it." rows={3} />
        <div className="grid gap-5 tablet:grid-cols-2">
          <TextArea field={field('evidenceFor')} label="For" help="One line each. &ldquo;run 4&rdquo; and &ldquo;photo 3&rdquo; become links." rows={4} />
          <TextArea field={field('evidenceAgainst')} label="Against" help="One line each." rows={4} />
        </div>
        <div className="grid gap-x-8 gap-y-5 tablet:grid-cols-2">
          {testNames.map((name) => (
            <div key={name} className="space-y-2">
              <ChoiceChips field={field(`${name}Result`)} legend={testLabels[name]} help={testHelp[name]} options={testOptions} />
              <TextArea field={field(`${name}Why`)} label={`Why, for ${testLabels[name].toLowerCase()}`} aside="needed when not tested" rows={2} />
            </div>
          ))}
        </div>
        <ChoiceChips field={field('result')} legend="Result, as a person states it" options={resultOptions} help="Ruled out needs something against it. Probable needs something for it. Not ruled out is not shown." />
        <div className="max-w-80"><Select field={field('testedById')} label="Tested by" emptyLabel="Nobody yet" options={people.map((person) => ({ value: person.userId, label: person.displayName }))} /></div>
        <Button>Save the hypothesis</Button>
      </Form>
    </section>
  );
}
