import { ChoiceChips } from '#app/components/forms/choice-chips.tsx';
import { TickBox } from '#app/components/forms/text-field.tsx';
import { foundPrecisionLabels } from '#app/domain/incident.ts';
import { foundAnswerLabels, foundAnswers } from '#app/domain/report-fields.ts';
import { FoundCard } from './found-card.tsx';
import type { FoundAnswerTyped } from './found-card.tsx';
import { MomentField } from './moment-field.tsx';
import { SunPreviewLine } from './sun-preview.tsx';
import { Follows, Question } from './question.tsx';
import type { ReportField, ReportFormState } from './report-fields.ts';
import type { SiteChoice } from './where-question.tsx';

export interface WhenQuestionProps {
  readonly field: ReportField;
  readonly state: ReportFormState;
  /** The chosen site; its clock and daylight are those of the answer. */
  readonly site: SiteChoice | undefined;
  /** What the form holds at the moment. */
  readonly values: Readonly<Record<string, string>>;
  readonly guestCode: string | null;
  /** Called with the answer, so that "Just now" can be pinned to the moment it was pressed. */
  readonly onAnswer?: (answer: string) => void;
}

const precisions = (['exact', 'within-15-min', 'within-1-h', 'date-only'] as const).map((value) => ({ value, label: foundPrecisionLabels[value] }));

/** Second question. A range and "Don't know" are answers like any other. */
export function WhenQuestion({ field, state, site, values, guestCode, onAnswer }: WhenQuestionProps) {
  const clock = site ? `Clock time at the place, ${site.zone.replaceAll('_', ' ')}.` : 'Clock time at the place.';
  const nowLocal = site?.nowLocal ?? '';
  const typed = (name: keyof FoundAnswerTyped) => values[name] ?? '';
  const moments = { field, state };
  return (
    <Question number={2} answers="foundWhen" title={<span id="found-question">When was it found?</span>}>
      <ChoiceChips
        field={field('foundWhen')}
        legend={<span className="sr-only">When was it found?</span>}
        options={foundAnswers.map((value) => ({ value, label: foundAnswerLabels[value], dashed: value === 'dont-know' }))}
        {...(onAnswer ? { onChange: (value: string) => onAnswer(value) } : {})}
      />
      <input type="hidden" name="foundNowAt" defaultValue={state.typed['foundNowAt'] ?? ''} />
      <Follows on="found-at">
        <MomentField {...moments} name="foundLocal" label="Day and time" fallback={nowLocal} help={`${clock} For another day, change the date.`} />
        <ChoiceChips field={field('foundPrecision', 'exact')} legend="How exact is that?" options={precisions} />
      </Follows>
      <Follows on="found-range">
        <MomentField {...moments} name="foundFromLocal" label="Last seen sound" help="The last time somebody saw that the mark was not there, such as the last walk." />
        <MomentField {...moments} name="foundToLocal" label="Found" fallback={nowLocal} help={clock} />
      </Follows>
      <Follows on="not-range" shortPath>
        <MomentField {...moments} name="lastSoundLocal" label="Last seen sound, if you know" help="The last time somebody saw that the mark was not there. Leave it empty if you don't know." />
      </Follows>
      {site ? <FoundCard site={site} typed={{ foundWhen: typed('foundWhen'), foundNowAt: typed('foundNowAt'), foundLocal: typed('foundLocal'), foundFromLocal: typed('foundFromLocal'), foundToLocal: typed('foundToLocal'), lastSoundLocal: typed('lastSoundLocal') }} /> : null}
      <SunPreviewLine values={values} guestCode={guestCode} />
      {state.longWindowDays === null ? null : (
        <TickBox field={field('longWindowConfirmed')} value="yes" label={`It is right: between sound and found lie ${state.longWindowDays} days.`} />
      )}
    </Question>
  );
}
