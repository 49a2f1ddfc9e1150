import type { ReactNode } from 'react';
import { monthNames } from './wall-clock.ts';

const dayMs = 86_400_000;
/** Two or three days still show as a round slot at the width of a phone. [% of the ribbon] */
const leastSlotPart = 2.3;
const dayOf = (on: string) => Date.parse(`${on}T00:00:00Z`);

/** Twelve months from the first of a month. */
export interface RibbonSpan {
  /** `YYYY-MM-01` */
  readonly fromOn: string;
  readonly months?: number;
}
export interface YearRibbonProps extends RibbonSpan {
  readonly todayOn: string;
  /** Day by which the fix is due. */
  readonly dueOn?: string | null;
  /** Effectiveness check, placed inside a return. */
  readonly checkOn?: string | null;
  /** Days on which the mark is lit again. */
  readonly lit: readonly { readonly firstOn: string; readonly lastOn: string }[];
  readonly label?: string;
}

function spanOf({ fromOn, months = 12 }: RibbonSpan) {
  const start = new Date(`${fromOn}T00:00:00Z`);
  const firsts = Array.from({ length: months + 1 }, (_, index) => Date.UTC(start.getUTCFullYear(), start.getUTCMonth() + index, 1));
  const fromMs = firsts[0] ?? 0;
  const toMs = firsts.at(-1) ?? fromMs + dayMs;
  const part = (ms: number) => `${(Math.min(1, Math.max(0, (ms - fromMs) / (toMs - fromMs))) * 100).toFixed(3)}%`;
  return { firsts, part, inside: (ms: number) => ms >= fromMs && ms < toMs };
}

function ribbonSentence({ todayOn, dueOn, checkOn, lit, label }: YearRibbonProps): string {
  const late = dueOn && dueOn < todayOn ? `, late by ${Math.round((dayOf(todayOn) - dayOf(dueOn)) / dayMs)} days` : '';
  const due = dueOn ? `Due ${dueOn}${late}.` : 'No due day.';
  const returns = lit.length === 0 ? 'No return of the sun in these months.' : `Sun on the mark ${lit.map((days) => (days.firstOn === days.lastOn ? days.firstOn : `${days.firstOn} to ${days.lastOn}`)).join(', ')}.`;
  return [label ? `${label}.` : '', due, returns, checkOn ? `Check ${checkOn}.` : ''].filter(Boolean).join(' ');
}

/** Months across: dark is time left to fix, slots are days lit again, diamond is due, dashes are late, blue is today. */
export function YearRibbon(props: YearRibbonProps) {
  const { todayOn, dueOn, checkOn, lit } = props;
  const { firsts, part, inside } = spanOf(props);
  const today = dayOf(todayOn);
  const due = dueOn ? dayOf(dueOn) : null;
  const late = due !== null && due < today;
  const top = 8;
  const shown = lit.filter((days) => inside(dayOf(days.firstOn)) || inside(dayOf(days.lastOn)));
  return (
    <svg className="burn-card" height="34" role="img" aria-label={ribbonSentence(props)}>
      <rect x="0" y={top + 0.5} width="100%" height="15" className="fill-pale stroke-pale-edge" />
      {firsts.slice(1, -1).map((first) => <line key={first} x1={part(first)} x2={part(first)} y1={top + 1} y2={top + 15} className="stroke-pale-edge" strokeOpacity="0.55" />)}
      {due !== null && !late ? <svg x={part(today)} y={top} width={`${Number.parseFloat(part(due)) - Number.parseFloat(part(today))}%`} height="16"><rect width="100%" height="16" className="fill-card stroke-card-edge" /></svg> : null}
      {late ? <line x1={part(due)} x2={part(today)} y1={top + 8} y2={top + 8} className="stroke-ink" strokeWidth="3" strokeDasharray="4 2" /> : null}
      {shown.map((days) => {
        const from = Number.parseFloat(part(dayOf(days.firstOn)));
        const width = Number.parseFloat(part(dayOf(days.lastOn) + dayMs)) - from;
        const drawn = Math.max(width, leastSlotPart);
        return <rect key={days.firstOn} x={`${from - (drawn - width) / 2}%`} y={top + 4} width={`${drawn}%`} height="8" rx="4" className="fill-slot stroke-char" />;
      })}
      <line x1={part(today)} x2={part(today)} y1={top - 2} y2={top + 18} className="stroke-clear" strokeWidth="1.6" />
      {due === null || !inside(due) ? null : (
        <svg x={part(due)} y={top} overflow="visible"><path d="M0-7 4.5-2.5 0 2-4.5-2.5Z" className="fill-ink" /><line x1="0" x2="0" y1="0" y2="16" className="stroke-ink" strokeWidth="1.5" /></svg>
      )}
      {checkOn && inside(dayOf(checkOn)) ? <svg x={part(dayOf(checkOn))} y={top + 20} overflow="visible"><path d="m-4 0 3 3 5-7" className="fill-none stroke-ink" strokeWidth="1.7" /></svg> : null}
    </svg>
  );
}

