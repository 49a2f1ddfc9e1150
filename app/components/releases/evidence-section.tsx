import { Cell, DataTable, HeadCell, Row, TableHead } from '#app/components/ui/data-table.tsx';
import type { ReleasedItemView } from '#app/domain/release-document.ts';
import { DocumentSection, PartHeading } from './document-section.tsx';

/** Items with who held them, by part in the matter. Names, descriptions and seals stay in the house. */
export function EvidenceSection({ items, number }: { readonly items: readonly ReleasedItemView[]; readonly number: number }) {
  return (
    <DocumentSection id="evidence" title={`${number}. Evidence and custody`}>
      {items.length === 0 ? <p className="text-second">No item is in this release.</p> : <p className="pb-2 text-small text-second">Holders are named by their part in the matter. Each record begins at the moment at which the one before it ends.</p>}
      {items.map((item) => (
        <div key={item.code}>
          <PartHeading>{item.code}: {item.kind}</PartHeading>
          {item.custody.length === 0 ? null : (
            <DataTable caption={`Custody of ${item.code}`}>
              <TableHead><HeadCell>From</HeadCell><HeadCell>To</HeadCell><HeadCell>Holder</HeadCell></TableHead>
              <tbody>
                {item.custody.map((record) => (
                  <Row key={record.from} tight>
                    <Cell className="whitespace-nowrap">{record.from}</Cell>
                    <Cell className="whitespace-nowrap">{record.to}</Cell>
                    <Cell>{record.holder}</Cell>
                  </Row>
                ))}
              </tbody>
            </DataTable>
          )}
          {item.exams.length === 0 ? null : <ul className="list-disc py-2 pl-5">{item.exams.map((exam) => <li key={`${exam.when}${exam.kind}`}>{exam.when}: {exam.kind.toLowerCase()}; {exam.notice}</li>)}</ul>}
        </div>
      ))}
    </DocumentSection>
  );
}
