import type { ReconstructionResult } from '#app/physics/model/result.ts';
import { daylightOn } from '#app/physics/sun/daylight.ts';
import type { Daylight } from '#app/physics/sun/daylight.ts';
import type { Observer } from '#app/physics/sun/solar-position.ts';
import { nextDay } from '#app/physics/sun/zone-days.ts';
import { fromLocalInput, localDay } from './local-time.ts';
import { minuteReasonWords } from './run-words.ts';

/** What a burn card draws, as plain JSON: `BurnCardModel` of the components. */
export interface CardView {
  readonly zone: string;
  readonly fromUtc: string;
  readonly toUtc: string;
  readonly daylight: readonly { readonly riseUtc: string; readonly setUtc: string }[];
  readonly polar: 'day' | 'night' | null;
  readonly window: { readonly startUtc: string; readonly endUtc: string } | null;
  readonly runs: readonly CardRun[];
  readonly foundAtUtc: string | null;
  readonly flux: readonly { readonly atUtc: string; readonly kwm2: number }[];
  readonly startWords: readonly string[];
  readonly endWords: readonly string[];
}
export interface CardRun {
  readonly fromUtc: string;
  readonly toUtc: string;
  readonly verdict: 'sunlit' | 'not-sunlit' | 'cannot-tell';
  readonly reasonWords: string;
}

/** Place and times of a case, as far as the card needs them. */
export interface CardCase {
  readonly zone: string;
  readonly latitudeDeg: number;
  readonly longitudeDeg: number;
  readonly elevationM: number;
  readonly onsetEarliestAt: Date | null;
  readonly onsetLatestAt: Date | null;
  /** Clock error already taken off; null when only the day, or nothing, is known. */
  readonly foundAt: Date | null;
  readonly reportedAt: Date;
}

/** The parts of a finished run that the card shows. */
export type CardResult = Pick<ReconstructionResult, 'runs'> & {
  readonly window: { readonly startUtc: string; readonly endUtc: string };
  /** Sunlit minutes with a flux; empty for small cards. */
  readonly flux: readonly { readonly atUtc: string; readonly kwm2: number }[];
};

interface Stretch {
  readonly startUtc: string;
  readonly endUtc: string;
}

function statedWindow(facts: CardCase): Stretch | null {
  if (!facts.onsetEarliestAt || !facts.onsetLatestAt) return null;
  return { startUtc: facts.onsetEarliestAt.toISOString(), endUtc: facts.onsetLatestAt.toISOString() };
}

/** Days, local, that a stretch touches; at most 32, since no card draws more. */
function daysOf(stretch: Stretch, zone: string): string[] {
  const last = localDay(new Date(stretch.endUtc), zone);
  const days = [localDay(new Date(stretch.startUtc), zone)];
  for (let day = days[0] ?? last; day < last && days.length < 32; ) {
    day = nextDay(day);
    days.push(day);
  }
  return days;
}

/** Days of places whose daylight was worked out already: a register shows the same ones again and again. */
const known = new Map<string, Daylight>();
const mostKnown = 5_000;

function knownDaylight(day: string, zone: string, observer: Observer): Daylight {
  const key = `${day} ${zone} ${observer.latitudeDeg} ${observer.longitudeDeg} ${observer.elevationM}`;
  const found = known.get(key) ?? daylightOn(day, zone, observer);
  if (known.size >= mostKnown) known.clear();
  known.set(key, found);
  return found;
}

function daylightOf(days: readonly string[], facts: CardCase): Pick<CardView, 'daylight' | 'polar'> {
  const observer = { latitudeDeg: facts.latitudeDeg, longitudeDeg: facts.longitudeDeg, elevationM: facts.elevationM, pressureHpa: 1_013.25, temperatureC: 15 };
  const found = days.map((day) => knownDaylight(day, facts.zone, observer));
  const daylight = found.flatMap((one, index) => {
    const day = days[index] ?? '';
    if (one.polar === 'day') return [{ riseUtc: startOf(day, facts.zone), setUtc: startOf(nextDay(day), facts.zone) }];
    if (one.sunriseMs === null && one.sunsetMs === null) return [];
    return [{ riseUtc: one.sunriseMs === null ? startOf(day, facts.zone) : iso(one.sunriseMs), setUtc: one.sunsetMs === null ? startOf(nextDay(day), facts.zone) : iso(one.sunsetMs) }];
  });
  const polar = found[0]?.polar ?? null;
  return { daylight, polar: found.every((one) => one.polar === polar) ? polar : null };
}

