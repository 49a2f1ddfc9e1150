import type { ReactNode } from 'react';
import type { FieldLike } from '#app/components/forms/field-like.ts';
import type { SelectOption } from '#app/components/forms/text-field.tsx';
import { SectionHeading } from '#app/components/ui/page-title.tsx';

export type FieldOf = (name: string) => FieldLike;

/** One part of the measurements form. */
export function Part({ title, note, children }: { readonly title: string; readonly note?: string; readonly children: ReactNode }) {
  return (
    <section className="space-y-4">
      <SectionHeading note={note}>{title}</SectionHeading>
      {children}
    </section>
  );
}

/** What follows from the numbers above, said as soon as they are typed. */
export function FollowsFrom({ words }: { readonly words: string | null }) {
  return <p role="status" className={words === null ? '' : 'border-l-6 border-ink py-0.5 pl-4'}>{words}</p>;
}

const words = (value: string) => `${value.charAt(0).toUpperCase()}${value.slice(1).replaceAll('-', ' ')}`;
export const plain = (values: readonly string[]): SelectOption[] => values.map((value) => ({ value, label: words(value) }));
