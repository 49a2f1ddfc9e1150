import type { ReactNode } from 'react';

/** States of a case, with `draft` for a report that lies on the reporter's phone only. */
export type MarkedState =
  | 'draft' | 'reported' | 'triage' | 'investigation' | 'findings' | 'corrective-action' | 'closed' | 'returned' | 'duplicate';

const words: Record<MarkedState, string> = {
  draft: 'On this phone',
  reported: 'Reported',
  triage: 'Triage',
  investigation: 'Investigation',
  findings: 'Findings',
  'corrective-action': 'Corrective action',
  closed: 'Closed',
  returned: 'Returned',
  duplicate: 'Duplicate',
};

const ring = { fill: 'none', stroke: 'currentColor', strokeWidth: 2 } as const;
const shapes: Record<MarkedState, ReactNode> = {
  draft: <circle cx="8" cy="8" r="6" {...ring} strokeWidth={1.8} strokeDasharray="1.7 2.07" />,
  reported: <circle cx="8" cy="8" r="5.8" {...ring} />,
  triage: (
    <>
      <circle cx="8" cy="8" r="5.8" {...ring} />
      <path d="M8 2.2a5.8 5.8 0 0 0 0 11.6Z" fill="currentColor" />
    </>
  ),
  investigation: (
    <path d="M2.9 6.4a5.4 5.4 0 0 1 10.2 0ZM2.9 9.6a5.4 5.4 0 0 0 10.2 0ZM0.5 7.2h15v1.6h-15Z" fill="currentColor" />
  ),
  findings: <path d="M5.6 2.7a5.8 5.8 0 0 0 0 10.6M10.4 2.7a5.8 5.8 0 0 1 0 10.6" {...ring} strokeWidth={2.4} />,
  'corrective-action': <path d="M8 2a6 6 0 1 0 6 6H8Z" fill="currentColor" />,
  closed: (
    <>
      <circle cx="8" cy="8" r="7" fill="currentColor" />
      <path d="m4.6 8.3 2.4 2.4 4.4-5" fill="none" stroke="var(--color-paper)" strokeWidth="1.8" />
    </>
  ),
  returned: <path d="M13 5A5.8 5.8 0 1 0 12.6 11.6" {...ring} strokeWidth={2.2} />,
  duplicate: (
    <>
      <circle cx="5.6" cy="8" r="4.4" {...ring} strokeWidth={1.8} />
      <circle cx="10.8" cy="8" r="4.6" fill="currentColor" />
    </>
  ),
};

export interface StateMarkProps {
  readonly state: MarkedState;
  /** Second line or note after the word, such as "probable, reopened" or "since 26 Mar 2026". */
  readonly note?: ReactNode;
  readonly below?: boolean;
  /** Said in place of the state's own word, for readers who do not know the words of the trade. */
  readonly word?: string;
}

/** Shape and word of a state; the shape never stands alone. */
export function StateMark({ state, note, below = false, word }: StateMarkProps) {
  return (
    <span className="inline-flex items-start gap-2">
      <svg width="16" height="16" viewBox="0 0 16 16" aria-hidden="true" className="mt-[0.125em] flex-none">
        {shapes[state]}
      </svg>
      <span>
        <span className="font-medium">{word ?? words[state]}</span>
        {note ? <span className={`text-axis text-second ${below ? 'block' : 'ml-1.5'}`}>{note}</span> : null}
      </span>
    </span>
  );
}
