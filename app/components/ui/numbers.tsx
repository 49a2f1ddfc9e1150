import { useContext, useId } from 'react';
import type { ReactNode } from 'react';
import { AppLink } from './app-link.tsx';
import { FigureFilesContext } from './figure-files.ts';

export interface NumbersProps {
  /** "Fig. 1" and its like. */
  readonly figure?: string;
  /** Title with units. */
  readonly title: ReactNode;
  readonly picture: ReactNode;
  readonly numbers: ReactNode;
  /** Method, basis and limits under both. */
  readonly note?: ReactNode;
  /** Start with the table. */
  readonly numbersFirst?: boolean;
  /** Name of the file with these numbers, without its ending. */
  readonly csv?: string;
}

/** A figure and its table in one place; "Numbers" and "Picture" take turns, in print both are shown. */
export function Numbers({ figure, title, picture, numbers, note, numbersFirst = false, csv }: NumbersProps) {
  const id = useId();
  const files = useContext(FigureFilesContext);
  return (
    <figure className="numbers-swap border-t-[1.5px] border-ink" aria-labelledby={`${id}-title`}>
      <div className="flex items-baseline justify-between gap-3 pt-1.5 pb-2">
        <figcaption id={`${id}-title`} className="text-body font-semibold">
          {figure ? <span className="mr-2 font-serif font-normal text-second">{figure}</span> : null}
          {title}
        </figcaption>
        <span data-print="no" className="flex flex-none items-baseline gap-4">
        {csv && files ? <AppLink href={`${files}/${csv}.csv`} download className="inline-flex min-h-(--target-height) items-center text-small" aria-describedby={`${id}-title`}>CSV</AppLink> : null}
        <label className="relative inline-flex min-h-(--target-height) flex-none cursor-pointer items-center has-focus-visible:outline-3 has-focus-visible:outline-offset-2 has-focus-visible:outline-ink">
          <input type="checkbox" className="numbers-switch absolute inset-0 h-full w-full cursor-pointer opacity-0" defaultChecked={numbersFirst} aria-label="Show the numbers" aria-describedby={`${id}-title`} />
          <span aria-hidden="true" className="text-small underline decoration-ember decoration-2 underline-offset-4">
            <span className="word-numbers">Numbers</span>
            <span className="word-picture">Picture</span>
          </span>
        </label>
        </span>
      </div>
      <div className="figure-picture">{picture}</div>
      <div className="figure-numbers">{numbers}</div>
      {note ? <p className="mt-1.5 text-axis text-second">{note}</p> : null}
    </figure>
  );
}
