import type { ReactNode } from 'react';
import { CaptionedBurnCard } from '#app/components/burn-card/burn-card.tsx';
import { DayCards } from '#app/components/burn-card/day-cards.tsx';
import { MinuteTable } from '#app/components/burn-card/minute-table.tsx';
import { headerSpan } from '#app/components/burn-card/model.ts';
import type { BurnCardModel } from '#app/components/burn-card/model.ts';
import { ScrubCard } from '#app/components/burn-card/scrub-card.tsx';
import { zoneWords } from '#app/components/burn-card/words.ts';
import type { RunView } from '#app/domain/run-view.ts';

export interface RunCardProps {
  readonly view: RunView;
  readonly label: string;
  /** Words at both ends of the window, where the case's own card has the same window. */
  readonly words: { readonly start: readonly string[]; readonly end: readonly string[] } | null;
  /** Minute under the blue line, where the window is moved along minute by minute. */
  readonly cursorUtc: string | null;
  readonly onMinute: (atUtc: string) => void;
  readonly playing: boolean;
  readonly onPlay: () => void;
}

const weekMs = 7 * 86_400_000;

/** The large card of a run: moved along minute by minute within a day, day by day beyond a week. */
export function RunCard({ view, label, words, cursorUtc, ...scrub }: RunCardProps) {
  const { window } = view.card;
  const model: BurnCardModel = { ...runCardModel(view), startWords: words?.start ?? [], endWords: words?.end ?? [] };
  const length = window ? Date.parse(window.endUtc) - Date.parse(window.startUtc) : 0;
  if (length > weekMs) return <Table model={model} card={<DayCards model={model} label={label} />} />;
  if (!view.scrubs) return <CaptionedBurnCard model={model} size="L" label={label} />;
  return <Table model={model} card={<ScrubCard model={model} minutes={view.minutes} label={label} atUtc={cursorUtc ?? view.minutes[0]?.atUtc ?? ''} {...scrub} />} />;
}

/** The card of a run: its window with a margin on both sides. */
export function runCardModel({ card }: RunView): BurnCardModel {
  return { ...card, ...(card.window ? headerSpan(card.window) : { fromUtc: card.fromUtc, toUtc: card.toUtc }) };
}

function Table({ model, card }: { readonly model: BurnCardModel; readonly card: ReactNode }) {
  const zone = zoneWords(model);
  return (
    <div>
      {card}
      <p className="pt-1 text-small text-second"><b className="font-semibold text-ink">{zone.date}</b>{zone.rest}</p>
      <details>
        <summary className="inline-flex min-h-8 items-center text-small underline decoration-ember decoration-2 underline-offset-4">Minute table</summary>
        <MinuteTable model={model} />
      </details>
    </div>
  );
}
