import type { ReactNode } from 'react';
import { TestMark } from '#app/components/ui/test-mark.tsx';
import { AppLink } from '#app/components/ui/app-link.tsx';
import type { HypothesisCard } from '#app/domain/hypothesis-view.ts';
import { EvidenceText } from './evidence-text.tsx';

export interface HypothesisListProps {
  readonly caseNumber: number;
  readonly hypotheses: readonly HypothesisCard[];
  /** Whether the reader may change them. */
  readonly editable: boolean;
}

const columns = 'desk:grid desk:grid-cols-[minmax(9rem,1.1fr)_minmax(9rem,1.2fr)_minmax(10rem,1.4fr)_minmax(10rem,1.4fr)_minmax(13rem,1.5fr)_minmax(6.5rem,0.8fr)] desk:gap-x-6';

/** A row an idea: what we should see, for, against, four tests, result and who. At the desk the labels stand above. */
export function HypothesisList({ caseNumber, hypotheses, editable }: HypothesisListProps) {
  return (
    <div>
      <div aria-hidden="true" className={`hidden border-b-[1.5px] border-ink pb-1.5 text-axis font-semibold text-second ${columns}`}>
        {['Hypothesis', 'If so, we should see', 'For', 'Against', 'Four tests', 'Result'].map((head) => <span key={head}>{head}</span>)}
      </div>
      <ul className="max-desk:border-t-[1.5px] max-desk:border-ink">
        {hypotheses.map((hypothesis) => (
          <li key={hypothesis.id} id={`hypothesis-${hypothesis.id}`} className={`avoid-break border-b border-hair py-3 max-desk:space-y-3 ${columns}`}>
            <div>
              <h3 className="font-serif text-account leading-6">{hypothesis.label}</h3>
              <p className="text-small text-second">{hypothesis.statement}</p>
              {editable ? <p className="mt-1 text-small"><AppLink href={`?edit=${hypothesis.id}#hypothesis-form`}>Change<span className="sr-only"> {hypothesis.label}</span></AppLink></p> : null}
            </div>
            <Part label="If so, we should see">
              {hypothesis.predicts.length === 0 ? <p className="text-second">not said</p> : <ul className="list-['–_'] space-y-1 pl-3">{hypothesis.predicts.map((line) => <li key={line}>{line}</li>)}</ul>}
            </Part>
            <Part label="For"><EvidenceText text={hypothesis.evidenceFor} caseNumber={caseNumber} /></Part>
            <Part label="Against"><EvidenceText text={hypothesis.evidenceAgainst} caseNumber={caseNumber} /></Part>
            {hypothesis.outcome ? <Outcome outcome={hypothesis.outcome} /> : <Part label="Tests and result" wide><p className="text-second">Hidden until you ask to see the author&rsquo;s opinion.</p></Part>}
          </li>
        ))}
      </ul>
    </div>
  );
}

function Part({ label, wide = false, children }: { readonly label: string; readonly wide?: boolean; readonly children: ReactNode }) {
  return (
    <div className={`text-small ${wide ? 'desk:col-span-2' : ''}`}>
      <h4 className="text-axis font-semibold text-second desk:sr-only">{label}</h4>
      {children}
    </div>
  );
}

function Outcome({ outcome }: { readonly outcome: NonNullable<HypothesisCard['outcome']> }) {
  return (
    <>
      <Part label="Four tests">
        <ul className="grid grid-cols-2 gap-x-3 gap-y-1.5">
          {outcome.tests.map((test) => <li key={test.name}><TestMark result={test.result} label={test.label} why={test.why || undefined} /></li>)}
        </ul>
      </Part>
      <Part label="Result">
        <p className="font-serif text-account leading-6">{outcome.result}</p>
        <p className="text-axis text-second">{outcome.by}</p>
      </Part>
    </>
  );
}
