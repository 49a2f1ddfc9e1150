import { Form } from 'react-router';
import { answerTo, problemFields } from '#app/components/findings/problem-fields.ts';
import type { FormAnswer } from '#app/components/findings/problem-fields.ts';
import { ChoiceChips } from '#app/components/forms/choice-chips.tsx';
import { ErrorSummary } from '#app/components/forms/error-summary.tsx';
import { Select, TextArea, TextInput, TickBox } from '#app/components/forms/text-field.tsx';
import { cautions } from '#app/components/layout/cautions.ts';
import { AppLink } from '#app/components/ui/app-link.tsx';
import { Button } from '#app/components/ui/button.tsx';
import { SectionHeading } from '#app/components/ui/page-title.tsx';
import { controlLevelLabels, controlLevels } from '#app/domain/corrective-action.ts';
import { riskLabels, risks } from '#app/domain/incident.ts';
import type { Risk } from '#app/domain/incident.ts';
import { formatIsoDay } from '#app/domain/local-time.ts';

export interface PersonOption {
  readonly userId: string;
  readonly displayName: string;
}

export interface ActionFormProps {
  readonly people: readonly PersonOption[];
  readonly defaults: Readonly<Record<Risk, string>>;
  readonly defaultRisk: Risk;
  readonly todayOn: string;
  readonly answer: FormAnswer | undefined;
  readonly closeHref: string;
}

export const personOptions = (people: readonly PersonOption[]) => people.map((person) => ({ value: person.userId, label: person.displayName }));
const levelOptions = controlLevels.map((value) => ({ value, label: controlLevelLabels[value] }));
const riskOptions = risks.map((value) => ({ value, label: riskLabels[value] }));

/** A new action: what, why, how strong a control, who does it, who checks it, until when. */
export function ActionForm({ people, defaults, defaultRisk, todayOn, answer, closeHref }: ActionFormProps) {
  const problem = answerTo(answer, 'add');
  const field = problemFields(problem, { risk: defaultRisk, controlLevel: 'engineering' });
  const named = [['title', 'What is to be done'], ['controlLevel', 'Level of control'], ['interim', 'Interim'], ['ownerId', 'Owner'], ['verifierId', 'Verifier'], ['dueOn', 'Due'], ['risk', 'Risk'], ['cost', 'Cost'], ['costCurrency', 'Currency']] as const;
  const dueHelp = `Left empty: ${risks.map((risk) => `${riskLabels[risk].toLowerCase()} ${formatIsoDay(defaults[risk])}`).join(', ')}.`;
  return (
    <section id="action-form" aria-labelledby="action-form-title" className="mb-8">
      <SectionHeading id="action-form-title" aside={<AppLink href={closeHref} className="text-small">Leave without saving</AppLink>}>A new action</SectionHeading>
      <Form method="post" className="max-w-[60rem] space-y-5">
        <input type="hidden" name="intent" value="add" />
        <ErrorSummary errors={problem?.formErrors} fields={named.map(([name, label]) => ({ field: field(name), label }))} />
        <TextInput field={field('title', { required: true })} label="What is to be done" help="No names of people: the title is seen in lists and calendars." />
        <TextArea field={field('why')} label="Why this, and not a stronger control" rows={3} />
        <ChoiceChips field={field('controlLevel')} legend="Level of control" options={levelOptions} help="Strongest first. Take the strongest that can be done." />
        <TickBox field={field('interim')} label="Interim: holds only until a lasting fix is in place" />
        <div className="grid gap-5 tablet:grid-cols-2">
          <Select field={field('ownerId', { required: true })} label="Owner" emptyLabel="Choose a person" options={personOptions(people)} />
          <Select field={field('verifierId', { required: true })} label="Verifier" emptyLabel="Choose somebody else" options={personOptions(people)} help="Another person than the owner." />
        </div>
        <div className="grid gap-5 tablet:grid-cols-2">
          <ChoiceChips field={field('risk')} legend="Risk if nothing is done" options={riskOptions} />
          <TextInput field={field('dueOn')} label="Due" type="date" min={todayOn} aside="not required" help={dueHelp} />
        </div>
        <div className="grid max-w-96 grid-cols-[1fr_7rem] gap-3">
          <TextInput field={field('cost')} label="Cost" inputMode="numeric" aside="not required" />
          <TextInput field={field('costCurrency')} label="Currency" maxLength={3} autoCapitalize="characters" />
        </div>
        <p className="text-small text-second">{cautions.film}</p>
        <Button>Give the action</Button>
      </Form>
    </section>
  );
}
