import { inTransaction } from '#db/client.server.ts';
import type { Transaction } from '#db/client.server.ts';
import { insertLogEntry } from '#db/queries/log.server.ts';
import { countSavedViews, deleteSavedView, insertSavedView, isNameTaken, renameSavedView } from '#db/queries/saved-views.server.ts';
import { DomainError, notFound } from '#app/domain/errors.ts';
import type { Actor } from '#app/domain/roles.ts';
import { mostSavedViews } from '#app/domain/saved-view.ts';
import type { SavedViewForm } from '#app/domain/saved-view.ts';

/**
 * Saves, renames or deletes a view of the person's own register.
 *
 * @throws DomainError `invalid-input` with a sentence on the name; `not-found` for a view of somebody else.
 */
export function changeSavedViews(request: { actor: Actor; change: SavedViewForm }): Promise<void> {
  const { actor, change } = request;
  return inTransaction(async (tx) => {
    switch (change.intent) {
      case 'save-view': {
        await refuseTaken(tx, actor, change.name, null);
        if ((await countSavedViews(tx, actor)) >= mostSavedViews) throw nameProblem(`You keep ${mostSavedViews} views already; delete one first.`);
        const id = await insertSavedView(tx, actor, { name: change.name, search: change.search });
        return writeLine(tx, actor, id, 'saved-view.made', 'View of the register saved.');
      }
      case 'rename-view': {
        await refuseTaken(tx, actor, change.name, change.id);
        if ((await renameSavedView(tx, actor, change.id, change.name)) === null) throw notFound('The view');
        return writeLine(tx, actor, change.id, 'saved-view.renamed', 'View of the register renamed.');
      }
      case 'delete-view':
        if ((await deleteSavedView(tx, actor, change.id)) === null) throw notFound('The view');
        return writeLine(tx, actor, change.id, 'saved-view.deleted', 'View of the register deleted.');
    }
  });
}

const nameProblem = (sentence: string) => new DomainError('invalid-input', 'The view was not saved.', { fieldErrors: { name: [sentence] } });

async function refuseTaken(tx: Transaction, actor: Actor, name: string, exceptId: string | null): Promise<void> {
  if (await isNameTaken(tx, actor, name, exceptId)) throw nameProblem(`You have a view named "${name}" already; choose another name, or delete that one first.`);
}

/** The name of a view is a person's own word and stays out of the log, which others read. */
function writeLine(tx: Transaction, actor: Actor, id: string, event: string, summary: string): Promise<void> {
  return insertLogEntry(tx, { actorId: actor.userId, actorName: actor.displayName, organisationId: actor.organisationId, caseId: null, event, subject: 'saved_views', subjectId: id, summary, reason: '' });
}
