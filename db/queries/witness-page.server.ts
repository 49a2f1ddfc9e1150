import type { DbOrTx } from '#db/client.server.ts';
import { listAttachments, readableClasses } from './attachments.server.ts';
import { findCase } from './case-subject.server.ts';
import { listPossibleWitnesses, listWitnessAccounts } from './witness-accounts.server.ts';
import type { InvolvementRow } from './witness-accounts.server.ts';
import { attachmentCode } from '#app/domain/attachment.ts';
import { DomainError } from '#app/domain/errors.ts';
import { formatDayClock } from '#app/domain/local-time.ts';
import { canOnCase, whoCan } from '#app/domain/permissions.ts';
import { whyClosed } from '#app/domain/why-closed.ts';
import type { Actor } from '#app/domain/roles.ts';
import { witnessesHeading, witnessNames, witnessRoleLabels } from '#app/domain/witness.ts';

const isChild = (person: InvolvementRow) => person.ageBand === 'under-16' || person.ageBand === '16-17';
const roleOf = (person: InvolvementRow) => Object.entries(witnessRoleLabels).find(([role]) => role === person.role)?.[1] ?? (person.role === 'injured' ? 'Injured person' : 'Reporter');

/**
 * Accounts of witnesses for those who may see personal fields; null when the case is not theirs to see. A child is named to
 * nobody here, since no name of one is kept.
 *
 * @throws DomainError `forbidden` for everybody else, the reporter of the case included.
 */
export async function getWitnessPage(db: DbOrTx, { actor, caseNumber }: { readonly actor: Actor; readonly caseNumber: number }) {
  const found = await findCase(db, actor, caseNumber);
  if (!found) return null;
  const { row, subject } = found;
  if (!canOnCase(actor, 'witness:read', subject)) throw new DomainError('forbidden', `The accounts of witnesses are not open to you. ${whoCan('witness:read')}`);
  const lines = await listWitnessAccounts(db, { actor, caseNumber });
  const names = witnessNames(lines.map(({ account }) => account.involvementId));
  const documents = await listAttachments(db, { actor, caseNumber, classes: readableClasses(actor, subject) });
  const people = await listPossibleWitnesses(db, row.id);
  const mayWrite = canOnCase(actor, 'witness:write', subject);
  const nameOf = (person: InvolvementRow) => (isChild(person) ? 'a child, no name kept' : (person.name ?? 'no name given'));
  return {
    caseNumber,
    zone: row.zone,
    heading: witnessesHeading(lines.map(({ account }) => account)),
    accounts: lines.map(({ account, person, takenBy }, index) => {
      const copy = documents.find((document) => document.id === account.signedAttachmentId);
      return {
        id: account.id,
        label: account.label,
        witness: names[index] ?? '',
        person: nameOf(person),
        role: roleOf(person),
        taken: `taken by ${takenBy}, ${formatDayClock(account.takenAt, row.zone)}`,
        speaksOf: account.speaksOfAt ? formatDayClock(account.speaksOfAt, row.zone) : null,
        language: account.language,
        words: account.words,
        readBack: account.readBack,
        signedCopy: copy ? { id: copy.id, words: `${attachmentCode(copy.label)} ${copy.title}` } : null,
      };
    }),
    people: mayWrite ? people.map((person) => ({ id: person.id, words: `${nameOf(person)}, ${roleOf(person).toLowerCase()}` })) : [],
    statements: mayWrite ? documents.filter((document) => document.class !== 'ordinary').map((document) => ({ id: document.id, words: `${attachmentCode(document.label)} ${document.title}` })) : [],
    mayWrite,
    whoWrites: whyClosed(actor, 'witness:write', subject),
  };
}
export type WitnessPage = NonNullable<Awaited<ReturnType<typeof getWitnessPage>>>;
