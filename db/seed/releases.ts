import { demoEmail, demoOrganisations, demoPeople } from '#fixtures/demo/people.ts';
import type { DemoCase } from '#fixtures/demo/demo-case.ts';
import { db } from '#db/client.server.ts';
import { getActor } from '#db/queries/actors.server.ts';
import { readCaseBeforeRedaction } from '#db/queries/case-before-redaction.server.ts';
import { listCaseReleases, listRecipientOrganisations } from '#db/queries/releases.server.ts';
import { getAccountByEmail } from '#db/queries/users.server.ts';
import { linesToDecide, photoKey } from '#app/domain/lines-to-decide.ts';
import type { Decisions } from '#app/domain/redaction.ts';
import type { Actor } from '#app/domain/roles.ts';
import { releaseCaseFile } from '#app/services/releases/approve-release.server.ts';
import { prepareRelease } from '#app/services/releases/prepare-release.server.ts';

const yearMs = 365 * 86_400_000;
const insurerName = demoOrganisations.find((organisation) => organisation.key === 'harrowmere')?.name;

/**
 * Releases of the demonstration cases to their insurer, made through the same services as any other. Run again after it
 * was cut short, it goes on where it stopped; a case that has more than the one waiting release of its own is left alone,
 * and so is a database without the people of the demonstration.
 */
export async function seedReleases(demoCases: readonly DemoCase[]): Promise<void> {
  const preparer = await demoActor('maren');
  const approver = await demoActor('joss');
  if (!preparer || !approver) return;
  for (const demo of demoCases.filter((one) => one.released)) {
    const [first, ...others] = await listCaseReleases(db, { actor: approver, caseNumber: demo.number });
    if (others.length > 0 || (first && first.state !== 'prepared')) continue;
    const number = first?.number ?? (await prepareDemo(preparer, demo.number));
    if (number !== null) await releaseCaseFile({ actor: approver, caseNumber: demo.number, number });
  }
}

async function prepareDemo(actor: Actor, caseNumber: number): Promise<number | null> {
  const found = await readCaseBeforeRedaction(db, { actor, caseNumber });
  if (!found) return null;
  const insurers = await listRecipientOrganisations(db, { organisationId: found.organisationId, audience: 'insurer' });
  const recipient = insurers.find((organisation) => organisation.name === insurerName);
  if (!recipient) return null;
  const keys = [...linesToDecide(found.source, 'insurer').map((line) => line.key), ...found.source.photos.map((photo) => photoKey(photo))];
  const decisions: Decisions = Object.fromEntries(keys.map((key) => [key, 'share' as const]));
  return prepareRelease({
    actor,
    caseNumber,
    audience: 'insurer',
    recipientOrganisationId: recipient.id,
    changeNote: 'First release',
    expires: { at: new Date(Date.now() + yearMs) },
    decisions,
    basis: null,
  });
}

async function demoActor(key: string): Promise<Actor | null> {
  const person = demoPeople.find((one) => one.key === key);
  const account = person ? await getAccountByEmail(db, demoEmail(person)) : null;
  return account ? getActor(db, account.id) : null;
}
