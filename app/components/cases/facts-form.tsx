import { Form } from 'react-router';
import { ChoiceChips, dontKnowOption } from '#app/components/forms/choice-chips.tsx';
import { DateTimeField } from '#app/components/forms/date-time-range.tsx';
import { Select, TextArea, TextInput } from '#app/components/forms/text-field.tsx';
import type { SelectOption } from '#app/components/forms/text-field.tsx';
import { Button } from '#app/components/ui/button.tsx';
import { eventTypeLabels, eventTypes, extentLabels, extents, foundMeans, foundMeansLabels, onsetBases, onsetBasisLabels, weatherSeen, weatherSeenLabels } from '#app/domain/incident.ts';
import { formFields } from './form-fields.ts';
import type { RefusedForm } from './form-fields.ts';
import { Refusal } from './refusal.tsx';
import { RiskFields } from './risk-fields.tsx';
import type { RiskFieldsProps } from './risk-fields.tsx';

export interface FactsFormProps {
  readonly facts: Readonly<Record<string, string>>;
  readonly version: number;
  readonly zone: string;
  readonly problem: RefusedForm | undefined;
  readonly similar: RiskFieldsProps['similar'];
  readonly caseNumber: number;
}

function listOf<Value extends string>(values: readonly Value[], labels: Readonly<Record<Value, string>>): SelectOption[] {
  return values.map((value) => ({ value, label: labels[value] }));
}

/** The facts of the case as the investigator has them, saved together. */
export function FactsForm({ facts, version, zone, problem, similar, caseNumber }: FactsFormProps) {
  const { field, refused } = formFields('save-facts', problem, 'fact');
  const stored = (name: string) => field(name, facts[name]);
  return (
    <Form method="post" className="space-y-6" preventScrollReset>
      <Refusal refused={refused} />
      <input type="hidden" name="intent" value="save-facts" />
      <input type="hidden" name="version" value={version} />
      <div className="grid gap-x-8 gap-y-4 tablet:grid-cols-2">
        <div className="tablet:col-span-2"><TextInput field={stored('title')} label="Title" help="What and where, no names of people." maxLength={120} required /></div>
        <Select field={stored('eventType')} label="Kind of event" emptyLabel="Not decided" options={listOf(eventTypes, eventTypeLabels)} />
        <ChoiceChips field={stored('hazardStillPresent')} legend="Is the hazard still there?" options={[{ value: 'yes', label: 'Yes' }, { value: 'no', label: 'No' }, dontKnowOption]} />
        <TextArea field={stored('interimControl')} label="Interim control" help="What keeps the light off now." rows={2} />
        <TextArea field={stored('interimControlEnds')} label="It may go when" help='Such as "the coating is verified".' rows={2} />
        <WindowEnd name="onsetEarliest" label="Last seen sound" zone={zone} field={field} stored={facts['onsetEarliest'] ?? ''} />
        <WindowEnd name="onsetLatest" label="Latest possible onset" zone={zone} field={field} stored={facts['onsetLatest'] ?? ''} />
        <Select field={stored('onsetBasis')} label="Basis of the window" emptyLabel="Not known" options={listOf(onsetBases, onsetBasisLabels)} />
        <TextInput field={stored('clockErrorMin')} label="Clock error of the alarm or camera, minutes" help="Reading minus true time: 6 when it runs six minutes fast, -2 when two slow." inputMode="decimal" />
        <Select field={stored('foundByMeans')} label="Found by" emptyLabel="Not known" options={listOf(foundMeans, foundMeansLabels)} />
        <Select field={stored('extent')} label="Extent" emptyLabel="Not known" options={listOf(extents, extentLabels)} />
        <Select field={stored('weatherSeen')} label="Weather seen" emptyLabel="Not known" options={listOf(weatherSeen, weatherSeenLabels)} />
      </div>
      <RiskFields field={field} facts={facts} similar={similar} caseNumber={caseNumber} />
      <Button look="outlined">Save the facts</Button>
    </Form>
  );
}

interface WindowEndProps {
  readonly name: string;
  readonly label: string;
  readonly zone: string;
  readonly field: ReturnType<typeof formFields>['field'];
  readonly stored: string;
}

/** One end of the onset window; when the clock showed it twice, it is asked which pass is meant. */
function WindowEnd({ name, label, zone, field, stored }: WindowEndProps) {
  const own = field(name, stored);
  const asksWhich = own.errors?.some((sentence) => sentence.includes('twice')) ?? false;
  return (
    <div className="space-y-2">
      <DateTimeField field={own} label={label} zone={zone} help="" />
      {asksWhich ? <Select field={field(`${name}Which`)} label="Which pass" emptyLabel="Choose" options={[{ value: 'first', label: 'The first, before the clocks went back' }, { value: 'second', label: 'The second, after they went back' }]} /> : null}
    </div>
  );
}
