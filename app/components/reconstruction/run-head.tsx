import { AppLink } from '#app/components/ui/app-link.tsx';
import type { RunPageView } from '#app/domain/run-page.ts';
import { becauseWords, gradeHeading, totalsWords } from '#app/domain/run-words.ts';

export interface RunHeadProps {
  readonly page: RunPageView;
  readonly listHref: string;
  /** Address of this run, for taking it away. */
  readonly href: string;
}

const standingWords = { attached: 'Attached to the case.', superseded: 'Was attached; a later run took its place.', 'not attached': 'Not attached to the case.' } as const;

/** The grade as the heading, the reasons, and which run this is. The engine's words stop here: a cause is stated by people. */
export function RunHead({ page, listHref, href }: RunHeadProps) {
  const { line } = page;
  const { grade } = line;
  return (
    <div className="space-y-2">
      <h2 className="font-serif text-title">{grade ? gradeHeading(grade) : line.state === 'failed' ? `Run ${line.number} could not be made` : `Run ${line.number} is under way`}</h2>
      <p className="text-small text-second">
        Run {line.number} of {page.runCount}. {standingWords[line.standing]} Asked for {line.askedWords} by {line.askedBy}. Engine {line.engineVersion}
        {page.zoneRules ? `, zone rules ${page.zoneRules}` : ''}. Input hash <span className="font-mono">{line.inputHash.slice(0, 12)}</span>
        {page.resultHash ? <>, result hash <span className="font-mono">{page.resultHash.slice(0, 12)}</span></> : null}.
      </p>
      {line.note ? <p>{line.note}</p> : null}
      {grade ? (
        <div className="max-w-[80ch]">
          <p>{line.totals ? `${totalsWords(line.totals)}. ` : ''}{becauseWords(grade)}</p>
          {grade.because.length > 0 ? <ul className="list-disc pl-5">{grade.because.map((reason) => <li key={reason}>{reason}</li>)}</ul> : null}
        </div>
      ) : null}
      <p data-print="no" className="flex flex-wrap gap-x-5 gap-y-1 text-small [&_a]:inline-flex [&_a]:min-h-8 [&_a]:items-center">
        <AppLink href={listHref}>All runs</AppLink>
        {page.view && page.runCount > 1 ? <AppLink href={`${listHref}/compare?a=${line.number > 1 ? line.number - 1 : 2}&b=${line.number}`}>Compare with another run</AppLink> : null}
        {page.view ? <AppLink href={`${href}/figures/minutes.csv`} download>Minutes as CSV</AppLink> : null}
        {page.view ? <AppLink href={`${href}?format=json`} download>Record as JSON, input and result</AppLink> : null}
      </p>
    </div>
  );
}