/** Month names over a column of ribbons. */
export function YearRibbonHead({ fromOn, months = 12, todayOn }: RibbonSpan & { readonly todayOn: string }) {
  const { firsts, part } = spanOf({ fromOn, months });
  return (
    <svg className="burn-card" height="34" role="img" aria-label={`Months from ${fromOn}`}>
      {firsts.map((first) => <line key={first} x1={part(first)} x2={part(first)} y1="28" y2="34" className="stroke-second" />)}
      {firsts.slice(0, -1).map((first, index) => {
        const month = new Date(first);
        const middle = part((first + (firsts[index + 1] ?? first)) / 2);
        const showsYear = index === 0 || month.getUTCMonth() === 0;
        return (
          <g key={first} fontSize="12" textAnchor="middle">
            {showsYear ? <text x={middle} y="10" className="fill-ink font-semibold">{month.getUTCFullYear()}</text> : null}
            <text x={middle} y="24" className="fill-second font-semibold">{monthNames[month.getUTCMonth()]?.slice(0, 1)}<tspan className="max-tablet:hidden">{monthNames[month.getUTCMonth()]?.slice(1)}</tspan></text>
          </g>
        );
      })}
      <line x1={part(dayOf(todayOn))} x2={part(dayOf(todayOn))} y1="26" y2="34" className="stroke-clear" strokeWidth="1.6" />
    </svg>
  );
}

/** What the marks of a ribbon mean, once under the list. */
export function YearRibbonKey() {
  return (
    <ul className="flex flex-wrap gap-x-7 gap-y-1 pt-3 text-axis text-second">
      <KeyLine words="time left to fix"><rect y="4" width="26" height="10" className="fill-card stroke-card-edge" /></KeyLine>
      <KeyLine words="days the mark is lit again"><rect y="3" width="26" height="12" className="fill-pale stroke-pale-edge" /><rect x="7" y="5" width="12" height="8" rx="4" className="fill-slot stroke-char" /></KeyLine>
      <KeyLine words="due"><path d="m13 4 5 5-5 5-5-5Z" className="fill-ink" /></KeyLine>
      <KeyLine words="late"><line x1="0" x2="26" y1="9" y2="9" className="stroke-ink" strokeWidth="3" strokeDasharray="4 2" /></KeyLine>
      <KeyLine words="effectiveness check, inside a return"><path d="m8 9 4 4 7-9" className="fill-none stroke-ink" strokeWidth="1.8" /></KeyLine>
      <KeyLine words="today"><line x1="13" x2="13" y1="1" y2="17" className="stroke-clear" strokeWidth="1.6" /></KeyLine>
    </ul>
  );
}

function KeyLine({ words, children }: { readonly words: string; readonly children: ReactNode }) {
  return <li className="flex items-center gap-2"><svg width="26" height="18" aria-hidden="true" className="overflow-visible">{children}</svg>{words}</li>;
}
