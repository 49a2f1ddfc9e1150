import type { CaseSubject, Relation } from './permissions.ts';

/**
 * What permissions need to know when one action is acted on: the case it belongs to, and the person's relations to this
 * action alone. Owning another action of the same case gives no right to this one.
 */
export function actionSubject(
  ofCase: Pick<CaseSubject, 'organisationId' | 'siteId' | 'state'>,
  action: { readonly ownerId: string; readonly verifierId: string },
  userId: string,
): CaseSubject {
  const relations: Relation[] = [];
  if (action.ownerId === userId) relations.push('owner-of-action');
  if (action.verifierId === userId) relations.push('verifier-of-action');
  return { organisationId: ofCase.organisationId, siteId: ofCase.siteId, state: ofCase.state, relations };
}
