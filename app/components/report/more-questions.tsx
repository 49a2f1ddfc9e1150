import { ChoiceChips } from '#app/components/forms/choice-chips.tsx';
import { Select, TextInput } from '#app/components/forms/text-field.tsx';
import { foundMeans, foundMeansLabels, weatherSeen, weatherSeenLabels } from '#app/domain/incident.ts';
import type { UnitSystem } from '#app/domain/lengths.ts';
import { targetMaterialLabels, targetMaterials } from '#app/domain/scene.ts';
import { WitnessQuestion } from './hurt-questions.tsx';
import { OpticQuestion } from './optic-question.tsx';
import { Follows, OnlyMarks, Question } from './question.tsx';
import type { ReportField } from './report-fields.ts';

const yesNo = [{ value: 'yes', label: 'Yes' }, { value: 'no', label: 'No' }, { value: 'dont-know', label: "Don't know", dashed: true }];

export interface MoreQuestionsProps {
  readonly field: ReportField;
  readonly guest: boolean;
  readonly units: UnitSystem;
  /** What the form holds at the moment. */
  readonly values: Readonly<Record<string, string>>;
}

/** What helps the next person and is not required. A bright patch without a mark is asked less. */
export function MoreQuestions({ field, guest, units, values }: MoreQuestionsProps) {
  return (
    <>
      <Question title="Is the bright patch still there?">
        <ChoiceChips field={field('hazardStillPresent')} legend={<span className="sr-only">Is the bright patch still there?</span>} options={yesNo} size="large" spread />
        <Follows on="hazard">
          <p>Keep others out. Somebody is told at once when you send this.</p>
        </Follows>
        <TextInput field={field('interimControl')} label="What covers or shades it now?" help="Such as: tarpaulin since 15:08. Leave it empty if nothing does." autoComplete="off" />
      </Question>
      <OpticQuestion field={field} units={units} values={values} />
      <Question title="What was marked?" help="Not required." shortPath>
        <Select field={field('targetMaterial')} label="Material" emptyLabel="Not answered" options={targetMaterials.map((value) => ({ value, label: targetMaterialLabels[value] }))} />
      </Question>
      <Question title="How was it noticed, and in what weather?" help="Not required.">
        <OnlyMarks>
          <ChoiceChips field={field('foundByMeans')} legend="How was it noticed?" options={foundMeans.map((value) => ({ value, label: foundMeansLabels[value] }))} />
        </OnlyMarks>
        <ChoiceChips field={field('weatherSeen')} legend="The sky then" options={weatherSeen.map((value) => ({ value, label: weatherSeenLabels[value], dashed: value === 'dont-know' }))} />
        <OnlyMarks>
          <WitnessQuestion field={field} />
        </OnlyMarks>
      </Question>
      {guest ? (
        <Question title="May we come back to you?" help="Not required. Kept apart from the report, seen by few, and removed 90 days after the case closes.">
          <TextInput field={field('contactName')} label="Name" autoComplete="name" />
          <TextInput field={field('contactEmail')} label="E-mail" type="email" autoComplete="email" help="The receipt is sent there." />
          <TextInput field={field('contactPhone')} label="Phone" type="tel" autoComplete="tel" />
        </Question>
      ) : null}
    </>
  );
}
