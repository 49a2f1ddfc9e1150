import { describe, expect, test } from 'vitest';
import { actionFilterHref, passesFilter, readActionFilter, readChosen } from '#app/domain/action-filter.ts';
import { actionFormSchema, addDays, daysFrom, defaultDueOn, effectSchema, reasonSchema, returnStillToCome } from '#app/domain/action-form.ts';
import { actionsHeading, compareActions, dueDayMeaning, groupOf, inView, isCheckDue } from '#app/domain/action-list.ts';
import type { ListedAction } from '#app/domain/action-list.ts';
import { actionLine, actionRights, returnSpans } from '#app/domain/action-view.ts';
import type { ActionSource } from '#app/domain/action-view.ts';
import { actionStates, actionSteps, effectivenessCheckOn, stepAllowed } from '#app/domain/corrective-action.ts';
import { fieldErrorsOf } from '#app/http/field-errors.ts';
import type { Actor } from '#app/domain/roles.ts';

const listed = (values: Partial<ListedAction> = {}): ListedAction => ({ state: 'open', dueOn: '2026-07-24', risk: 'medium', ownerId: 'owner', verifierId: 'verifier', effectCheckOn: null, today: '2026-07-15', nextReturnOn: '2026-08-03', ...values });

describe('the steps of an action', () => {
  test('lead only along open, in progress, done, verified, effective; everything else is refused', () => {
    const ways = Object.entries(actionSteps).flatMap(([step, { to }]) => actionStates.filter((state) => stepAllowed(step as keyof typeof actionSteps, state)).map((from) => `${from} > ${to}`));
    expect(ways.sort()).toEqual(
      [
        'open > in-progress', 'open > done', 'in-progress > done', 'done > verified', 'done > in-progress', 'verified > effective', 'verified > not-effective', 'effective > not-effective',
        'open > withdrawn', 'in-progress > withdrawn', 'done > withdrawn', 'verified > withdrawn', 'not-effective > withdrawn',
      ].sort(),
    );
  });
});

describe('the effectiveness check', () => {
  test('stands on the first day of return on or after the day of verification', () => {
    const days = ['2027-03-22', '2026-09-20', '2026-09-21'];
    expect(effectivenessCheckOn('2026-08-01', days)).toBe('2026-09-20');
    expect(effectivenessCheckOn('2026-09-20', days)).toBe('2026-09-20');
    expect(effectivenessCheckOn('2026-09-22', days)).toBe('2027-03-22');
    expect(effectivenessCheckOn('2027-03-23', days)).toBeNull();
    expect(effectivenessCheckOn('2026-08-01', [])).toBeNull();
  });

  test('is too early while that day is still to come', () => {
    const check = (today: string, verifiedOn = '2026-08-01') => returnStillToCome({ today, verifiedOn, returnDays: ['2026-07-30', '2026-09-20'] });
    expect(check('2026-09-19')).toBe('2026-09-20');
    expect(check('2026-09-20')).toBeNull();
    expect(check('2026-12-01')).toBeNull();
    expect(check('2026-09-19', '2026-07-30')).toBeNull();
    expect(returnStillToCome({ today: '2026-09-19', verifiedOn: '2026-08-01', returnDays: [] })).toBeNull();
  });
});

describe('days', () => {
  test.each([['severe', '2026-07-16'], ['high', '2026-07-22'], ['medium', '2026-08-14'], ['low', '2026-10-13']] as const)('%s falls due on %s when given on 15 July 2026', (risk, day) => {
    expect(defaultDueOn('2026-07-15', risk)).toBe(day);
  });

  test('are counted over leap days and the turn of the year', () => {
    expect(addDays('2028-02-28', 1)).toBe('2028-02-29');
    expect(addDays('2026-12-31', 1)).toBe('2027-01-01');
    expect(daysFrom('2026-07-15', '2026-08-03')).toBe(19);
    expect(daysFrom('2026-07-15', '2026-07-03')).toBe(-12);
  });

  test('in a row are one stretch of return', () => {
    expect(returnSpans(['2026-08-04', '2026-08-03', '2026-08-05', '2027-05-09'])).toEqual([{ firstOn: '2026-08-03', lastOn: '2026-08-05' }, { firstOn: '2027-05-09', lastOn: '2027-05-09' }]);
    expect(returnSpans([])).toEqual([]);
  });
});

