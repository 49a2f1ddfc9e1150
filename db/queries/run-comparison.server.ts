import type { DbOrTx } from '#db/client.server.ts';
import { canOnCase } from '#app/domain/permissions.ts';
import type { Actor } from '#app/domain/roles.ts';
import { compareRuns } from '#app/domain/run-comparison.ts';
import type { ComparedRun, RunComparisonView } from '#app/domain/run-comparison.ts';
import { correctedFoundAt } from './case-header.server.ts';
import { findReadableRuns, lineView } from './reconstruction-page.server.ts';
import { getReconstruction, listReconstructions } from './reconstructions.server.ts';

export interface RunComparisonPage {
  /** Finished runs of the case, newest first. */
  readonly runs: readonly { readonly number: number; readonly words: string }[];
  readonly a: number | null;
  readonly b: number | null;
  /** Null where the two do not exist. */
  readonly view: RunComparisonView | null;
  /** Whether this person may have the changes worked out one by one. */
  readonly mayRun: boolean;
}

/** Two finished runs of a case side by side, the two newest where none were named; null when the case is not theirs to see. */
export async function getRunComparison(db: DbOrTx, params: { actor: Actor; caseNumber: number; a: number | null; b: number | null }): Promise<RunComparisonPage | null> {
  const found = await findReadableRuns(db, params.actor, params.caseNumber);
  if (!found) return null;
  const lines = (await listReconstructions(db, params)).filter((line) => line.state === 'done').map((line) => lineView(line, found.row.zone));
  const [newest, before] = lines;
  const b = params.b ?? newest?.number ?? null;
  const a = params.a ?? before?.number ?? null;
  const runs = lines.map((line) => ({ number: line.number, words: `run ${line.number}, ${line.askedWords}` }));
  const mayRun = canOnCase(params.actor, 'reconstruction:run', found.subject);
  if (a === null || b === null || a === b) return { runs, a, b, mayRun, view: null };
  const whole = async (number: number): Promise<(ComparedRun & { resultHash: string | null }) | null> => {
    const run = await getReconstruction(db, { ...params, number });
    const line = lines.find((one) => one.number === number);
    return run?.result && line ? { line, input: run.input, result: run.result, resultHash: run.resultHash } : null;
  };
  const [first, second] = [await whole(Math.min(a, b)), await whole(Math.max(a, b))];
  if (!first || !second) return { runs, a, b, mayRun, view: null };
  return { runs, a, b, mayRun, view: compareRuns(first, second, { foundAt: correctedFoundAt(found.row), sameBytes: first.resultHash !== null && first.resultHash === second.resultHash }) };
}
