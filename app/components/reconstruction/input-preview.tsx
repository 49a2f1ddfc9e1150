import { AppLink } from '#app/components/ui/app-link.tsx';
import { Cell, DataTable, HeadCell, Row, TableHead } from '#app/components/ui/data-table.tsx';
import { SectionHeading } from '#app/components/ui/page-title.tsx';
import { TickLine } from '#app/components/ui/tick-line.tsx';
import type { InputOrigin } from '#app/domain/scene-optic.ts';

export interface InputPreviewProps {
  readonly origins: readonly InputOrigin[];
  readonly missing: readonly string[];
  readonly sceneVersion: number | null;
  readonly measurementsHref: string;
}

const originWords = { measured: 'measured', reported: 'reported', file: 'from file', assumed: 'assumed' } as const;

/** What a new run would go by: every value with where it comes from, and what is still missing. */
export function InputPreview({ origins, missing, sceneVersion, measurementsHref }: InputPreviewProps) {
  const assumed = origins.filter((one) => one.origin === 'assumed').length;
  return (
    <div className="grid gap-x-10 gap-y-6 desk:grid-cols-[minmax(0,1fr)_minmax(0,24rem)]">
      <section aria-labelledby="input-values">
        <SectionHeading id="input-values" note={`${sceneVersion === null ? 'no measurements yet' : `measurements, version ${sceneVersion}`}; ${assumed} of ${origins.length} values assumed`}>A new run would go by</SectionHeading>
        <DataTable caption="Values for a new run, with their origin">
          <TableHead>
            <HeadCell>Value</HeadCell>
            <HeadCell>As it is taken</HeadCell>
            <HeadCell>Origin</HeadCell>
          </TableHead>
          <tbody>
            {origins.map((one) => (
              <Row key={one.field} tight>
                <Cell heading>{one.field}</Cell>
                <Cell note={one.note}>{one.value}</Cell>
                <Cell note={one.verified ? undefined : 'unverified'}>{originWords[one.origin]}</Cell>
              </Row>
            ))}
          </tbody>
        </DataTable>
      </section>
      <section aria-labelledby="input-missing">
        <SectionHeading id="input-missing" aside={<AppLink href={measurementsHref} className="text-small">Measurements</AppLink>}>{missing.length === 0 ? 'Nothing is missing' : 'Still missing'}</SectionHeading>
        {missing.length === 0 ? <p className="text-second">Every value that the engine asks for is there, or stands in the list as assumed.</p> : null}
        {missing.map((sentence) => <TickLine key={sentence} done={false}>{sentence}</TickLine>)}
        {missing.length > 0 ? <p className="pt-2 text-small text-second">A run without them is possible: what cannot be told is then drawn as dots, never as an answer.</p> : null}
      </section>
    </div>
  );
}
