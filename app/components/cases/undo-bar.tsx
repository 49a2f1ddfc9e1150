import { useEffect, useRef, useState } from 'react';
import { Form } from 'react-router';
import { FixedBar } from '#app/components/layout/page.tsx';
import { useHydrated } from '#app/components/report/use-hydrated.ts';
import { Button } from '#app/components/ui/button.tsx';
import type { UndoOffer } from '#app/domain/move-undo.ts';
import { undoLeftWords, undoSeconds } from '#app/domain/move-undo.ts';

export interface UndoBarProps {
  readonly offer: UndoOffer;
  /** Path of the case, `/cases/118`. */
  readonly casePath: string;
}

/**
 * What was done, and for some seconds the way back. Without a script it is a plain form at the head of the page, which the
 * server refuses with a sentence when the time is over. The seconds are not read out one by one.
 */
export function UndoBar({ offer, casePath }: UndoBarProps) {
  const hydrated = useHydrated();
  const leftMs = useTimeLeft(offer.leftMs);
  const start = useRef<HTMLDivElement>(null);
  // The button of the move has gone from the page, and focus with it: the next Tab then finds the undo.
  useEffect(() => {
    if (document.activeElement === document.body) start.current?.focus({ preventScroll: true });
  }, [offer.sequence]);
  if (leftMs === 0) return null;
  const title = `Done: ${offer.label.toLowerCase()}.`;
  const form = (
    <Form method="post" action={`${casePath}/undo`} className="flex items-center gap-3">
      <input type="hidden" name="sequence" value={offer.sequence} />
      <span className="text-small whitespace-nowrap text-second tabular-nums">{hydrated ? undoLeftWords(leftMs) : `within ${undoSeconds} seconds of it`}</span>
      <Button look="outlined">Undo</Button>
    </Form>
  );
  return (
    <div ref={start} tabIndex={-1} className="outline-none print:hidden">
      {hydrated ? <FixedBar title={title} action={form} /> : <div className="flex flex-wrap items-center justify-between gap-3 border-b-2 border-ink bg-sheet px-4 py-2"><p className="font-semibold">{title}</p>{form}</div>}
    </div>
  );
}

/** Counts down from `fromMs`, from the moment that the page has it. [ms] */
function useTimeLeft(fromMs: number): number {
  const [leftMs, setLeftMs] = useState(fromMs);
  useEffect(() => {
    const startedMs = performance.now();
    const tick = () => setLeftMs(Math.max(0, fromMs - (performance.now() - startedMs)));
    tick();
    const timer = setInterval(tick, 250);
    return () => clearInterval(timer);
  }, [fromMs]);
  return leftMs;
}
