import type { ReactNode } from 'react';

export type WithheldClass = 'personal' | 'health' | 'child' | 'legal' | 'exact place' | 'commercial' | 'text held back' | 'photos held back';

/* One width a class, so that the block never gives away how much was removed. */
const widths: Record<WithheldClass, string> = {
  personal: 'w-[9.5rem]',
  health: 'w-[9rem]',
  child: 'w-[8.5rem]',
  legal: 'w-[8rem]',
  'exact place': 'w-[11rem]',
  commercial: 'w-[11rem]',
  'text held back': 'w-[12.5rem]',
  'photos held back': 'w-[13.5rem]',
};

export interface HatchProps {
  readonly withheld: WithheldClass;
}

/** Stands where text was taken out of the bytes, with the class of what was taken. */
export function Hatch({ withheld }: HatchProps) {
  return (
    <span className={`hatch inline-flex h-[1.375rem] items-stretch border border-ink align-text-bottom ${widths[withheld]}`}>
      <span aria-hidden="true" className="hatch-lines flex-1" />
      <span className="flex items-center bg-ink px-2 font-sans text-axis text-paper">
        <span className="sr-only">withheld: </span>
        {withheld}
      </span>
    </span>
  );
}

export interface HatchSectionProps {
  readonly withheld: string;
  readonly children?: ReactNode;
}

/** A whole part withheld or hidden, such as an opinion that the reviewer has not asked to see. */
export function HatchSection({ withheld, children }: HatchSectionProps) {
  return (
    <div className="hatch border border-ink">
      <div aria-hidden="true" className="hatch-lines h-16" />
      <div className="flex flex-wrap items-center justify-between gap-3 border-t border-ink bg-sheet px-4 py-2 text-body">
        <p>{withheld}</p>
        {children}
      </div>
    </div>
  );
}
