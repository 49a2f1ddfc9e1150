import { actionSteps } from '#app/domain/corrective-action.ts';
import { actionWords, changeAction, refuseStep, workOnAction } from './work-on-action.server.ts';
import type { ActionTarget } from './work-on-action.server.ts';

/** The owner has begun. */
export function startAction(target: ActionTarget): Promise<void> {
  return workOnAction(target, 'action:do', async (tx, locked) => {
    refuseStep('start', locked.action);
    await changeAction(tx, locked, { state: actionSteps.start.to }, { event: 'action.started', summary: `${actionWords(locked.action)} started.` });
  });
}
