import { z } from 'zod';
import type { Grade } from '#app/physics/model/tests.ts';
import type { CaseState } from './case-state.ts';
import { caseStateLabels } from './case-state.ts';
import { canOnCase, caseRules, whoCan } from './permissions.ts';
import type { ScaledPhoto } from './photo-trail.ts';
import type { CaseSubject } from './permissions.ts';
import type { Actor } from './roles.ts';
import { holdsRole } from './roles.ts';
import type { RunView } from './run-view.ts';
import type { InputOrigin } from './scene-optic.ts';

/** What the pages of a case's runs are given. Words are ready to be shown. */
export interface RunLineView {
  readonly number: number;
  readonly state: 'queued' | 'running' | 'done' | 'failed';
  readonly askedWords: string;
  readonly askedBy: string;
  readonly engineVersion: string;
  readonly inputHash: string;
  readonly sceneVersion: number | null;
  readonly note: string;
  readonly windowWords: string;
  readonly totals: { readonly sunlit: number; readonly notSunlit: number; readonly cannotTell: number } | null;
  readonly grade: Grade | null;
  readonly standing: 'attached' | 'superseded' | 'not attached';
  readonly progress: { readonly done: number; readonly total: number };
  readonly failure: string | null;
}

export interface RunsPageView {
  readonly heading: string;
  readonly runs: readonly RunLineView[];
  /** A run is queued or under way: the page asks again. */
  readonly pending: boolean;
  /** Why this person may not ask for a run now; null when they may. */
  readonly refusal: string | null;
  /** Without any time there is nothing to run. */
  readonly ready: boolean;
  readonly sceneVersion: number | null;
  readonly origins: readonly InputOrigin[];
  readonly missing: readonly string[];
}

export interface RunPageView {
  readonly line: RunLineView;
  readonly zone: string;
  readonly zoneRules: string;
  readonly resultHash: string | null;
  readonly finishedWords: string | null;
  readonly runCount: number;
  /** What differs from the run before; null for the first. */
  readonly changes: { readonly since: number; readonly inputs: readonly { readonly term: string; readonly value: string }[]; readonly sunlit: string | null } | null;
  readonly refusal: string | null;
  readonly attachRefusal: string | null;
  readonly view: RunView | null;
  /** Photo with a known scale, over which the way of the spot can be drawn. */
  readonly photo: ScaledPhoto | null;
}

/** Why a run cannot be asked for, or attached, in one sentence; null when it can. */
export function runRefusal(actor: Actor, action: 'reconstruction:run' | 'reconstruction:attach', subject: CaseSubject): string | null {
  if (canOnCase(actor, action, subject)) return null;
  const rule = caseRules[action];
  if (!holdsRole(actor, rule.roles, subject.siteId)) return whoCan(action);
  return `Not in the state "${caseStateLabels[subject.state].toLowerCase()}". ${action === 'reconstruction:run' ? 'Runs are made' : 'Runs are attached'} in: ${rule.states.map((state: CaseState) => caseStateLabels[state].toLowerCase()).join(', ')}.`;
}

/** Heading of the list of runs: what they found, not what they are. */
export function runsHeading(runs: readonly RunLineView[]): string {
  if (runs.length === 0) return 'Nothing has been reconstructed yet';
  const attached = runs.find((run) => run.standing === 'attached' && run.grade);
  if (attached?.grade) return `Run ${attached.number} is attached: ${attached.grade.word.replace(/ because$/u, '')}`;
  const pending = runs.find((run) => run.state === 'queued' || run.state === 'running');
  if (pending) return `Run ${pending.number} is under way`;
  return runs.some((run) => run.state === 'done') ? 'No run is attached to the case yet' : 'No run has finished yet';
}

/** What a person says of a run, for the log; may be left empty. */
export const runNoteSchema = z.string().trim().max(300, 'Keep it under 300 characters.').default('');
