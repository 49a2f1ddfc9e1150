import { inTransaction } from '#db/client.server.ts';
import type { Transaction } from '#db/client.server.ts';
import type { Person } from '#db/queries/case-people.server.ts';
import { lockCase } from '#db/queries/case-subject.server.ts';
import { findAction, insertAction } from '#db/queries/corrective-actions.server.ts';
import { insertLogEntry } from '#db/queries/log.server.ts';
import { listRecipients } from '#db/queries/recipients.server.ts';
import { defaultDueOn } from '#app/domain/action-form.ts';
import type { ActionDraft } from '#app/domain/action-form.ts';
import { DomainError, notFound } from '#app/domain/errors.ts';
import { formatIsoDay, localDay } from '#app/domain/local-time.ts';
import type { Actor } from '#app/domain/roles.ts';
import { actionGivenMail, actionToVerifyLaterMail } from '#app/mail/templates/action-given.ts';
import { authorize } from '#app/services/authorize.ts';
import { actionWords, mailFacts, notify } from './work-on-action.server.ts';

/**
 * Gives a fix to somebody, with somebody else to verify it. Without a day the default of its risk holds.
 *
 * @throws DomainError `invalid-input` beside the field.
 */
export async function addAction({ actor, caseNumber, draft }: { readonly actor: Actor; readonly caseNumber: number; readonly draft: ActionDraft }): Promise<{ actionId: string; number: number }> {
  return inTransaction(async (tx) => {
    const found = await lockCase(tx, actor, caseNumber);
    if (!found) throw notFound('The case');
    authorize(actor, 'action:write', found.subject);
    const now = new Date();
    const today = localDay(now, found.row.zone);
    if (draft.dueOn !== null) refusePast(draft.dueOn, today);
    const { owner, verifier } = await ownerAndVerifier(tx, actor, draft);
    const dueOn = draft.dueOn ?? defaultDueOn(today, draft.risk);
    const { id, number } = await insertAction(tx, { ...draft, dueOn, caseId: found.row.id, createdById: actor.userId });
    await insertLogEntry(tx, {
      actorId: actor.userId,
      actorName: actor.displayName,
      organisationId: found.row.organisationId,
      caseId: found.row.id,
      event: 'action.given',
      subject: 'corrective_actions',
      subjectId: id,
      summary: `${actionWords({ number, title: draft.title })} given to ${owner.displayName}, to be verified by ${verifier.displayName}, due ${formatIsoDay(dueOn)}.`,
      after: { ...draft, dueOn },
    });
    const written = await findAction(tx, actor, id);
    if (written) {
      const facts = await mailFacts(tx, { ...written, now });
      await notify(tx, { actor, caseRow: written.caseRow }, [owner], `action-given:${id}:1`, actionGivenMail(facts));
      await notify(tx, { actor, caseRow: written.caseRow }, [verifier], `action-to-verify:${id}:1`, actionToVerifyLaterMail(facts));
    }
    return { actionId: id, number };
  });
}

export function refusePast(dueOn: string, today: string): void {
  if (dueOn >= today) return;
  throw new DomainError('invalid-input', 'The day has passed.', { fieldErrors: { dueOn: [`${formatIsoDay(dueOn)} has passed; choose ${formatIsoDay(today)} or later.`] } });
}

/** Both people, if they are two, and of the actor's organisation. */
export async function ownerAndVerifier(tx: Transaction, actor: Actor, ids: { readonly ownerId: string; readonly verifierId: string }): Promise<{ owner: Person; verifier: Person }> {
  if (ids.ownerId === ids.verifierId) {
    throw new DomainError('invalid-input', 'Owner and verifier are the same person.', { fieldErrors: { verifierId: ['Choose somebody else to verify: nobody verifies their own fix.'] } });
  }
  const people = await listRecipients(tx, { organisationId: actor.organisationId, userIds: [ids.ownerId, ids.verifierId] });
  const pick = (userId: string, field: string) => {
    const person = people.find((candidate) => candidate.userId === userId);
    if (!person) throw new DomainError('invalid-input', 'One of the people is not in your organisation.', { fieldErrors: { [field]: ['Choose a person from the list.'] } });
    return person;
  };
  return { owner: pick(ids.ownerId, 'ownerId'), verifier: pick(ids.verifierId, 'verifierId') };
}
