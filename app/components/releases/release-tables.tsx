import { href } from 'react-router';
import { AppLink } from '#app/components/ui/app-link.tsx';
import { Cell, DataTable, HeadCell, Row, TableHead } from '#app/components/ui/data-table.tsx';
import type { KeptReleaseView, ReaderReleaseView } from '#app/domain/release-view.ts';

const releaseHref = (release: KeptReleaseView): string => href('/cases/:caseNumber/releases/:number', { caseNumber: String(release.caseNumber), number: String(release.number) });

/** Releases as the team keeps them, of one case or of all. */
export function KeptReleases({ releases, withCase }: { readonly releases: readonly KeptReleaseView[]; readonly withCase: boolean }) {
  return (
    <DataTable caption={withCase ? 'Releases of all cases' : 'Releases of this case'} className="max-tablet:min-w-[46rem]">
      <TableHead>
        {withCase ? <HeadCell>Case</HeadCell> : null}
        <HeadCell>Release</HeadCell>
        <HeadCell>For</HeadCell>
        <HeadCell>State</HeadCell>
        <HeadCell numeric>Withheld</HeadCell>
        <HeadCell>Ends</HeadCell>
        <HeadCell numeric>Opened</HeadCell>
        <HeadCell>SHA-256, first 8 bytes</HeadCell>
      </TableHead>
      <tbody>
        {releases.map((release) => (
          <Row key={release.id}>
            {withCase ? <Cell heading note={release.caseTitle}>{release.caseNumber}</Cell> : null}
            <Cell heading={!withCase} note={release.changeNote}><AppLink href={releaseHref(release)} className="inline-flex min-h-6 items-center">Release {release.number}</AppLink></Cell>
            <Cell note={release.audience}>{release.recipient}</Cell>
            <Cell note={release.statusNote}>{release.status}</Cell>
            <Cell numeric>{release.withheld}</Cell>
            <Cell className="whitespace-nowrap">{release.ends}</Cell>
            <Cell numeric>{release.openings}</Cell>
            <Cell className="font-mono text-axis whitespace-nowrap">{release.hashShort}</Cell>
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
        <HeadCell>Release</HeadCell>
        <HeadCell>Frozen</HeadCell>
        <HeadCell>Ends</HeadCell>
        <HeadCell numeric>Withheld</HeadCell>
      </TableHead>
      <tbody>
        {releases.map((release) => (
          <Row key={release.id}>
            <Cell heading note={release.siteName}>
              <AppLink href={href('/case-files/:releaseId', { releaseId: release.id })} className="inline-flex min-h-6 items-center">{release.caseNumber} {release.title}</AppLink>
            </Cell>
            <Cell note={release.changeNote}>{release.number}</Cell>
            <Cell className="whitespace-nowrap">{release.released}</Cell>
            <Cell className="whitespace-nowrap">{release.ends}</Cell>
            <Cell numeric>{release.withheld}</Cell>
          </Row>
        ))}
      </tbody>
    </DataTable>
  );
}
