import type { Transaction } from '#db/client.server.ts';
import { inTransaction } from '#db/client.server.ts';
import { getAttachmentOfCase } from '#db/queries/attachments.server.ts';
import { insertPlan, planOfItem, updatePlan } from '#db/queries/planned-exams.server.ts';
import type { PlanRow } from '#db/queries/planned-exams.server.ts';
import { DomainError, notFound } from '#app/domain/errors.ts';
import type { CancelPlan, ChangePlan, PlanExam } from '#app/domain/evidence-form.ts';
import { planObstacles } from '#app/domain/planned-exam.ts';
import { logLine } from '#app/services/log-line.server.ts';
import { lockedItem } from './locked-item.server.ts';
import type { ItemCall, LockedItem } from './locked-item.server.ts';

interface PlanCall extends ItemCall {
  readonly plannedAt: Date;
  readonly now: Date;
}

const written = ({ plannedAt, waitingDays, tellRoles, protocolAttachmentId }: Pick<PlanRow, 'plannedAt' | 'waitingDays' | 'tellRoles' | 'protocolAttachmentId'>) => ({ plannedAt: plannedAt.toISOString(), waitingDays, tellRoles, protocolAttachmentId });

/** The sentence beside the protocol when it is no document of the case. */
export async function protocolProblem(tx: Transaction, caseId: string, attachmentId: string | null): Promise<Record<string, string[]>> {
  const known = attachmentId === null || (await getAttachmentOfCase(tx, { caseId, attachmentId }));
  return known ? {} : { protocolAttachmentId: ['Choose one of the documents of this case.'] };
}

/** A plan of the item that still stands. */
export async function standingPlan(tx: Transaction, { item }: Pick<LockedItem, 'item'>, planId: string): Promise<PlanRow> {
  const plan = await planOfItem(tx, { itemId: item.id, planId });
  if (!plan) throw notFound('The planned examination');
  if (plan.outcome) throw new DomainError('conflict', plan.outcome === 'made' ? 'This examination has been recorded as made in the meantime. Open the page anew.' : 'This examination has been cancelled in the meantime. Open the page anew.');
  return plan;
}

const refuse = (fieldErrors: Record<string, string[]>): void => {
  if (Object.keys(fieldErrors).length > 0) throw new DomainError('invalid-input', 'The examination cannot be planned as it stands.', { fieldErrors });
};

/**
 * Plans an examination that may alter the item. Notice and protocol may still be missing: the plan lists them. The same
 * form sent again changes nothing.
 *
 * @throws DomainError `not-found`, `forbidden`, or `invalid-input` beside the field.
 */
export async function planExam({ actor, caseNumber, label, plan, plannedAt, now }: PlanCall & { readonly plan: PlanExam }): Promise<void> {
  return inTransaction(async (tx) => {
    const { row, item, code } = await lockedItem(tx, { actor, caseNumber, label }, 'evidence:write');
    refuse({ ...planObstacles(plannedAt, now), ...(await protocolProblem(tx, row.id, plan.protocolAttachmentId)) });
    const planId = await insertPlan(tx, { itemId: item.id, ...plan, plannedAt, plannedById: actor.userId });
    if (planId === null) return;
    await logLine(tx, actor, row, { event: 'evidence.exam-planned', subject: 'planned_exams', subjectId: planId, summary: `An examination that may alter item ${code} is planned.`, after: { method: plan.method, ...written({ ...plan, plannedAt }) } });
  });
}

/** Moves a plan to another day, or changes its waiting time, parties or protocol. @throws DomainError `conflict` when somebody else changed it in between. */
export async function changePlan({ actor, caseNumber, label, change, plannedAt, now }: PlanCall & { readonly change: ChangePlan }): Promise<void> {
  return inTransaction(async (tx) => {
    const locked = await lockedItem(tx, { actor, caseNumber, label }, 'evidence:write');
    const plan = await standingPlan(tx, locked, change.planId);
    const { waitingDays, tellRoles, protocolAttachmentId } = change;
    const next = { plannedAt, waitingDays, tellRoles, protocolAttachmentId };
    if (JSON.stringify(written(next)) === JSON.stringify(written(plan))) return;
    if (plan.revision !== change.revision) throw new DomainError('conflict', 'Somebody changed this plan after you opened the page. What you typed is still below: open the page anew beside it and compare.');
    refuse({ ...(plannedAt.getTime() === plan.plannedAt.getTime() ? {} : planObstacles(plannedAt, now)), ...(await protocolProblem(tx, locked.row.id, protocolAttachmentId)) });
    await updatePlan(tx, plan.id, { ...next, revision: plan.revision + 1 });
    await logLine(tx, actor, locked.row, { event: 'evidence.exam-plan-changed', subject: 'planned_exams', subjectId: plan.id, summary: `The planned examination of item ${locked.code} was changed.`, before: written(plan), after: written(next) });
  });
}

/** Cancels a plan with a reason. The same form sent again changes nothing. */
export async function cancelPlan({ actor, caseNumber, label, cancel, now }: ItemCall & { readonly cancel: CancelPlan; readonly now: Date }): Promise<void> {
  return inTransaction(async (tx) => {
    const locked = await lockedItem(tx, { actor, caseNumber, label }, 'evidence:write');
    const known = await planOfItem(tx, { itemId: locked.item.id, planId: cancel.planId });
    if (known?.outcome === 'cancelled' && known.cancelReason === cancel.cancelReason) return;
    const plan = await standingPlan(tx, locked, cancel.planId);
    await updatePlan(tx, plan.id, { outcome: 'cancelled', cancelReason: cancel.cancelReason, settledAt: now, settledById: actor.userId });
    await logLine(tx, actor, locked.row, { event: 'evidence.exam-plan-cancelled', subject: 'planned_exams', subjectId: plan.id, summary: `The planned examination of item ${locked.code} was cancelled.`, reason: cancel.cancelReason, before: written(plan), after: { outcome: 'cancelled' } });
  });
}
