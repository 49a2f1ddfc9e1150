import { and, asc, count, desc, eq, inArray, or, sql } from 'drizzle-orm';
import type { SQL } from 'drizzle-orm';
import type { AnyPgColumn } from 'drizzle-orm/pg-core';
import type { DbOrTx, Transaction } from '#db/client.server.ts';
import { actionProofs, cases, correctiveActions, logEntries, sites, sunReturns, users } from '#db/schema/all.ts';
import type { ActionState } from '#app/domain/corrective-action.ts';
import { caseRules } from '#app/domain/permissions.ts';
import type { Actor, Role } from '#app/domain/roles.ts';

export type ActionRow = typeof correctiveActions.$inferSelect;

/**
 * Actions that the actor may read, as a condition on `corrective_actions` joined with `cases`: the SQL form of
 * `action:read`, in which a person without the role sees the actions they own or verify, and no other.
 */
export function actionVisibleTo(actor: Actor): SQL {
  const readers: readonly Role[] = caseRules['action:read'].roles;
  const reading = actor.grants.filter((grant) => readers.includes(grant.role));
  const siteIds = reading.flatMap((grant) => (grant.siteId ? [grant.siteId] : []));
  const ways = [
    eq(correctiveActions.ownerId, actor.userId),
    eq(correctiveActions.verifierId, actor.userId),
    ...(reading.some((grant) => grant.siteId === null) ? [sql`true`] : siteIds.length > 0 ? [inArray(cases.siteId, siteIds)] : []),
  ];
  return and(eq(cases.organisationId, actor.organisationId), or(...ways)) ?? sql`false`;
}

const nameOf = (column: AnyPgColumn) => sql<string | null>`(select ${users.displayName} from ${users} where ${users.id} = ${column})`;

const columns = {
  id: correctiveActions.id,
  caseId: cases.id,
  caseNumber: cases.number,
  caseState: cases.state,
  organisationId: cases.organisationId,
  siteId: cases.siteId,
  siteName: sites.name,
  zone: cases.zone,
  interimControl: cases.interimControl,
  number: correctiveActions.number,
  title: correctiveActions.title,
  why: correctiveActions.why,
  controlLevel: correctiveActions.controlLevel,
  interim: correctiveActions.interim,
  ownerId: correctiveActions.ownerId,
  owner: nameOf(correctiveActions.ownerId),
  verifierId: correctiveActions.verifierId,
  verifier: nameOf(correctiveActions.verifierId),
  dueOn: correctiveActions.dueOn,
  risk: correctiveActions.risk,
  cost: correctiveActions.cost,
  costCurrency: correctiveActions.costCurrency,
  state: correctiveActions.state,
  proof: correctiveActions.proof,
  doneAt: correctiveActions.doneAt,
  doneById: correctiveActions.doneById,
  doneBy: nameOf(correctiveActions.doneById),
  verifiedAt: correctiveActions.verifiedAt,
  verifiedBy: nameOf(correctiveActions.verifiedById),
  verificationNote: correctiveActions.verificationNote,
  effectCheckOn: correctiveActions.effectCheckOn,
  effectNote: correctiveActions.effectNote,
  effectAt: correctiveActions.effectAt,
  effectBy: nameOf(correctiveActions.effectById),
  withdrawnReason: correctiveActions.withdrawnReason,
  version: correctiveActions.version,
  createdAt: correctiveActions.createdAt,
} as const;

function selectActions(db: DbOrTx) {
  return db.select(columns).from(correctiveActions).innerJoin(cases, eq(cases.id, correctiveActions.caseId)).innerJoin(sites, eq(sites.id, cases.siteId));
}
export type ActionRecord = Awaited<ReturnType<typeof selectActions>>[number];

/** Actions that the actor may read, of one case or of all. */
export function listActions(db: DbOrTx, params: { readonly actor: Actor; readonly caseNumber?: number }): Promise<ActionRecord[]> {
  return selectActions(db)
    .where(and(actionVisibleTo(params.actor), params.caseNumber === undefined ? undefined : eq(cases.number, params.caseNumber)))
    .orderBy(asc(correctiveActions.dueOn), asc(cases.number), asc(correctiveActions.number));
}

/** Every action somebody may have to be reminded of, whatever the organisation. For the timer only. */
export function listActionsToRemind(db: DbOrTx): Promise<ActionRecord[]> {
  const states: ActionState[] = ['open', 'in-progress', 'done', 'verified', 'not-effective'];
  return selectActions(db).where(inArray(correctiveActions.state, states)).orderBy(asc(correctiveActions.dueOn));
}

export interface ReturnDay {
  readonly caseId: string;
  readonly onDay: string;
  readonly bestAt: Date;
  readonly fromAt: Date;
  readonly toAt: Date;
  readonly minutes: number;
}

/** Days on which the sun comes back, of cases that the caller has already read in scope; soonest first. */
export function listReturnDays(db: DbOrTx, caseIds: readonly string[]): Promise<ReturnDay[]> {
  if (caseIds.length === 0) return Promise.resolve([]);
  return db
    .select({ caseId: sunReturns.caseId, onDay: sunReturns.onDay, bestAt: sunReturns.bestAt, fromAt: sunReturns.fromAt, toAt: sunReturns.toAt, minutes: sunReturns.minutes })
    .from(sunReturns)
    .where(inArray(sunReturns.caseId, [...caseIds]))
    .orderBy(asc(sunReturns.onDay));
}

export interface ProofView {
  readonly id: string;
  readonly actionId: string;
  readonly fileName: string;
  readonly mime: string;
  readonly bytes: number;
  readonly sha256: string;
  readonly createdAt: Date;
  readonly uploadedBy: string | null;
}