describe('the forms', () => {
  const one = '11111111-1111-4111-8111-111111111111';
  const two = '22222222-2222-4222-8222-222222222222';
  const fields = { title: 'Matt coating', controlLevel: 'engineering', ownerId: one, verifierId: two, dueOn: '', risk: 'medium', cost: '', costCurrency: '' };

  test('take what a browser sends, where an unticked box is not sent at all', () => {
    expect(actionFormSchema.parse(fields)).toEqual({ title: 'Matt coating', why: '', controlLevel: 'engineering', interim: false, ownerId: one, verifierId: two, dueOn: null, risk: 'medium', cost: null, costCurrency: null });
    expect(actionFormSchema.parse({ ...fields, interim: 'on', dueOn: '2026-07-24', cost: '4200', costCurrency: 'gbp' })).toMatchObject({ interim: true, dueOn: '2026-07-24', cost: 4200, costCurrency: 'GBP' });
  });

  test.each([
    [{ verifierId: one }, 'verifierId', 'nobody verifies their own fix'],
    [{ title: ' ' }, 'title', 'what is to be done'],
    [{ dueOn: '24.7.2026' }, 'dueOn', 'year, month and day'],
    [{ dueOn: '2026-02-30' }, 'dueOn', 'year, month and day'],
    [{ cost: '4,200.50' }, 'cost', 'digits only'],
    [{ cost: '4200' }, 'costCurrency', 'currency of the cost'],
    [{ cost: '4200', costCurrency: 'pounds' }, 'costCurrency', 'three letters'],
    [{ ownerId: '' }, 'ownerId', 'Choose a person'],
  ])('%o is refused beside %s', (change, field, sentence) => {
    const refused = actionFormSchema.safeParse({ ...fields, ...change });
    expect(refused.error ? fieldErrorsOf(refused.error)[field]?.join(' ') : '').toContain(sentence);
  });

  test('a reason is more than a mark', () => {
    expect(reasonSchema.safeParse('...').success).toBe(false);
    expect(reasonSchema.safeParse(' Scaffold late ').data).toBe('Scaffold late');
  });

  test('a check says one or the other, and what was seen', () => {
    expect(effectSchema.safeParse({ effective: 'maybe', note: 'Seen.' }).success).toBe(false);
    expect(effectSchema.safeParse({ effective: 'effective', note: '' }).success).toBe(false);
    expect(effectSchema.parse({ effective: 'not-effective', note: 'Lit at noon.' })).toMatchObject({ reason: '' });
  });
});

describe('the list', () => {
  test.each([
    [{}, 'after-fix'],
    [{ dueOn: '2026-07-14' }, 'before-fix'],
    [{ dueOn: '2026-07-15' }, 'after-fix'],
    [{ dueOn: '2026-08-02' }, 'after-fix'],
    [{ dueOn: '2026-08-03' }, 'before-fix'],
    [{ nextReturnOn: null }, 'no-return'],
    [{ state: 'done' }, 'in-place'],
    [{ state: 'verified', dueOn: '2026-07-01' }, 'in-place'],
    [{ state: 'not-effective' }, 'before-fix'],
    [{ state: 'effective' }, 'finished'],
    [{ state: 'withdrawn' }, 'finished'],
  ] as const)('puts %o under %s', (values, group) => {
    expect(groupOf(listed(values))).toBe(group);
  });

  test('is ordered by return, then due day, then the higher risk', () => {
    const order = [listed({ nextReturnOn: null }), listed({ risk: 'low' }), listed({ risk: 'severe' }), listed({ dueOn: '2026-07-20' }), listed({ nextReturnOn: '2026-07-30', dueOn: '2026-12-01' })].sort(compareActions);
    expect(order.map((action) => [action.nextReturnOn, action.dueOn, action.risk])).toEqual([
      ['2026-07-30', '2026-12-01', 'medium'],
      ['2026-08-03', '2026-07-20', 'medium'],
      ['2026-08-03', '2026-07-24', 'severe'],
      ['2026-08-03', '2026-07-24', 'low'],
      [null, '2026-07-24', 'medium'],
    ]);
  });

  test('says in its heading what comes back before it is mended, and what is late', () => {
    expect(actionsHeading([listed({ dueOn: '2026-08-28' }), listed({ dueOn: '2026-07-03' }), listed()])).toBe('One fix is due after the sun is back, one is late');
    expect(actionsHeading([listed()])).toBe('Every fix is due before the sun is back');
    expect(actionsHeading([listed({ state: 'effective' })])).toBe('No fix is waiting to be made');
    expect(actionsHeading([listed({ state: 'not-effective' })])).toBe('One did not work');
  });

  test('knows what is mine, to verify, and due to be checked', () => {
    expect(inView(listed(), 'mine', 'verifier')).toBe(true);
    expect(inView(listed({ state: 'effective' }), 'mine', 'owner')).toBe(false);
    expect(inView(listed({ state: 'done' }), 'to-verify', 'anybody')).toBe(true);
    expect(isCheckDue(listed({ state: 'verified', effectCheckOn: '2026-07-15' }))).toBe(true);
    expect(isCheckDue(listed({ state: 'verified', effectCheckOn: '2026-07-16' }))).toBe(false);
  });

  test('says before a re-date whether the sun is back first', () => {
    expect(dueDayMeaning('2026-08-28', '2026-07-15', '2026-08-03')).toEqual({ sunFirst: true, days: 25 });
    expect(dueDayMeaning('2026-08-01', '2026-07-15', '2026-08-03')).toEqual({ sunFirst: false, days: 2 });
    expect(dueDayMeaning('2026-08-01', '2026-07-15', null)).toBeNull();
  });
});

