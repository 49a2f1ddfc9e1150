import { BurnCardDrawing } from './drawing.tsx';
import { layoutBurnCard } from './layout.ts';
import type { BurnCardModel } from './model.ts';
import { timeAxis } from './time-axis.ts';
import { burnCardSentence } from './words.ts';
import { textWidthPx } from '#app/components/charts/text-width.ts';

/** Minutes whose answer is another in the later run. */
export interface ChangedMinutes {
  readonly fromUtc: string;
  readonly toUtc: string;
  readonly minutes: number;
  readonly beforeWords: string;
  readonly afterWords: string;
}

export interface TwoCardsProps {
  /** Both on one span of one zone. */
  readonly earlier: BurnCardModel;
  readonly later: BurnCardModel;
  readonly earlierName: string;
  readonly laterName: string;
  readonly changed: readonly ChangedMinutes[];
}

const widths = [288, 328, 640, 1000, 1280] as const;
const rowPx = 64;

/** Two runs on one ruler, the minutes that changed bracketed between them. The list of changes stands in words elsewhere. */
export function TwoCards({ earlier, later, earlierName, laterName, changed }: TwoCardsProps) {
  return (
    <div className="space-y-1">
      <p className="text-small font-semibold">{earlierName}</p>
      <div className="card-frame">
        {widths.map((width) => (
          <div key={width} data-from={width === widths[0] ? 0 : width}>
            <BurnCardDrawing layout={layoutBurnCard(earlier, width, 'M')} sentence={burnCardSentence(earlier, earlierName)} />
            <Brackets width={width} model={earlier} changed={changed} />
            <p className="text-small font-semibold">{laterName}</p>
            <BurnCardDrawing layout={layoutBurnCard(later, width, 'M')} sentence={burnCardSentence(later, laterName)} />
          </div>
        ))}
      </div>
    </div>
  );
}

function Brackets({ width, model, changed }: { readonly width: number; readonly model: BurnCardModel; readonly changed: readonly ChangedMinutes[] }) {
  const axis = timeAxis(model.fromUtc, model.toUtc, model.zone, width);
  const part = (x: number) => `${((x / width) * 100).toFixed(3)}%`;
  let freeFrom = Number.NEGATIVE_INFINITY;
  return (
    <svg width="100%" height={rowPx} aria-hidden="true" fontSize="12" className="block overflow-visible">
      {changed.map((one) => {
        const [x1, x2] = [axis.x(one.fromUtc), axis.x(one.toUtc)];
        const middle = (x1 + x2) / 2;
        const half = Math.max(...[one.beforeWords, one.afterWords, `${one.minutes} min`].map((words) => textWidthPx(words, 12))) / 2 + 4;
        const fits = middle - half > Math.max(freeFrom, 0) && middle + half < width;
        if (fits) freeFrom = middle + half;
        return (
          <g key={one.fromUtc}>
            {[0, rowPx - 4].map((y) => {
              const tip = y === 0 ? y + 4 : y;
              return (
                <g key={y} className="stroke-ink" strokeWidth="1.5">
                  <line x1={part(x1)} x2={part(x2)} y1={y === 0 ? 1 : rowPx - 1} y2={y === 0 ? 1 : rowPx - 1} />
                  <line x1={part(x1)} x2={part(x1)} y1={y === 0 ? 1 : rowPx - 1} y2={tip} />
                  <line x1={part(x2)} x2={part(x2)} y1={y === 0 ? 1 : rowPx - 1} y2={tip} />
                </g>
              );
            })}
            {fits ? (
              <g>
                <text x={part(middle)} y="18" textAnchor="middle" className="fill-second">{one.beforeWords}</text>
                <text x={part(middle)} y="34" textAnchor="middle" className="fill-ink font-semibold">{one.afterWords}</text>
                <text x={part(middle)} y="50" textAnchor="middle" className="fill-second">{one.minutes} min</text>
              </g>
            ) : null}
          </g>
        );
      })}
    </svg>
  );
}
