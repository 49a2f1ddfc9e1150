import { describe, expect, test } from 'vitest';
import { accountSchema, chosenPasswordSchema, forgottenSchema, inviteSchema, longestPassword, safeNext, signInSchema } from '#app/domain/account.ts';
import { peopleFormSchema } from '#app/domain/people-form.ts';
import { fieldErrorsOf } from '#app/http/field-errors.ts';

const site = '0b0e7a52-7f0e-4c7e-9a86-2b1f5a0c9d11';
const invitation = { intent: 'invite', displayName: 'Noor Ellery', email: 'noor@tallowmere.example', role: 'reporter', siteId: '' };

describe('where to go after signing in', () => {
  test.each(['/cases', '/cases/118?tab=log#line-4', '/sites/KESTWICK-C', '/report?at=door-7q'])('%s lies within the product and is kept', (next) => {
    expect(safeNext(next)).toBe(next);
  });

  // What a browser makes of an address: WHATWG URL Standard, "basic URL parser" (tabs and line breaks are removed, a backslash counts as a slash).
  test.each(['//elsewhere.example', '/\\elsewhere.example', '\\\\elsewhere.example', '/\t/elsewhere.example', '/\n/elsewhere.example', 'https://elsewhere.example', 'javascript:alert(1)', 'cases', '', ' /cases', '/%5c\\elsewhere.example'])(
    '%j could lead elsewhere and is dropped',
    (next) => {
      expect(safeNext(next)).toBeNull();
    },
  );

  test.each(['/cases', '/cases/118?tab=log#line-4'])('%s, resolved as a browser does, stays on the host', (next) => {
    expect(new URL(safeNext(next) ?? 'https://elsewhere.example', 'https://register.example').host).toBe('register.example');
  });

  test('does not lead back to signing in or out', () => {
    expect(safeNext('/sign-out')).toBeNull();
    expect(safeNext('/sign-in?next=/cases')).toBeNull();
    expect(safeNext(null)).toBeNull();
  });
});

describe('the sign-in form', () => {
  test('takes the address in any case and with blanks around it', () => {
    expect(signInSchema.parse({ intent: 'sign-in', email: ' Noor@Tallowmere.Example ', password: 'x' }).email).toBe('noor@tallowmere.example');
  });

  test('asks for both fields, each beside its own', () => {
    const parsed = signInSchema.safeParse({ intent: 'sign-in', email: 'noor', password: '' });
    expect(parsed.success ? {} : fieldErrorsOf(parsed.error)).toEqual({ email: [expect.stringContaining('name@example.org')], password: [expect.any(String)] });
  });

  test('does not hash a password without end', () => {
    expect(signInSchema.safeParse({ intent: 'sign-in', email: 'noor@tallowmere.example', password: 'x'.repeat(longestPassword + 1) }).success).toBe(false);
  });
});

describe('a new password', () => {
  const takes = (password: string) => chosenPasswordSchema.safeParse({ intent: 'set-password', password }).success;

  test('has twelve characters or more, of any kind', () => {
    expect(takes('elevenchars')).toBe(false);
    expect(takes('twelve chars')).toBe(true);
    expect(takes('ein Brennglas am Fenster')).toBe(true);
  });

  test('is also asked for when the old one is changed', () => {
    const parsed = accountSchema.safeParse({ intent: 'change-password', currentPassword: '', password: 'short' });
    expect(parsed.success ? {} : Object.keys(fieldErrorsOf(parsed.error))).toEqual(['currentPassword', 'password']);
  });
});

test('an address without a domain gets no link', () => {
  expect(forgottenSchema.safeParse({ intent: 'send-link', email: 'noor@' }).success).toBe(false);
});

describe('an invitation', () => {
  test('names a person, an address, a role and, if wanted, one site', () => {
    expect(inviteSchema.parse(invitation)).toEqual(invitation);
    expect(inviteSchema.safeParse({ ...invitation, siteId: site }).success).toBe(true);
  });

  test.each([
    ['displayName', { displayName: ' ' }],
    ['email', { email: 'noor' }],
    ['role', { role: 'owner' }],
    ['role', { role: '' }],
    ['siteId', { siteId: 'roof' }],
  ])('with a wrong %s is refused beside that field', (field, change) => {
    const parsed = inviteSchema.safeParse({ ...invitation, ...change });
    expect(parsed.success ? [] : Object.keys(fieldErrorsOf(parsed.error))).toEqual([field]);
  });

  test('makes nobody administrator of one site, since people and rights know no sites', () => {
    const said = { siteId: [expect.stringContaining('all sites')] };
    const invited = peopleFormSchema.safeParse({ ...invitation, role: 'administrator', siteId: site });
    const added = peopleFormSchema.safeParse({ intent: 'add-role', userId: site, role: 'administrator', siteId: site });
    expect([invited, added].map((parsed) => (parsed.success ? {} : fieldErrorsOf(parsed.error)))).toEqual([said, said]);
    expect(peopleFormSchema.safeParse({ ...invitation, role: 'administrator' }).success).toBe(true);
  });
});

test('switching an account off needs a reason', () => {
  const switchOff = (reason: string) => peopleFormSchema.safeParse({ intent: 'switch-off', userId: site, reason });
  expect(switchOff('  ').success).toBe(false);
  expect(switchOff('Left on 30 June').success).toBe(true);
});
