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

export function clockOfMinutes(minutes: number): string {
  const whole = Math.round(minutes);
  return `${String(Math.floor(whole / 60)).padStart(2, '0')}:${String(whole % 60).padStart(2, '0')}`;
}

/** Outlines of the daylight in day and minute, day by day as steps, so that the change of the clock stands as a step; polar night parts them. */
export function platePieces(days: readonly PlateDay[]): (readonly [index: number, minute: number])[][] {
  const pieces: [number, number][][] = [];
  let tops: [number, number][] = [];
  let bottoms: [number, number][] = [];
  const close = () => {
    if (tops.length > 0) pieces.push([...tops, ...bottoms.toReversed()]);
    tops = [];
    bottoms = [];
  };
  for (const [index, { riseMin, setMin }] of days.entries()) {
    if (riseMin === null || setMin === null) {
      close();
      continue;
    }
    tops.push([index, riseMin], [index + 1, riseMin]);
    bottoms.push([index, setMin], [index + 1, setMin]);
  }
  close();
  return pieces;
}

/**
 * Outlines of spans that go on from one day to the next, in day and minute, so that a picture needs a few areas instead of
 * one for each day. A span joins the first outline of the day before that it overlaps.
 */
export function spanPieces(spans: readonly PlateSpan[], startMs: number): (readonly [index: number, minute: number])[][] {
  const chains: { index: number; from: number; to: number }[][] = [];
  for (const span of spans.toSorted((a, b) => a.on.localeCompare(b.on) || a.fromMin - b.fromMin)) {
    const cell = { index: dayIndex(span.on, startMs), from: span.fromMin, to: span.toMin };
    const chain = chains.find((one) => {
      const last = one.at(-1);
      return last?.index === cell.index - 1 && last.from < cell.to && last.to > cell.from;
    });
    if (chain) chain.push(cell);
    else chains.push([cell]);
  }
  return chains.map((cells) => [
    ...cells.flatMap(({ index, from }): [number, number][] => [[index, from], [index + 1, from]]),
    ...cells.toReversed().flatMap(({ index, to }): [number, number][] => [[index + 1, to], [index, to]]),
  ]);
}

/** Whole hours between which all daylight of the year lies, both even. */
export function plateHours(days: readonly PlateDay[]): { readonly fromHour: number; readonly toHour: number } {
  const lit = days.flatMap((day) => (day.riseMin === null || day.setMin === null ? [] : [day.riseMin, day.setMin]));
  return { fromHour: Math.max(0, Math.floor(Math.min(...lit, 360) / 120) * 2), toHour: Math.min(24, Math.ceil(Math.max(...lit, 1080) / 120) * 2) };
}

/** Lines of months and hours inside the daylight, in day and minute. */
export function plateGrid(data: YearPlateData, hours: readonly number[]): (readonly [readonly [number, number], readonly [number, number]])[] {
  const start = yearStart(data);
  const months = data.days.flatMap(({ riseMin, setMin }, index): [[number, number], [number, number]][] =>
    index > 0 && riseMin !== null && setMin !== null && new Date(start + index * dayMs).getUTCDate() === 1 ? [[[index, riseMin], [index, setMin]]] : []);
  return [...months, ...hours.flatMap((hour) => hourLines(data.days, hour * 60))];
}

function hourLines(days: readonly PlateDay[], minute: number): [[number, number], [number, number]][] {
  const lines: [[number, number], [number, number]][] = [];
  let from: number | null = null;
  for (let index = 0; index <= days.length; index += 1) {
    const day = days[index];
    const lit = day !== undefined && day.riseMin !== null && day.setMin !== null && day.riseMin < minute && day.setMin > minute;
    if (lit && from === null) from = index;
    if (!lit && from !== null) {
      lines.push([[from, minute], [index, minute]]);
      from = null;
    }
  }
  return lines;
}

/** First and last day of each month of the year shown, as places on its axis. */
export function plateMonths(data: YearPlateData): { readonly month: number; readonly from: number; readonly to: number }[] {
  const start = yearStart(data);
  const begin = new Date(start);
  const first = (index: number) => (Date.UTC(begin.getUTCFullYear(), begin.getUTCMonth() + index, 1) - start) / dayMs;
  return Array.from({ length: 12 }, (_, index) => ({ month: (begin.getUTCMonth() + index) % 12, from: Math.max(0, first(index)), to: Math.min(data.days.length, first(index + 1)) })).filter(({ from }) => from < data.days.length);
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

/** @param dayWords A day of the calendar as the page or the print writes it. */
export function plateSentence(data: YearPlateData, dayWords: (on: string) => string): string {
  const bands = litBands(data);
  if (bands.length === 0) return 'On no day of these twelve months is the mark lit.';
  return `The mark can be lit ${bands.map((band) => `${dayWords(band.firstOn)} to ${dayWords(band.lastOn)}, ${clockOfMinutes(band.fromMin)} to ${clockOfMinutes(band.toMin)}`).join('; ')}.`;
}
