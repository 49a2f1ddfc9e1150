import { db } from '#db/client.server.ts';
import { findCase } from '#db/queries/case-subject.server.ts';
import { getReconstruction } from '#db/queries/reconstructions.server.ts';
import { DomainError, notFound } from '#app/domain/errors.ts';
import type { Actor } from '#app/domain/roles.ts';
import { aloneInputs } from '#app/domain/run-alone.ts';
import { totalsWords } from '#app/domain/run-words.ts';
import { runEngine } from '#app/jobs/engine-runner.server.ts';
import { authorize } from '#app/services/authorize.ts';

/** Minutes do not depend on rays and samples, and fluxes are not shown from these runs. */
const quick = { rays: 1_000, samples: 64 } as const;
const timeoutMs = 15_000;

export interface ChangeAlone {
  readonly label: string;
  readonly words: string;
}

/**
 * What each change between two runs would have done by itself, on the engine of today. Nothing is stored.
 *
 * @returns Null where one change made all the difference, or there are too many to take one by one.
 * @throws DomainError `forbidden` to those who may not run one; `not-found`.
 */
export async function changesAlone(params: { actor: Actor; caseNumber: number; a: number; b: number }): Promise<ChangeAlone[] | null> {
  const found = await findCase(db, params.actor, params.caseNumber);
  if (!found) throw notFound('The case');
  authorize(params.actor, 'reconstruction:run', found.subject);
  const [first, second] = [Math.min(params.a, params.b), Math.max(params.a, params.b)];
  const before = await getReconstruction(db, { ...params, number: first });
  const after = await getReconstruction(db, { ...params, number: second });
  if (!before || !after) throw notFound('The run');
  const inputs = aloneInputs(before.input, after.input);
  if (!inputs) return null;
  const answers: ChangeAlone[] = [];
  for (const { label, input, refusal } of inputs) answers.push({ label, words: input ? await answerOf({ ...input, ...quick, recurrenceFromUtc: input.window.startUtc, recurrenceToUtc: dayAfter(input.window.endUtc) }) : `not possible by itself: ${refusal ?? ''}` });
  return answers;
}

const dayAfter = (utc: string): string => new Date(Date.parse(utc) + 86_400_000).toISOString();

async function answerOf(input: Parameters<typeof runEngine>[0]): Promise<string> {
  try {
    return totalsWords((await runEngine(input, { timeoutMs })).totals);
  } catch (error) {
    if (error instanceof DomainError) return `not possible by itself: ${error.message}`;
    throw error;
  }
}
