import { inTransaction } from '#db/client.server.ts';
import type { Transaction } from '#db/client.server.ts';
import { lockCase } from '#db/queries/case-subject.server.ts';
import { insertHypothesis, listHypothesesOfCase, updateHypothesis } from '#db/queries/hypotheses.server.ts';
import type { HypothesisView } from '#db/queries/hypotheses.server.ts';
import { insertLogEntry } from '#db/queries/log.server.ts';
import { listRecipients } from '#db/queries/recipients.server.ts';
import { DomainError, notFound } from '#app/domain/errors.ts';
import { resultObstacles } from '#app/domain/hypothesis-form.ts';
import type { HypothesisDraft } from '#app/domain/hypothesis-form.ts';
import { hypothesisKindLabels } from '#app/domain/hypothesis.ts';
import type { Actor } from '#app/domain/roles.ts';
import { authorize } from '#app/services/authorize.ts';

export interface SaveHypothesis {
  readonly actor: Actor;
  readonly caseNumber: number;
  /** Null for a new one. */
  readonly hypothesisId: string | null;
  /** `updatedAt` of the one that was opened for editing; null for a new one. */
  readonly openedAt: Date | null;
  readonly draft: HypothesisDraft;
}

/**
 * Records an idea of what happened, or changes one.
 *
 * @throws DomainError `invalid-input` beside the field; `conflict` when somebody saved it in between.
 */
export async function saveHypothesis(request: SaveHypothesis): Promise<{ hypothesisId: string }> {
  return inTransaction(async (tx) => {
    const { actor, draft } = request;
    const found = await lockCase(tx, actor, request.caseNumber);
    if (!found) throw notFound('The case');
    authorize(actor, 'hypothesis:write', found.subject);
    const all = await listHypothesesOfCase(tx, found.row.id);
    const before = request.hypothesisId === null ? null : (all.find((hypothesis) => hypothesis.id === request.hypothesisId) ?? null);
    if (request.hypothesisId !== null && !before) throw notFound('The hypothesis');
    if (before && before.updatedAt.getTime() !== request.openedAt?.getTime()) {
      throw new DomainError('conflict', 'Somebody saved this hypothesis after you opened it. Yours is still below: open the page anew beside it, and put the two together.');
    }
    refuseSecondSunlight(all, before, draft);
    const obstacles = resultObstacles(draft.result, draft);
    if (obstacles.length > 0) throw new DomainError('invalid-input', 'The result does not go with the tests yet.', { fieldErrors: { result: obstacles } });
    await refuseStranger(tx, actor, draft.testedById);
    const hypothesisId = before ? before.id : await insertHypothesis(tx, found.row.id, draft);
    if (before) await updateHypothesis(tx, { caseId: found.row.id, hypothesisId }, draft);
    await insertLogEntry(tx, {
      actorId: actor.userId,
      actorName: actor.displayName,
      organisationId: found.row.organisationId,
      caseId: found.row.id,
      event: before ? 'hypothesis.changed' : 'hypothesis.added',
      subject: 'hypotheses',
      subjectId: hypothesisId,
      summary: `Hypothesis "${hypothesisKindLabels[draft.kind]}" ${before ? 'changed' : 'added'}.`,
      ...(before ? { before: loggable(before) } : {}),
      after: loggable(draft),
    });
    return { hypothesisId };
  });
}

function loggable(hypothesis: HypothesisDraft | HypothesisView): Record<string, unknown> {
  const { kind, statement, predicts, evidenceFor, evidenceAgainst, tests, result, testedById } = hypothesis;
  return { kind, statement, predicts, evidenceFor, evidenceAgainst, tests, result, testedById };
}

function refuseSecondSunlight(all: readonly HypothesisView[], before: HypothesisView | null, draft: HypothesisDraft): void {
  if (draft.kind !== 'focused-sunlight') return;
  if (all.some((other) => other.kind === 'focused-sunlight' && other.id !== before?.id)) {
    throw new DomainError('invalid-input', 'The case already has its focused-sunlight hypothesis.', { fieldErrors: { kind: ['Focused sunlight is already on the list: change that one, or choose another kind.'] } });
  }
}

async function refuseStranger(tx: Transaction, actor: Actor, testedById: string | null): Promise<void> {
  if (testedById === null) return;
  const [person] = await listRecipients(tx, { organisationId: actor.organisationId, userIds: [testedById] });
  if (!person) throw new DomainError('invalid-input', 'The person named is not in your organisation.', { fieldErrors: { testedById: ['Choose a person from the list.'] } });
}
