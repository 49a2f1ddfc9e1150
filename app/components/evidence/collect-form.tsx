import { Form } from 'react-router';
import { ChoiceChips } from '#app/components/forms/choice-chips.tsx';
import { ClockTimeField } from '#app/components/forms/clock-time-field.tsx';
import { ErrorSummary } from '#app/components/forms/error-summary.tsx';
import { Select, TextInput } from '#app/components/forms/text-field.tsx';
import { problemFields } from '#app/components/findings/problem-fields.ts';
import type { FormAnswer } from '#app/components/findings/problem-fields.ts';
import { Button } from '#app/components/ui/button.tsx';
import { evidenceKindLabels, evidenceKinds, holderRoleLabels, holderRoles } from '#app/domain/evidence.ts';

const kindOptions = evidenceKinds.map((value) => ({ value, label: evidenceKindLabels[value] }));
const holderOptions = holderRoles.filter((role) => role !== 'disposed').map((value) => ({ value, label: holderRoleLabels[value] }));

export interface CollectFormProps {
  /** Makes a repeated sending harmless. */
  readonly clientId: string;
  readonly zone: string;
  readonly answer: FormAnswer | null;
}

/** A new item with its first holder. */
export function CollectForm({ clientId, zone, answer }: CollectFormProps) {
  const field = problemFields(answer, {}, 'item-');
  const names: readonly (readonly [string, string])[] = [['kind', 'What it is'], ['description', 'Description'], ['fromWhere', 'Taken from'], ['collectedBy', 'Collected by'], ['collectedAt', 'Collected at'], ['condition', 'Condition'], ['holderRole', 'Held by, part'], ['holderName', 'Held by, name']];
  return (
    <Form method="post" className="space-y-4">
      <input type="hidden" name="intent" value="collect" />
      <input type="hidden" name="clientId" value={answer?.typed['clientId'] ?? clientId} />
      <ErrorSummary errors={answer?.formErrors} fields={names.map(([name, label]) => ({ field: field(name), label }))} />
      <ChoiceChips field={field('kind')} legend="What it is" options={kindOptions} />
      <TextInput field={field('description', { required: true })} label="Description" help="So that another person would pick the right one." />
      <TextInput field={field('fromWhere', { required: true })} label="Taken from" help="The spot, and how it stood there." />
      <div className="grid gap-4 tablet:grid-cols-2">
        <TextInput field={field('collectedBy', { required: true })} label="Collected by" autoComplete="off" />
        <ClockTimeField field={field('collectedAt', { required: true })} fieldFor={field} label="Collected at" zone={zone} />
        <TextInput field={field('sealNumber')} label="Seal number" aside="if sealed" autoComplete="off" />
        <TextInput field={field('condition', { required: true })} label="Condition" help="As found. Never clean it." />
        <Select field={field('holderRole', { required: true })} label="Held by, part" emptyLabel="Choose" options={holderOptions} />
        <TextInput field={field('holderName', { required: true })} label="Held by, name" autoComplete="off" />
        <TextInput field={field('place')} label="Kept where" aside="room, shelf" />
      </div>
      <Button>Record the item</Button>
    </Form>
  );
}
