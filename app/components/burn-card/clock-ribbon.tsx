export interface ClockRibbonProps {
  readonly fromUtc: string;
  readonly toUtc: string;
  readonly nowUtc: string;
  readonly dueUtc: string;
  /** What the clock is for: "First look, case 128". */
  readonly label: string;
}

/** The year ribbon in hours: dark is time left, diamond is due, dashes are late, blue is now. It has no slots. */
export function ClockRibbon({ fromUtc, toUtc, nowUtc, dueUtc, label }: ClockRibbonProps) {
  const from = Date.parse(fromUtc);
  const to = Date.parse(toUtc);
  const now = Date.parse(nowUtc);
  const due = Date.parse(dueUtc);
  const place = (ms: number) => Math.min(100, Math.max(0, ((ms - from) / (to - from)) * 100));
  const minutes = Math.round(Math.abs(due - now) / 60_000);
  const words = minutes < 120 ? `${minutes} minutes` : `${Math.round(minutes / 60)} hours`;
  const late = due < now;
  const hourPart = (3_600_000 / (to - from)) * 100;
  const lines = Array.from({ length: Math.min(23, Math.floor(100 / hourPart)) }, (_, index) => hourPart * (index + 1)).filter((part) => part < 99.5);
  return (
    <svg className="burn-card" height="22" role="img" aria-label={`${label}: ${words} ${late ? 'late' : 'left'}`}>
      <rect x="0" y="8.5" width="100%" height="9" className="fill-pale stroke-pale-edge" />
      {lines.map((part) => <line key={part} x1={`${part}%`} x2={`${part}%`} y1="9" y2="17" className="stroke-pale-edge" strokeOpacity="0.55" />)}
      {late
        ? <line x1={`${place(due)}%`} x2={`${place(now)}%`} y1="13" y2="13" className="stroke-ink" strokeWidth="3" strokeDasharray="4 2" />
        : <rect x={`${place(now)}%`} y="8" width={`${place(due) - place(now)}%`} height="10" className="fill-card stroke-card-edge" />}
      <line x1={`${place(now)}%`} x2={`${place(now)}%`} y1="5" y2="21" className="stroke-clear" strokeWidth="1.8" />
      <svg x={`${place(due)}%`} y="0" overflow="visible"><path d="m0 1 4 4-4 4-4-4Z" className="fill-ink" /></svg>
    </svg>
  );
}
