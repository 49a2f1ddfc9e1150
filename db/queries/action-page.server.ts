import type { DbOrTx } from '#db/client.server.ts';
import { findCase } from './case-subject.server.ts';
import { listActionHistory, listActions, listProofs, listReturnDays } from './corrective-actions.server.ts';
import type { ActionRecord, ReturnDay } from './corrective-actions.server.ts';
import { listColleagues } from './recipients.server.ts';
import { defaultDueOn } from '#app/domain/action-form.ts';
import { actionGroups, actionsHeading, groupOf } from '#app/domain/action-list.ts';
import { actionLine, actionRights, actionStory, inOrder, returnSpans } from '#app/domain/action-view.ts';
import type { ActionLine, ActionRights } from '#app/domain/action-view.ts';
import { effectivenessCheckOn } from '#app/domain/corrective-action.ts';
import { formatDayClock, formatIsoDay, localDay } from '#app/domain/local-time.ts';
import { canOnCase, whoCan } from '#app/domain/permissions.ts';
import type { Actor } from '#app/domain/roles.ts';

export interface ActionCard {
  readonly line: ActionLine;
  readonly rights: ActionRights;
  readonly why: string;
  readonly cost: string | null;
  readonly ownerId: string;
  readonly verifierId: string;
  readonly story: readonly { readonly term: string; readonly value: string; readonly note: string }[];
  readonly checkWords: { readonly day: string; readonly note: string } | null;
  /** Day on which the effect would be looked at if it were verified today. */
  readonly proposedCheckOn: string | null;
  /** First return that is still to come before the effect can be seen, in words. */
  readonly tooEarlyUntil: string | null;
  readonly files: readonly { readonly id: string; readonly name: string; readonly note: string }[];
  readonly history: readonly { readonly at: string; readonly who: string; readonly summary: string; readonly reason: string }[];
}

/** Actions of one case as this reader may see them; null when the case is not theirs to see. */
export async function getCaseActions(db: DbOrTx, { actor, caseNumber, now }: { readonly actor: Actor; readonly caseNumber: number; readonly now: Date }) {
  const found = await findCase(db, actor, caseNumber);
  if (!found) return null;
  const { row } = found;
  const records = await listActions(db, { actor, caseNumber });
  // Owning one action opens that action, not the list; only a role does.
  const readsAll = canOnCase(actor, 'action:read', { ...found.subject, relations: [] });
  if (!readsAll && records.length === 0) return { allowed: false as const, whoCan: whoCan('action:read') };
  const returns = await listReturnDays(db, [row.id]);
  const proofs = await listProofs(db, { actor, caseNumber });
  const history = await listActionHistory(db, records.map((record) => record.id));
  const today = localDay(now, row.zone);
  const cards = records.map((record) => card(actor, record, returns, now, { proofs, history }));
  const mayAdd = canOnCase(actor, 'action:write', found.subject);
  return {
    allowed: true as const,
    heading: actionsHeading(cards.map((one) => one.line)),
    onlyOwn: !readsAll,
    zone: row.zone,
    todayOn: today,
    returns: returnSpans(returns.map((day) => day.onDay)),
    upcoming: returns.filter((day) => day.bestAt > now).slice(0, 4).map((day) => `${formatDayClock(day.bestAt, row.zone)}, ${day.minutes} min`),
    interimControl: row.interimControl ? { words: row.interimControl, ends: row.interimControlEnds } : null,
    cards: actionGroups.flatMap((group) => inOrder(cards.map((one) => one.line).filter((line) => groupOf(line) === group)).flatMap((line) => cards.filter((one) => one.line.id === line.id))),
    mayAdd,
    addClosed: mayAdd ? null : whoCan('action:write'),
    people: mayAdd ? await listColleagues(db, actor.organisationId) : [],
    defaults: { low: defaultDueOn(today, 'low'), medium: defaultDueOn(today, 'medium'), high: defaultDueOn(today, 'high'), severe: defaultDueOn(today, 'severe') },
    defaultRisk: row.risk ?? ('medium' as const),
  };
}

interface Attached {
  readonly proofs: Awaited<ReturnType<typeof listProofs>>;
  readonly history: Awaited<ReturnType<typeof listActionHistory>>;
}

function card(actor: Actor, record: ActionRecord, returns: readonly ReturnDay[], now: Date, { proofs, history }: Attached): ActionCard {
  const { zone } = record;
  const today = localDay(now, zone);
  const days = returns.map((day) => day.onDay);
  const firstOn = record.verifiedAt ? effectivenessCheckOn(localDay(record.verifiedAt, zone), days) : null;
  return {
    line: actionLine(record, returns, now),
    rights: actionRights(actor, record),
    why: record.why,
    cost: record.cost === null ? null : `${record.cost.toLocaleString('en-GB')} ${record.costCurrency ?? ''}`.trim(),
    ownerId: record.ownerId,
    verifierId: record.verifierId,
    story: actionStory(record),
    checkWords: record.effectCheckOn ? { day: formatIsoDay(record.effectCheckOn), note: record.state === 'verified' && record.effectCheckOn < today ? 'past, and nothing recorded yet' : '' } : null,
    proposedCheckOn: effectivenessCheckOn(today, days),
    tooEarlyUntil: firstOn !== null && today < firstOn ? formatIsoDay(firstOn) : null,
    files: proofs.filter((proof) => proof.actionId === record.id).map((proof) => ({ id: proof.id, name: proof.fileName, note: `${sizeWords(proof.bytes)}, ${formatDayClock(proof.createdAt, zone)}, SHA-256 ${proof.sha256.slice(0, 12)}` })),
    history: history.filter((line) => line.actionId === record.id).map((line) => ({ at: formatDayClock(line.at, zone), who: line.actorName, summary: line.summary, reason: line.reason })),
  };
}

const sizeWords = (bytes: number) => (bytes < 1_000_000 ? `${Math.max(1, Math.round(bytes / 1_000))} kB` : `${(bytes / 1_000_000).toFixed(1)} MB`);
