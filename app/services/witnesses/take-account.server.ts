import { inTransaction } from '#db/client.server.ts';
import type { Transaction } from '#db/client.server.ts';
import { getAttachmentOfCase } from '#db/queries/attachments.server.ts';
import { lockCase } from '#db/queries/case-subject.server.ts';
import { findAccountByClientId, getAccountOfCase, insertAccount, insertInvolvement, listPossibleWitnesses, nextAccountLabel, updateSignedCopy } from '#db/queries/witness-accounts.server.ts';
import { attachmentCode } from '#app/domain/attachment.ts';
import { DomainError, notFound } from '#app/domain/errors.ts';
import type { Actor } from '#app/domain/roles.ts';
import type { TakeAccount } from '#app/domain/witness.ts';
import { authorize } from '#app/services/authorize.ts';
import { logLine } from '#app/services/log-line.server.ts';

export interface TakeAccountRequest {
  readonly actor: Actor;
  readonly caseNumber: number;
  readonly account: TakeAccount;
  readonly takenAt: Date;
  readonly speaksOfAt: Date | null;
  readonly now: Date;
}

/**
 * Keeps what a witness said, in their words, with the person apart from it. The log says that an account was taken and
 * neither by whom it was given nor what it says. The same form sent again gives the same account.
 *
 * @throws DomainError `not-found`, `forbidden`, or `invalid-input` beside the field.
 */
export async function takeAccount({ actor, caseNumber, account, takenAt, speaksOfAt, now }: TakeAccountRequest): Promise<{ label: number }> {
  return inTransaction(async (tx) => {
    const found = await lockCase(tx, actor, caseNumber);
    if (!found) throw notFound('The case');
    authorize(actor, 'witness:write', found.subject);
    const caseId = found.row.id;
    const earlier = await findAccountByClientId(tx, { caseId, clientId: account.clientId });
    if (earlier) return { label: earlier.label };
    const fieldErrors = {
      ...(takenAt.getTime() > now.getTime() ? { takenAt: ['This is still to come. Check the day and the time.'] } : {}),
      ...(speaksOfAt && speaksOfAt.getTime() > takenAt.getTime() ? { speaksOfAt: ['The account speaks of a time after it was taken. Check both.'] } : {}),
      ...(await signedCopyErrors(tx, caseId, account.signedAttachmentId)),
    };
    if (Object.keys(fieldErrors).length > 0) throw new DomainError('invalid-input', 'The account was not kept yet.', { fieldErrors });
    const involvementId = account.involvementId === null ? await newPerson(tx, caseId, account) : await knownPerson(tx, caseId, account.involvementId);
    const label = await nextAccountLabel(tx, caseId);
    const { clientId, language, words, readBack, signedAttachmentId } = account;
    const accountId = await insertAccount(tx, { caseId, clientId, label, involvementId, takenById: actor.userId, takenAt, language, words, readBack, speaksOfAt, signedAttachmentId });
    await logLine(tx, actor, found.row, {
      event: 'witness.account-taken',
      subject: 'witness_accounts',
      subjectId: accountId,
      summary: `Account ${label} of a witness taken${readBack ? ' and read back' : ''}.`,
      after: { label, language, readBack, takenAt: takenAt.toISOString(), signedAttachmentId },
    });
    return { label };
  });
}

function newPerson(tx: Transaction, caseId: string, { personName, personRole, ageBand }: TakeAccount): Promise<string> {
  return insertInvolvement(tx, { caseId, role: personRole, name: personName === '' ? null : personName, ageBand });
}

async function knownPerson(tx: Transaction, caseId: string, involvementId: string): Promise<string> {
  const people = await listPossibleWitnesses(tx, caseId);
  if (!people.some((person) => person.id === involvementId)) throw new DomainError('invalid-input', 'The account was not kept yet.', { fieldErrors: { involvementId: ['Choose one of the people of this case, or name a new one.'] } });
  return involvementId;
}

async function signedCopyErrors(tx: Transaction, caseId: string, attachmentId: string | null): Promise<Record<string, string[]>> {
  if (attachmentId === null) return {};
  const copy = await getAttachmentOfCase(tx, { caseId, attachmentId });
  if (!copy) return { signedAttachmentId: ['Choose one of the documents of this case.'] };
  if (copy.class === 'ordinary') return { signedAttachmentId: [`Document ${attachmentCode(copy.label)} is kept as ordinary, and a signed statement names a person. Add the copy again as a personal document.`] };
  return {};
}

/** Adds the signed copy of an account once it has come in. */
export async function addSignedCopy({ actor, caseNumber, accountId, signedAttachmentId }: { readonly actor: Actor; readonly caseNumber: number; readonly accountId: string; readonly signedAttachmentId: string }): Promise<void> {
  return inTransaction(async (tx) => {
    const found = await lockCase(tx, actor, caseNumber);
    if (!found) throw notFound('The case');
    authorize(actor, 'witness:write', found.subject);
    const account = await getAccountOfCase(tx, { caseId: found.row.id, accountId });
    if (!account) throw notFound('The account');
    const fieldErrors = await signedCopyErrors(tx, found.row.id, signedAttachmentId);
    if (Object.keys(fieldErrors).length > 0) throw new DomainError('invalid-input', 'The signed copy was not added.', { fieldErrors });
    if (account.signedAttachmentId === signedAttachmentId) return;
    await updateSignedCopy(tx, account.id, signedAttachmentId);
    await logLine(tx, actor, found.row, {
      event: 'witness.signed-copy-added',
      subject: 'witness_accounts',
      subjectId: account.id,
      summary: `Signed copy of account ${account.label} added.`,
      before: { signedAttachmentId: account.signedAttachmentId },
      after: { signedAttachmentId },
    });
  });
}
