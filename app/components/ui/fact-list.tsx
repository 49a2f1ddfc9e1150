import type { ReactNode } from 'react';

export interface Fact {
  readonly term: string;
  readonly value: ReactNode;
  /** Method, basis or uncertainty, in the second line. */
  readonly note?: ReactNode;
}
export interface FactListProps {
  readonly facts: readonly Fact[];
  /** `ends`: value at the right edge. `columns`: value under a common left edge, as for inputs. */
  readonly layout?: 'ends' | 'columns';
}

/** Term and value a row, parted by hairlines. */
export function FactList({ facts, layout = 'ends' }: FactListProps) {
  const ends = layout === 'ends';
  return (
    <dl>
      {facts.map((fact) => (
        <div key={fact.term} className={`border-b border-hair py-2 ${ends ? 'flex flex-wrap justify-between gap-x-6' : 'grid grid-cols-[minmax(6.5rem,40%)_1fr] gap-x-3 text-small'}`}>
          <dt className="text-second">{fact.term}</dt>
          <dd className={ends ? 'ml-auto text-right' : ''}>
            {fact.value}
            {fact.note ? <span className={`text-axis text-second ${ends ? 'ml-1' : 'block'}`}>{fact.note}</span> : null}
          </dd>
        </div>
      ))}
    </dl>
  );
}
