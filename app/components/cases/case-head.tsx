import { href } from 'react-router';
import { CaptionedBurnCard } from '#app/components/burn-card/burn-card.tsx';
import { headerSpan } from '#app/components/burn-card/model.ts';
import { AppLink } from '#app/components/ui/app-link.tsx';
import { PageTitle } from '#app/components/ui/page-title.tsx';
import { StateMark } from '#app/components/ui/state-mark.tsx';
import { Tabs } from '#app/components/ui/tabs.tsx';
import type { CaseHeaderView } from '#app/domain/case-view.ts';
import { measurePages } from './measure-nav.tsx';

export interface CaseHeadProps {
  readonly head: CaseHeaderView;
  /** Path of the page, to mark the tab that is open. */
  readonly path: string;
}

/** The page of one run draws the card of that run. */
const ownCard = /\/reconstructions\/\d+\/?$/u;

/** Number, title, state and next return, the card of the window, and the tabs as words. */
export function CaseHead({ head, path }: CaseHeadProps) {
  const base = href('/cases/:caseNumber', { caseNumber: String(head.number) });
  const span = head.card.window ? headerSpan(head.card.window) : { fromUtc: head.card.fromUtc, toUtc: head.card.toUtc };
  const isUnder = (tabPath: string) => path === `${base}${tabPath}` || path.startsWith(`${base}${tabPath}/`);
  // Plan, skyline and weather are pages of the measurements; they share one word among the tabs.
  const isCurrent = (tabPath: string) => (tabPath === '' ? path === base || path === `${base}/` : tabPath === '/measurements' ? measurePages.some((page) => isUnder(`/${page}`)) : isUnder(tabPath));
  return (
    <>
      <PageTitle number={head.number} below={head.subtitle} aside={<StateAndReturn head={head} />}>{head.title}</PageTitle>
      {ownCard.test(path) ? null : (
        <>
          <CaptionedBurnCard model={{ ...head.card, ...span }} size="L" label={`Case ${head.number}`} links={<CardLinks head={head} base={base} />} />
          <p className="pb-3 text-small text-second">{head.cardNote}</p>
        </>
      )}
      <Tabs label={`Parts of case ${head.number}`} items={head.tabs.map((tab) => ({ href: `${base}${tab.path}`, label: tab.label, current: isCurrent(tab.path), ...(tab.count === null ? {} : { count: tab.count }) }))} />
    </>
  );
}

function StateAndReturn({ head }: { readonly head: CaseHeaderView }) {
  return (
    <div className="space-y-1 tablet:text-right">
      <p><StateMark state={head.state} note={head.stateNote} /></p>
      {head.duplicateOf === null ? null : <p>Main case: <AppLink href={href('/cases/:caseNumber', { caseNumber: String(head.duplicateOf) })}>{head.duplicateOf}</AppLink></p>}
      <p className="text-small">
        {head.nextReturn ? (
          <>Sun returns <time dateTime={head.nextReturn.atUtc} className="font-semibold">{head.nextReturn.words}</time><span className="text-second">, {head.nextReturn.inWords}</span></>
        ) : <span className="text-second">Return of the sun: {head.returnWords}</span>}
      </p>
      {head.legalHold ? <p className="text-small font-semibold">On hold: nothing of it is erased</p> : null}
    </div>
  );
}

function CardLinks({ head, base }: { readonly head: CaseHeaderView; readonly base: string }) {
  if (head.reconstructionNumber === null) return null;
  return <AppLink href={`${base}/reconstructions/${head.reconstructionNumber}`} className="inline-flex min-h-(--target-height) items-center text-small">Open the reconstruction</AppLink>;
}
