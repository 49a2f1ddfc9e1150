import { AppLink } from '#app/components/ui/app-link.tsx';
import { Cell, DataTable, HeadCell, Row, TableHead } from '#app/components/ui/data-table.tsx';
import { SectionHeading } from '#app/components/ui/page-title.tsx';
import type { VersionView } from '#app/domain/finding-view.ts';

export interface VersionListProps {
  readonly versions: readonly VersionView[];
  readonly chosen: number | null;
  /** Result of hashing the chosen signed version again; null where there is nothing to hash. */
  readonly hashAgrees: boolean | null;
}

/** Every version that the reader may know of; a signed one with its hash. */
export function VersionList({ versions, chosen, hashAgrees }: VersionListProps) {
  if (versions.length === 0) return null;
  return (
    <section aria-labelledby="versions" className="mt-10">
      <SectionHeading id="versions" note="old versions are kept">Versions</SectionHeading>
      <DataTable caption="Versions of the finding">
        <TableHead>
          <HeadCell>Version</HeadCell>
          <HeadCell>State</HeadCell>
          <HeadCell>Author</HeadCell>
          <HeadCell>Reviewer</HeadCell>
          <HeadCell>Since</HeadCell>
          <HeadCell>Hash of what was signed, SHA-256</HeadCell>
        </TableHead>
        <tbody>
          {versions.map((version) => (
            <Row key={version.version} chosen={version.version === chosen}>
              <Cell heading><AppLink href={`?version=${version.version}`}>{version.version}</AppLink></Cell>
              <Cell>{version.state}</Cell>
              <Cell>{version.author}</Cell>
              <Cell>{version.reviewer ?? 'none yet'}</Cell>
              <Cell className="whitespace-nowrap">{version.when}</Cell>
              <Cell note={version.version === chosen ? hashWords(hashAgrees) : undefined}>{version.frozenHash ? <code className="font-mono text-axis break-all">{version.frozenHash}</code> : 'not signed'}</Cell>
            </Row>
          ))}
        </tbody>
      </DataTable>
    </section>
  );
}

function hashWords(agrees: boolean | null): string | undefined {
  if (agrees === null) return undefined;
  return agrees ? 'Hashed again just now: the same.' : 'Hashed again just now: it differs. Do not rely on this version; tell the administrator.';
}
