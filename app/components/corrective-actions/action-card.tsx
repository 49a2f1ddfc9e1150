import { href } from 'react-router';
import type { FormAnswer } from '#app/components/findings/problem-fields.ts';
import { YearRibbon, YearRibbonHead } from '#app/components/burn-card/year-ribbon.tsx';
import { AppLink } from '#app/components/ui/app-link.tsx';
import { FactList } from '#app/components/ui/fact-list.tsx';
import type { ActionLine, ActionRights } from '#app/domain/action-view.ts';
import type { PersonOption } from './action-form.tsx';
import { ActionSteps } from './action-steps.tsx';

export interface ActionCardView {
  readonly line: ActionLine;
  readonly rights: ActionRights;
  readonly why: string;
  readonly cost: string | null;
  readonly ownerId: string;
  readonly verifierId: string;
  readonly story: readonly { readonly term: string; readonly value: string; readonly note: string }[];
  readonly checkWords: { readonly day: string; readonly note: string } | null;
  readonly proposedCheckOn: string | null;
  readonly tooEarlyUntil: string | null;
  readonly files: readonly { readonly id: string; readonly name: string; readonly note: string }[];
  readonly history: readonly { readonly at: string; readonly who: string; readonly summary: string; readonly reason: string }[];
}

export interface ActionCardProps {
  readonly card: ActionCardView;
  readonly todayOn: string;
  readonly people: readonly PersonOption[];
  readonly answer: FormAnswer | undefined;
}

/** First day of the month of an ISO day: the ribbon starts at the current month. */
export const monthOf = (isoDay: string): string => `${isoDay.slice(0, 7)}-01`;

/** One action of the case: what, who, until when, against the returns of the sun; what was shown; what may be done now. */
export function ActionCard({ card, todayOn, people, answer }: ActionCardProps) {
  const { line } = card;
  return (
    <article id={`action-${line.number}`} aria-labelledby={`action-${line.number}-title`} className="avoid-break border-t-[1.5px] border-ink pt-3 pb-8">
      <div className="flex flex-wrap items-baseline justify-between gap-x-6">
        <h3 id={`action-${line.number}-title`} className="font-serif text-account leading-6"><span className="text-second">{line.number}</span> {line.title}</h3>
        <p className="font-semibold">{line.stateWords}{line.interim ? <span className="font-normal text-second">, interim</span> : null}</p>
      </div>
      {card.why ? <p className="max-w-[64ch] pt-1 whitespace-pre-line">{card.why}</p> : null}
      <div className="grid gap-x-10 gap-y-4 pt-2 desk:grid-cols-[minmax(0,1fr)_minmax(0,1.4fr)]">
        <div>
          <FactList facts={factsOf(card)} />
        </div>
        <div>
          <YearRibbonHead fromOn={monthOf(todayOn)} todayOn={todayOn} />
          <YearRibbon fromOn={monthOf(todayOn)} todayOn={todayOn} dueOn={isBeingDone(line) ? line.dueOn : null} checkOn={line.state === 'verified' ? line.effectCheckOn : null} lit={line.spans} label={line.title} />
          <Story card={card} />
        </div>
      </div>
      <div className="pt-3">
        <ActionSteps {...card} actionId={line.id} number={line.number} version={line.version} dueOn={line.dueOn} todayOn={todayOn} people={people} answer={answer} />
        {card.history.length > 0 ? <History lines={card.history} /> : null}
      </div>
    </article>
  );
}

const isBeingDone = (line: ActionLine) => line.state === 'open' || line.state === 'in-progress';

function factsOf({ line, cost, checkWords }: ActionCardView) {
  return [
    { term: 'Control', value: line.level },
    { term: 'Owner', value: line.owner },
    { term: 'Verifier', value: line.verifier },
    { term: 'Due', value: line.dueWords, note: line.dueNote },
    { term: 'Sun returns', value: line.returnWords, note: line.returnNote },
    ...(checkWords ? [{ term: 'See whether it works', value: checkWords.day, note: checkWords.note }] : []),
    ...(cost ? [{ term: 'Cost', value: cost }] : []),
  ];
}

function Story({ card }: { readonly card: ActionCardView }) {
  if (card.story.length === 0 && card.files.length === 0) return null;
  return (
    <dl className="mt-2 space-y-2">
      {card.story.map((step) => (
        <div key={step.term}>
          <dt className="text-small font-semibold">{step.term} <span className="font-normal text-second">{step.note}</span></dt>
          <dd className="font-serif whitespace-pre-line">{step.value}</dd>
        </div>
      ))}
      {card.files.length > 0 ? (
        <div>
          <dt className="text-small font-semibold">Proof</dt>
          {card.files.map((file) => <dd key={file.id}><AppLink href={href('/proofs/:proofId', { proofId: file.id })} reload download>{file.name}</AppLink> <span className="text-axis text-second">{file.note}</span></dd>)}
        </div>
      ) : null}
    </dl>
  );
}

function History({ lines }: { readonly lines: ActionCardView['history'] }) {
  return (
    <details>
      <summary className="min-h-11 py-2.5 text-small desk:min-h-8 desk:py-1.5">What happened to it, {lines.length} {lines.length === 1 ? 'entry' : 'entries'}</summary>
      <ol className="space-y-1.5 pb-2 text-small">
        {lines.map((line) => <li key={`${line.at}-${line.summary}`}>{line.summary} <span className="text-second">{line.who}, {line.at}.{line.reason ? ` Reason: ${line.reason}` : ''}</span></li>)}
      </ol>
    </details>
  );
}
