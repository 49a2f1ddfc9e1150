import { href } from 'react-router';
import { AppLink } from '#app/components/ui/app-link.tsx';
import { Cell, DataTable, HeadCell, Row, TableHead } from '#app/components/ui/data-table.tsx';
import { SectionHeading } from '#app/components/ui/page-title.tsx';
import type { ItemLineView } from '#app/domain/evidence-view.ts';

/** Items with who holds each now. */
export function ItemTable({ caseNumber, items }: { readonly caseNumber: number; readonly items: readonly ItemLineView[] }) {
  return (
    <section aria-labelledby="items" className="pt-6">
      <SectionHeading id="items">Items</SectionHeading>
      <DataTable caption="Items of evidence" className="min-w-[42rem]">
        <TableHead>
          <HeadCell>Item</HeadCell>
          <HeadCell>What it is</HeadCell>
          <HeadCell>Seal</HeadCell>
          <HeadCell>Held by</HeadCell>
          <HeadCell numeric>Examinations</HeadCell>
          <HeadCell>Label</HeadCell>
        </TableHead>
        <tbody>
          {items.map((item) => {
            const address = { caseNumber: String(caseNumber), letter: item.letter };
            return (
              <Row key={item.code}>
                <Cell heading className="whitespace-nowrap"><AppLink href={href('/cases/:caseNumber/evidence/:letter', address)} className="inline-flex min-h-6 items-center">{item.code}</AppLink></Cell>
                <Cell note={item.kind}>{item.description}</Cell>
                <Cell>{item.sealWords}</Cell>
                <Cell note={`since ${item.since}`}>{item.holder}</Cell>
                <Cell numeric>{item.exams}</Cell>
                <Cell><AppLink href={href('/cases/:caseNumber/evidence/:letter/label', address)} className="inline-flex min-h-6 items-center">Print<span className="sr-only"> the label of {item.code}</span></AppLink></Cell>
              </Row>
            );
          })}
        </tbody>
      </DataTable>
    </section>
  );
}
