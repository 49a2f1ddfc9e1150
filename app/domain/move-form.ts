import { z } from 'zod';
import type { MoveExtra } from './case-move.ts';
import { plainText } from './incident.ts';
import { fromLocalInput } from './local-time.ts';

const words = plainText(2_000).default('');

/** A move as its form sends it. */
export const moveForm = z.object({
  moveId: z.string().max(40),
  version: z.coerce.number('The form is damaged; load the page again.').int().min(1),
  reason: words,
  question: plainText(500).default(''),
  /** A day; the whole of it counts. */
  answerDueOn: z.string().default(''),
  answer: words,
  mainCaseNumber: z.string().default(''),
  closeReason: z.string().default(''),
  lesson: words,
  externalReports: words,
  effectivenessWaiver: words,
  reconstructionWaiver: words,
  evidenceWaiver: words,
});
export type MoveForm = z.infer<typeof moveForm>;

/** What goes with the move; a day ends at its last minute in the zone of the place. */
export function moveExtra(form: MoveForm, zone: string): MoveExtra {
  const number = Number(/^#?(\d{1,9})$/u.exec(form.mainCaseNumber.trim())?.[1] ?? Number.NaN);
  const { question, answer, closeReason, lesson, externalReports, effectivenessWaiver, reconstructionWaiver, evidenceWaiver } = form;
  return {
    question, answer, closeReason, lesson, externalReports, effectivenessWaiver, reconstructionWaiver, evidenceWaiver,
    answerDueAt: endOfDay(form.answerDueOn, zone),
    mainCaseNumber: Number.isFinite(number) ? number : undefined,
  };
}

function endOfDay(day: string, zone: string): Date | undefined {
  if (!/^\d{4}-\d{2}-\d{2}$/u.test(day)) return undefined;
  const reading = fromLocalInput(`${day}T23:59`, zone, 'second');
  if (reading.kind === 'instant') return reading.instant;
  return reading.kind === 'gap' ? reading.after : undefined;
}
