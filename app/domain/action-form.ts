import { Temporal } from 'temporal-polyfill';
import { z } from 'zod';
import { controlLevels } from './corrective-action.ts';
import { plainText, riskDueDays, risks } from './incident.ts';
import type { Risk } from './incident.ts';

const required = (max: number, sentence: string) => plainText(max).pipe(z.string().min(1, sentence));
const daySentence = 'Give the day as year, month and day, such as 2026-07-24.';
const day = z.iso.date(daySentence);
/** An empty field is no day. */
const dayOrNone = z.union([z.literal('').transform(() => null), day], daySentence).default(null);
const person = z.uuid('Choose a person from the list.');
const tick = z.literal('on').optional().transform((value) => value === 'on');

/** Reasons are read by others later: a full stop or a dash is not one. */
export const reasonSchema = required(2_000, 'Give the reason in a few words.').pipe(z.string().min(5, 'Give the reason in a few words.'));

const costSentence = 'Give the cost as whole units, digits only.';
const currencySentence = 'Give the currency as three letters, such as GBP.';
const sameTwice = 'Choose somebody else to verify: nobody verifies their own fix.';

export const actionFormSchema = z
  .object({
    title: required(160, 'Say in a few words what is to be done.'),
    why: plainText(4_000).default(''),
    controlLevel: z.enum(controlLevels, 'Choose the level of control.'),
    interim: tick,
    ownerId: person,
    verifierId: person,
    /** Left empty: the default of the risk. */
    dueOn: dayOrNone,
    risk: z.enum(risks, 'Choose the risk if nothing is done.'),
    cost: z
      .union([z.literal('').transform(() => null), z.string().regex(/^\d{1,12}$/, costSentence).transform(Number)], costSentence)
      .default(null),
    costCurrency: z
      .union([z.literal('').transform(() => null), z.string().trim().toUpperCase().regex(/^[A-Z]{3}$/, currencySentence)], currencySentence)
      .default(null),
  })
  .superRefine((form, context) => {
    if (form.ownerId === form.verifierId) context.addIssue({ code: 'custom', path: ['verifierId'], message: sameTwice });
    if (form.cost !== null && form.costCurrency === null) context.addIssue({ code: 'custom', path: ['costCurrency'], message: 'Give the currency of the cost, such as GBP.' });
  });
export type ActionDraft = z.output<typeof actionFormSchema>;

export const doneSchema = z.object({ note: required(4_000, 'Say what was done, in a sentence.') });
export const sendBackSchema = z.object({ note: required(4_000, 'Say what is still missing, in a sentence.') });
export const withdrawSchema = z.object({ reason: reasonSchema });
export const reDateSchema = z.object({ dueOn: day, reason: reasonSchema });
export const reassignSchema = z
  .object({ ownerId: person, verifierId: person, reason: reasonSchema })
  .superRefine((form, context) => {
    if (form.ownerId === form.verifierId) context.addIssue({ code: 'custom', path: ['verifierId'], message: sameTwice });
  });
export const verifySchema = z.object({
  note: required(4_000, 'Say what you checked, and how.'),
  /** Left empty: the first day of return. */
  effectCheckOn: dayOrNone,
});
export const effectSchema = z.object({
  effective: z.enum(['effective', 'not-effective'], 'Say whether it works.'),
  note: required(4_000, 'Say what you saw, and when.'),
  /** Needed only when the sun has not been back yet. */
  reason: plainText(2_000).default(''),
});

/** `YYYY-MM-DD` that many days later. */
export function addDays(isoDay: string, days: number): string {
  return Temporal.PlainDate.from(isoDay).add({ days }).toString();
}

/** Whole days from one ISO day to another; negative when the second is earlier. */
export function daysFrom(fromDay: string, toDay: string): number {
  return Temporal.PlainDate.from(fromDay).until(Temporal.PlainDate.from(toDay)).days;
}

export const defaultDueOn = (today: string, risk: Risk): string => addDays(today, riskDueDays[risk]);

/** The first day of return on which the fix can be seen to work, when that day is still to come; null otherwise. */
export function returnStillToCome(check: { readonly today: string; readonly verifiedOn: string; readonly returnDays: readonly string[] }): string | null {
  const first = [...check.returnDays].sort().find((returnDay) => returnDay >= check.verifiedOn);
  return first !== undefined && check.today < first ? first : null;
}