describe('the address of the list', () => {
  test('keeps the filter, and forgives what it cannot read', () => {
    const filter = readActionFilter(new URLSearchParams('view=late&risk=high&state=nonsense&site=Block%20C'));
    expect(filter).toEqual({ view: 'late', risk: 'high', state: null, site: 'Block C' });
    expect(actionFilterHref(filter)).toBe('/actions?view=late&risk=high&site=Block+C');
    expect(actionFilterHref(filter, { view: 'open', risk: null, site: null })).toBe('/actions');
    expect(readActionFilter(new URLSearchParams('view=everything'))).toEqual({ view: 'open', risk: null, state: null, site: null });
  });

  test('chosen rows come with the version that was seen; anything else is dropped', () => {
    expect(readChosen(['11111111-1111-4111-8111-111111111111:3', 'x', '11111111-1111-4111-8111-111111111111', null])).toEqual([{ actionId: '11111111-1111-4111-8111-111111111111', version: 3 }]);
  });
});

describe('one action', () => {
  const source: ActionSource = {
    id: 'a', caseNumber: 122, caseState: 'corrective-action', organisationId: 'o', siteId: 's', siteName: 'Block C', zone: 'Europe/London', interimControl: null, number: 1, title: 'Matt coating', why: '',
    controlLevel: 'engineering', interim: false, ownerId: 'owner', owner: 'Ada', verifierId: 'verifier', verifier: 'Bo', dueOn: '2026-07-03', risk: 'medium', cost: null, costCurrency: null, state: 'open', proof: '',
    doneAt: null, doneById: null, doneBy: null, verifiedAt: null, verifiedBy: null, verificationNote: '', effectCheckOn: null, effectNote: '', effectAt: null, effectBy: null, withdrawnReason: null, version: 1,
  };
  const actor = (userId: string, ...roles: ('manager' | 'reviewer')[]): Actor => ({ userId, organisationId: 'o', displayName: 'A', email: 'a@example.test', units: 'metric', grants: roles.map((role) => ({ role, siteId: null })) });

  test('is shown by a named state even where the view would hide it', () => {
    const line = actionLine({ ...source, state: 'withdrawn' }, [], new Date('2026-07-15T08:42:00Z'));
    const at = (address: string) => passesFilter(line, readActionFilter(new URLSearchParams(address)), 'owner');
    expect([at(''), at('view=all'), at('state=withdrawn'), at('state=open'), at('view=mine&state=withdrawn'), at('view=all&risk=high'), at('view=all&site=Block C')]).toEqual([false, true, true, false, false, false, true]);
  });

  test('says how late it is and when the sun is back, in the clock of the place', () => {
    const line = actionLine(source, [{ onDay: '2026-08-03', bestAt: new Date('2026-08-03T12:30:00Z') }], new Date('2026-07-15T08:42:00Z'));
    expect(line).toMatchObject({ dueNote: '12 days late', returnWords: '3 Aug 2026, 13:30', returnNote: 'in 19 days', nextReturnOn: '2026-08-03' });
  });

  test('lets the owner do it, the verifier verify it, and neither the other', () => {
    const done = { ...source, state: 'done' as const, doneById: 'owner' };
    expect(actionRights(actor('owner'), source)).toMatchObject({ start: true, markDone: true, verify: false, change: false, withdraw: false });
    expect(actionRights(actor('owner', 'manager'), done)).toMatchObject({ verify: false, sendBack: false });
    expect(actionRights(actor('verifier'), done)).toMatchObject({ verify: true, sendBack: true, markDone: false });
    expect(actionRights(actor('verifier'), source)).toMatchObject({ start: false, markDone: false });
  });

  test('does not let whoever marked it done verify it', () => {
    expect(actionRights(actor('m', 'manager'), { ...source, state: 'done', doneById: 'm' })).toMatchObject({ verify: false, sendBack: true });
  });
});
