import type { ReactNode } from 'react';

export interface TickLineProps {
  readonly done: boolean;
  readonly children: ReactNode;
  readonly note?: ReactNode;
}

/** One thing that a move needs: ticked or open, said in words too. */
export function TickLine({ done, children, note }: TickLineProps) {
  return (
    <div className="flex items-start gap-2.5 border-b border-hair py-1.5">
      <svg width="14" height="14" viewBox="0 0 14 14" aria-hidden="true" className="mt-[0.2em] flex-none">
        <rect x="1" y="1" width="12" height="12" fill={done ? 'currentColor' : 'none'} stroke="currentColor" strokeWidth="1.5" />
        {done ? <path d="m3.6 7.2 2.3 2.3 4.4-5" fill="none" stroke="var(--color-paper)" strokeWidth="1.8" /> : null}
      </svg>
      <span>
        <span className="sr-only">{done ? 'Done: ' : 'Open: '}</span>
        {children}
        {note ? <span className="ml-1.5 text-axis text-second">{note}</span> : null}
      </span>
    </div>
  );
}
