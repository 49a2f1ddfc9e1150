import { inTransaction } from '#db/client.server.ts';
import type { Transaction } from '#db/client.server.ts';
import { lockCase } from '#db/queries/case-subject.server.ts';
import type { CaseRow } from '#db/queries/case-subject.server.ts';
import { insertFindingDraft, listFindingRows, updateFindingDraft } from '#db/queries/findings.server.ts';
import type { FindingRow } from '#db/queries/findings.server.ts';
import { listHypothesesOfCase } from '#db/queries/hypotheses.server.ts';
import { insertLogEntry } from '#db/queries/log.server.ts';
import { DomainError, notFound } from '#app/domain/errors.ts';
import { certaintyFacts, selectionObstacles } from '#app/domain/finding-form.ts';
import type { FindingDraft } from '#app/domain/finding-form.ts';
import { certaintyObstacles } from '#app/domain/finding.ts';
import type { Actor } from '#app/domain/roles.ts';
import { authorize } from '#app/services/authorize.ts';

export interface SaveFinding {
  readonly actor: Actor;
  readonly caseNumber: number;
  /** `updatedAt` of the draft that was open on the page; null when there was none. */
  readonly openedAt: Date | null;
  readonly draft: FindingDraft;
}

/**
 * Keeps the draft of a finding. A person writes in their own version only: after a signed or returned version, or beside
 * the draft of a colleague, a new version in their name begins.
 *
 * @throws DomainError `invalid-input` when the certainty does not go with the tests, beside the field.
 */
export async function saveFinding({ actor, caseNumber, openedAt, draft }: SaveFinding): Promise<{ findingId: string; version: number }> {
  return inTransaction(async (tx) => {
    const found = await lockCase(tx, actor, caseNumber);
    if (!found) throw notFound('The case');
    authorize(actor, 'finding:write', found.subject);
    await refuseCertainty(tx, found.row, draft);
    const [latest] = await listFindingRows(tx, found.row.id);
    const own = latest?.state === 'draft' && latest.authorId === actor.userId ? latest : null;
    refuseStale(own, openedAt);
    return own ? changeDraft(tx, found.row, own, actor, draft) : addVersion(tx, found.row, latest ?? null, actor, draft);
  });
}

async function refuseCertainty(tx: Transaction, row: CaseRow, draft: FindingDraft): Promise<void> {
  const hypotheses = await listHypothesesOfCase(tx, row.id);
  const selected = hypotheses.find((hypothesis) => hypothesis.id === draft.selectedHypothesisId) ?? null;
  if (draft.selectedHypothesisId !== null && !selected) {
    throw new DomainError('invalid-input', 'The hypothesis is not one of this case.', { fieldErrors: { selectedHypothesisId: ['Choose one of the hypotheses listed, or none.'] } });
  }
  const certainty = certaintyObstacles(draft.certainty, certaintyFacts(hypotheses, draft.selectedHypothesisId));
  const selection = selectionObstacles(draft.certainty, selected);
  if (certainty.length + selection.length > 0) {
    throw new DomainError('invalid-input', 'The certainty does not go with what is recorded.', {
      fieldErrors: { ...(certainty.length > 0 ? { certainty } : {}), ...(selection.length > 0 ? { selectedHypothesisId: selection } : {}) },
    });
  }
}

function refuseStale(own: FindingRow | null, openedAt: Date | null): void {
  if (own && own.updatedAt.getTime() !== openedAt?.getTime()) {
    throw new DomainError('conflict', 'This draft was saved from another window after you opened it. What you typed is still below: open the page anew beside it, and put the two together.');
  }
}

async function changeDraft(tx: Transaction, row: CaseRow, own: FindingRow, actor: Actor, draft: FindingDraft) {
  await updateFindingDraft(tx, own.id, draft);
  await insertLogEntry(tx, {
    ...line(row, actor, own.id),
    event: 'finding.draft-saved',
    summary: `Draft of finding version ${own.version} saved.`,
    before: loggable(own),
    after: loggable(draft),
  });
  return { findingId: own.id, version: own.version };
}

async function addVersion(tx: Transaction, row: CaseRow, latest: FindingRow | null, actor: Actor, draft: FindingDraft) {
  const version = (latest?.version ?? 0) + 1;
  const findingId = await insertFindingDraft(tx, { ...draft, caseId: row.id, version, authorId: actor.userId });
  await insertLogEntry(tx, { ...line(row, actor, findingId), event: 'finding.draft-begun', summary: `Draft of finding version ${version} begun.`, after: loggable(draft) });
  return { findingId, version };
}

const line = (row: CaseRow, actor: Actor, findingId: string) => ({
  actorId: actor.userId,
  actorName: actor.displayName,
  organisationId: row.organisationId,
  caseId: row.id,
  subject: 'findings',
  subjectId: findingId,
});

function loggable(finding: FindingDraft): Record<string, unknown> {
  const { opinion, selectedHypothesisId, certainty, classification, immediateCauses, underlyingCauses, rootCauses, limits } = finding;
  return { opinion, selectedHypothesisId, certainty, classification, immediateCauses, underlyingCauses, rootCauses, limits };
}
