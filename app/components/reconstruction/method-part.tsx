import type { ReactNode } from 'react';
import type { MethodPart } from '#app/domain/method-models.ts';

export interface MethodPartSectionProps {
  readonly part: MethodPart;
  /** Figures of this part. */
  readonly children?: ReactNode;
}

/** One part of the engine: its model, where it holds, how it was tested, its limits and sources. */
export function MethodPartSection({ part, children }: MethodPartSectionProps) {
  return (
    <section id={part.id} aria-labelledby={`${part.id}-heading`} className="space-y-4 border-t-2 border-ink pt-2">
      <h2 id={`${part.id}-heading`} className="font-serif text-title">{part.title}</h2>
      <div className="max-w-[76ch] space-y-2">{part.model.map((paragraph) => <p key={paragraph}>{paragraph}</p>)}</div>
      {children}
      <dl className="grid gap-x-8 gap-y-3 tablet:grid-cols-2">
        <Entry term="Holds for" lines={[part.holds]} />
        <Entry term="Tested" lines={part.tested.map((one) => <>{one.words} <span className="font-mono text-axis text-second [overflow-wrap:anywhere]">{one.test}</span></>)} />
        <Entry term="Limits" lines={part.limits} />
        <Entry term="Sources" lines={part.sources} />
      </dl>
    </section>
  );
}

function Entry({ term, lines }: { readonly term: string; readonly lines: readonly ReactNode[] }) {
  return (
    <div className="min-w-0 border-t border-hair pt-1.5">
      <dt className="text-small font-semibold">{term}</dt>
      {lines.map((line, index) => <dd key={index} className="pb-1 text-small">{line}</dd>)}
    </div>
  );
}
