import { href } from 'react-router';
import { Cell, DataTable, HeadCell, Row, TableHead } from '#app/components/ui/data-table.tsx';
import type { CustodyRowView, ExamView } from '#app/domain/evidence-view.ts';

/** Who held the item, from the first hands to those that hold it now. */
export function ChainTable({ code, custody }: { readonly code: string; readonly custody: readonly CustodyRowView[] }) {
  return (
    <DataTable caption={`Chain of custody of ${code}`} className="min-w-[50rem]">
      <TableHead>
        <HeadCell>From</HeadCell>
        <HeadCell>To</HeadCell>
        <HeadCell>Holder</HeadCell>
        <HeadCell>Purpose</HeadCell>
        <HeadCell>Condition taken over</HeadCell>
        <HeadCell>Signed</HeadCell>
      </TableHead>
      <tbody>
        {custody.map((record) => (
          <Row key={record.id}>
            <Cell heading className="whitespace-nowrap">{record.from}</Cell>
            <Cell className="whitespace-nowrap">{record.to}</Cell>
            <Cell note={[record.name, record.place].filter(Boolean).join(', ')}>{record.role}</Cell>
            <Cell>{record.purpose}</Cell>
            <Cell>{record.condition}</Cell>
            <Cell>{record.signed}</Cell>
          </Row>
        ))}
      </tbody>
    </DataTable>
  );
}

/** Examinations of the item, with notice and protocol where there was need of them. */
export function ExamTable({ code, exams, documents }: { readonly code: string; readonly exams: readonly ExamView[]; readonly documents: readonly { readonly id: string; readonly words: string }[] }) {
  const words = (id: string) => documents.find((document) => document.id === id)?.words;
  return (
    <DataTable caption={`Examinations of ${code}`} className="min-w-[46rem]">
      <TableHead>
        <HeadCell>When</HeadCell>
        <HeadCell>Kind</HeadCell>
        <HeadCell>Method</HeadCell>
        <HeadCell>Result</HeadCell>
        <HeadCell>Notice and protocol</HeadCell>
      </TableHead>
      <tbody>
        {exams.map((exam) => (
          <Row key={exam.id}>
            <Cell heading className="whitespace-nowrap">{exam.when}</Cell>
            <Cell note={`by ${exam.by}`}>{exam.kind}</Cell>
            <Cell>{exam.method}</Cell>
            <Cell note={exam.wentAhead ? `Went ahead because: ${exam.wentAhead}` : ''}>{exam.result}</Cell>
            <Cell>
              {exam.notice ?? 'no notice recorded'}
              {exam.protocolId ? <span className="block">{words(exam.protocolId) ? <a href={href('/documents/:documentId', { documentId: exam.protocolId })} download>{words(exam.protocolId)}</a> : 'protocol not open to you'}</span> : null}
            </Cell>
          </Row>
        ))}
      </tbody>
    </DataTable>
  );
}
