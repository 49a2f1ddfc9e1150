import { createAction, createActor, createCase, createHouse, createReconstruction, createSunReturn } from '#tests/support/factories.ts';
import type { House } from '#tests/support/factories.ts';
import { emptyResult } from '#tests/db/findings/stage.ts';
import { eq } from 'drizzle-orm';
import { db } from '#db/client.server.ts';
import { correctiveActions } from '#db/schema/all.ts';
import { addDays } from '#app/domain/action-form.ts';
import type { ActionDraft } from '#app/domain/action-form.ts';
import type { CaseState } from '#app/domain/case-state.ts';
import { localDay } from '#app/domain/local-time.ts';
import type { Actor } from '#app/domain/roles.ts';
import type { ReconstructionInput } from '#app/physics/model/input.ts';

export const zone = 'Europe/London';
export const today = (): string => localDay(new Date(), zone);
export const inDays = (days: number): string => addDays(today(), days);

const input: ReconstructionInput = {
  place: { latitudeDeg: 53.5, longitudeDeg: -1.6, elevationM: 60, heightAboveGroundM: 10, zone },
  window: { startUtc: '2026-05-09T09:00:00.000Z', endUtc: '2026-05-09T14:10:00.000Z', clockSigmaS: 0 },
  sky: { climateClass: 'temperate-rural' },
  seed: 3,
};

export interface ActionStage {
  readonly house: House;
  readonly caseId: string;
  readonly caseNumber: number;
  /** Two people without any role: what they may do comes from the action alone. */
  readonly owner: Actor;
  readonly verifier: Actor;
}

/** A case in corrective action on whose mark the sun returns on the given days. */
export async function actionStage(returnDays: readonly string[] = [], state: CaseState = 'corrective-action'): Promise<ActionStage> {
  const house = await createHouse();
  const row = await createCase(state, { site: house.site, assignedToId: house.investigator.userId });
  const run = await createReconstruction({ caseId: row.id, number: 1, input, state: 'done', result: emptyResult, attachedAt: new Date('2026-05-12T11:00:00Z') });
  for (const onDay of returnDays) await createSunReturn({ caseId: row.id, reconstructionId: run.id, onDay });
  return { house, caseId: row.id, caseNumber: row.number, owner: await createActor(house.organisation.id), verifier: await createActor(house.organisation.id) };
}

export function actionDraft(stage: ActionStage, values: Partial<ActionDraft> = {}): ActionDraft {
  return {
    title: 'Matt coating on the parapet',
    why: 'A matt face does not focus.',
    controlLevel: 'engineering',
    interim: false,
    ownerId: stage.owner.userId,
    verifierId: stage.verifier.userId,
    dueOn: null,
    risk: 'medium',
    cost: null,
    costCurrency: null,
    ...values,
  };
}

type ActionValues = Omit<Parameters<typeof createAction>[0], 'caseId' | 'ownerId' | 'verifierId'>;

/** An action of the stage as it stands, past every service. */
export async function existingAction(stage: ActionStage, values: ActionValues = {}) {
  return createAction({ caseId: stage.caseId, ownerId: stage.owner.userId, verifierId: stage.verifier.userId, dueOn: inDays(30), ...values });
}

export async function readAction(actionId: string) {
  const [row] = await db.select().from(correctiveActions).where(eq(correctiveActions.id, actionId));
  if (!row) throw new Error('The action is gone.');
  return row;
}

/** The smallest start of a JPEG; what follows does not matter to the type. */
export const jpeg = (name = 'parapet.jpg', rest = 'coated'): File => new File([new Uint8Array([0xff, 0xd8, 0xff, 0xe0]), rest], name, { type: 'image/jpeg' });
