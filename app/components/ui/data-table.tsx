import type { ReactNode, ThHTMLAttributes, TdHTMLAttributes, HTMLAttributes } from 'react';

export interface DataTableProps {
  /** Read out before the table; shown only when `captionShown`. */
  readonly caption: string;
  readonly captionShown?: boolean;
  readonly children: ReactNode;
  readonly className?: string;
}

/** A table with hairlines only. Wide ones scroll inside their own frame, which then takes the keyboard. */
export function DataTable({ caption, captionShown = false, children, className = '' }: DataTableProps) {
  return (
    // A frame that scrolls must take the keyboard, or its far columns are out of reach without a mouse. It is positioned,
    // so that words hidden for the eye scroll with it and do not widen the page.
    // eslint-disable-next-line jsx-a11y/no-noninteractive-tabindex
    <div className="relative overflow-x-auto" role="region" aria-label={caption} tabIndex={0}>
      <table className={`w-full border-collapse text-left ${className}`}>
        <caption className={captionShown ? 'pb-2 text-left text-small text-second' : 'sr-only'}>{caption}</caption>
        {children}
      </table>
    </div>
  );
}

/** Head row over a 1.5 px ink rule; children are `HeadCell`s. */
export function TableHead({ children }: { readonly children: ReactNode }) {
  return (
    <thead className="border-b-[1.5px] border-ink align-bottom text-axis font-semibold text-second">
      <tr>{children}</tr>
    </thead>
  );
}

export interface HeadCellProps extends ThHTMLAttributes<HTMLTableCellElement> {
  readonly numeric?: boolean;
}
export function HeadCell({ numeric = false, className = '', children, ...rest }: HeadCellProps) {
  return (
    <th scope="col" className={`py-1.5 pr-3 font-semibold last:pr-0 ${numeric ? 'text-right' : ''} ${className}`} {...rest}>
      {children}
    </th>
  );
}

export interface RowProps extends HTMLAttributes<HTMLTableRowElement> {
  readonly chosen?: boolean;
  /** Register rows are tighter than those of an ordinary table. */
  readonly tight?: boolean;
}
export function Row({ chosen = false, tight = false, className = '', children, ...rest }: RowProps) {
  const ground = chosen ? 'bg-wash [&>*:first-child]:border-l-4 [&>*:first-child]:border-l-ink [&>*:first-child]:pl-2' : '';
  const padding = tight ? '[&>*]:pt-[5px] [&>*]:pb-1' : '[&>*]:py-2';
  return (
    <tr className={`border-b border-hair align-top ${padding} ${ground} ${className}`} {...(chosen ? { 'aria-current': true } : {})} {...rest}>
      {children}
    </tr>
  );
}

export interface CellProps extends TdHTMLAttributes<HTMLTableCellElement> {
  readonly numeric?: boolean;
  /** Names the row. */
  readonly heading?: boolean;
  /** Second line, smaller. */
  readonly note?: ReactNode;
}
export function Cell({ numeric = false, heading = false, note, className = '', children, ...rest }: CellProps) {
  const Tag = heading ? 'th' : 'td';
  return (
    <Tag {...(heading ? { scope: 'row' } : {})} className={`pr-3 last:pr-0 ${heading ? 'font-semibold' : ''} ${numeric ? 'text-right' : ''} ${className}`} {...rest}>
      {children}
      {note ? <span className="block text-axis font-normal text-second">{note}</span> : null}
    </Tag>
  );
}

export interface GroupHeadingProps {
  readonly children: ReactNode;
  readonly count?: ReactNode;
  readonly level?: 2 | 3;
}

/** Serif group heading with a plain count, over a rule. */
export function GroupHeading({ children, count, level = 2 }: GroupHeadingProps) {
  const Tag = level === 2 ? 'h2' : 'h3';
  return (
    <div className="flex flex-wrap items-baseline gap-x-2.5 border-b-[1.5px] border-ink pt-4 pb-1">
      <Tag className="font-serif text-account leading-6 tablet:text-group">{children}</Tag>
      {count ? <span className="text-small text-second">{count}</span> : null}
    </div>
  );
}

/** The same inside a table: one row across all columns. */
export function GroupRow({ children, count, columns }: GroupHeadingProps & { readonly columns: number }) {
  return (
    <tr className="border-b-[1.5px] border-ink">
      <th colSpan={columns} scope="colgroup" className="pt-4 pb-1 font-serif text-group font-normal">
        {children}
        {count ? <span className="ml-2.5 font-sans text-small text-second">{count}</span> : null}
      </th>
    </tr>
  );
}