/** Proofs of the actions that the actor may read. */
export function listProofs(db: DbOrTx, params: { readonly actor: Actor; readonly caseNumber: number }): Promise<ProofView[]> {
  return db
    .select({
      id: actionProofs.id,
      actionId: actionProofs.correctiveActionId,
      fileName: actionProofs.fileName,
      mime: actionProofs.mime,
      bytes: actionProofs.bytes,
      sha256: actionProofs.sha256,
      createdAt: actionProofs.createdAt,
      uploadedBy: users.displayName,
    })
    .from(actionProofs)
    .innerJoin(correctiveActions, eq(correctiveActions.id, actionProofs.correctiveActionId))
    .innerJoin(cases, eq(cases.id, correctiveActions.caseId))
    .leftJoin(users, eq(users.id, actionProofs.uploadedById))
    .where(and(actionVisibleTo(params.actor), eq(cases.number, params.caseNumber)))
    .orderBy(asc(actionProofs.createdAt));
}

/** One proof with the place of its bytes, if the actor may read its action. */
export async function getProof(db: DbOrTx, params: { readonly actor: Actor; readonly proofId: string }) {
  const [row] = await db
    .select({
      id: actionProofs.id,
      caseId: cases.id,
      organisationId: cases.organisationId,
      fileName: actionProofs.fileName,
      mime: actionProofs.mime,
      sha256: actionProofs.sha256,
      objectKey: actionProofs.objectKey,
    })
    .from(actionProofs)
    .innerJoin(correctiveActions, eq(correctiveActions.id, actionProofs.correctiveActionId))
    .innerJoin(cases, eq(cases.id, correctiveActions.caseId))
    .where(and(actionVisibleTo(params.actor), eq(actionProofs.id, params.proofId)));
  return row ?? null;
}

export interface ActionHistoryLine {
  readonly actionId: string;
  readonly at: Date;
  readonly actorName: string;
  readonly summary: string;
  readonly reason: string;
}

/** What happened to the given actions, which the caller has already read in scope; newest first. */
export function listActionHistory(db: DbOrTx, actionIds: readonly string[]): Promise<ActionHistoryLine[]> {
  if (actionIds.length === 0) return Promise.resolve([]);
  return db
    .select({ actionId: logEntries.subjectId, at: logEntries.at, actorName: logEntries.actorName, summary: logEntries.summary, reason: logEntries.reason })
    .from(logEntries)
    .where(and(eq(logEntries.subject, 'corrective_actions'), inArray(logEntries.subjectId, [...actionIds])))
    .orderBy(desc(logEntries.sequence));
}

/** Case and action of a visible action, both locked; null when there is none. The case is locked first, as everywhere. */
export async function lockAction(tx: Transaction, actor: Actor, actionId: string) {
  const [found] = await tx
    .select({ caseId: cases.id })
    .from(correctiveActions)
    .innerJoin(cases, eq(cases.id, correctiveActions.caseId))
    .where(and(actionVisibleTo(actor), eq(correctiveActions.id, actionId)));
  if (!found) return null;
  const [caseRow] = await tx.select().from(cases).where(eq(cases.id, found.caseId)).for('update');
  const [action] = await tx.select().from(correctiveActions).where(eq(correctiveActions.id, actionId)).for('update');
  return caseRow && action ? { caseRow, action } : null;
}

/** Case and action of a visible action, without a lock: to refuse early, before files are taken in. */
export async function findAction(db: DbOrTx, actor: Actor, actionId: string) {
  const [row] = await db
    .select({ caseRow: cases, action: correctiveActions })
    .from(correctiveActions)
    .innerJoin(cases, eq(cases.id, correctiveActions.caseId))
    .where(and(actionVisibleTo(actor), eq(correctiveActions.id, actionId)));
  return row ?? null;
}

export async function insertAction(tx: Transaction, values: Omit<typeof correctiveActions.$inferInsert, 'number'>): Promise<{ id: string; number: number }> {
  // The caller holds the lock on the case, so that two people never get the same number.
  const [row] = await tx
    .insert(correctiveActions)
    .values({ ...values, number: sql`(select coalesce(max(${correctiveActions.number}), 0) + 1 from ${correctiveActions} where ${correctiveActions.caseId} = ${values.caseId})` })
    .returning({ id: correctiveActions.id, number: correctiveActions.number });
  if (!row) throw new Error('The action was not written.');
  return row;
}

export type ActionChange = Partial<Omit<typeof correctiveActions.$inferInsert, 'id' | 'caseId' | 'number' | 'version'>>;

/** Writes the change and raises the version. */
export async function updateAction(tx: Transaction, actionId: string, change: ActionChange): Promise<void> {
  await tx
    .update(correctiveActions)
    .set({ ...change, version: sql`${correctiveActions.version} + 1` })
    .where(eq(correctiveActions.id, actionId));
}

/** A file of proof; the same bytes given twice are kept once. */
export async function insertProof(tx: Transaction, values: Omit<typeof actionProofs.$inferInsert, 'id' | 'createdAt'>): Promise<void> {
  await tx.insert(actionProofs).values(values).onConflictDoNothing({ target: [actionProofs.correctiveActionId, actionProofs.sha256] });
}

export async function countProofs(tx: Transaction, actionId: string): Promise<number> {
  const [row] = await tx.select({ stored: count() }).from(actionProofs).where(eq(actionProofs.correctiveActionId, actionId));
  return row?.stored ?? 0;
}
