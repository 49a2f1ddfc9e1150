import type { Transaction } from '#db/client.server.ts';
import { getPerson, listRoleHolders, reporterAddress } from '#db/queries/case-people.server.ts';
import type { CaseRow } from '#db/queries/case-subject.server.ts';
import { insertMail } from '#db/queries/outbox.server.ts';
import type { Move } from '#app/domain/case-state.ts';
import { isHarmless, mailHoldSeconds } from '#app/domain/move-undo.ts';
import { formatDay } from '#app/domain/local-time.ts';
import type { Actor, Role } from '#app/domain/roles.ts';
import { assignedMail, closedMail, findingSentMail, findingSignedMail, noActionMail, reopenedMail, returnedMail } from '#app/mail/templates/case-moved.ts';

interface Message {
  readonly subject: string;
  readonly bodyText: string;
  readonly bodyHtml: string;
}

/** Start of the key of every message about one move; `version` is that of the case after it. */
export const moveMailKey = (moveId: string, caseId: string, version: number): string => `case-${moveId}:${caseId}:${version}`;

/**
 * Mail that follows from a move, in its transaction. Nobody is told of what they did themselves. Where the move may be
 * taken back, the mail waits until it no longer may.
 */
export async function mailMove(tx: Transaction, { move, row, actor }: { move: Move; row: CaseRow; actor: Actor; reason: string }): Promise<void> {
  const about = { caseNumber: row.number, receipt: row.receipt };
  const occasion = { row, actor, key: moveMailKey(move.id, row.id, row.version), heldForS: isHarmless(move.id) ? mailHoldSeconds : 0 };
  switch (move.id) {
    case 'accept':
      return mailAssigned(tx, occasion);
    case 'return':
      return mailReporter(tx, occasion, returnedMail(about, row.answerDueAt ? formatDay(row.answerDueAt, row.zone) : 'soon'));
    case 'close':
    case 'close-no-action':
    case 'close-at-triage':
      return mailReporter(tx, occasion, closedMail(about));
    case 'reopen-investigation':
    case 'reopen-action':
      return mailReporter(tx, occasion, reopenedMail(about));
    case 'send-findings':
      return mailHolders(tx, occasion, 'reviewer', findingSentMail(about));
    case 'sign':
      return mailHolders(tx, occasion, 'manager', findingSignedMail(about));
    case 'sign-no-action':
      return mailHolders(tx, occasion, 'manager', noActionMail(about));
    default:
      return;
  }
}

interface Occasion {
  readonly row: CaseRow;
  readonly actor: Actor;
  /** One message per occasion and recipient. */
  readonly key: string;
  /** Seconds for which the message waits. */
  readonly heldForS?: number;
}

/** To the investigator of the case, unless they named themselves. */
export async function mailAssigned(tx: Transaction, occasion: Occasion): Promise<void> {
  const { row, actor } = occasion;
  if (!row.assignedToId || row.assignedToId === actor.userId) return;
  const investigator = await getPerson(tx, row.assignedToId);
  if (investigator) await post(tx, occasion, investigator.email, assignedMail({ caseNumber: row.number, receipt: row.receipt }));
}

async function mailReporter(tx: Transaction, occasion: Occasion, message: Message): Promise<void> {
  const address = await reporterAddress(tx, occasion.row.id);
  if (address && occasion.row.reporterId !== occasion.actor.userId) await post(tx, occasion, address, message);
}

async function mailHolders(tx: Transaction, occasion: Occasion, role: Role, message: Message): Promise<void> {
  const { row, actor } = occasion;
  const people = await listRoleHolders(tx, { organisationId: row.organisationId, siteId: row.siteId, roles: [role] });
  for (const person of people) {
    if (person.userId !== actor.userId) await post(tx, occasion, person.email, message);
  }
}

function post(tx: Transaction, { row, key, heldForS = 0 }: Occasion, toAddress: string, message: Message): Promise<void> {
  return insertMail(tx, { dedupeKey: `${key}:${toAddress}`, toAddress, caseId: row.id, heldForS, ...message });
}
