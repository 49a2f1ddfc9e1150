import { useId } from 'react';
import type { BurnCardLayout } from './layout.ts';
import type { Slot } from './slots.ts';
import { slotPath } from './slots.ts';

/** Places along the axis go out as parts of the width, so that a card fills its column while type and marks keep their size. */
function along(layout: BurnCardLayout) {
  const part = (x: number) => `${((x / layout.widthPx) * 100).toFixed(3)}%`;
  return { part, span: (x1: number, x2: number) => ({ x: part(x1), width: part(Math.max(0, x2 - x1)) }) };
}
type Along = ReturnType<typeof along>;
interface PartProps {
  readonly layout: BurnCardLayout;
  readonly on: Along;
}

export interface BurnCardDrawingProps {
  readonly layout: BurnCardLayout;
  /** Said in place of the drawing; left out when words beside it say the same. */
  readonly sentence?: string;
}

/** The card itself, from a layout. */
export function BurnCardDrawing({ layout, sentence }: BurnCardDrawingProps) {
  const on = along(layout);
  const middle = layout.bodyTopPx + layout.bodyPx / 2;
  return (
    <svg className="burn-card" height={layout.heightPx} {...(sentence ? { role: 'img', 'aria-label': sentence } : { 'aria-hidden': true })}>
      <Ruler layout={layout} on={on} />
      <line x1="0" x2="100%" y1={middle} y2={middle} className="stroke-edge" />
      <Bodies layout={layout} on={on} />
      <Breaks layout={layout} on={on} />
      {layout.endBars.map((x) => (
        <line key={x} x1={on.part(x)} x2={on.part(x)} y1={layout.bodyTopPx - 3} y2={layout.bodyTopPx + layout.bodyPx + 3} className="stroke-ink" strokeWidth="1.5" />
      ))}
      <Dots layout={layout} on={on} />
      {layout.slots.map((slot) => <SlotCut key={slot.x1} slot={slot} layout={layout} on={on} />)}
      {layout.foundX === null ? null : (
        <svg x={on.part(layout.foundX)} y={layout.bodyTopPx - 1} overflow="visible"><path d="M-4.5-7H4.5L0 0Z" className="fill-ink" /></svg>
      )}
      <Cursor layout={layout} on={on} />
      <Labels layout={layout} on={on} />
    </svg>
  );
}

function Ruler({ layout, on }: PartProps) {
  const foot = layout.severalDays ? layout.bodyTopPx - 3 : layout.bodyTopPx - 4;
  const y = layout.severalDays ? layout.bodyTopPx + layout.bodyPx + 16 : layout.bodyTopPx - 16;
  return (
    <g>
      {layout.ticks.map((tick) => <line key={tick.x} x1={on.part(tick.x)} x2={on.part(tick.x)} y1={foot - tick.lengthPx} y2={foot} className="stroke-second" />)}
      {layout.figures.map((figure) => {
        const nearStart = figure.x < 9;
        const anchor = nearStart ? 'start' : figure.x > layout.widthPx - 9 ? 'end' : 'middle';
        return <text key={figure.x} x={on.part(figure.x)} y={y} textAnchor={anchor} fontSize="12" className={layout.severalDays ? 'fill-second' : 'fill-ink font-medium'}>{figure.text}</text>;
      })}
    </g>
  );
}

function Bodies({ layout, on }: PartProps) {
  const id = useId();
  const { bodyTopPx: top, bodyPx } = layout;
  const short = Math.min(6, bodyPx / 5);
  const inside = (x: number, stretches: readonly { x1: number; x2: number }[]) => stretches.some((one) => x > one.x1 + 1 && x < one.x2 - 1);
  return (
    <g>
      <pattern id={id} width="5" height="5" patternUnits="userSpaceOnUse" patternTransform="rotate(45)"><line x1="0" x2="0" y1="0" y2="5" className="stroke-edge" /></pattern>
      {layout.bodies.map((body) => (
        <g key={body.x1}>
          <rect {...on.span(body.x1, body.x2)} y={top + 0.5} height={bodyPx - 1} className="fill-pale stroke-pale-edge" />
          <rect className="hatched" {...on.span(body.x1, body.x2)} y={top} height={bodyPx} fill={`url(#${id})`} />
        </g>
      ))}
      {layout.hourLines.filter((x) => inside(x, layout.bodies)).map((x) => <line key={x} x1={on.part(x)} x2={on.part(x)} y1={top + 1} y2={top + bodyPx - 1} className="stroke-pale-edge" strokeOpacity="0.55" />)}
      {layout.cards.map((card) => <rect key={card.x1} {...on.span(card.x1, card.x2)} y={top} height={bodyPx} className="fill-card stroke-card-edge" />)}
      {layout.hourLines.filter((x) => inside(x, layout.cards)).map((x) => <line key={x} x1={on.part(x)} x2={on.part(x)} y1={top} y2={top + bodyPx} className="stroke-card-rule" />)}
      {layout.shortLines.filter((x) => inside(x, layout.cards)).flatMap((x) => [
        <line key={`t${x}`} x1={on.part(x)} x2={on.part(x)} y1={top} y2={top + short} className="stroke-card-rule" />,
        <line key={`b${x}`} x1={on.part(x)} x2={on.part(x)} y1={top + bodyPx - short} y2={top + bodyPx} className="stroke-card-rule" />,
      ])}
    </g>
  );
}

