import type { ReactNode } from 'react';

export interface PageTitleProps {
  /** The finding of the page, as a sentence. */
  readonly children: ReactNode;
  /** Case number, in serif before the title. */
  readonly number?: string | number;
  readonly below?: ReactNode;
  /** Buttons, or state and return, at the right. */
  readonly aside?: ReactNode;
}

export function PageTitle({ children, number, below, aside }: PageTitleProps) {
  return (
    <div className="flex flex-wrap items-start justify-between gap-x-8 gap-y-3 pt-5 pb-3 desk:pt-6">
      <div className="flex min-w-0 flex-1 basis-80 gap-4">
        {number === undefined ? null : <p className="font-serif text-title tracking-tight text-second"><span className="sr-only">Case </span>{number}</p>}
        <div className="min-w-0">
          <h1 className="font-serif text-title">{children}</h1>
          {below ? <p className="mt-0.5 text-body text-second">{below}</p> : null}
        </div>
      </div>
      {aside ? <div className="flex flex-wrap items-start gap-3 max-tablet:w-full max-tablet:[&>*]:flex-1">{aside}</div> : null}
    </div>
  );
}

export interface SectionHeadingProps {
  readonly children: ReactNode;
  readonly note?: ReactNode;
  readonly aside?: ReactNode;
  readonly level?: 2 | 3;
  readonly id?: string;
}

/** Section heading under its own rule, with a note beside it and a link at the right. */
export function SectionHeading({ children, note, aside, level = 2, id }: SectionHeadingProps) {
  const Tag = level === 2 ? 'h2' : 'h3';
  return (
    <div className="flex flex-wrap items-baseline justify-between gap-x-4 border-t-[1.5px] border-ink pt-2 pb-2">
      <div className="flex flex-wrap items-baseline gap-x-3">
        <Tag id={id} className="text-body font-semibold tablet:text-group">{children}</Tag>
        {note ? <span className="text-small text-second">{note}</span> : null}
      </div>
      {aside}
    </div>
  );
}
