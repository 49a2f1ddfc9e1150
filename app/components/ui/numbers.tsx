import { useId } from 'react';
import type { ReactNode } from 'react';

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
}

/** A figure and its table in one place; "Numbers" and "Picture" take turns, in print both are shown. */
export function Numbers({ figure, title, picture, numbers, note, numbersFirst = false }: NumbersProps) {
  const id = useId();
  return (
    <figure className="numbers-swap border-t-[1.5px] border-ink" aria-labelledby={`${id}-title`}>
      <div className="flex items-baseline justify-between gap-3 pt-1.5 pb-2">
        <figcaption id={`${id}-title`} className="text-body font-semibold">
          {figure ? <span className="mr-2 font-serif font-normal text-second">{figure}</span> : null}
          {title}
        </figcaption>
        <label data-print="no" className="relative inline-flex min-h-6 flex-none cursor-pointer items-center has-focus-visible:outline-3 has-focus-visible:outline-offset-2 has-focus-visible:outline-ink">
          <input type="checkbox" className="numbers-switch absolute inset-0 h-full w-full cursor-pointer opacity-0" defaultChecked={numbersFirst} aria-label="Show the numbers" aria-describedby={`${id}-title`} />
          <span aria-hidden="true" className="text-small underline decoration-ember decoration-2 underline-offset-4">
            <span className="word-numbers">Numbers</span>
            <span className="word-picture">Picture</span>
          </span>
        </label>
      </div>
      <div className="figure-picture">{picture}</div>
      <div className="figure-numbers">{numbers}</div>
      {note ? <p className="mt-1.5 text-axis text-second">{note}</p> : null}
    </figure>
  );
}
