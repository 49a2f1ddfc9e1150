import { ChoiceChips } from '#app/components/forms/choice-chips.tsx';
import { Select, TextArea } from '#app/components/forms/text-field.tsx';
import { DataTable } from '#app/components/ui/data-table.tsx';
import { SectionHeading } from '#app/components/ui/page-title.tsx';
import type { SimilarCaseView } from '#app/domain/case-view.ts';
import { consequences, likelihoods, riskLabels, risks } from '#app/domain/incident.ts';
import type { formFields } from './form-fields.ts';

export interface RiskFieldsProps {
  readonly field: ReturnType<typeof formFields>['field'];
  readonly facts: Readonly<Record<string, string>>;
  readonly similar: readonly SimilarCaseView[];
  readonly caseNumber: number;
}

const words = (value: string) => value.replaceAll('-', ' ');

/** Consequence and likelihood with their basis; the grid is an aid to the words, and no cell of it is coloured. */
export function RiskFields({ field, facts, similar, caseNumber }: RiskFieldsProps) {
  return (
    <section aria-labelledby="risk-heading">
      <SectionHeading id="risk-heading" note="consequence and likelihood, an aid to the words beside it, not a result">If nothing is done</SectionHeading>
      <div className="grid gap-x-8 gap-y-4 desk:grid-cols-2">
        <RiskGrid facts={facts} similar={similar} caseNumber={caseNumber} />
        <div className="space-y-4">
          <div className="grid gap-4 tablet:grid-cols-2">
            <Select field={field('potentialConsequence', facts['potentialConsequence'])} label="Consequence" emptyLabel="Not stated" options={consequences.map((value) => ({ value, label: words(value) }))} />
            <Select field={field('likelihood', facts['likelihood'])} label="Likelihood" emptyLabel="Not stated" options={likelihoods.map((value) => ({ value, label: words(value) }))} />
          </div>
          <TextArea field={field('riskBasis', facts['riskBasis'])} label="Basis, in your words" rows={4} maxLength={1_000} />
          <ChoiceChips field={field('risk', facts['risk'])} legend="Risk, as you judge it" options={risks.map((value) => ({ value, label: riskLabels[value] }))} help="Sets how soon an action falls due: 1, 7, 30 or 90 days. Our own default; each action may have another day." />
        </div>
      </div>
    </section>
  );
}

function RiskGrid({ facts, similar, caseNumber }: Pick<RiskFieldsProps, 'facts' | 'similar' | 'caseNumber'>) {
  const here = (consequence: string, likelihood: string) => facts['potentialConsequence'] === consequence && facts['likelihood'] === likelihood;
  const others = (consequence: string, likelihood: string) => similar.filter((one) => one.consequence === consequence && one.likelihood === likelihood).map((one) => one.row.number);
  return (
    <DataTable caption="Consequence and likelihood of this case and of similar ones" className="min-w-[21rem] table-fixed text-axis">
      <tbody>
        {[...consequences].reverse().map((consequence) => (
          <tr key={consequence}>
            <th scope="row" className={`w-[4.75rem] pr-2 text-right font-normal ${facts['potentialConsequence'] === consequence ? 'font-semibold' : 'text-second'}`}>{consequence}</th>
            {likelihoods.map((likelihood) => (
              <td key={likelihood} className="h-10 border border-hair text-center align-middle">
                {here(consequence, likelihood) ? <span className="font-semibold"><Diamond /> {caseNumber}</span> : null}
                <span className="text-second"> {others(consequence, likelihood).join(' ')}</span>
              </td>
            ))}
          </tr>
        ))}
        <tr>
          <td />
          {likelihoods.map((likelihood) => <th key={likelihood} scope="col" className={`pt-1 align-top font-normal ${facts['likelihood'] === likelihood ? 'font-semibold' : 'text-second'}`}>{words(likelihood)}</th>)}
        </tr>
      </tbody>
    </DataTable>
  );
}

function Diamond() {
  return <svg width="12" height="12" viewBox="0 0 12 12" aria-hidden="true" className="inline align-[-1px]"><path d="M6 0 12 6 6 12 0 6Z" className="fill-ink" /></svg>;
}
