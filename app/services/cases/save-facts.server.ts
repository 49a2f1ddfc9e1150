import { inTransaction } from '#db/client.server.ts';
import type { CaseRow } from '#db/queries/case-subject.server.ts';
import { lockCase } from '#db/queries/case-subject.server.ts';
import { updateCase } from '#db/queries/cases.server.ts';
import { insertLogEntry } from '#db/queries/log.server.ts';
import type { CaseFacts, CaseFactsForm } from '#app/domain/case-facts.ts';
import { readCaseFacts } from '#app/domain/case-facts.ts';
import { DomainError, notFound } from '#app/domain/errors.ts';
import type { Actor } from '#app/domain/roles.ts';
import { authorize } from '#app/services/authorize.ts';
import { refuseStaleVersion } from './case-version.server.ts';

export interface SaveFactsRequest {
  readonly actor: Actor;
  readonly caseNumber: number;
  readonly version: number;
  readonly form: CaseFactsForm;
}

/**
 * Writes the facts of a case as the investigator has them, and logs which changed from what to what.
 *
 * @throws DomainError `invalid-input` with a sentence per field; `conflict`, `forbidden`, `not-found`.
 */
export async function saveFacts(request: SaveFactsRequest): Promise<void> {
  await inTransaction(async (tx) => {
    const { actor } = request;
    const found = await lockCase(tx, actor, request.caseNumber);
    if (!found) throw notFound('The case');
    await refuseStaleVersion(tx, actor, found, request.version);
    authorize(actor, 'case:edit-facts', found.subject);
    const { row } = found;
    const now = new Date();
    const foundIsClockTime = row.foundPrecision !== 'date-only' && row.foundPrecision !== 'unknown';
    const reading = readCaseFacts(request.form, { zone: row.zone, now, foundAt: row.foundAt, foundIsClockTime });
    if (!reading.ok) throw new DomainError('invalid-input', 'Some facts cannot be saved as they stand.', { fieldErrors: reading.fieldErrors });
    const changes = changedFacts(row, reading.facts);
    if (changes.names.length === 0) return;
    refuseGapsUnderInvestigation(row, reading.facts);
    const interimControlAt = reading.facts.interimControl !== row.interimControl ? (reading.facts.interimControl ? now : null) : row.interimControlAt;
    await updateCase(tx, row.id, { ...reading.facts, interimControlAt });
    await insertLogEntry(tx, {
      actorId: actor.userId,
      actorName: actor.displayName,
      organisationId: row.organisationId,
      caseId: row.id,
      event: 'case.facts-changed',
      subject: 'cases',
      subjectId: row.id,
      summary: `Facts changed: ${changes.names.join(', ')}.`,
      before: changes.before,
      after: changes.after,
    });
  });
}

/** The table demands these of a case under investigation; the sentence comes before the table refuses. */
function refuseGapsUnderInvestigation(row: CaseRow, facts: CaseFacts): void {
  if (row.state !== 'investigation') return;
  const fieldErrors: Record<string, string[]> = {};
  if (!facts.eventType) fieldErrors['eventType'] = ['A case under investigation keeps its kind of event.'];
  if (!facts.risk) fieldErrors['risk'] = ['A case under investigation keeps its risk.'];
  if (Object.keys(fieldErrors).length > 0) throw new DomainError('invalid-input', 'Some facts cannot be taken away now.', { fieldErrors });
}

const names: Record<keyof CaseFacts, string> = {
  title: 'title',
  eventType: 'kind of event',
  hazardStillPresent: 'hazard',
  interimControl: 'interim control',
  interimControlEnds: 'end of the interim control',
  onsetEarliestAt: 'last seen sound',
  onsetLatestAt: 'latest possible onset',
  onsetBasis: 'basis of the window',
  extent: 'extent',
  weatherSeen: 'weather seen',
  foundByMeans: 'how it was found',
  foundClockErrorS: 'clock error',
  potentialConsequence: 'consequence',
  likelihood: 'likelihood',
  risk: 'risk',
  riskBasis: 'basis of the risk',
};

function changedFacts(row: CaseRow, facts: CaseFacts) {
  const before: Record<string, unknown> = {};
  const after: Record<string, unknown> = {};
  const changed: string[] = [];
  for (const [key, name] of Object.entries(names)) {
    const field = asFactField(key);
    const [old, fresh] = [comparable(row[field]), comparable(facts[field])];
    if (old === fresh) continue;
    before[key] = old;
    after[key] = fresh;
    changed.push(name);
  }
  return { names: changed, before, after };
}

function asFactField(key: string): keyof CaseFacts {
  if (!isFactField(key)) throw new Error(`${key} is not a fact of a case.`);
  return key;
}
const isFactField = (key: string): key is keyof CaseFacts => key in names;
const comparable = (value: unknown) => (value instanceof Date ? value.toISOString() : value);