const iso = (ms: number) => new Date(Math.round(ms / 1_000) * 1_000).toISOString();

function localMoment(local: string, zone: string): Date {
  const reading = fromLocalInput(local, zone, 'first');
  if (reading.kind === 'instant') return reading.instant;
  if (reading.kind === 'gap') return reading.after;
  throw new RangeError(`${local} is not a clock time.`);
}
const startOf = (day: string, zone: string) => localMoment(`${day}T00:00`, zone).toISOString();

/** Without a run, all daylight inside the window is "can't tell": dots, never gaps. */
function undecidedRuns(window: Stretch | null, daylight: CardView['daylight']): CardRun[] {
  if (!window) return [];
  return daylight.flatMap(({ riseUtc, setUtc }) => {
    const fromUtc = riseUtc > window.startUtc ? riseUtc : window.startUtc;
    const toUtc = setUtc < window.endUtc ? setUtc : window.endUtc;
    return fromUtc < toUtc ? [{ fromUtc, toUtc, verdict: 'cannot-tell' as const, reasonWords: 'not reconstructed yet' }] : [];
  });
}

function runsOf(result: CardResult): CardRun[] {
  return result.runs.map((run) => ({ fromUtc: run.fromUtc, toUtc: run.toUtc, verdict: run.verdict, reasonWords: minuteReasonWords[run.reason] }));
}

/** The large card of a case: its whole window. The span is the window's; the header adds its margins. */
export function wholeCard(facts: CardCase, result: CardResult | null, words: { readonly start: readonly string[]; readonly end: readonly string[] }): CardView {
  const window = result?.window ?? statedWindow(facts);
  if (!window) return dayCard(facts, result, { fromHour: 4, toHour: 22 });
  const margin = (Date.parse(window.endUtc) - Date.parse(window.startUtc)) * 0.3 + 5_400_000;
  const wide = { startUtc: new Date(Date.parse(window.startUtc) - margin).toISOString(), endUtc: new Date(Date.parse(window.endUtc) + margin).toISOString() };
  const light = daylightOf(daysOf(wide, facts.zone), facts);
  return {
    zone: facts.zone,
    fromUtc: window.startUtc,
    toUtc: window.endUtc,
    ...light,
    window,
    runs: result ? runsOf(result) : undecidedRuns(window, light.daylight),
    foundAtUtc: facts.foundAt?.toISOString() ?? null,
    flux: result?.flux ?? [],
    startWords: words.start,
    endWords: words.end,
  };
}

export interface HourSpan {
  readonly fromHour: number;
  readonly toHour: number;
}

/** The day that stands for a case in a list: the one with most sunlit minutes, else when it was found. */
export function cardDay(facts: CardCase, result: CardResult | null): string {
  const sunlit = (result?.runs ?? []).filter((run) => run.verdict === 'sunlit');
  const longest = sunlit.reduce<(typeof sunlit)[number] | null>((best, run) => (best && best.minutes >= run.minutes ? best : run), null);
  const at = longest ? new Date(longest.fromUtc) : (facts.foundAt ?? facts.onsetLatestAt ?? facts.reportedAt);
  return localDay(at, facts.zone);
}

