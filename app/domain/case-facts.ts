import { z } from 'zod';
import { consequences, eventTypes, extents, foundMeans, likelihoods, onsetBases, plainText, risks, weatherSeen, yesNoUnknown } from './incident.ts';
import { formatClock, formatDay, fromLocalInput } from './local-time.ts';

/** An empty choice stays unknown. */
const choice = <Value extends string>(values: readonly [Value, ...Value[]]) =>
  z.enum(['', ...values]).transform((value) => values.find((known) => known === value) ?? null);
const optionalText = (max: number) => plainText(max).transform((text) => text || null);

/** The facts of a case as the triage form sends them; clock times are local to the place. */
export const caseFactsForm = z.object({
  title: plainText(120).pipe(z.string().min(3, 'Give the case a title of three letters or more; no names of people.')),
  eventType: choice(eventTypes),
  hazardStillPresent: z.enum(yesNoUnknown, 'Say whether the hazard is still there.'),
  interimControl: optionalText(500),
  interimControlEnds: optionalText(300),
  onsetEarliest: z.string().default(''),
  onsetEarliestWhich: z.enum(['', 'first', 'second']).default(''),
  onsetLatest: z.string().default(''),
  onsetLatestWhich: z.enum(['', 'first', 'second']).default(''),
  onsetBasis: choice(onsetBases),
  extent: choice(extents),
  weatherSeen: choice(weatherSeen),
  foundByMeans: choice(foundMeans),
  clockErrorMin: z
    .string()
    .default('')
    .transform((text) => (text.trim() === '' ? 0 : Number(text.replace(',', '.').replace('−', '-'))))
    .pipe(z.number('Write the clock error in minutes, such as 6 or -1.5.').min(-1_440, 'A clock error is at most a day.').max(1_440, 'A clock error is at most a day.')),
  potentialConsequence: choice(consequences),
  likelihood: choice(likelihoods),
  risk: choice(risks),
  riskBasis: optionalText(1_000),
});
export type CaseFactsForm = z.infer<typeof caseFactsForm>;

/** The facts as they are stored. */
export type CaseFacts = Omit<CaseFactsForm, 'onsetEarliest' | 'onsetEarliestWhich' | 'onsetLatest' | 'onsetLatestWhich' | 'clockErrorMin'> & {
  readonly onsetEarliestAt: Date | null;
  readonly onsetLatestAt: Date | null;
  readonly foundClockErrorS: number;
};

export type FactsReading = { readonly ok: true; readonly facts: CaseFacts } | { readonly ok: false; readonly fieldErrors: Record<string, string[]> };

export interface FactsContext {
  readonly zone: string;
  readonly now: Date;
  /** As the reporter gave it, before the clock error is taken off. */
  readonly foundAt: Date | null;
  /** Whether `foundAt` is a clock time at all, not only a day. */
  readonly foundIsClockTime: boolean;
}

/** Reads clock times in the zone of the place and checks their order. */
export function readCaseFacts(form: CaseFactsForm, context: FactsContext): FactsReading {
  const { onsetEarliest, onsetEarliestWhich, onsetLatest, onsetLatestWhich, clockErrorMin, ...rest } = form;
  const fieldErrors: Record<string, string[]> = {};
  const read = (field: string, local: string, which: '' | 'first' | 'second') => {
    const reading = readClock(local, context.zone, which);
    if (reading.sentence) fieldErrors[field] = [reading.sentence];
    return reading.instant;
  };
  const onsetEarliestAt = read('onsetEarliest', onsetEarliest, onsetEarliestWhich);
  const onsetLatestAt = read('onsetLatest', onsetLatest, onsetLatestWhich);
  const foundClockErrorS = Math.round(clockErrorMin * 60);
  if (Object.keys(fieldErrors).length === 0) {
    const sentence = orderSentence({ onsetEarliestAt, onsetLatestAt }, foundClockErrorS, context);
    if (sentence) fieldErrors[sentence.field] = [sentence.text];
  }
  if (form.hazardStillPresent === 'yes' && form.interimControl && !form.interimControlEnds) {
    fieldErrors['interimControlEnds'] = ['Say when the interim control may go, such as "when the coating is verified".'];
  }
  if (Object.keys(fieldErrors).length > 0) return { ok: false, fieldErrors };
  return { ok: true, facts: { ...rest, onsetEarliestAt, onsetLatestAt, foundClockErrorS } };
}

function readClock(local: string, zone: string, which: '' | 'first' | 'second'): { instant: Date | null; sentence?: string } {
  if (local.trim() === '') return { instant: null };
  const reading = fromLocalInput(local, zone, which === '' ? undefined : which);
  if (reading.kind === 'instant') return { instant: reading.instant };
  if (reading.kind === 'fold') return { instant: null, sentence: 'The clocks went back and showed this time twice: say whether you mean the first or the second pass.' };
  if (reading.kind === 'gap') return { instant: null, sentence: `The clocks went forward and skipped this time; the same moment read ${formatClock(reading.after, zone)}.` };
  return { instant: null, sentence: 'This is not a date and time; write it as day, month, year, hour and minute.' };
}

function orderSentence(window: { onsetEarliestAt: Date | null; onsetLatestAt: Date | null }, clockErrorS: number, context: FactsContext): { field: string; text: string } | null {
  const { onsetEarliestAt: earliest, onsetLatestAt: latest } = window;
  if ((earliest === null) !== (latest === null)) return { field: earliest ? 'onsetLatest' : 'onsetEarliest', text: 'Give both ends of the onset window, or neither.' };
  if (!earliest || !latest) return null;
  if (latest > context.now) return { field: 'onsetLatest', text: 'The latest possible onset lies in the future.' };
  if (earliest > latest) return { field: 'onsetEarliest', text: 'Last seen sound comes after the latest possible onset; change one of them.' };
  const found = context.foundAt && context.foundIsClockTime ? new Date(context.foundAt.getTime() - clockErrorS * 1_000) : null;
  if (found && latest.getTime() > found.getTime() + 59_000) {
    return { field: 'onsetLatest', text: `The mark was found at ${formatClock(found, context.zone)} on ${formatDay(found, context.zone)}, clock error taken off; it cannot have begun after that.` };
  }
  return null;
}

/** Length beyond which the onset window is pointed out as unusually long. [days] */
export const longWindowDays = 14;
