import type { Transaction } from '#db/client.server.ts';
import { getPerson, listRoleHolders, reporterAddress } from '#db/queries/case-people.server.ts';
import type { CaseRow } from '#db/queries/case-subject.server.ts';
import { insertMail } from '#db/queries/outbox.server.ts';
import type { Move } from '#app/domain/case-state.ts';
import { formatDay } from '#app/domain/local-time.ts';
import type { Actor, Role } from '#app/domain/roles.ts';
import { assignedMail, closedMail, findingSentMail, findingSignedMail, noActionMail, reopenedMail, returnedMail } from '#app/mail/templates/case-moved.ts';

interface Message {
  readonly subject: string;
  readonly bodyText: string;
  readonly bodyHtml: string;
}

/** Mail that follows from a move, in its transaction. Nobody is told of what they did themselves. */
export async function mailMove(tx: Transaction, { move, row, actor }: { move: Move; row: CaseRow; actor: Actor; reason: string }): Promise<void> {
  const about = { caseNumber: row.number, receipt: row.receipt };
  const key = `case-${move.id}:${row.id}:${row.version}`;
  switch (move.id) {
    case 'accept':
      return mailAssigned(tx, { row, actor, key });
    case 'return':
      return mailReporter(tx, { row, actor, key }, returnedMail(about, row.answerDueAt ? formatDay(row.answerDueAt, row.zone) : 'soon'));
    case 'close':
    case 'close-no-action':
    case 'close-at-triage':
      return mailReporter(tx, { row, actor, key }, closedMail(about));
    case 'reopen-investigation':
    case 'reopen-action':
      return mailReporter(tx, { row, actor, key }, reopenedMail(about));
    case 'send-findings':
      return mailHolders(tx, { row, actor, key }, 'reviewer', findingSentMail(about));
    case 'sign':
      return mailHolders(tx, { row, actor, key }, 'manager', findingSignedMail(about));
    case 'sign-no-action':
      return mailHolders(tx, { row, actor, key }, 'manager', noActionMail(about));
    default:
      return;
  }
}

interface Occasion {
  readonly row: CaseRow;
  readonly actor: Actor;
  /** One message per occasion and recipient. */
  readonly key: string;
}

/** To the investigator of the case, unless they named themselves. */
export async function mailAssigned(tx: Transaction, { row, actor, key }: Occasion): Promise<void> {
  if (!row.assignedToId || row.assignedToId === actor.userId) return;
  const investigator = await getPerson(tx, row.assignedToId);
  if (investigator) await post(tx, { row, key }, investigator.email, assignedMail({ caseNumber: row.number, receipt: row.receipt }));
}

async function mailReporter(tx: Transaction, { row, actor, key }: Occasion, message: Message): Promise<void> {
  const address = await reporterAddress(tx, row.id);
  if (address && row.reporterId !== actor.userId) await post(tx, { row, key }, address, message);
}

async function mailHolders(tx: Transaction, { row, actor, key }: Occasion, role: Role, message: Message): Promise<void> {
  const people = await listRoleHolders(tx, { organisationId: row.organisationId, siteId: row.siteId, roles: [role] });
  for (const person of people) {
    if (person.userId !== actor.userId) await post(tx, { row, key }, person.email, message);
  }
}

function post(tx: Transaction, { row, key }: Pick<Occasion, 'row' | 'key'>, toAddress: string, message: Message): Promise<void> {
  return insertMail(tx, { dedupeKey: `${key}:${toAddress}`, toAddress, caseId: row.id, ...message });
}
