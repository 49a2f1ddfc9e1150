import type { PhotoMark } from '#app/domain/photo-marks.ts';

export interface MarksLayerProps {
  readonly marks: readonly PhotoMark[];
  /** Size of the photo as shown, for the shape of circles. */
  readonly widthPx: number;
  readonly heightPx: number;
}

const unit = 1000;
/** In units of the drawing, by the width at which the photo is shown: never under 12 px. */
const wordSizes = 'text-[24px] @max-[700px]:text-[28px] @max-[460px]:text-[37px] @max-[330px]:text-[44px]';

/** Marks drawn over a photo: ink on a pale bed, so that they show on dark and light grounds alike. The picture is not touched. */
export function MarksLayer({ marks, widthPx, heightPx }: MarksLayerProps) {
  const height = (heightPx / widthPx) * unit;
  return (
    <div aria-hidden="true" className="@container pointer-events-none absolute inset-0">
      <svg viewBox={`0 0 ${unit} ${height.toFixed(2)}`} className={`h-full w-full ${wordSizes}`}>
        {marks.map((mark, index) => <Mark key={index} mark={mark} height={height} number={index + 1} />)}
      </svg>
    </div>
  );
}

const bed = { stroke: '#fcf9f3', strokeWidth: 8, fill: 'none', strokeLinecap: 'square' } as const;
const ink = { stroke: '#1c2430', strokeWidth: 3.5, fill: 'none', strokeLinecap: 'square' } as const;

function Mark({ mark, height, number }: { readonly mark: PhotoMark; readonly height: number; readonly number: number }) {
  const words = mark.words === '' ? String(number) : `${number} ${mark.words}`;
  if (mark.kind === 'text') return <Words x={mark.x * unit} y={mark.y * height} text={words} />;
  if (mark.kind === 'circle') {
    const [x, y, r] = [mark.x * unit, mark.y * height, mark.radius * unit];
    return <g><circle cx={x} cy={y} r={r} {...bed} /><circle cx={x} cy={y} r={r} {...ink} /><Words x={x + r + 8} y={y} text={words} /></g>;
  }
  const [x1, y1, x2, y2] = [mark.fromX * unit, mark.fromY * height, mark.toX * unit, mark.toY * height];
  const path = `M${x1} ${y1}L${x2} ${y2}${head(x1, y1, x2, y2)}`;
  return <g><path d={path} {...bed} /><path d={path} {...ink} /><Words x={x1} y={y1} text={words} /></g>;
}

/** Two short strokes back from the point. */
function head(x1: number, y1: number, x2: number, y2: number): string {
  const angle = Math.atan2(y2 - y1, x2 - x1);
  const at = (turn: number) => `${(x2 - 26 * Math.cos(angle + turn)).toFixed(1)} ${(y2 - 26 * Math.sin(angle + turn)).toFixed(1)}`;
  return `M${at(0.45)}L${x2} ${y2}L${at(-0.45)}`;
}

function Words({ x, y, text }: { readonly x: number; readonly y: number; readonly text: string }) {
  const right = x > unit * 0.7;
  return <text x={right ? x - 10 : x + 10} y={y - 8} fontWeight="600" textAnchor={right ? 'end' : 'start'} fill="#1c2430" stroke="#fcf9f3" strokeWidth="8" strokeLinejoin="round" paintOrder="stroke">{text}</text>;
}
