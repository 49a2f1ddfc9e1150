import { scaleLinear, scaleLog } from 'd3-scale';
import { plainNumber } from '#app/domain/plain-number.ts';

export interface MarginRulerProps {
  /** The measured or computed value with its range. */
  readonly value: number;
  readonly low: number;
  readonly high: number;
  readonly unit: string;
  /** Range that would agree; null at one end: open there. */
  readonly agreeFrom: number | null;
  readonly agreeTo: number | null;
  /** Log scale, for fluxes over decades. */
  readonly log?: boolean;
  readonly label?: string;
}

/** Diamond with whiskers against the pale range that would agree, on a ruler in the test's own unit. */
export function MarginRuler({ value, low, high, unit, agreeFrom, agreeTo, log = false, label }: MarginRulerProps) {
  const numbers = [value, low, high, agreeFrom, agreeTo].filter((one): one is number => one !== null && Number.isFinite(one));
  const positive = numbers.every((one) => one > 0);
  const scale = log && positive
    ? scaleLog([10 ** Math.floor(Math.log10(Math.min(...numbers))), 10 ** Math.ceil(Math.log10(Math.max(...numbers) * 1.01))], [0, 100])
    : scaleLinear([Math.min(0, ...numbers), Math.max(...numbers, 1e-9) * 1.15], [0, 100]).nice(4);
  const part = (one: number) => `${Math.min(100, Math.max(0, scale(one))).toFixed(2)}%`;
  const all = log && positive ? scale.ticks().filter((tick) => Number.isInteger(Math.log10(tick))) : scale.ticks(4);
  const pale = { from: agreeFrom === null ? 0 : scale(agreeFrom), to: agreeTo === null ? 100 : scale(agreeTo) };
  const agreeWords = agreeFrom === null && agreeTo === null ? '' : `; would agree ${agreeFrom === null ? `up to ${plainNumber(agreeTo ?? 0)}` : agreeTo === null ? `from ${plainNumber(agreeFrom)}` : `from ${plainNumber(agreeFrom)} to ${plainNumber(agreeTo)}`}`;
  return (
    <svg width="100%" height="36" role="img" aria-label={`${label ? `${label}: ` : ''}${plainNumber(value)}, ${plainNumber(low)} to ${plainNumber(high)} ${unit}${agreeWords}`} className="block overflow-visible" fontSize="12">
      {agreeWords === '' ? null : <rect x={`${Math.max(0, Math.min(100, pale.from))}%`} y="1.5" width={`${Math.max(0.8, Math.min(100, pale.to) - Math.max(0, pale.from))}%`} height="11" className="fill-pale stroke-pale-edge" />}
      <g className="stroke-ink" strokeWidth="1.5">
        <line x1={part(low)} x2={part(high)} y1="7" y2="7" />
        <line x1={part(low)} x2={part(low)} y1="3" y2="11" />
        <line x1={part(high)} x2={part(high)} y1="3" y2="11" />
      </g>
      <svg x={part(value)} y="7" overflow="visible"><path d="M0-4.5 4.5 0 0 4.5-4.5 0Z" className="fill-ink" /></svg>
      <line x1="0" x2="100%" y1="18" y2="18" className="stroke-second" />
      {all.map((tick, index) => {
        const last = index === all.length - 1;
        return (
          <g key={tick}>
            <line x1={part(tick)} x2={part(tick)} y1="18" y2="21" className="stroke-second" />
            <text x={part(tick)} y="33" textAnchor={scale(tick) < 4 ? 'start' : last ? 'end' : 'middle'} className="fill-second">{plainNumber(tick)}{last ? ` ${unit}` : ''}</text>
          </g>
        );
      })}
    </svg>
  );
}
