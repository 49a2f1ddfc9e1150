import type { BurnCardModel, BurnRun } from './model.ts';
import { daySpan, localDate, wallToUtcMs } from './wall-clock.ts';

export interface OneDay {
  readonly on: string;
  readonly model: BurnCardModel;
}
export interface FoldedDays {
  /** The first is drawn, the others are alike. */
  readonly days: readonly OneDay[];
}

const dayMs = 86_400_000;
const alikeMs = 10 * 60_000;

function overlap(run: BurnRun, from: number, to: number): BurnRun[] {
  const start = Math.max(from, Date.parse(run.fromUtc));
  const end = Math.min(to, Date.parse(run.toUtc));
  return end > start ? [{ ...run, fromUtc: new Date(start).toISOString(), toUtc: new Date(end).toISOString() }] : [];
}

/** The part of a card that lies on one local day, drawn from 00 to 24. */
export function dayOfCard(model: BurnCardModel, on: string): BurnCardModel {
  const span = daySpan(on, model.zone, 0, 24);
  const [from, to] = [Date.parse(span.fromUtc), Date.parse(span.toUtc)];
  const window = model.window ? overlap({ fromUtc: model.window.startUtc, toUtc: model.window.endUtc, verdict: 'not-sunlit', reasonWords: '' }, from, to)[0] : undefined;
  const found = model.foundAtUtc ? Date.parse(model.foundAtUtc) : null;
  return {
    ...model,
    ...span,
    daylight: model.daylight.filter((day) => Date.parse(day.setUtc) > from && Date.parse(day.riseUtc) < to),
    window: window ? { startUtc: window.fromUtc, endUtc: window.toUtc } : null,
    goesOn: { before: model.window !== null && Date.parse(model.window.startUtc) < from, after: model.window !== null && Date.parse(model.window.endUtc) > to },
    runs: model.runs.flatMap((run) => overlap(run, from, to)),
    foundAtUtc: found !== null && found >= from && found <= to ? (model.foundAtUtc ?? null) : null,
  };
}

/** Result and local minute of every run, to ten minutes: days that share it have no change worth a line of their own. */
function pattern(day: OneDay): string {
  const midnight = wallToUtcMs(day.on, 0, day.model.zone);
  const place = (utc: string) => Math.round((Date.parse(utc) - midnight) / alikeMs);
  const runs = day.model.runs.map((run) => `${run.verdict}${place(run.fromUtc)}-${place(run.toUtc)}`);
  return `${runs.join(' ')}${day.model.foundAtUtc ? ` found ${place(day.model.foundAtUtc)}` : ''}`;
}

/** Splits a long card into days and folds neighbours that are alike. */
export function foldDays(model: BurnCardModel): FoldedDays[] {
  const first = localDate(model.window?.startUtc ?? model.fromUtc, model.zone);
  const last = localDate(model.window?.endUtc ?? model.toUtc, model.zone);
  const groups: { key: string; days: OneDay[] }[] = [];
  for (let at = Date.parse(`${first}T00:00:00Z`); at <= Date.parse(`${last}T00:00:00Z`); at += dayMs) {
    const on = new Date(at).toISOString().slice(0, 10);
    const day = { on, model: dayOfCard(model, on) };
    const key = pattern(day);
    const previous = groups.at(-1);
    if (previous?.key === key) previous.days.push(day);
    else groups.push({ key, days: [day] });
  }
  return groups;
}
