import type { ReactNode } from 'react';
import { BurnCard } from './burn-card.tsx';
import type { FoldedDays } from './fold-days.ts';
import { foldDays } from './fold-days.ts';
import { SharedHourRuler } from './hour-ruler.tsx';
import type { BurnCardModel } from './model.ts';
import { dateWords } from './wall-clock.ts';

export interface DayCardsProps {
  readonly model: BurnCardModel;
  readonly label?: string;
}

/** A window of more than seven days: one small card a day on a shared ruler, days without change folded until pressed. */
export function DayCards({ model, label }: DayCardsProps) {
  const groups = foldDays(model);
  return (
    <div>
      <DayLine words=""><SharedHourRuler fromHour={0} toHour={24} /></DayLine>
      {groups.map((group) => <Group key={group.days[0]?.on} group={group} {...(label ? { label } : {})} />)}
    </div>
  );
}

function DayLine({ words, children }: { readonly words: string; readonly children: ReactNode }) {
  return <div className="grid grid-cols-[6.5rem_1fr] items-center gap-3"><span className="text-small text-second">{words}</span>{children}</div>;
}

function Group({ group, label }: { readonly group: FoldedDays; readonly label?: string }) {
  const [first, ...rest] = group.days;
  if (!first) return null;
  const card = (day: typeof first) => (
    <DayLine key={day.on} words={dateWords(day.on, false)}><BurnCard model={day.model} size="S" {...(label ? { label } : {})} /></DayLine>
  );
  if (rest.length === 0) return card(first);
  return (
    <>
      {card(first)}
      <details>
        <summary className="ml-[7.25rem] inline-flex min-h-(--target-height) items-center text-small underline decoration-ember decoration-2 underline-offset-4">{rest.length} {rest.length === 1 ? 'day' : 'days'} alike</summary>
        {rest.map(card)}
      </details>
    </>
  );
}