function Breaks({ layout, on }: PartProps) {
  const { bodyTopPx: top, bodyPx } = layout;
  const mark = (kind: 'skipped' | 'repeated') => (kind === 'skipped' ? 'clock forward' : 'hour twice');
  return (
    <g>
      {layout.breaks.map((change) => (
        <g key={change.x}>
          {change.kind === 'skipped' ? <rect {...on.span(change.x, change.x + change.widthPx)} y={top - 2} height={bodyPx + 4} className="fill-paper" /> : null}
          <line x1={on.part(change.x)} x2={on.part(change.x)} y1={top - 2} y2={top + bodyPx + 2} className="stroke-second" strokeDasharray="2 3" />
          {layout.size === 'S' || change.widthPx < 74 ? null : <text x={on.part(change.x + change.widthPx / 2)} y={top + bodyPx - 4} fontSize="12" textAnchor="middle" className="fill-second">{mark(change.kind)}</text>}
        </g>
      ))}
    </g>
  );
}

function Dots({ layout, on }: PartProps) {
  const y = layout.bodyTopPx + layout.bodyPx / 2;
  const r = layout.dotRadiusPx;
  const line = { y1: y, y2: y, strokeLinecap: 'round' as const, strokeDasharray: `0 ${layout.dotPitchPx}` };
  return (
    <g>
      {layout.dots.map((dots) => {
        if (dots.x2 - dots.x1 < layout.dotPitchPx) {
          const cx = on.part((dots.x1 + dots.x2) / 2);
          return <g key={dots.x1}><circle cx={cx} cy={y} r={r} className="fill-slot" /><circle cx={cx} cy={y} r={r - 0.8} className="hatched fill-card" /></g>;
        }
        const ends = { x1: on.part(dots.x1), x2: on.part(dots.x2) };
        return (
          <g key={dots.x1}>
            <line {...ends} {...line} strokeWidth={2 * r} className="stroke-slot" />
            <line {...ends} {...line} strokeWidth={2 * r - 1.6} className="hatched stroke-card" />
          </g>
        );
      })}
    </g>
  );
}

function SlotCut({ slot, layout, on }: PartProps & { readonly slot: Slot }) {
  const y = layout.bodyTopPx + layout.bodyPx / 2;
  const length = slot.x2 - slot.x1;
  const large = layout.size === 'L' || layout.size === 'hero';
  const d = slotPath(slot);
  const half = slot.profile[0]?.halfPx ?? 5;
  if (slot.profile.every((point) => point.halfPx === half)) {
    const cut = { ...on.span(slot.x1, slot.x2), y: y - half, height: 2 * half, rx: half };
    return (
      <g>
        {large ? <rect {...cut} className="fill-none stroke-halo" strokeWidth="5" /> : null}
        <rect {...cut} className="fill-slot stroke-char" strokeWidth={large ? 1.8 : 0.9} />
      </g>
    );
  }
  return (
    <svg x={on.part(slot.x1)} width={on.part(length)} y={y - 16} height="32" viewBox={`0 -16 ${length.toFixed(2)} 32`} preserveAspectRatio="none" overflow="visible">
      {large ? <path d={d} className="fill-none stroke-halo" strokeWidth="5" vectorEffect="non-scaling-stroke" /> : null}
      <path d={d} className="fill-slot stroke-char" strokeWidth={large ? 1.8 : 0.9} vectorEffect="non-scaling-stroke" />
    </svg>
  );
}

function Cursor({ layout, on }: PartProps) {
  if (!layout.cursor) return null;
  const x = on.part(layout.cursor.x);
  const y2 = layout.bodyTopPx + layout.bodyPx + 4;
  const anchor = layout.cursor.x < 18 ? 'start' : layout.cursor.x > layout.widthPx - 18 ? 'end' : 'middle';
  return (
    <g>
      <line x1={x} x2={x} y1={layout.bodyTopPx - 4} y2={y2} className="stroke-paper" strokeWidth="6" />
      <line x1={x} x2={x} y1={layout.bodyTopPx - 12} y2={y2} className="stroke-clear" strokeWidth="2" />
      {layout.size === 'S' ? null : <text x={x} y="12" fontSize="12" textAnchor={anchor} className="fill-clear font-semibold">{layout.cursor.words}</text>}
    </g>
  );
}

function Labels({ layout, on }: PartProps) {
  return (
    <g>
      {layout.labels.map((label) => (
        <g key={`${label.text} ${label.x} ${label.y}`}>
          {label.bracket ? (
            <g className="stroke-second">
              <line x1={on.part(label.bracket.x1)} x2={on.part(label.bracket.x2)} y1={label.bracket.y} y2={label.bracket.y} />
              <line x1={on.part(label.bracket.x1)} x2={on.part(label.bracket.x1)} y1={label.bracket.y - 4} y2={label.bracket.y} />
              <line x1={on.part(label.bracket.x2)} x2={on.part(label.bracket.x2)} y1={label.bracket.y - 4} y2={label.bracket.y} />
            </g>
          ) : null}
          {label.leader ? <line x1={on.part(label.leader.x)} x2={on.part(label.leader.x)} y1={label.leader.y1} y2={label.leader.y2} className="stroke-second" /> : null}
          <text x={on.part(label.x)} y={label.y} fontSize={label.sizePx} textAnchor={label.anchor} className={`${label.tone === 'ink' ? 'fill-ink' : 'fill-second'} ${label.bold ? 'font-semibold' : label.sizePx === 13 ? 'font-medium' : ''}`}>
            {label.text}
          </text>
        </g>
      ))}
    </g>
  );
}
