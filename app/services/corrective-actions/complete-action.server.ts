import { db } from '#db/client.server.ts';
import type { Transaction } from '#db/client.server.ts';
import { countProofs, findAction, insertProof } from '#db/queries/corrective-actions.server.ts';
import { listRecipients } from '#db/queries/recipients.server.ts';
import { actionSubject } from '#app/domain/action-subject.ts';
import { actionSteps } from '#app/domain/corrective-action.ts';
import { DomainError, notFound } from '#app/domain/errors.ts';
import type { CaseAction } from '#app/domain/permissions.ts';
import { actionDoneMail } from '#app/mail/templates/action-done.ts';
import { authorize } from '#app/services/authorize.ts';
import { storeProofs } from './proof-files.server.ts';
import type { StoredProof } from './proof-files.server.ts';
import { actionWords, changeAction, mailFacts, notify, refuseStep, workOnAction } from './work-on-action.server.ts';
import type { ActionTarget, LockedAction } from './work-on-action.server.ts';

/**
 * Marks a fix as done: a sentence, and at least one photo or document. The files are stored before the transaction, so
 * that what is acknowledged is stored; a refused form leaves objects that nothing points to.
 */
export async function completeAction(target: ActionTarget & { readonly note: string; readonly files: readonly File[] }): Promise<void> {
  const stored = await takeProofs(target, 'action:do', target.files);
  await workOnAction(target, 'action:do', async (tx, locked) => {
    refuseStep('mark-done', locked.action);
    await writeProofs(tx, locked, stored);
    if ((await countProofs(tx, locked.action.id)) === 0) {
      throw new DomainError('invalid-input', 'The proof is missing.', { fieldErrors: { files: ['Add a photo or a document that shows the fix.'] } });
    }
    await changeAction(
      tx,
      locked,
      { state: actionSteps['mark-done'].to, proof: target.note, doneAt: locked.now, doneById: locked.actor.userId },
      { event: 'action.done', summary: `${actionWords(locked.action)} marked done, with ${filesInWords(stored)}.` },
    );
    const verifier = await listRecipients(tx, { organisationId: locked.caseRow.organisationId, userIds: [locked.action.verifierId] });
    await notify(tx, locked, verifier, `action-done:${locked.action.id}:${locked.action.version}`, actionDoneMail(await mailFacts(tx, locked)));
  });
}

const filesInWords = (files: readonly StoredProof[]) => (files.length === 1 ? 'one file' : `${files.length} files`);

/** Refuses early what will be refused anyway, then takes the files in. */
export async function takeProofs(target: ActionTarget, permission: CaseAction, files: readonly File[]): Promise<StoredProof[]> {
  const found = await findAction(db, target.actor, target.actionId);
  if (!found) throw notFound('The action');
  authorize(target.actor, permission, actionSubject(found.caseRow, found.action, target.actor.userId));
  return storeProofs(target.actionId, files);
}

export async function writeProofs(tx: Transaction, { action, actor }: LockedAction, stored: readonly StoredProof[]): Promise<void> {
  for (const proof of stored) await insertProof(tx, { ...proof, correctiveActionId: action.id, uploadedById: actor.userId });
}
