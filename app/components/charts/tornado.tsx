import { scaleLinear } from 'd3-scale';
import { Numbers } from '#app/components/ui/numbers.tsx';
import { plainNumber } from '#app/domain/plain-number.ts';
import { NumberTable } from './number-table.tsx';

export interface TornadoRow {
  /** "Bearing ±3°" */
  readonly name: string;
  readonly low: number;
  readonly high: number;
}
export interface TornadoProps {
  readonly rows: readonly TornadoRow[];
  /** The answer with every input as entered. */
  readonly base: number;
  readonly unit: string;
  readonly label: string;
}

/** What moves the answer most: one bar an input, longest first, about the answer as it stands. */
export function Tornado({ rows, base, unit, label }: TornadoProps) {
  const sorted = rows.toSorted((a, b) => Math.abs(b.high - b.low) - Math.abs(a.high - a.low));
  const values = [base, ...rows.flatMap((row) => [row.low, row.high])];
  const scale = scaleLinear([Math.min(...values), Math.max(...values)], [0, 100]).nice(3);
  const part = (value: number) => `${scale(value).toFixed(2)}%`;
  const ticks = scale.ticks(3);
  return (
    <div role="img" aria-label={`${label}: ${sorted.map((row) => `${row.name}, ${plainNumber(row.low)} to ${plainNumber(row.high)} ${unit}`).join('; ')}`} className="grid grid-cols-[minmax(6rem,38%)_1fr] gap-x-3 text-axis">
      {sorted.map((row) => (
        <div key={row.name} className="contents">
          <span className="self-center text-second">{row.name}</span>
          <svg width="100%" height="22" className="overflow-visible">
            <rect x={part(Math.min(row.low, row.high))} y="7" width={`${Math.max(0.7, Math.abs(scale(row.high) - scale(row.low)))}%`} height="8" className="fill-clear" />
            <line x1={part(base)} x2={part(base)} y1="0" y2="22" className="stroke-ink" strokeWidth="1.5" />
          </svg>
        </div>
      ))}
      <span />
      <svg width="100%" height="22" fontSize="12" className="overflow-visible">
        <line x1="0" x2="100%" y1="1" y2="1" className="stroke-second" />
        {ticks.map((tick, index) => (
          <g key={tick}>
            <line x1={part(tick)} x2={part(tick)} y1="1" y2="5" className="stroke-second" />
            <text x={part(tick)} y="18" textAnchor={scale(tick) < 4 ? 'start' : index === ticks.length - 1 ? 'end' : 'middle'} className="fill-second">{plainNumber(tick)}{index === ticks.length - 1 ? ` ${unit}` : ''}</text>
          </g>
        ))}
      </svg>
    </div>
  );
}

export function TornadoFigure({ figure, title, note, ...data }: Omit<TornadoProps, 'label'> & { readonly figure?: string; readonly title: string; readonly note?: string }) {
  return (
    <Numbers
      csv="sensitivity"
      {...(figure ? { figure } : {})}
      title={title}
      {...(note ? { note } : {})}
      picture={<Tornado {...data} label={title} />}
      numbers={<NumberTable caption={title} columns={[{ head: 'Input' }, { head: `Low, ${data.unit}`, numeric: true }, { head: `High, ${data.unit}`, numeric: true }]} rows={data.rows.map((row) => [row.name, plainNumber(row.low), plainNumber(row.high)])} />}
    />
  );
}