/** One day of the case between two hours of the clock, for a row of a list. */
export function dayCard(facts: CardCase, result: CardResult | null, { fromHour, toHour }: HourSpan): CardView {
  const day = cardDay(facts, result);
  const at = (hour: number) => (hour === 24 ? startOf(nextDay(day), facts.zone) : localMoment(`${day}T${String(hour).padStart(2, '0')}:00`, facts.zone).toISOString());
  const span = { startUtc: at(fromHour), endUtc: at(toHour) };
  const light = daylightOf([day], facts);
  const stated = result?.window ?? statedWindow(facts);
  // Left whole where it touches the day, so that no end bar is drawn at a midnight on which nothing ended.
  const window = clipped(stated, span) ? stated : null;
  const runs = result ? runsOf(result) : undecidedRuns(window, light.daylight);
  const foundAtUtc = facts.foundAt?.toISOString() ?? null;
  return {
    zone: facts.zone,
    fromUtc: span.startUtc,
    toUtc: span.endUtc,
    ...light,
    window,
    runs: runs.flatMap((run) => {
      const inside = clipped({ startUtc: run.fromUtc, endUtc: run.toUtc }, span);
      return inside ? [{ ...run, fromUtc: inside.startUtc, toUtc: inside.endUtc }] : [];
    }),
    foundAtUtc: foundAtUtc && foundAtUtc >= span.startUtc && foundAtUtc <= span.endUtc ? foundAtUtc : null,
    flux: [],
    startWords: [],
    endWords: [],
  };
}

function clipped(stretch: Stretch | null, span: Stretch): Stretch | null {
  if (!stretch) return null;
  const startUtc = stretch.startUtc > span.startUtc ? stretch.startUtc : span.startUtc;
  const endUtc = stretch.endUtc < span.endUtc ? stretch.endUtc : span.endUtc;
  return startUtc < endUtc ? { startUtc, endUtc } : null;
}

/** Whether an end of the window, or the find, lies on the day of the card but outside 04 to 22; then all rows show the whole day. */
export function needsWholeDay(facts: CardCase, result: CardResult | null): boolean {
  const whole = dayCard(facts, result, { fromHour: 0, toHour: 24 });
  const usual = dayCard(facts, result, { fromHour: 4, toHour: 22 });
  const moments = [whole.window?.startUtc, whole.window?.endUtc, facts.foundAt?.toISOString()];
  return moments.some((utc) => utc !== undefined && utc >= whole.fromUtc && utc <= whole.toUtc && (utc < usual.fromUtc || utc > usual.toUtc));
}

/** Today at a place: daylight, and the sunlit stretch where one is known. Without a run the daylight is left open. */
export function todayCard(facts: { readonly zone: string; readonly latitudeDeg: number; readonly longitudeDeg: number; readonly elevationM: number; readonly now: Date; readonly sunlit: { readonly fromAt: Date; readonly toAt: Date } | null; readonly decided: boolean }): CardView {
  const day = localDay(facts.now, facts.zone);
  const whole = { startUtc: startOf(day, facts.zone), endUtc: startOf(nextDay(day), facts.zone) };
  const asCase: CardCase = { ...facts, onsetEarliestAt: new Date(whole.startUtc), onsetLatestAt: new Date(whole.endUtc), foundAt: null, reportedAt: facts.now };
  const card = dayCard({ ...asCase, onsetEarliestAt: null, onsetLatestAt: null }, null, { fromHour: 4, toHour: 22 });
  if (!facts.decided) return { ...card, window: whole, runs: undecidedRuns(whole, card.daylight) };
  const runs = facts.sunlit ? [{ fromUtc: facts.sunlit.fromAt.toISOString(), toUtc: facts.sunlit.toAt.toISOString(), verdict: 'sunlit' as const, reasonWords: minuteReasonWords['sun-on-mark'] }] : [];
  return { ...card, window: whole, runs };
}

/** The day of `now` with the minutes of a run made for it. */
export function runCard(place: { readonly zone: string; readonly latitudeDeg: number; readonly longitudeDeg: number; readonly elevationM: number }, result: CardResult, now: Date): CardView {
  return dayCard({ ...place, onsetEarliestAt: null, onsetLatestAt: null, foundAt: null, reportedAt: now }, result, { fromHour: 4, toHour: 22 });
}
