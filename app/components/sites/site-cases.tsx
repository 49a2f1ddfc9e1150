import { href } from 'react-router';
import { AppLink } from '#app/components/ui/app-link.tsx';
import { Cell, DataTable, HeadCell, Row, TableHead } from '#app/components/ui/data-table.tsx';
import { StateMark } from '#app/components/ui/state-mark.tsx';
import type { CaseState } from '#app/domain/case-state.ts';

export interface SiteCase {
  readonly number: number;
  readonly title: string;
  readonly state: CaseState;
  readonly reported: string;
  readonly nextReturn: string | null;
}

const noReturn = 'no return on file';
const caseHref = (row: SiteCase) => href('/cases/:caseNumber', { caseNumber: String(row.number) });

/** Cases at one site: a table at the desk, one block a case on a phone. */
export function SiteCases({ cases }: { readonly cases: readonly SiteCase[] }) {
  return (
    <>
      <div className="max-tablet:hidden">
        <DataTable caption="Cases at this site, newest first">
          <TableHead>
            <HeadCell>No.</HeadCell>
            <HeadCell>Mark</HeadCell>
            <HeadCell>State</HeadCell>
            <HeadCell>Reported</HeadCell>
            <HeadCell>Sun returns, local time</HeadCell>
          </TableHead>
          <tbody>
            {cases.map((row) => (
              <Row key={row.number}>
                <Cell className="font-serif">{row.number}</Cell>
                <Cell heading>
                  <AppLink href={caseHref(row)}>{row.title}</AppLink>
                </Cell>
                <Cell>
                  <StateMark state={row.state} />
                </Cell>
                <Cell>{row.reported}</Cell>
                <Cell>{row.nextReturn ?? noReturn}</Cell>
              </Row>
            ))}
          </tbody>
        </DataTable>
      </div>
      <ul className="tablet:hidden">
        {cases.map((row) => (
          <li key={row.number} className="border-b border-hair py-2">
            <AppLink href={caseHref(row)} className="flex min-h-11 items-center gap-3 font-semibold">
              <span className="font-serif font-normal">{row.number}</span>
              {row.title}
            </AppLink>
            <p className="flex flex-wrap justify-between gap-x-4 text-small">
              <StateMark state={row.state} />
              <span>{row.nextReturn ? `sun returns ${row.nextReturn}` : noReturn}</span>
            </p>
          </li>
        ))}
      </ul>
    </>
  );
}
