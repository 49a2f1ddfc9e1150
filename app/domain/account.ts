import { z } from 'zod';
import { makeTokenSchema, revokeTokenSchema } from './api-token.ts';
import { roles } from './roles.ts';

/** NIST SP 800-63B, 5.1.1.2, asks for eight or more and no rules of composition; we ask for twelve. */
export const shortestPassword = 12;
export const longestPassword = 200;

export const emailField = z
  .string()
  .trim()
  .toLowerCase()
  .max(254, 'This address is too long.')
  .pipe(z.email('Write the whole e-mail address, like name@example.org.'));

export const newPasswordField = z
  .string()
  .min(shortestPassword, `Use at least ${shortestPassword} characters. A few unrelated words are easy to keep in mind.`)
  .max(longestPassword, `Use at most ${longestPassword} characters.`);

export const signInSchema = z.object({
  intent: z.literal('sign-in'),
  email: emailField,
  password: z.string().min(1, 'Type your password.').max(longestPassword, 'No password here is that long.'),
});

export const forgottenSchema = z.object({ intent: z.literal('send-link'), email: emailField });
export const chosenPasswordSchema = z.object({ intent: z.literal('set-password'), password: newPasswordField });

export const accountSchema = z.discriminatedUnion('intent', [
  z.object({ intent: z.literal('change-password'), currentPassword: z.string().min(1, 'Type the password you use now.'), password: newPasswordField }),
  z.object({ intent: z.literal('change-units'), units: z.enum(['metric', 'us']) }),
  z.object({ intent: z.literal('sign-out-everywhere') }),
  makeTokenSchema,
  revokeTokenSchema,
]);

/** A role and where it holds; an empty site stands for every site of the organisation. */
export const grantFields = {
  role: z.enum(roles, 'Choose a role.'),
  siteId: z.union([z.uuid(), z.literal('')], 'Choose a site of your organisation.').default(''),
};

/** People and rights know no sites: whoever could change them for one site could give themselves all the others. */
export const administratorForAllSites = {
  check: ({ role, siteId }: { readonly role: string; readonly siteId: string }) => role !== 'administrator' || siteId === '',
  said: { path: ['siteId'], message: 'An administrator looks after the whole organisation. Choose all sites.' },
};

export const inviteSchema = z
  .object({
    intent: z.literal('invite'),
    displayName: z.string().trim().min(2, 'Write the name of the person.').max(120, 'Use at most 120 characters.'),
    email: emailField,
    ...grantFields,
  })
  .refine(administratorForAllSites.check, administratorForAllSites.said);

/**
 * Where to go after signing in: an address within the product, or null. A browser drops tabs and line breaks from an
 * address and takes a backslash for a slash, so none of these are let through.
 */
export function safeNext(next: string | null): string | null {
  if (!next || !/^\/(?!\/)[^\\\p{Cc}\s]*$/u.test(next)) return null;
  return /^\/sign-(?:in|out)(?:[/?#]|$)/u.test(next) ? null : next;
}
