import type { ReactNode } from 'react';
import { StepDisc } from '#app/components/forms/field.tsx';

/** Numbered disc that fills by itself once the question is answered, without a script. */
export function AnswerDisc({ number, answers }: { readonly number: number; readonly answers: string }) {
  return (
    <span data-disc={answers} className="flex-none">
      <span className="disc-open"><StepDisc>{number}</StepDisc></span>
      <span className="disc-done"><StepDisc done /></span>
    </span>
  );
}

/** A bright patch that left no mark takes a shorter way: what is only about marks is left out, by `report.css`. */
const onlyMarks = 'only-marks';

/** One of the four questions that a report needs, or, without a number, one that it does not. */
export interface QuestionProps {
  readonly number?: number;
  readonly answers?: string;
  readonly title: ReactNode;
  readonly help?: ReactNode;
  /** Left out for a near miss. */
  readonly shortPath?: boolean;
  readonly children: ReactNode;
}

export function Question({ number, answers, title, help, shortPath = false, children }: QuestionProps) {
  return (
    <section className={`${shortPath ? `${onlyMarks} ` : ''}border-t border-hair pt-4 pb-5`}>
      <h2 className="flex items-center gap-3 pb-2.5 text-account font-semibold">
        {number !== undefined && answers !== undefined ? <AnswerDisc number={number} answers={answers} /> : <OptionalDisc />}
        {title}
      </h2>
      {help ? <p className="pb-2.5 text-small text-second">{help}</p> : null}
      <div className="space-y-4">{children}</div>
    </section>
  );
}

function OptionalDisc() {
  return (
    <svg width="28" height="28" viewBox="0 0 28 28" aria-hidden="true" className="flex-none fill-none stroke-ink">
      <circle cx="14" cy="14" r="13" strokeWidth="1.5" strokeDasharray="3 2.8" />
      <path d="M14 9.5v9M9.5 14h9" strokeWidth="1.5" />
    </svg>
  );
}

/** Shown by the style sheet when the answer it depends on is given; see `report.css`. */
export function Follows({ on, shortPath = false, children }: { readonly on: string; readonly shortPath?: boolean; readonly children: ReactNode }) {
  return <div className={`follows space-y-3${shortPath ? ` ${onlyMarks}` : ''}`} data-on={on}>{children}</div>;
}

/** Left out for a near miss. */
export function OnlyMarks({ children }: { readonly children: ReactNode }) {
  return <div className={`${onlyMarks} space-y-3`}>{children}</div>;
}
