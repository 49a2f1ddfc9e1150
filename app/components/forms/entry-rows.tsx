import type { ReactNode } from 'react';
import { FieldError } from './field.tsx';
import type { FieldLike } from './field-like.ts';

export interface EntryColumn<Key extends string> {
  readonly key: Key;
  readonly head: string;
  /** Width on a phone in sixths of the line, as a class such as `max-desk:col-span-2`. */
  readonly span: string;
}
export interface EntryRowsProps<Key extends string> {
  readonly caption: string;
  readonly columns: readonly EntryColumn<Key>[];
  /** Widths at the desk, the number of the row first, as a class such as `desk:grid-cols-[2rem_1fr]`. */
  readonly grid: string;
  readonly rowCount: number;
  readonly fieldOf: (row: number, key: Key) => FieldLike;
  /** The control of one cell; the label says row and column, as nothing else names it. */
  readonly control: (row: number, key: Key, label: string) => ReactNode;
}

/** How a cell of `EntryRows` is called in its label and in the summary of errors. */
export const entryLabel = (row: number, head: string) => `Row ${row + 1}, ${head}`;

/** Numbers typed in rows: a table at the desk; narrower, each row is a block in which every field carries its own words. */
export function EntryRows<Key extends string>({ caption, columns, grid, rowCount, fieldOf, control }: EntryRowsProps<Key>) {
  return (
    <div role="table" aria-label={caption}>
      <div role="rowgroup" className="max-desk:sr-only">
        <div role="row" className={`grid gap-x-3 border-b-[1.5px] border-ink pb-1.5 text-axis font-semibold text-second ${grid}`}>
          <span role="columnheader" className="self-end"><span className="sr-only">Row</span></span>
          {columns.map(({ key, head }) => <span key={key} role="columnheader" className="self-end">{head}</span>)}
        </div>
      </div>
      <div role="rowgroup" className="max-desk:border-t-[1.5px] max-desk:border-ink">
        {Array.from({ length: rowCount }, (_unused, row) => (
          <div key={row} role="row" className={`grid grid-cols-6 items-start gap-x-3 gap-y-2 border-b border-hair pt-2 pb-3 desk:py-1 ${grid}`}>
            <span role="rowheader" className="font-serif text-second max-desk:col-span-6 desk:self-center"><span className="desk:sr-only">Row </span>{row + 1}</span>
            {columns.map(({ key, head, span }) => (
              <div key={key} role="cell" className={`min-w-0 ${span}`}>
                <span aria-hidden="true" className="block pb-1 text-axis text-second desk:hidden">{head}</span>
                {control(row, key, entryLabel(row, head))}
                <FieldError field={fieldOf(row, key)} />
              </div>
            ))}
          </div>
        ))}
      </div>
    </div>
  );
}
