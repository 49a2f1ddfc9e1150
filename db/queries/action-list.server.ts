import type { DbOrTx } from '#db/client.server.ts';
import { listActions, listReturnDays } from './corrective-actions.server.ts';
import { actionRights, actionLine, inOrder } from '#app/domain/action-view.ts';
import type { ActionLine } from '#app/domain/action-view.ts';
import type { Actor } from '#app/domain/roles.ts';

export interface ListedLine extends ActionLine {
  /** May be re-dated, given to somebody else, or asked after by this reader. */
  readonly changeable: boolean;
  readonly nextReturnAt: Date | null;
}

/** Every action that the actor may read, with the returns of the sun on its mark, soonest return first. */
export async function listActionLines(db: DbOrTx, { actor, now }: { readonly actor: Actor; readonly now: Date }): Promise<ListedLine[]> {
  const records = await listActions(db, { actor });
  const returns = await listReturnDays(db, [...new Set(records.map((record) => record.caseId))]);
  const byCase = new Map<string, typeof returns>();
  for (const day of returns) byCase.set(day.caseId, [...(byCase.get(day.caseId) ?? []), day]);
  const extras = new Map(records.map((record) => [record.id, { changeable: actionRights(actor, record).change, nextReturnAt: (byCase.get(record.caseId) ?? []).find((day) => day.bestAt > now)?.bestAt ?? null }]));
  return inOrder(records.map((record) => actionLine(record, byCase.get(record.caseId) ?? [], now))).map((line) => ({ ...line, ...(extras.get(line.id) ?? { changeable: false, nextReturnAt: null }) }));
}
