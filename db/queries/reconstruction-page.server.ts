import type { DbOrTx } from '#db/client.server.ts';
import { DomainError } from '#app/domain/errors.ts';
import { formatClock, formatDay, formatDayClock, localDay } from '#app/domain/local-time.ts';
import { canOnCase, whoCan } from '#app/domain/permissions.ts';
import { draftInput } from '#app/domain/reconstruction-draft.ts';
import type { Actor } from '#app/domain/roles.ts';
import { inputChanges } from '#app/domain/run-inputs.ts';
import { runRefusal, runsHeading } from '#app/domain/run-page.ts';
import type { RunLineView, RunPageView, RunsPageView } from '#app/domain/run-page.ts';
import { runView } from '#app/domain/run-view.ts';
import type { ReconstructionInput } from '#app/physics/model/input.ts';
import type { ReconstructionResult } from '#app/physics/model/result.ts';
import type { CaseRow } from './case-subject.server.ts';
import { findCase } from './case-subject.server.ts';
import { getScaledPhoto } from './photo-scale.server.ts';
import { getReconstruction, getReconstructionSource, listReconstructions } from './reconstructions.server.ts';
import type { ReconstructionLine, ReconstructionWhole } from './reconstructions.server.ts';

/** The case, if this person may read its runs; null when the case is not theirs to see. @throws DomainError `forbidden` */
export async function findReadableRuns(db: DbOrTx, actor: Actor, caseNumber: number) {
  const found = await findCase(db, actor, caseNumber);
  if (found && !canOnCase(actor, 'reconstruction:read', found.subject)) throw new DomainError('forbidden', `Reconstructions are not open to you. ${whoCan('reconstruction:read')}`);
  return found;
}

function windowWords(window: { readonly startUtc: string; readonly endUtc: string }, zone: string): string {
  const [start, end] = [new Date(window.startUtc), new Date(window.endUtc)];
  const sameDay = localDay(start, zone) === localDay(end, zone);
  return sameDay ? `${formatDay(start, zone)}, ${formatClock(start, zone)} to ${formatClock(end, zone)}` : `${formatDayClock(start, zone)} to ${formatDayClock(end, zone)}`;
}

/** One run as a line of the list. */
export function lineView(line: Omit<ReconstructionLine, 'resultHash'>, zone: string): RunLineView {
  return {
    number: line.number,
    state: line.state,
    askedWords: formatDayClock(line.createdAt, zone),
    askedBy: line.requestedBy ?? 'a person who has left',
    engineVersion: line.engineVersion,
    inputHash: line.inputHash,
    sceneVersion: line.sceneVersion,
    note: line.note,
    windowWords: windowWords(line.window, zone),
    totals: line.totals,
    grade: line.grade,
    standing: line.attachedAt === null ? 'not attached' : line.supersededAt === null ? 'attached' : 'superseded',
    progress: { done: line.progressDone, total: line.progressTotal },
    failure: line.failure,
  };
}

/** The runs of a case, with what a new one would go by; null when the case is not theirs to see. */
export async function getRunsPage(db: DbOrTx, params: { actor: Actor; caseNumber: number; now: Date }): Promise<RunsPageView | null> {
  const found = await findReadableRuns(db, params.actor, params.caseNumber);
  const source = await getReconstructionSource(db, params);
  if (!found || !source) return null;
  const runs = (await listReconstructions(db, params)).map((line) => lineView(line, found.row.zone));
  const draft = draftInput(source, params.now);
  return {
    heading: runsHeading(runs),
    runs,
    pending: runs.some((run) => run.state === 'queued' || run.state === 'running'),
    refusal: runRefusal(params.actor, 'reconstruction:run', found.subject),
    ready: draft.input !== null,
    sceneVersion: source.sceneVersion,
    origins: draft.origins,
    missing: draft.missing,
  };
}

/** True time at which the mark was found; null for a bare day. */
function foundAt(row: CaseRow): Date | null {
  if (!row.foundAt || row.foundPrecision === 'date-only' || row.foundPrecision === 'unknown') return null;
  return new Date(row.foundAt.getTime() - row.foundClockErrorS * 1000);
}

/** What differs from the run before it; the engine's version is named where that changed. */
async function changesSince(db: DbOrTx, params: { actor: Actor; caseNumber: number; number: number }, run: ReconstructionWhole): Promise<RunPageView['changes']> {
  const before = params.number > 1 ? await getReconstruction(db, { ...params, number: params.number - 1 }) : null;
  if (!before) return null;
  const engine = before.engineVersion === run.engineVersion ? [] : [{ term: 'Engine', value: `${before.engineVersion} to ${run.engineVersion}` }];
  const [earlier, later] = [before.result?.totals.sunlit, run.result?.totals.sunlit];
  return { since: before.number, inputs: [...engine, ...inputChanges(before.input, run.input)], sunlit: earlier === undefined || later === undefined || earlier === later ? null : `${earlier} to ${later} min` };
}

/** One run with all that its page draws; null when it is not there or not theirs to see. */
export async function getRunPage(db: DbOrTx, params: { actor: Actor; caseNumber: number; number: number; now: Date }): Promise<RunPageView | null> {
  const found = await findReadableRuns(db, params.actor, params.caseNumber);
  const run = await getReconstruction(db, params);
  if (!found || !run) return null;
  const { zone } = found.row;
  const line = lineView({ ...run, totals: run.result?.totals ?? null, grade: run.result?.grade ?? null, window: run.result?.window ?? run.input.window }, zone);
  return {
    line,
    zone,
    zoneRules: run.zoneRules,
    resultHash: run.resultHash,
    finishedWords: run.finishedAt ? formatDayClock(run.finishedAt, zone) : null,
    runCount: run.runCount,
    changes: await changesSince(db, params, run),
    refusal: runRefusal(params.actor, 'reconstruction:run', found.subject),
    attachRefusal: runRefusal(params.actor, 'reconstruction:attach', found.subject),
    photo: run.state === 'done' ? await getScaledPhoto(db, params) : null,
    view: run.state === 'done' && run.result ? runView(run.input, run.result, { foundAt: foundAt(found.row), now: params.now }) : null,
  };
}

export interface RunExport {
  readonly caseNumber: number;
  readonly number: number;
  readonly engineVersion: string;
  readonly zoneRules: string;
  readonly inputHash: string;
  readonly resultHash: string;
  readonly input: ReconstructionInput;
  readonly result: ReconstructionResult;
}

/** A finished run as it was computed, for taking away; null when there is none or it is not theirs to see. */
export async function getRunExport(db: DbOrTx, params: { actor: Actor; caseNumber: number; number: number }): Promise<RunExport | null> {
  const found = await findReadableRuns(db, params.actor, params.caseNumber);
  const run = await getReconstruction(db, params);
  if (!found || !run?.result || !run.resultHash) return null;
  const { number, engineVersion, zoneRules, inputHash, resultHash, input, result } = run;
  return { caseNumber: params.caseNumber, number, engineVersion, zoneRules, inputHash, resultHash, input, result };
}
