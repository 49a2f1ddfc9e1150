import { TestMark } from '#app/components/ui/test-mark.tsx';
import type { FindingPart, HypothesisPart, ReleaseDocument } from '#app/domain/release-document.ts';
import { DocumentSection, PartHeading } from './document-section.tsx';
import { RedactedWords } from './redacted-words.tsx';

export function HypothesesSection({ hypotheses, number }: { readonly hypotheses: readonly HypothesisPart[]; readonly number: number }) {
  return (
    <DocumentSection id="hypotheses" title={`${number}. Hypotheses and tests`}>
      {hypotheses.length === 0 ? <p className="text-second">None are part of this release.</p> : null}
      {hypotheses.map((one, index) => (
        <article key={index} className="avoid-break border-t border-hair pb-3 first-of-type:border-t-0">
          <PartHeading>{one.heading}: {one.result.toLowerCase()}</PartHeading>
          <p className="max-w-[64ch] font-serif text-account"><RedactedWords text={one.statement} /></p>
          <dl className="max-w-[64ch] pt-1">
            {one.lines.map((line) => (
              <div key={line.label} className="grid gap-x-4 py-1 tablet:grid-cols-[9rem_1fr]">
                <dt className="text-second">{line.label}</dt>
                <dd><RedactedWords text={line.text} /></dd>
              </div>
            ))}
          </dl>
          <ul className="grid gap-x-6 gap-y-2 pt-2 tablet:grid-cols-2">
            {one.tests.map((test) => (
              <li key={test.label}><TestMark result={test.result} label={test.label} why={test.why.length > 0 ? <RedactedWords text={test.why} /> : undefined} /></li>
            ))}
          </ul>
        </article>
      ))}
    </DocumentSection>
  );
}

export function FindingSection({ finding, number }: { readonly finding: FindingPart | null; readonly number: number }) {
  return (
    <DocumentSection id="finding" title={`${number}. ${finding ? finding.heading : 'Finding'}`}>
      {finding ? (
        <div className="max-w-[64ch] space-y-3">
          <p className="font-serif text-account"><b className="font-semibold">{finding.certainty}. {finding.classification}.</b> <RedactedWords text={finding.opinion} /></p>
          {finding.causes.length > 0 ? <><PartHeading>Causes</PartHeading><p className="font-serif text-account"><RedactedWords text={finding.causes} /></p></> : null}
          {finding.limits.length > 0 ? <><PartHeading>Limits</PartHeading><p className="font-serif text-account"><RedactedWords text={finding.limits} /></p></> : null}
          <p className="text-small text-second">Signed by a technical reviewer who is not its author. What was signed has the SHA-256 <span className="font-mono text-axis break-all">{finding.hash}</span>.</p>
        </div>
      ) : <p className="text-second">No finding is signed. Drafts are not released.</p>}
    </DocumentSection>
  );
}

export function ActionsSection({ actions, number }: { readonly actions: ReleaseDocument['actions']; readonly number: number }) {
  return (
    <DocumentSection id="actions" title={`${number}. Actions`}>
      {actions.length === 0 ? <p className="text-second">No action was given.</p> : null}
      <ol>
        {actions.map((action) => (
          <li key={action.number} className="grid grid-cols-[2rem_1fr] border-b border-hair py-2">
            <span className="font-serif">{action.number}</span>
            <div>
              <p className="font-medium"><RedactedWords text={action.title} /></p>
              <p className="text-small text-second">{action.meta}</p>
              {action.effect.length > 0 ? <p className="text-small">Effect: <RedactedWords text={action.effect} /></p> : null}
            </div>
          </li>
        ))}
      </ol>
    </DocumentSection>
  );
}
