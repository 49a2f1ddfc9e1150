import type { ReactNode } from 'react';

export interface CautionProps {
  readonly title?: string;
  readonly children: ReactNode;
}

/** A caution behind a 6 px bar; never smaller than body text. */
export function Caution({ title, children }: CautionProps) {
  return (
    <div role="note" className="avoid-break border-l-6 border-ink py-0.5 pl-4 text-body">
      {title ? <p className="font-semibold">{title}</p> : null}
      {children}
    </div>
  );
}
