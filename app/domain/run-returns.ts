import type { ReconstructionInput } from '#app/physics/model/input.ts';
import type { RecurrenceBand, ReconstructionResult } from '#app/physics/model/result.ts';
import { settleSite } from '#app/physics/site.ts';
import { localDay } from '#app/physics/sun/zone-days.ts';
import { formatClock, formatIsoDay } from './local-time.ts';
import { yearOfSun } from './year-of-sun.ts';
import type { YearDay, YearSpan } from './year-of-sun.ts';

/** Days on which the sun lands on the mark again, as tables and as the picture of a year. */
export interface ReturnBandView {
  readonly daysWords: string;
  readonly clockWords: string;
  readonly bestWords: string;
  readonly dayCount: number;
  readonly minutes: number;
  /** "past", "the window itself", or null for days still to come. */
  readonly when: 'past' | 'window' | null;
  readonly days: readonly { readonly on: string; readonly dayWords: string; readonly from: string; readonly to: string; readonly best: string; readonly minutes: number; readonly separationDeg: number }[];
}
export interface YearPlateView {
  readonly days: readonly YearDay[];
  readonly reach: readonly YearSpan[];
  readonly lit: readonly YearSpan[];
  readonly todayOn: string;
  readonly note: string;
}

const minuteOfClock = (clock: string): number => Number(clock.slice(0, 2)) * 60 + Number(clock.slice(3, 5));

function bandDays(band: RecurrenceBand, zone: string): ReturnBandView['days'] {
  return band.days.map((day) => ({
    on: day.on,
    dayWords: formatIsoDay(day.on),
    from: formatClock(new Date(day.fromUtc), zone),
    to: formatClock(new Date(day.toUtc), zone),
    best: formatClock(new Date(day.bestUtc), zone),
    minutes: day.minutes,
    separationDeg: day.separationDeg,
  }));
}

function bandView(band: RecurrenceBand, zone: string, todayOn: string, window: { readonly firstOn: string; readonly lastOn: string }): ReturnBandView {
  const days = bandDays(band, zone);
  const earliest = days.reduce((least, day) => (day.from < least ? day.from : least), '23:59');
  const latest = days.reduce((most, day) => (day.to > most ? day.to : most), '00:00');
  const best = band.days.find((day) => day.bestUtc === band.bestUtc);
  const holdsWindow = band.firstOn <= window.lastOn && band.lastOn >= window.firstOn;
  return {
    daysWords: band.firstOn === band.lastOn ? formatIsoDay(band.firstOn) : `${formatIsoDay(band.firstOn)} to ${formatIsoDay(band.lastOn)}`,
    clockWords: earliest === latest ? earliest : `${earliest} to ${latest}`,
    bestWords: `${formatIsoDay(best?.on ?? band.firstOn)}, ${formatClock(new Date(band.bestUtc), zone)}`,
    dayCount: days.length,
    minutes: band.minutes,
    when: holdsWindow ? 'window' : band.lastOn < todayOn ? 'past' : null,
    days,
  };
}

export function returnBands(input: ReconstructionInput, result: ReconstructionResult, now: Date): ReturnBandView[] {
  const { zone } = input.place;
  const window = { firstOn: localDay(Date.parse(result.window.startUtc), zone), lastOn: localDay(Date.parse(result.window.endUtc) - 60_000, zone) };
  return result.recurrence.map((band) => bandView(band, zone, localDay(now.getTime(), zone), window));
}

/**
 * Twelve months from the first of the current month, or from the month of the window while that lies less than a year
 * back, so that the day of the mark stands in its own picture.
 */
export function yearPlate(input: ReconstructionInput, result: ReconstructionResult, now: Date): YearPlateView {
  const { zone } = input.place;
  const windowMs = Date.parse(result.window.startUtc);
  const begin = now.getTime() - windowMs < 300 * 86_400_000 ? windowMs : now.getTime();
  const firstOn = `${localDay(begin, zone).slice(0, 7)}-01`;
  const { days, reach } = yearOfSun({ observer: settleSite(input).observer, zone, firstOn, days: 365, skyline: input.skyline, opening: input.opening });
  const reachKnown = input.skyline !== undefined || input.opening !== undefined;
  return {
    days: days.map((day) => ({ on: day.on, riseMin: tenth(day.riseMin), setMin: tenth(day.setMin) })),
    reach: reachKnown ? reach.map((span) => ({ on: span.on, fromMin: Math.round(span.fromMin), toMin: Math.round(span.toMin) })) : [],
    lit: litSpans(result.recurrence, zone),
    todayOn: localDay(now.getTime(), zone),
    note: plateNote(zone, reachKnown),
  };
}

const tenth = (value: number | null): number | null => (value === null ? null : Math.round(value * 10) / 10);

/** Days on which the sun lands on the mark, as they stand in the picture of a year. */
export function litSpans(recurrence: readonly LitDays[], zone: string): YearSpan[] {
  return recurrence.flatMap((band) => band.days).map((day) => {
    const fromMin = minuteOfClock(formatClock(new Date(day.fromUtc), zone));
    return { on: day.on, fromMin, toMin: Math.max(minuteOfClock(formatClock(new Date(day.toUtc), zone)), fromMin + 1) };
  });
}
interface LitDays {
  readonly days: readonly { readonly on: string; readonly fromUtc: string; readonly toUtc: string }[];
}

export function plateNote(zone: string, reachKnown: boolean): string {
  const reachWords = reachKnown ? ' Lighter: the sun reaches the optic, over the skyline and through the opening as recorded.' : ' No skyline and no opening were recorded, so all daylight counts as reaching the optic.';
  return `Clock of ${zone.replaceAll('_', ' ')}. Dark: daylight at the place.${reachWords} Cut through: the sun stands where it puts the focus on the mark. Summer time steps the clock, not the sun.`;
}
