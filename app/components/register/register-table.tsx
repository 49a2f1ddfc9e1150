import type { ReactNode } from 'react';
import { Fragment } from 'react';
import { href } from 'react-router';
import { BurnCard } from '#app/components/burn-card/burn-card.tsx';
import { SharedHourRuler } from '#app/components/burn-card/hour-ruler.tsx';
import { opticDrawingOf } from '#app/components/cases/optic-of.ts';
import { OpticDrawing } from '#app/components/optics/optic-drawing.tsx';
import { AppLink } from '#app/components/ui/app-link.tsx';
import { StateMark } from '#app/components/ui/state-mark.tsx';
import type { RegisterGroup, RegisterRowView, RegisterView } from '#app/domain/case-view.ts';
import { registerGroupLabels, registerGroups } from '#app/domain/case-view.ts';

export interface RegisterTableProps {
  readonly rows: readonly RegisterRowView[];
  readonly groupCounts: RegisterView['groupCounts'];
  readonly span: RegisterView['span'];
  /** False when another order than that of the groups was asked for. */
  readonly grouped: boolean;
}

const columns = 8;
/** The roles that these elements have by themselves, until a phone's layout takes them away. */
const as = { table: { role: 'table' }, rowgroup: { role: 'rowgroup' }, row: { role: 'row' }, cell: { role: 'cell' }, rowheader: { role: 'rowheader' }, columnheader: { role: 'columnheader' } } as const;
const groupNotes: Record<RegisterGroup, string> = { 'before-fix': ', soonest first', new: ', oldest first', settled: '' };

/**
 * The register as one table. On phones its rows are laid out as blocks; roles are written out, since that layout would
 * otherwise take the table's meaning away.
 */
export function RegisterTable({ rows, groupCounts, span, grouped }: RegisterTableProps) {
  const groups = grouped ? registerGroups.map((group) => ({ group, rows: rows.filter((row) => row.group === group) })).filter((one) => one.rows.length > 0) : [{ group: null, rows }];
  return (
    <table {...as.table} className="w-full border-collapse text-left max-tablet:block" aria-label="Cases">
      <thead {...as.rowgroup} className="border-b-[1.5px] border-ink align-bottom text-axis font-semibold text-second max-tablet:sr-only">
        <tr {...as.row}>
          <Head>No.</Head>
          <Head>Optic</Head>
          <Head>Mark and place</Head>
          <Head className="max-desk:hidden">Onset window</Head>
          <Head className="w-[24%] min-w-48"><span className="sr-only">Sun on the mark in the window. </span><SharedHourRuler fromHour={span.fromHour} toHour={span.toHour} /></Head>
          <Head className="desk:min-w-42">State and finding</Head>
          <Head className="desk:min-w-38">Sun returns</Head>
          <Head className="max-desk:hidden">What it waits for</Head>
        </tr>
      </thead>
      <tbody {...as.rowgroup} className="max-tablet:block">
        {groups.map(({ group, rows: inGroup }) => (
          <Fragment key={group ?? 'all'}>
            {group ? <GroupLine group={group} count={groupCounts[group]} /> : null}
            {inGroup.map((row) => <RegisterRow key={row.number} row={row} />)}
          </Fragment>
        ))}
      </tbody>
    </table>
  );
}

function Head({ children, className = '' }: { readonly children: ReactNode; readonly className?: string }) {
  return <th scope="col" {...as.columnheader} className={`py-1.5 pr-3 font-semibold last:pr-0 ${className}`}>{children}</th>;
}

function GroupLine({ group, count }: { readonly group: RegisterGroup; readonly count: number }) {
  return (
    <tr {...as.row} className="border-b-[1.5px] border-ink max-tablet:block">
      <th {...as.rowheader} colSpan={columns} scope="rowgroup" className="pt-4 pb-1 font-serif text-account font-normal max-tablet:block tablet:text-group">
        {registerGroupLabels[group]}
        <span className="ml-2.5 font-sans text-small text-second max-tablet:ml-0 max-tablet:block">{count} {count === 1 ? 'case' : 'cases'}{groupNotes[group]}</span>
      </th>
    </tr>
  );
}

const cell = 'pr-3 pt-[5px] pb-1 last:pr-0 max-tablet:p-0';

function RegisterRow({ row }: { readonly row: RegisterRowView }) {
  const to = href('/cases/:caseNumber', { caseNumber: String(row.number) });
  return (
    <tr {...as.row} className="border-b border-hair align-top focus-within:bg-wash max-tablet:grid max-tablet:grid-cols-[2.5rem_minmax(0,1fr)_4rem] max-tablet:gap-x-3 max-tablet:gap-y-1.5 max-tablet:py-3">
      <td {...as.cell} className={`${cell} font-serif text-group leading-6 text-second`}>{row.number}</td>
      <td {...as.cell} className={`${cell} max-tablet:col-start-3 max-tablet:row-start-1 max-tablet:justify-self-end`}>
        <OpticDrawing kind={opticDrawingOf(row.opticKind)} width={44} named />
      </td>
      <th {...as.rowheader} scope="row" className={`${cell} text-left font-normal max-tablet:col-start-2 max-tablet:row-start-1`}>
        <AppLink href={to} data-row-link className="block font-semibold no-underline hover:underline max-tablet:min-h-6">{row.title}</AppLink>
        <span className="block text-axis text-second">{row.place}</span>
      </th>
      <td {...as.cell} className={`${cell} text-axis whitespace-nowrap max-desk:hidden`}>
        {row.windowDay}
        <span className="block text-second">{row.windowHours}</span>
      </td>
      <td {...as.cell} className={`${cell} max-tablet:col-span-3`}><BurnCard model={row.card} size="S" label={`Case ${row.number}`} /></td>
      <td {...as.cell} className={`${cell} max-tablet:col-span-2 max-[359px]:col-span-3`}><StateMark state={row.state} note={row.stateNote} below /></td>
      <td {...as.cell} className={`${cell} max-tablet:col-start-3 max-tablet:-ml-20 max-tablet:text-right max-[359px]:col-span-3 max-[359px]:col-start-1 max-[359px]:ml-0 max-[359px]:text-left`}>
        {row.nextReturn ? (
          <>
            <time dateTime={row.nextReturn.atUtc} className="font-medium">{row.nextReturn.words}</time>
            <span className="block text-axis text-second">{row.nextReturn.inWords}</span>
          </>
        ) : <span className="text-second">{row.returnWords}</span>}
      </td>
      <td {...as.cell} className={`${cell} text-axis text-second max-desk:hidden`}>{row.waitsFor}</td>
    </tr>
  );
}
