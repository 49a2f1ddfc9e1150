import { href } from 'react-router';
import { YearRibbon, YearRibbonHead, YearRibbonKey } from '#app/components/burn-card/year-ribbon.tsx';
import { AppLink } from '#app/components/ui/app-link.tsx';
import { GroupHeading } from '#app/components/ui/data-table.tsx';
import { actionGroupLabels, actionGroups, groupOf } from '#app/domain/action-list.ts';
import { chosenValue } from '#app/domain/action-filter.ts';
import type { ActionLine } from '#app/domain/action-view.ts';
import { monthOf } from './action-card.tsx';

export interface ActionListLine extends ActionLine {
  readonly changeable: boolean;
}

export interface ActionListProps {
  readonly lines: readonly ActionListLine[];
  readonly todayOn: string;
  /** Form to which the ticks of the rows belong. */
  readonly formId: string;
  readonly onChoose: (value: string, chosen: boolean) => void;
}

const columns = 'desk:grid desk:grid-cols-[2rem_minmax(11rem,1.3fr)_minmax(10rem,1.1fr)_8rem_minmax(18rem,2.2fr)_9.5rem] desk:gap-x-4';

/** Rows in groups: lit or late before the fix, fix before the sun, no fixed return, in place, finished. */
export function ActionList({ lines, todayOn, formId, onChoose }: ActionListProps) {
  const fromOn = monthOf(todayOn);
  return (
    <div>
      <div aria-hidden="true" className={`hidden items-end text-axis font-semibold text-second ${columns}`}>
        <span />
        <span className="pb-1.5">Action</span>
        <span className="pb-1.5">Owner and interim control</span>
        <span className="pb-1.5">Due</span>
        <YearRibbonHead fromOn={fromOn} todayOn={todayOn} />
        <span className="pb-1.5">Sun returns</span>
      </div>
      {actionGroups.map((group) => {
        const rows = lines.filter((line) => groupOf(line) === group);
        if (rows.length === 0) return null;
        return (
          <section key={group} aria-label={actionGroupLabels[group]}>
            <GroupHeading count={`${rows.length} shown`}>{actionGroupLabels[group]}</GroupHeading>
            <ul>{rows.map((line) => <ActionRow key={line.id} line={line} fromOn={fromOn} todayOn={todayOn} formId={formId} onChoose={onChoose} />)}</ul>
          </section>
        );
      })}
      <YearRibbonKey />
    </div>
  );
}

interface ActionRowProps extends Omit<ActionListProps, 'lines'> {
  readonly line: ActionListLine;
  readonly fromOn: string;
}

function ActionRow({ line, fromOn, todayOn, formId, onChoose }: ActionRowProps) {
  const late = line.dueNote.endsWith('late');
  const beingDone = line.state === 'open' || line.state === 'in-progress';
  return (
    <li className={`avoid-break border-b border-hair py-2.5 desk:py-1.5 ${columns}`}>
      <div className="max-desk:float-right">
        {line.changeable ? (
          <label className="flex min-h-11 min-w-11 items-start justify-center pt-1 desk:min-h-6 desk:min-w-6 desk:justify-start">
            <input type="checkbox" className="tick-box" name="chosen" value={chosenValue(line)} form={formId} onChange={(event) => onChoose(chosenValue(line), event.currentTarget.checked)} />
            <span className="sr-only">Choose action {line.number} of case {line.caseNumber}, {line.title}</span>
          </label>
        ) : null}
      </div>
      <div className="min-w-0">
        <h3 className="font-semibold"><AppLink href={`${href('/cases/:caseNumber/actions', { caseNumber: String(line.caseNumber) })}#action-${line.number}`} className="no-underline">{line.title}</AppLink></h3>
        <p className="text-small text-second">{line.caseNumber}, {line.level}{line.interim ? ', interim' : ''}, {line.siteName}</p>
      </div>
      <div className="min-w-0 max-desk:hidden">
        <p>{line.owner}</p>
        <p className="text-small text-second">until then: {line.untilThen}</p>
      </div>
      <div className="max-desk:hidden"><Due line={line} late={late} /></div>
      <div className="min-w-0 desk:-mt-1"><YearRibbon fromOn={fromOn} todayOn={todayOn} dueOn={beingDone ? line.dueOn : null} checkOn={line.state === 'verified' ? line.effectCheckOn : null} lit={line.spans} label={line.title} /></div>
      <p className="max-desk:flex max-desk:flex-wrap max-desk:items-baseline max-desk:gap-x-2 desk:[&>*]:block"><span className="desk:sr-only">Sun returns</span><span className="font-semibold">{line.returnWords}</span><span className="text-small text-second">{line.returnNote}</span></p>
      <div className="flex justify-between gap-4 desk:hidden">
        <div className="min-w-0"><p>{line.owner}</p><p className="text-small text-second">until then: {line.untilThen}</p></div>
        <div className="flex-none text-right"><Due line={line} late={late} /></div>
      </div>
    </li>
  );
}

function Due({ line, late }: { readonly line: ActionListLine; readonly late: boolean }) {
  return (
    <>
      <p className="whitespace-nowrap">{line.dueWords}</p>
      <p className={`text-small ${late ? 'font-semibold' : 'text-second'}`}>{line.dueNote}</p>
      {line.state === 'open' ? null : <p className="text-small text-second">{line.stateWords.toLowerCase()}</p>}
    </>
  );
}
