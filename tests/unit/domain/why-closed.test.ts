import { expect, test } from 'vitest';
import type { CaseSubject } from '#app/domain/permissions.ts';
import type { Actor, Role } from '#app/domain/roles.ts';
import { whyClosed } from '#app/domain/why-closed.ts';

const actor = (role: Role): Actor => ({ userId: 'u', organisationId: 'o', displayName: 'Somebody', email: 's@example.test', units: 'metric', grants: [{ role, siteId: null }] });
const subject = (state: CaseSubject['state']): CaseSubject => ({ organisationId: 'o', siteId: 's', state, relations: [] });

test('whoever would have the role is told of the state, and when it is open', () => {
  expect(whyClosed(actor('investigator'), 'case:edit-facts', subject('findings'))).toBe('Not while the case is in the state “findings”; in triage, investigation or corrective action it is open to you.');
});

test('whoever has not is told who may', () => {
  expect(whyClosed(actor('reporter'), 'case:edit-facts', subject('findings'))).toBe('Open to an investigator.');
  expect(whyClosed(actor('reporter'), 'case:edit-facts', subject('triage'))).toBe('Open to an investigator.');
});
