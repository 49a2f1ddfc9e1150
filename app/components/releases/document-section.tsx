import { createContext, use } from 'react';
import type { ReactNode } from 'react';

/** Level of the headings of the sections; a document inside a case begins one lower. */
export const SectionLevel = createContext<2 | 3>(2);

export interface DocumentSectionProps {
  readonly id: string;
  readonly title: ReactNode;
  readonly children: ReactNode;
}

export function DocumentSection({ id, title, children }: DocumentSectionProps) {
  const Heading = use(SectionLevel) === 2 ? 'h2' : 'h3';
  return (
    <section id={id} aria-labelledby={`${id}-heading`} className="scroll-mt-20 pt-8">
      <Heading id={`${id}-heading`} className="pb-2 font-serif text-account">{title}</Heading>
      {children}
    </section>
  );
}

export function PartHeading({ children }: { readonly children: ReactNode }) {
  const Heading = use(SectionLevel) === 2 ? 'h3' : 'h4';
  return <Heading className="pt-4 pb-1 text-group font-semibold">{children}</Heading>;
}
