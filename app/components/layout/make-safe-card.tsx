import type { ReactNode } from 'react';
import { cautions } from './cautions.ts';
import { MakeSafeDrawing } from './make-safe-drawing.tsx';

export interface EmergencyBlockProps {
  /** Number for `tel:`, set by the organisation; left out: words only. */
  readonly telephone?: string;
  readonly headingLevel?: 1 | 2;
}

/** Ink block that comes before any form. */
export function EmergencyBlock({ telephone, headingLevel = 2 }: EmergencyBlockProps) {
  const Heading = headingLevel === 1 ? 'h1' : 'h2';
  return (
    <section data-ground="ink" className="bg-ink px-(--page-margin) py-5 text-paper">
      <Heading className="text-[1.5rem]/8 font-semibold">Smoking or burning?</Heading>
      <p className="pt-1 text-[1rem]/6">Raise the alarm, get out, call the emergency number. Report later.</p>
      {telephone ? (
        <a href={`tel:${telephone.replace(/[^+\d]/g, '')}`} className="mt-4 flex min-h-14 items-center justify-center bg-paper px-3 text-center text-[1.125rem]/6 font-semibold text-ember-deep no-underline">
          Call the emergency number, {telephone}
        </a>
      ) : null}
    </section>
  );
}

const lines: readonly ReactNode[] = [
  <>Come from the <b className="font-semibold">shaded side</b>. Keep others out.</>,
  <><b className="font-semibold">Cover</b> the glass or metal with something opaque that will not burn, or shade it.</>,
  <><b className="font-semibold">Do not look</b> at the sun, its reflection, or along the beam. Keep hands out of it.</>,
  <><b className="font-semibold">Do not move or clean it</b> unless someone is at risk. Then note how it stood.</>,
];

/** The four make-safe lines. */
export function MakeSafeLines() {
  return (
    <ol>
      {lines.map((line, index) => (
        <li key={index} className="flex gap-4 border-t border-hair py-2.5 text-[1rem]/6">
          <span aria-hidden="true" className="w-5 flex-none font-serif text-[1.25rem]/6">{index + 1}</span>
          <span>{line}</span>
        </li>
      ))}
    </ol>
  );
}

export interface MakeSafeCardProps extends EmergencyBlockProps {
  /** The button on, and quiet links. */
  readonly children?: ReactNode;
  /** Roof, heat and eye cautions folded under the lines. */
  readonly moreCautions?: boolean;
}

/** Emergency block, drawing, four lines and the cautions: shown before the questions. */
export function MakeSafeCard({ telephone, headingLevel = 2, children, moreCautions = true }: MakeSafeCardProps) {
  return (
    <div>
      <EmergencyBlock {...(telephone === undefined ? {} : { telephone })} headingLevel={headingLevel} />
      <div className="space-y-3 px-(--page-margin) pt-4">
        <h2 className="text-account font-semibold">If the bright patch is still there</h2>
        <MakeSafeDrawing />
        <MakeSafeLines />
        {children}
        {moreCautions ? (
          <details className="border-t border-hair">
            <summary className="flex min-h-11 items-center underline decoration-ember decoration-2 underline-offset-4">Eyes, heat and roofs</summary>
            <div className="space-y-2 pb-3 text-[1rem]/6">
              <p>{cautions.eyes}</p>
              <p className="font-semibold">{cautions.sight}</p>
              <p>{cautions.heat}</p>
              <p>{cautions.roof}</p>
              <p>{cautions.noReenactment}</p>
            </div>
          </details>
        ) : null}
      </div>
    </div>
  );
}
