import type { ReactNode } from 'react';
import { Cell, DataTable, HeadCell, Row, TableHead } from '#app/components/ui/data-table.tsx';

export interface NumberColumn {
  readonly head: string;
  readonly numeric?: boolean;
}
export interface NumberTableProps {
  readonly caption: string;
  readonly columns: readonly NumberColumn[];
  readonly rows: readonly (readonly ReactNode[])[];
}

/** The figure as a table: the first column names the row, units stand in the heads. */
export function NumberTable({ caption, columns, rows }: NumberTableProps) {
  return (
    <DataTable caption={caption}>
      <TableHead>{columns.map((column) => <HeadCell key={column.head} numeric={column.numeric ?? false}>{column.head}</HeadCell>)}</TableHead>
      <tbody>
        {rows.map((row, index) => (
          <Row key={index} tight>
            {row.map((value, place) => <Cell key={place} heading={place === 0} numeric={columns[place]?.numeric ?? false} className="!font-normal">{value}</Cell>)}
          </Row>
        ))}
      </tbody>
    </DataTable>
  );
}
