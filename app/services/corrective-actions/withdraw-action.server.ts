import { actionSteps } from '#app/domain/corrective-action.ts';
import { actionWords, changeAction, refuseStep, workOnAction } from './work-on-action.server.ts';
import type { ActionTarget } from './work-on-action.server.ts';

/** Takes an action off the list for good; its reason stays. */
export function withdrawAction(target: ActionTarget & { readonly reason: string }): Promise<void> {
  return workOnAction(target, 'action:write', async (tx, locked) => {
    refuseStep('withdraw', locked.action);
    await changeAction(
      tx,
      locked,
      { state: actionSteps.withdraw.to, withdrawnReason: target.reason },
      { event: 'action.withdrawn', summary: `${actionWords(locked.action)} withdrawn.`, reason: target.reason },
    );
  });
}
