import { expect, test } from 'vitest';
import { caseStates } from '#app/domain/case-state.ts';
import { actorOf, createAction, createCase, createFinding, createHouse, createHypothesis, createPhoto, createScene, createUser } from '#tests/support/factories.ts';
test('x', async () => {
  const house = await createHouse();
  for (const s of caseStates) { const c = await createCase(s, { site: house.site }); expect(c.state).toBe(s); await createScene({ caseId: c.id }); await createPhoto({caseId: c.id}); await createHypothesis({caseId: c.id}); await createFinding({caseId: c.id, authorId: house.investigator.userId, state: 'signed'}); await createAction({caseId: c.id, ownerId: house.manager.userId, verifierId: house.reviewer.userId, state: 'withdrawn'}); }
  expect((await actorOf(await createUser({organisationId: house.organisation.id, grants: ['manager']}))).grants.length).toBe(1);
});
