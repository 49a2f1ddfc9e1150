import { ChoiceChips } from '#app/components/forms/choice-chips.tsx';
import { Select, TextInput } from '#app/components/forms/text-field.tsx';
import { injuryKindLabels, injuryKinds, treatmentLabels, treatments } from '#app/domain/injury.ts';
import { personRelationLabels, personRelations } from '#app/domain/person-relation.ts';
import { Follows } from './question.tsx';
import type { ReportField } from './report-fields.ts';

const relations = [...personRelations.map((value) => ({ value, label: personRelationLabels[value] })), { value: 'dont-know', label: "Don't know", dashed: true }];

/** Who was hurt, without a name, and the injury in a box of its own. Shown once somebody was hurt. */
export function HurtQuestions({ field }: { readonly field: ReportField }) {
  return (
    <Follows on="hurt">
      <p className="border-l-6 border-ink py-1 pl-4">Blurred or dark spots in sight: get medical help now. Tell the person in charge of the site.</p>
      <ChoiceChips
        field={field('hurtAgeBand')}
        legend="How old, roughly? No name, please."
        options={[{ value: 'adult', label: 'Adult' }, { value: '16-17', label: '16 or 17' }, { value: 'under-16', label: 'Under 16' }, { value: 'unknown', label: "Don't know", dashed: true }]}
      />
      <ChoiceChips field={field('hurtRelation')} legend="Who are they to this place?" options={relations} />
      <fieldset className="space-y-3 border-[1.5px] border-edge p-3">
        <legend className="px-1 font-semibold">Injury box</legend>
        <p className="text-small text-second">Not required. Only an investigator and the privacy lead read this box. Write only what is needed.</p>
        <Select field={field('injuryKind')} label="What kind of injury?" emptyLabel="Don't know" options={injuryKinds.map((value) => ({ value, label: injuryKindLabels[value] }))} />
        <TextInput field={field('injuryPart')} label="Which part of the body?" help="Such as: left hand. No name." autoComplete="off" maxLength={80} />
        <Select field={field('injuryTreatment')} label="What was done for them?" emptyLabel="Not answered" options={treatments.map((value) => ({ value, label: treatmentLabels[value] }))} />
      </fieldset>
    </Follows>
  );
}

/** Somebody who saw it: that there is one, and who they are to the place. Names are asked for by the investigator. */
export function WitnessQuestion({ field }: { readonly field: ReportField }) {
  return (
    <>
      <ChoiceChips field={field('seenByOthers')} legend="Did somebody else see it happen?" options={[{ value: 'yes', label: 'Yes' }, { value: 'no', label: 'No' }, { value: 'dont-know', label: "Don't know", dashed: true }]} />
      <Follows on="witness">
        <ChoiceChips field={field('witnessRelation')} legend="Who are they to this place? No name, please." options={relations} />
      </Follows>
    </>
  );
}
