import type { Transaction } from '#db/client.server.ts';
import { findCase } from '#db/queries/case-subject.server.ts';
import type { CaseRow } from '#db/queries/case-subject.server.ts';
import type { CasePatch } from '#db/queries/cases.server.ts';
import { countDuplicatesOf } from '#db/queries/cases.server.ts';
import { listFindingRows } from '#db/queries/findings.server.ts';
import type { MoveExtra } from '#app/domain/case-move.ts';
import { isTriageCloseReason } from '#app/domain/case-move.ts';
import type { Move } from '#app/domain/case-state.ts';
import { DomainError } from '#app/domain/errors.ts';
import { triageCloseReasonLabels } from '#app/domain/incident.ts';
import { formatDay } from '#app/domain/local-time.ts';
import type { Actor } from '#app/domain/roles.ts';
import { holdsRole } from '#app/domain/roles.ts';

export interface MoveContext {
  readonly move: Move;
  readonly row: CaseRow;
  readonly actor: Actor;
  readonly reason: string;
  readonly extra: MoveExtra;
  readonly now: Date;
}

interface Effect {
  readonly patch: CasePatch;
  /** Line of the log. */
  readonly summary: string;
}

/** Waivers and closing words that came with the move; they count towards what it needs. */
export function waiversOf(move: Move, extra: MoveExtra): Pick<Partial<CaseRow>, 'lesson' | 'externalReports' | 'effectivenessWaiver' | 'reconstructionWaiver' | 'evidenceWaiver'> {
  const given = (value: string | undefined) => value?.trim() || undefined;
  const kept = (fields: Record<string, string | undefined>) => Object.fromEntries(Object.entries(fields).filter(([, value]) => value !== undefined));
  if (move.id === 'close') return kept({ lesson: given(extra.lesson), externalReports: given(extra.externalReports), effectivenessWaiver: given(extra.effectivenessWaiver) });
  if (move.id === 'send-findings') return kept({ reconstructionWaiver: given(extra.reconstructionWaiver), evidenceWaiver: given(extra.evidenceWaiver) });
  return {};
}

/** Columns that the move changes besides the state, after the rules that need more than the case itself. */
export async function effectOf(tx: Transaction, context: MoveContext): Promise<Effect> {
  const { move, row, reason, extra, now } = context;
  switch (move.id) {
    case 'return':
      return {
        patch: { question: extra.question?.trim() ?? '', answer: null, answerDueAt: extra.answerDueAt ?? null },
        summary: `Returned with one question, answer due ${extra.answerDueAt ? formatDay(extra.answerDueAt, row.zone) : ''}.`,
      };
    case 'answer':
      return answered(context);
    case 'mark-duplicate':
      return markedDuplicate(tx, context);
    case 'undo-duplicate':
      return { patch: { duplicateOfId: null }, summary: 'No longer a duplicate; back to triage.' };
    case 'close-at-triage':
      return closedAtTriage(context);
    case 'send-findings':
      return { patch: { noActionReason: null }, summary: 'Finding sent to review.' };
    case 'sign-no-action':
      return { patch: { noActionReason: reason.trim() }, summary: 'Finding signed: no action needed. The site manager closes the case, or passes it to action.' };
    case 'close-no-action':
      return closedWithoutAction(tx, context);
    case 'close':
      refuseCloseOfHighRisk(context);
      return { patch: { closedAt: now }, summary: 'Closed.' };
    case 'reopen-investigation':
    case 'reopen-action':
      return { patch: { closedAt: null, closeReason: null, noActionReason: null, reopenCount: row.reopenCount + 1 }, summary: `Reopened, for the ${ordinal(row.reopenCount + 1)} time.` };
    default:
      return { patch: {}, summary: `${summaries[move.id] ?? move.label}.` };
  }
}

