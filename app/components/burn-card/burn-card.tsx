import type { ReactNode } from 'react';
import { BurnCardDrawing } from './drawing.tsx';
import type { CardSize } from './layout.ts';
import { layoutBurnCard } from './layout.ts';
import { MinuteTable } from './minute-table.tsx';
import type { BurnCardModel } from './model.ts';
import { burnCardSentence, zoneWords } from './words.ts';

export interface BurnCardProps {
  readonly model: BurnCardModel;
  readonly size: CardSize;
  /** What the card is of, first words of its accessible name: "Case 118". */
  readonly label?: string;
  /** One drawing for this width, where the width is known, as on paper. [px] */
  readonly width?: number;
}

/* Widths for which a large card is drawn; the frame shows the widest that fits. */
const largeWidths = [288, 328, 640, 1000, 1280] as const;
const smallWidths = { S: 336, M: 358 } as const;

/** A burn card that fills its column. Large cards are drawn for five widths, from small phone to wide desk. */
export function BurnCard({ model, size, label, width }: BurnCardProps) {
  const sentence = burnCardSentence(model, label);
  if (width !== undefined) return <div style={{ width, maxWidth: '100%' }}><BurnCardDrawing layout={layoutBurnCard(model, width, size)} sentence={sentence} /></div>;
  if (size === 'S' || size === 'M') return <BurnCardDrawing layout={layoutBurnCard(model, smallWidths[size], size)} sentence={sentence} />;
  return (
    <div className="card-frame">
      {largeWidths.map((drawn) => (
        <div key={drawn} data-from={drawn === largeWidths[0] ? 0 : drawn}>
          <BurnCardDrawing layout={layoutBurnCard(model, drawn, size)} sentence={sentence} />
        </div>
      ))}
    </div>
  );
}

export interface CaptionedBurnCardProps extends BurnCardProps {
  /** IANA zone of the reader; named when it differs from the case. */
  readonly viewerZone?: string;
  /** Links at the right of the line under the card. */
  readonly links?: ReactNode;
}

/** Card, its date and zone in words, and the minute table folded under it. */
export function CaptionedBurnCard({ model, size, label, width, viewerZone, links }: CaptionedBurnCardProps) {
  const zone = zoneWords(model, viewerZone);
  return (
    <div>
      <BurnCard model={model} size={size} {...(label === undefined ? {} : { label })} {...(width === undefined ? {} : { width })} />
      <div className="flex flex-wrap items-baseline justify-between gap-x-6 gap-y-1 pt-1">
        <p className="text-small text-second"><b className="font-semibold text-ink">{zone.date}</b>{zone.rest}</p>
        {links ? <div className="flex flex-wrap gap-5 [&_a]:inline-flex [&_a]:min-h-(--target-height) [&_a]:items-center">{links}</div> : null}
      </div>
      <details>
        <summary className="inline-flex min-h-(--target-height) items-center text-small underline decoration-ember decoration-2 underline-offset-4">Minute table</summary>
        <MinuteTable model={model} />
      </details>
    </div>
  );
}
