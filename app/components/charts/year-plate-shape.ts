import { localDate, wallTime } from '#app/components/burn-card/wall-clock.ts';

/** Daylight of one local day in minutes after local midnight; both null when the sun stays down. */
export interface PlateDay {
  readonly on: string;
  readonly riseMin: number | null;
  readonly setMin: number | null;
}
export interface PlateSpan {
  readonly on: string;
  readonly fromMin: number;
  readonly toMin: number;
}
export interface YearPlateData {
  /** Every day of the year shown, in order, usually 365. */
  readonly days: readonly PlateDay[];
  /** Where the sun reaches the optic: over the skyline and through the opening. */
  readonly reach?: readonly PlateSpan[];
  /** Where it lands on the mark. */
  readonly lit: readonly PlateSpan[];
  readonly todayOn?: string | null;
}

const dayMs = 86_400_000;

export function yearStart(data: YearPlateData): number {
  return Date.parse(`${data.days[0]?.on ?? '1970-01-01'}T00:00:00Z`);
}

export function dayIndex(on: string, startMs: number): number {
  return Math.round((Date.parse(`${on}T00:00:00Z`) - startMs) / dayMs);
}

/** Minutes after local midnight on the wall clock of a zone. */
export function minutesOfDay(utc: string, zone: string): number {
  const wall = wallTime(Date.parse(utc), zone);
  return wall.hour * 60 + wall.minute;
}

/** Turns instants into spans of the plate; one that crosses midnight keeps to its first day. */
export function plateSpan(fromUtc: string, toUtc: string, zone: string): PlateSpan {
  const fromMin = minutesOfDay(fromUtc, zone);
  const toMin = minutesOfDay(toUtc, zone);
  return { on: localDate(fromUtc, zone), fromMin, toMin: toMin >= fromMin ? toMin : 1440 };
}

export function clockOfMinutes(minutes: number): string {
  const whole = Math.round(minutes);
  return `${String(Math.floor(whole / 60)).padStart(2, '0')}:${String(whole % 60).padStart(2, '0')}`;
}

/** Outline of the daylight, day by day as steps, so that the change of the clock stands as a step; polar night breaks it. */
export function platePath(days: readonly PlateDay[], x: (index: number) => number, y: (minutes: number) => number): string {
  const pieces: string[] = [];
  let tops: string[] = [];
  let bottoms: string[] = [];
  const close = () => {
    if (tops.length > 0) pieces.push(`M${tops.join('L')}L${bottoms.toReversed().join('L')}Z`);
    tops = [];
    bottoms = [];
  };
  for (const [index, day] of days.entries()) {
    if (day.riseMin === null || day.setMin === null) {
      close();
      continue;
    }
    const [x1, x2] = [x(index).toFixed(1), x(index + 1).toFixed(1)];
    const [top, bottom] = [y(day.riseMin).toFixed(1), y(day.setMin).toFixed(1)];
    tops.push(`${x1} ${top}`, `${x2} ${top}`);
    bottoms.push(`${x1} ${bottom}`, `${x2} ${bottom}`);
  }
  close();
  return pieces.join('');
}

/** Consecutive days on which the mark is lit. */
export interface LitBand {
  readonly firstOn: string;
  readonly lastOn: string;
  readonly fromMin: number;
  readonly toMin: number;
  readonly cells: readonly { readonly index: number; readonly fromMin: number; readonly toMin: number }[];
}

/** Groups lit spans into bands; a single day left out between two does not part them. */
export function litBands(data: YearPlateData): LitBand[] {
  const start = yearStart(data);
  const bands: { firstOn: string; lastOn: string; fromMin: number; toMin: number; cells: { index: number; fromMin: number; toMin: number }[] }[] = [];
  for (const span of data.lit.toSorted((a, b) => a.on.localeCompare(b.on) || a.fromMin - b.fromMin)) {
    const index = dayIndex(span.on, start);
    if (index < 0 || index >= data.days.length) continue;
    const last = bands.at(-1);
    const cell = { index, fromMin: span.fromMin, toMin: span.toMin };
    if (last && index - (last.cells.at(-1)?.index ?? index) <= 2) {
      last.cells.push(cell);
      last.lastOn = span.on;
      last.fromMin = Math.min(last.fromMin, span.fromMin);
      last.toMin = Math.max(last.toMin, span.toMin);
    } else {
      bands.push({ firstOn: span.on, lastOn: span.on, fromMin: span.fromMin, toMin: span.toMin, cells: [cell] });
    }
  }
  return bands;
}