const summaries: Readonly<Record<string, string>> = {
  'open-triage': 'First look',
  accept: 'Investigation opened',
  'straight-to-action': 'Passed straight to corrective action',
  'send-back': 'Finding sent back with comments',
  sign: 'Finding signed, passed to corrective action',
  'pass-to-action': 'Passed to corrective action after all',
  'back-to-investigation': 'Back to investigation',
};

function ordinal(count: number): string {
  return ['first', 'second', 'third', 'fourth', 'fifth'][count - 1] ?? `${count}th`;
}

/** The reporter may answer at any time; an investigator answers for them only once the day has passed. */
function answered({ row, actor, extra, now }: MoveContext): Effect {
  const own = row.reporterId === actor.userId;
  if (!own && row.answerDueAt && row.answerDueAt > now) {
    throw new DomainError('invalid-state', `The reporter has until ${formatDay(row.answerDueAt, row.zone)} to answer; after that you may answer for them, or note that none came.`);
  }
  return { patch: { answer: extra.answer?.trim() ?? '' }, summary: own ? 'The reporter answered the question.' : 'Answer noted by the investigator.' };
}

async function markedDuplicate(tx: Transaction, { row, actor, extra }: MoveContext): Promise<Effect> {
  const refuse = (sentence: string) => new DomainError('invalid-input', sentence, { fieldErrors: { mainCaseNumber: [sentence] } });
  const main = await findCase(tx, actor, extra.mainCaseNumber ?? 0);
  if (!main) throw refuse(`Case ${extra.mainCaseNumber} was not found, or is not yours to see.`);
  if (main.row.id === row.id) throw refuse('A case cannot be its own main case.');
  if (main.row.state === 'duplicate') throw refuse(`Case ${main.row.number} is a duplicate itself; point to its main case.`);
  if ((await countDuplicatesOf(tx, row.id)) > 0) throw refuse('Other cases point to this one; undo those first, or make this the main case.');
  const manages = (siteId: string) => holdsRole(actor, ['manager'], siteId);
  if (main.row.siteId !== row.siteId && !(manages(row.siteId) && manages(main.row.siteId))) {
    throw new DomainError('forbidden', `Case ${main.row.number} is at another site. Merging across sites is open to a manager of both.`);
  }
  return { patch: { duplicateOfId: main.row.id }, summary: `Marked as duplicate of ${main.row.number}; both accounts are kept.` };
}

function closedAtTriage({ row, actor, extra, now }: MoveContext): Effect {
  if (row.anyoneHurt === 'yes' && !holdsRole(actor, ['manager'], row.siteId)) {
    throw new DomainError('forbidden', 'Somebody was hurt: only the site manager may close this case at triage.');
  }
  if (!isTriageCloseReason(extra.closeReason)) throw new DomainError('invalid-input', 'Choose why the case closes here.');
  return { patch: { closedAt: now, closeReason: extra.closeReason }, summary: `Closed at triage: ${triageCloseReasonLabels[extra.closeReason].toLowerCase()}.` };
}

/** Two people agree that nothing is to be done: the reviewer by the signature, and a manager who is somebody else. */
async function closedWithoutAction(tx: Transaction, context: MoveContext): Promise<Effect> {
  refuseCloseOfHighRisk(context);
  const [latest] = await listFindingRows(tx, context.row.id);
  if (latest?.reviewerId === context.actor.userId) throw new DomainError('forbidden', 'You signed the finding. Another person, the site manager, agrees that no action is needed.');
  return { patch: { closedAt: context.now }, summary: `Closed: no action needed. ${context.row.noActionReason ?? ''}`.trim() };
}

function refuseCloseOfHighRisk({ row, actor }: MoveContext): void {
  if (row.risk !== 'high' && row.risk !== 'severe') return;
  const everySite = actor.grants.some((grant) => grant.role === 'manager' && grant.siteId === null);
  if (!everySite) throw new DomainError('forbidden', `The risk is ${row.risk}: a manager for every site of the organisation closes this case.`);
}
