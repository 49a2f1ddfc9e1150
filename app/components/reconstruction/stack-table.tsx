import type { ReactNode } from 'react';

export interface StackTableProps {
  readonly caption: string;
  readonly heads: readonly string[];
  /** Column widths from tablets on, as a class: `tablet:grid-cols-[8rem_1fr]`. */
  readonly columns: string;
  readonly rows: readonly { readonly key: string; readonly cells: readonly ReactNode[]; readonly strong?: boolean }[];
}

/** A table whose rows become blocks on a phone: the first cell is the heading, the others name their column. */
export function StackTable({ caption, heads, columns, rows }: StackTableProps) {
  return (
    <div role="table" aria-label={caption}>
      <div role="rowgroup" className="max-tablet:sr-only">
        <div role="row" className={`grid gap-x-4 border-b-[1.5px] border-ink pb-1.5 text-axis font-semibold text-second ${columns}`}>
          {heads.map((head) => <span key={head} role="columnheader" className="self-end">{head}</span>)}
        </div>
      </div>
      <div role="rowgroup">
        {rows.map((row) => (
          <div key={row.key} role="row" className={`avoid-break grid items-start gap-x-4 gap-y-1.5 border-b border-hair py-2 ${columns}`}>
            {row.cells.map((cell, index) => (
              <div key={heads[index]} role={index === 0 ? 'rowheader' : 'cell'} className={index === 0 ? 'font-semibold' : row.strong && index === 1 ? 'font-semibold' : cell === '' ? 'max-tablet:hidden' : 'max-tablet:flex max-tablet:gap-3'}>
                {index > 0 ? <span aria-hidden="true" className="w-24 flex-none text-small font-normal text-second tablet:hidden">{heads[index]}</span> : null}
                <div className="min-w-0">{cell}</div>
              </div>
            ))}
          </div>
        ))}
      </div>
    </div>
  );
}
