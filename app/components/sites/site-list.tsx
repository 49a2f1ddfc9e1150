import { href } from 'react-router';
import { AppLink } from '#app/components/ui/app-link.tsx';
import { Cell, DataTable, HeadCell, Row, TableHead } from '#app/components/ui/data-table.tsx';

export interface ListedSite {
  readonly code: string;
  readonly name: string;
  readonly use: string;
  readonly zone: string;
  readonly cases: number;
  readonly open: number;
  readonly nextReturn: string | null;
}

interface SiteListProps {
  readonly sites: readonly ListedSite[];
  /** False for roles that see no case: counts and returns would read as if there were none. */
  readonly seesCases: boolean;
}

const noReturn = 'no return on file';
const siteHref = (site: ListedSite) => href('/sites/:siteCode', { siteCode: site.code });

/** Sites with the cases the reader may see: a table at the desk, one block a site on a phone. */
export function SiteList({ sites, seesCases }: SiteListProps) {
  return (
    <>
      <div className="max-tablet:hidden">
        <DataTable caption="Sites">
          <TableHead>
            <HeadCell>Site</HeadCell>
            <HeadCell>Use</HeadCell>
            {seesCases ? (
              <>
                <HeadCell numeric className="!pr-8">Cases</HeadCell>
                <HeadCell numeric className="!pr-8">Open</HeadCell>
                <HeadCell>Sun returns to an open case, local time</HeadCell>
              </>
            ) : null}
          </TableHead>
          <tbody>
            {sites.map((site) => (
              <Row key={site.code}>
                <Cell heading note={site.zone}>
                  <AppLink href={siteHref(site)}>{site.name}</AppLink>
                </Cell>
                <Cell>{site.use}</Cell>
                {seesCases ? (
                  <>
                    <Cell numeric className="!pr-8">{site.cases}</Cell>
                    <Cell numeric className="!pr-8">{site.open}</Cell>
                    <Cell>{site.nextReturn ?? noReturn}</Cell>
                  </>
                ) : null}
              </Row>
            ))}
          </tbody>
        </DataTable>
      </div>
      <ul className="border-t-[1.5px] border-ink tablet:hidden" aria-label="Sites">
        {sites.map((site) => (
          <li key={site.code} className="border-b border-hair py-1.5">
            <AppLink href={siteHref(site)} className="flex min-h-11 items-center font-semibold">{site.name}</AppLink>
            <p className="flex flex-wrap justify-between gap-x-4 pb-1 text-small text-second">
              <span>{seesCases ? `${site.open} open of ${site.cases}` : site.use}</span>
              <span>{seesCases ? (site.nextReturn ? `sun returns ${site.nextReturn}` : noReturn) : site.zone}</span>
            </p>
          </li>
        ))}
      </ul>
    </>
  );
}
