import { formatClock, formatOffset, fromLocalInput } from './local-time.ts';

/** A clock time of the place as a form sends it, with the pass of a repeated hour in a field of its own. */
export interface TypedMoment {
  readonly local: string;
  readonly which: string;
}
export type MomentReading = { readonly ok: true; readonly instant: Date } | { readonly ok: false; readonly sentence: string };

/** Name of the field that says which pass of a repeated hour is meant. */
export const whichField = (name: string): string => `${name}Which`;
const repeatedHour = 'The clock at the place showed this time twice that night, because it was put back.';
/** Whether the sentence asks which pass is meant. */
export const asksWhichPass = (sentence: string): boolean => sentence.startsWith(repeatedHour);

/** Reads a typed clock time in the zone of the place; the sentence says how to mend it. */
export function readTypedMoment({ local, which }: TypedMoment, zone: string): MomentReading {
  const text = local.trim().replace(' ', 'T');
  if (!/^\d{4}-\d{2}-\d{2}T\d{2}:\d{2}/u.test(text)) return { ok: false, sentence: 'Give a day and a time, such as 2026-05-09 15:10.' };
  const reading = fromLocalInput(text, zone, which === 'first' || which === 'second' ? which : undefined);
  switch (reading.kind) {
    case 'unreadable':
      return { ok: false, sentence: 'There is no such day or time. Check it against a calendar.' };
    case 'gap':
      return { ok: false, sentence: `The clock at the place skipped this time: it was put forward that night. Give the time on the changed clock, such as ${formatClock(reading.after, zone)}.` };
    case 'fold':
      return { ok: false, sentence: `${repeatedHour} Say whether you mean the first, at ${formatOffset(reading.first, zone)}, or the second, at ${formatOffset(reading.second, zone)}.` };
    case 'instant':
      return { ok: true, instant: reading.instant };
  }
}

/** Reads several clock times of one form. An empty field of `optional` is null. */
export function readMoments<Name extends string>(typed: Readonly<Record<string, string>>, zone: string, required: readonly Name[], optional: readonly Name[] = []) {
  const fieldErrors: Record<string, string[]> = {};
  const instants = new Map<Name, Date>();
  for (const name of [...required, ...optional]) {
    const local = typed[name] ?? '';
    if (local.trim() === '' && optional.includes(name)) continue;
    const reading = readTypedMoment({ local, which: typed[whichField(name)] ?? '' }, zone);
    if (reading.ok) instants.set(name, reading.instant);
    else fieldErrors[name] = [reading.sentence];
  }
  return { fieldErrors, at: (name: Name): Date | null => instants.get(name) ?? null };
}
