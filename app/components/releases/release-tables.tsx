import { href } from 'react-router';
import { AppLink } from '#app/components/ui/app-link.tsx';
import { Cell, DataTable, HeadCell, Row, TableHead } from '#app/components/ui/data-table.tsx';
import type { KeptReleaseView, ReaderReleaseView } from '#app/domain/release-view.ts';

const releaseHref = (release: KeptReleaseView): string => href('/cases/:caseNumber/releases/:number', { caseNumber: String(release.caseNumber), number: String(release.number) });

/** Columns that a phone leaves out; it says the same in one of the others. */
const wide = 'max-tablet:hidden';

const openedWords = (openings: number): string => (openings === 0 ? 'not opened yet' : openings === 1 ? 'opened once' : `opened ${openings} times`);

/** Releases as the team keeps them, of one case or of all. */
export function KeptReleases({ releases, withCase }: { readonly releases: readonly KeptReleaseView[]; readonly withCase: boolean }) {
  return (
    <DataTable caption={withCase ? 'Releases of all cases' : 'Releases of this case'} >
      <TableHead>
        {withCase ? <HeadCell>Case</HeadCell> : null}
        <HeadCell>Release</HeadCell>
        <HeadCell className={wide}>For</HeadCell>
        <HeadCell className={wide}>State</HeadCell>
        <HeadCell numeric className={wide}>Withheld</HeadCell>
        <HeadCell className={wide}>Ends</HeadCell>
        <HeadCell numeric className={wide}>Opened</HeadCell>
        <HeadCell className={wide}>SHA-256, first 8 bytes</HeadCell>
      </TableHead>
      <tbody>
        {releases.map((release) => (
          <Row key={release.id}>
            {withCase ? <Cell heading note={release.caseTitle}>{release.caseNumber}</Cell> : null}
            <Cell heading={!withCase} note={<>{release.changeNote}<span className="block tablet:hidden">For {release.recipient}, {release.audience.toLowerCase()}. {release.status}: {release.statusNote}. Ends {release.ends}; {release.withheld} withheld, {openedWords(release.openings)}.</span></>}><AppLink href={releaseHref(release)} className="inline-flex min-h-(--target-height) items-center desk:min-h-6">Release {release.number}</AppLink></Cell>
            <Cell note={release.audience} className={wide}>{release.recipient}</Cell>
            <Cell note={release.statusNote} className={wide}>{release.status}</Cell>
            <Cell numeric className={wide}>{release.withheld}</Cell>
            <Cell className={`${wide} whitespace-nowrap`}>{release.ends}</Cell>
            <Cell numeric className={wide}>{release.openings}</Cell>
            <Cell className={`${wide} font-mono text-axis whitespace-nowrap`}>{release.hashShort}</Cell>
          </Row>
        ))}
      </tbody>
    </DataTable>
  );
}

/** Releases that a reader may open. */
export function ReaderReleases({ releases }: { readonly releases: readonly ReaderReleaseView[] }) {
  return (
    <DataTable caption="Case files open to you">
      <TableHead>
        <HeadCell>Case</HeadCell>
        <HeadCell className={wide}>Release</HeadCell>
        <HeadCell className={wide}>Frozen</HeadCell>
        <HeadCell className={wide}>Ends</HeadCell>
        <HeadCell numeric className={wide}>Withheld</HeadCell>
      </TableHead>
      <tbody>
        {releases.map((release) => (
          <Row key={release.id}>
            <Cell heading note={<>{release.siteName}<span className="block tablet:hidden">Release {release.number}: {release.changeNote}. Frozen {release.released}, ends {release.ends}; {release.withheld} withheld.</span></>}>
              <AppLink href={href('/case-files/:releaseId', { releaseId: release.id })} className="inline-flex min-h-(--target-height) items-center desk:min-h-6">{release.caseNumber} {release.title}</AppLink>
            </Cell>
            <Cell note={release.changeNote} className={wide}>{release.number}</Cell>
            <Cell className={`${wide} whitespace-nowrap`}>{release.released}</Cell>
            <Cell className={`${wide} whitespace-nowrap`}>{release.ends}</Cell>
            <Cell numeric className={wide}>{release.withheld}</Cell>
          </Row>
        ))}
      </tbody>
    </DataTable>
  );
}
