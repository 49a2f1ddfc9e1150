import type { BurnCardModel, BurnRun } from './model.ts';
import { joinRuns, runMinutes } from './model.ts';
import { clockWords, dateWords, localDate, offsetWords, zoneOffsetMin } from './wall-clock.ts';

export const verdictWords: Record<BurnRun['verdict'], string> = {
  sunlit: 'sunlit',
  'not-sunlit': 'not sunlit',
  'cannot-tell': "can't tell",
};

const minutesWords = (minutes: number) => `${minutes} ${minutes === 1 ? 'minute' : 'minutes'}`;

/** "10:26 to 10:56", with the date before it once the card spans several days. */
export function rangeWords(fromUtc: string, toUtc: string, zone: string, withDate: boolean): string {
  const fromDate = localDate(fromUtc, zone);
  const toDate = localDate(toUtc, zone);
  if (fromDate !== toDate) return `${dateWords(fromDate, false)} ${clockWords(fromUtc, zone)} to ${dateWords(toDate, false)} ${clockWords(toUtc, zone)}`;
  return `${withDate ? `${dateWords(fromDate, false)} ` : ''}${clockWords(fromUtc, zone)} to ${clockWords(toUtc, zone)}`;
}

function resultWords(model: BurnCardModel, severalDays: boolean): string {
  if (!model.window) return 'Nothing examined yet.';
  const runs = joinRuns(model.runs).filter((run) => run.verdict !== 'not-sunlit');
  const sunlit = runs.some((run) => run.verdict === 'sunlit');
  const told = runs.map((run) => {
    const word = run.verdict === 'sunlit' ? 'Sunlit' : "Can't tell";
    return `${word} ${rangeWords(run.fromUtc, run.toUtc, model.zone, severalDays)}, ${minutesWords(runMinutes(run))}.`;
  });
  return [...(sunlit ? [] : ['No minute sunlit.']), ...told].join(' ');
}

function skyWords(model: BurnCardModel): string {
  if (model.polar === 'night') return 'The sun does not rise. ';
  if (model.polar === 'day') return 'The sun does not set. ';
  return '';
}

/** The card in one sentence or two: what, date, zone, examined from and to, each burn and dot run with its minutes. */
export function burnCardSentence(model: BurnCardModel, label?: string): string {
  const zone = model.zone;
  const from = model.window?.startUtc ?? model.fromUtc;
  const severalDays = localDate(from, zone) !== localDate(model.window?.endUtc ?? model.toUtc, zone);
  const head = [label, dateWords(localDate(from, zone)), zone.replaceAll('_', ' ')].filter(Boolean).join(', ');
  const examined = model.window ? `examined ${rangeWords(model.window.startUtc, model.window.endUtc, zone, severalDays)}` : 'not examined';
  const found = model.foundAtUtc ? ` Found ${clockWords(model.foundAtUtc, zone)}.` : '';
  return `${head}, ${examined}. ${skyWords(model)}${resultWords(model, severalDays)}${found}`;
}

/** "(your time is one hour earlier)", or nothing when reader and place agree. */
export function viewerWords(utc: string, zone: string, viewerZone: string | undefined): string {
  if (!viewerZone) return '';
  const difference = zoneOffsetMin(Date.parse(utc), viewerZone) - zoneOffsetMin(Date.parse(utc), zone);
  if (difference === 0) return '';
  const size = Math.abs(difference);
  const length = size % 60 === 0 ? `${size === 60 ? 'one hour' : `${size / 60} hours`}` : `${Math.floor(size / 60)} h ${size % 60} min`;
  return ` (your time is ${length} ${difference < 0 ? 'earlier' : 'later'})`;
}

/** Date, zone and offset under a card. */
export function zoneWords(model: BurnCardModel, viewerZone?: string): { readonly date: string; readonly rest: string } {
  const at = model.window?.startUtc ?? model.fromUtc;
  return {
    date: dateWords(localDate(at, model.zone)),
    rest: `, case time ${model.zone.replaceAll('_', ' ')}, ${offsetWords(at, model.zone)}${viewerWords(at, model.zone, viewerZone)}`,
  };
}
